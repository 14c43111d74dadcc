/** What a key asks of the workbench. */
export type KeyCommand =
  | 'toggle'
  | 'step-forward'
  | 'step-back'
  | 'play'
  | 'reverse'
  | 'to-start'
  | 'to-end'
  | 'slower'
  | 'faster'
  | 'next-event'
  | 'previous-event'
  | 'go-to-event'
  | 'clear'
  | 'open'
  | 'theme'
  | 'help';

const PLAIN: Readonly<Record<string, KeyCommand>> = {
  ' ': 'toggle',
  ArrowRight: 'step-forward',
  ArrowLeft: 'step-back',
  ArrowDown: 'next-event',
  ArrowUp: 'previous-event',
  Home: 'to-start',
  End: 'to-end',
  '[': 'slower',
  ']': 'faster',
  n: 'next-event',
  p: 'previous-event',
  g: 'go-to-event',
  o: 'open',
  t: 'theme',
  '?': 'help',
  Escape: 'clear',
};
const SHIFTED: Readonly<Record<string, KeyCommand>> = { ArrowRight: 'play', ArrowLeft: 'reverse' };

/** The parts of a keyboard event that decide what it means. */
export interface KeyPress {
  readonly key: string;
  readonly shiftKey: boolean;
  readonly ctrlKey: boolean;
  readonly altKey: boolean;
  readonly metaKey: boolean;
}

/**
 * What a key press means, null for nothing of ours.
 *
 * @param target Element that has the focus: a field keeps its own keys, a button its space and a list of choices its arrows.
 */
export function keyCommand(press: KeyPress, target: { readonly tagName: string } | null): KeyCommand | null {
  if (press.ctrlKey || press.altKey || press.metaKey) return null;
  const tag = target?.tagName ?? '';
  if (tag === 'INPUT' || tag === 'TEXTAREA') return null;
  if (tag === 'SELECT' && press.key !== 'Escape') return null;
  if ((tag === 'BUTTON' || tag === 'A') && press.key === ' ') return null;
  if (press.shiftKey && SHIFTED[press.key]) return SHIFTED[press.key];
  // Where a layout needs Shift for ? or [ the key arrives as the character itself.
  if (press.shiftKey && press.key.length > 1) return null;
  return PLAIN[press.key] ?? null;
}
