import { css } from 'lit';

/**
 * Panels, tables and controls as every view sets them: title left, its one-line state right, an ink rule beneath;
 * controls are words. Sizes come as custom properties from the page.
 */
export const panelStyles = css`
  :host {
    display: block;
    color: var(--ink);
    font-size: var(--text);
    line-height: var(--row);
  }
  :host([hidden]) {
    display: none;
  }
  header {
    display: flex;
    align-items: baseline;
    gap: 4px 16px;
    border-bottom: 1px solid var(--ink);
    padding-bottom: 4px;
    line-height: 18px;
  }
  h2 {
    font-size: var(--title);
    font-weight: 600;
    margin: 0;
    white-space: nowrap;
  }
  .state {
    margin-left: auto;
    color: var(--second);
    font-size: var(--axis);
    text-align: right;
  }
`;

export const controlStyles = css`
  button,
  select,
  input {
    font: inherit;
    color: inherit;
    background: none;
    border: 0;
    border-radius: 0;
    margin: 0;
    padding: 0;
  }
  button,
  select {
    cursor: pointer;
  }
  select {
    appearance: none;
    field-sizing: content;
    padding-right: 13px;
  }
  select option {
    color: var(--ink);
    background: var(--ground);
  }
  .choice {
    position: relative;
    display: inline-block;
    white-space: nowrap;
  }
  .choice::after {
    content: '';
    position: absolute;
    right: 1px;
    top: 50%;
    margin-top: -2px;
    border: 3.5px solid transparent;
    border-top: 4px solid currentColor;
    border-bottom: 0;
    pointer-events: none;
  }
  button:hover,
  select:hover {
    text-decoration: underline;
    text-decoration-thickness: 1px;
    text-underline-offset: 3px;
  }
  button:disabled {
    color: var(--faint);
    cursor: default;
    text-decoration: none;
  }
  input[type='text'],
  input[type='number'] {
    border-bottom: 1px solid var(--hairline);
  }
  :focus-visible {
    outline: 2px solid var(--ink);
    outline-offset: 2px;
  }
  .unseen {
    position: absolute;
    width: 1px;
    height: 1px;
    overflow: hidden;
    clip-path: inset(50%);
    white-space: nowrap;
  }
`;

/** Text in drawings: sans upright, symbols in the serif's italic. */
export const drawingStyles = css`
  svg {
    display: block;
    overflow: visible;
  }
  text {
    font-family: 'Source Sans 3', sans-serif;
    font-size: var(--axis);
    fill: var(--second);
  }
  .symbol {
    font-family: 'Source Serif 4', serif;
    font-style: italic;
  }
`;
