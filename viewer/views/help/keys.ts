/** What a key does, as the help lists it. */
export interface KeyLine {
  readonly keys: readonly string[];
  readonly does: string;
}

/** Every key of the workbench, in groups; those of the ball are the ball's own. */
export const KEY_GROUPS: readonly { readonly name: string; readonly lines: readonly KeyLine[] }[] = [
  {
    name: 'Clock',
    lines: [
      { keys: ['Space'], does: 'play or pause' },
      { keys: ['→'], does: 'step forward' },
      { keys: ['←'], does: 'step back' },
      { keys: ['Shift →'], does: 'play' },
      { keys: ['Shift ←'], does: 'play in reverse' },
      { keys: ['Home'], does: 'to the hard process' },
      { keys: ['End'], does: 'to the cutoff' },
      { keys: ['[', ']'], does: 'slower, faster' },
    ],
  },
  {
    name: 'Events',
    lines: [
      { keys: ['n', '↓'], does: 'next event' },
      { keys: ['p', '↑'], does: 'previous event' },
      { keys: ['g'], does: 'go to an event by number' },
    ],
  },
  {
    name: 'Ball, while it has the focus',
    lines: [
      { keys: ['←', '→', '↑', '↓'], does: 'turn it' },
      { keys: ['+', '−'], does: 'closer, further away' },
      { keys: ['0'], does: 'back to the first view' },
    ],
  },
  {
    name: 'Selection and files',
    lines: [
      { keys: ['Esc'], does: 'clear the selection' },
      { keys: ['o'], does: 'open a file' },
      { keys: ['t'], does: 'light or dark' },
      { keys: ['?'], does: 'this list' },
      { keys: ['Tab'], does: 'to the next control' },
    ],
  },
];
