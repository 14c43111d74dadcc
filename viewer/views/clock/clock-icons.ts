import { type SVGTemplateResult, svg } from 'lit';

// Each in a box of 14 by 12.
const BAR_LEFT = 'M1 1h2v10h-2z';
const BAR_RIGHT = 'M11 1h2v10h-2z';

const PATHS = {
  start: `${BAR_LEFT}M8 1v10l-5-5zM13 1v10l-5-5z`,
  back: `M3 1h2v10h-2zM11 1v10l-6-5z`,
  reverse: 'M11 1v10l-8-5z',
  play: 'M3 1v10l8-5z',
  pause: 'M3 1h3v10h-3zM8 1h3v10h-3z',
  forward: 'M3 1v10l6-5zM9 1h2v10h-2z',
  end: `${BAR_RIGHT}M1 1v10l5-5zM6 1v10l5-5z`,
} as const;

export type ClockIcon = keyof typeof PATHS;

/** Sign of a transport button; it always stands beside its word. */
export const clockIcon = (icon: ClockIcon): SVGTemplateResult =>
  svg`<svg class="icon" viewBox="0 0 14 12" width="14" height="12" aria-hidden="true"><path d=${PATHS[icon]} /></svg>`;

// From the head of the mark at (0, 0) down to its foot at (0, height).
const heads = {
  q_qg: (foot: number) => svg`<path class="stem" d="M0 0V${foot}" /><circle class="head" r="2.6" />`,
  g_gg: (foot: number) => svg`<path class="stem" d="M-4 0H4M0 0V${foot}" />`,
  g_qq: (foot: number) => svg`<path class="stem" d="M-4 -2L0 4.5L4 -2M0 4.5V${foot}" />`,
} as const;

/** Mark of a step by its kernel: pin, T, fork; a plain line for kernels that are not ours. */
export function stepMark(channel: string, foot: number): SVGTemplateResult {
  const draw = (heads as Record<string, (foot: number) => SVGTemplateResult>)[channel];
  return draw ? draw(foot) : svg`<path class="stem" d="M0 0V${foot}" />`;
}
