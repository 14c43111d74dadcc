import { css, html, type TemplateResult } from 'lit';
import { parseNotation, type Run } from './notation.ts';

const inner = (run: Run): TemplateResult | string => (run.symbol ? html`<i>${run.text}</i>` : run.text);

/** A mathematical text (see `parseNotation`) as HTML; its component needs `notationStyles`. */
export function notation(source: string): (TemplateResult | string)[] {
  return parseNotation(source).map((run) => {
    if (run.height === 'lowered') return html`<sub>${inner(run)}</sub>`;
    if (run.height === 'raised') return html`<sup>${inner(run)}</sup>`;
    return inner(run);
  });
}

/** Serif italic for symbols, indices smaller and off the line without stretching it. */
export const notationStyles = css`
  i {
    font-family: 'Source Serif 4', serif;
    font-style: italic;
    font-size: 1.04em;
  }
  sub,
  sup {
    font-size: 0.74em;
    line-height: 0;
    position: relative;
    vertical-align: baseline;
  }
  sub {
    top: 0.297em;
  }
  sup {
    top: -0.486em;
  }
`;
