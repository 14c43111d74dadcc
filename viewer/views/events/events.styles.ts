import { css } from 'lit';

export const eventsStyles = css`
  :host {
    display: flex;
    flex-direction: column;
    min-height: 0;
    --columns: 3.6em 2.8em minmax(0, 1fr) 5.8em;
  }
  .order {
    display: flex;
    align-items: baseline;
    gap: 10px;
    padding: 7px 0 5px;
    font-size: var(--axis);
    line-height: 18px;
    color: var(--second);
  }
  .order select,
  .order button {
    color: var(--ink);
  }
  .order button {
    margin-left: auto;
  }
  .heads,
  .row {
    display: grid;
    grid-template-columns: var(--columns);
    column-gap: 10px;
    align-items: baseline;
    text-align: right;
    white-space: nowrap;
  }
  .heads {
    color: var(--second);
    font-size: var(--axis);
    border-bottom: 1px solid var(--rule);
    line-height: 20px;
    padding: 0 8px;
    margin: 0 -8px;
  }
  .heads .along {
    text-align: left;
  }
  .box {
    flex: 1;
    min-height: 0;
    overflow-y: auto;
    position: relative;
    margin: 0 -8px;
    scrollbar-width: thin;
    scrollbar-color: var(--hairline) transparent;
  }
  .box:focus-visible {
    outline-offset: -2px;
  }
  .content {
    position: relative;
  }
  .rows {
    position: absolute;
    left: 0;
    right: 0;
    top: 0;
  }
  .row {
    height: 21px;
    line-height: 21px;
    padding: 0 8px;
    cursor: pointer;
    box-sizing: border-box;
  }
  .row .steps {
    color: var(--second);
  }
  .row svg {
    align-self: center;
    overflow: hidden;
  }
  .row path {
    stroke: var(--ink);
    stroke-width: 1.1;
  }
  .row .ground {
    stroke: var(--rule);
  }
  .row:hover:not([aria-selected='true']) {
    box-shadow: inset 0 0 0 1px var(--rule);
  }
  .row[aria-selected='true'] {
    background: var(--row-wash);
    box-shadow: inset 2.4px 0 0 var(--ink);
    font-weight: 600;
  }
  .trouble {
    color: var(--finding);
    padding: 6px 0;
  }
`;
