import { css } from 'lit';

export const clockStyles = css`
  :host {
    container: clock / inline-size;
    user-select: none;
  }
  header {
    flex-wrap: wrap;
  }
  .transport {
    display: flex;
    flex-wrap: wrap;
    gap: 0 12px;
    margin-left: 10px;
  }
  .transport button {
    display: inline-flex;
    align-items: baseline;
    gap: 4px;
    font-size: var(--axis);
  }
  .icon {
    fill: var(--ink);
    flex: none;
    align-self: center;
  }
  .speed {
    font-size: var(--axis);
    color: var(--second);
    white-space: nowrap;
  }
  .key {
    display: none;
    gap: 14px;
    font-size: var(--axis);
    color: var(--second);
    white-space: nowrap;
  }
  .key b {
    font-weight: 400;
  }
  .key span {
    display: inline-flex;
    align-items: baseline;
    gap: 5px;
  }
  .now {
    color: var(--ink);
    white-space: nowrap;
  }
  .plot {
    position: relative;
    touch-action: none;
    cursor: pointer;
  }
  .stem {
    fill: none;
    stroke: var(--ink);
    stroke-width: 1.5;
  }
  .head {
    fill: var(--ink);
  }
  .key svg {
    align-self: center;
  }
  .key .stem,
  .key .head {
    stroke-width: 1.3;
  }
  .mark text {
    text-anchor: middle;
    fill: var(--ink);
  }
  .mark.future .stem {
    stroke: var(--hairline);
  }
  .mark.future .head {
    fill: var(--hairline);
  }
  .mark.future text {
    fill: var(--faint);
  }
  .mark[data-selected] text {
    font-weight: 600;
    fill: var(--ink);
  }
  .mark[data-selected] .stem,
  .mark[data-selected] .head {
    stroke-width: 2.4;
    stroke: var(--ink);
  }
  .chosen {
    fill: var(--row-wash);
  }
  .pointed {
    fill: none;
    stroke: var(--hairline);
  }
  .bar {
    fill: var(--ground);
    stroke: var(--hairline);
  }
  .past {
    fill: var(--lit);
  }
  .cut {
    stroke: var(--hairline);
  }
  .axis {
    stroke: var(--ink);
    fill: none;
  }
  .minor {
    stroke: var(--hairline);
  }
  .now-line {
    stroke: var(--ink);
    stroke-width: 1.7;
  }
  .now-end {
    fill: var(--ink);
  }
  @container clock (min-width: 880px) {
    .key {
      display: flex;
    }
  }
  @container clock (max-width: 620px) {
    .middle {
      display: none;
    }
    .transport {
      order: 3;
      width: 100%;
      justify-content: space-between;
      margin-left: 0;
    }
  }
`;
