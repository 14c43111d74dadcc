import { type SVGTemplateResult, svg } from 'lit';
import { parseNotation } from './notation.ts';

const SMALL = 0.74;
const SHIFT = { line: 0, lowered: 0.22, raised: -0.36 } as const;

/**
 * A mathematical text (see `parseNotation`) as the content of an SVG text element.
 *
 * @param size Font size of the line [px]; indices follow at 0.74 of it.
 */
export function notationSpans(source: string, size: number): SVGTemplateResult[] {
  let at = 0;
  return parseNotation(source).map((run) => {
    const target = SHIFT[run.height] * size;
    const dy = target - at;
    at = target;
    const small = run.height === 'line' ? 1 : SMALL;
    const face = run.symbol ? 'symbol' : 'upright';
    return svg`<tspan class=${face} dy=${dy} font-size=${size * small * (run.symbol ? 1.04 : 1)}>${run.text}</tspan>`;
  });
}
