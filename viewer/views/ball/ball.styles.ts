import { css } from 'lit';

/** The plate fills its box; words that fold the keys stand in the lower corners. */
export const ballStyles = css`
  :host {
    display: block;
    position: relative;
    overflow: hidden;
    color: var(--ink);
    background: var(--ground);
    font-size: var(--axis, 12px);
  }
  :host([hidden]) {
    display: none;
  }
  .plate {
    position: absolute;
    inset: 0;
    outline-offset: -2px;
    cursor: grab;
    touch-action: none;
    user-select: none;
    -webkit-user-select: none;
  }
  .plate:focus-visible,
  button:focus-visible {
    outline: 2px solid var(--ink);
  }
  .plate[data-dragging] {
    cursor: grabbing;
  }
  .plate[data-over] {
    cursor: pointer;
  }
  canvas,
  svg {
    position: absolute;
    inset: 0;
    width: 100%;
    height: 100%;
    display: block;
  }
  svg {
    pointer-events: none;
    font-variant-numeric: tabular-nums lining-nums;
  }
  [hidden] {
    display: none;
  }
  button {
    all: unset;
    position: absolute;
    bottom: 0;
    padding: 2px 0;
    cursor: pointer;
    color: var(--second);
    font-size: 12px;
    line-height: 16px;
    background: var(--ground);
  }
  button:hover {
    color: var(--ink);
    text-decoration: underline;
    text-underline-offset: 3px;
  }
  .key-left {
    left: 0;
  }
  .key-right {
    right: 0;
  }
  .readout {
    position: absolute;
    left: 0;
    top: 0;
    max-width: 240px;
    padding: 3px 8px 4px;
    background: var(--lit);
    border: 1px solid var(--ink);
    line-height: 1.36;
    white-space: nowrap;
    pointer-events: none;
    font-variant-numeric: tabular-nums lining-nums;
  }
  .readout b {
    font-weight: 600;
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
