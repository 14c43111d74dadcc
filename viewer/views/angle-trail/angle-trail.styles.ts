import { css } from 'lit';

export const angleTrailStyles = css`
  :host {
    display: flex;
    flex-direction: column;
    min-height: 0;
    container: trail / size;
  }
  .key {
    display: flex;
    flex-wrap: wrap;
    justify-content: flex-end;
    gap: 0 14px;
    margin-left: auto;
    font-size: var(--axis);
    color: var(--second);
    white-space: nowrap;
  }
  .key b {
    font-weight: 400;
  }
  .key span {
    display: inline-flex;
    align-items: center;
    gap: 5px;
  }
  .choices {
    display: flex;
    gap: 18px;
    padding-top: 4px;
    font-size: var(--axis);
    line-height: 16px;
    color: var(--second);
  }
  .choices label:first-of-type {
    margin-left: auto;
  }
  .choices select {
    color: var(--ink);
    max-width: 15em;
    text-overflow: ellipsis;
  }
  .plot {
    flex: 1;
    min-height: 0;
    position: relative;
    overflow: hidden;
  }
  .plot svg {
    position: absolute;
    inset: 0;
    overflow: visible;
  }
  .hit {
    cursor: pointer;
    fill: transparent;
  }
  .grid {
    stroke: var(--rule);
  }
  .axis {
    stroke: var(--ink);
  }
  .ring {
    fill: var(--ground);
    stroke: var(--gluon);
    stroke-width: 1.9;
  }
  .core,
  .triangle {
    fill: var(--quark);
  }
  .other {
    fill: var(--ground);
    stroke: var(--ink);
    stroke-width: 1.5;
  }
  .stem,
  .partner,
  .birth {
    stroke: var(--ink);
    fill: none;
  }
  .stem {
    stroke-width: 1;
  }
  .partner,
  .birth {
    stroke-width: 1.7;
  }
  .partner {
    stroke-dasharray: 4 2;
  }
  .birth {
    stroke-dasharray: 6 2 1.4 2;
  }
  .under {
    stroke: var(--ground);
    stroke-width: 3.4;
  }
  .column.future {
    opacity: 0.36;
  }
  .column.aside {
    opacity: 0.14;
  }
  .thread {
    fill: none;
    stroke: var(--hairline);
  }
  .chosen {
    fill: var(--row-wash);
  }
  .chosen-bar {
    stroke: var(--ink);
    stroke-width: 2.4;
  }
  .pointed {
    fill: none;
    stroke: var(--hairline);
  }
  .chosen-number {
    font-weight: 600;
    fill: var(--ink);
  }
  .now-line {
    stroke: var(--ink);
    stroke-width: 1.5;
  }
  footer {
    font-size: var(--axis);
    line-height: 16px;
    color: var(--second);
    padding-top: 2px;
    white-space: nowrap;
    overflow: hidden;
    text-overflow: ellipsis;
  }
  @container trail (max-width: 430px) {
    .key {
      gap: 0 8px;
    }
    .key .sample {
      width: 14px;
      overflow: hidden;
    }
    .choices .what {
      display: none;
    }
    .choices label:first-of-type {
      margin-left: 0;
    }
  }
`;
