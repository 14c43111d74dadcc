import { css } from 'lit';

export const cardStyles = css`
  :host {
    display: flex;
    flex-direction: column;
    min-height: 0;
    position: relative;
    container: card / inline-size;
  }
  .body {
    overflow-y: auto;
    min-height: 0;
    scrollbar-width: thin;
    scrollbar-color: var(--hairline) transparent;
    padding-left: 8px;
    margin-left: -8px;
  }
  table {
    border-collapse: collapse;
    width: 100%;
    table-layout: fixed;
  }
  th,
  td {
    padding: 0;
    font-weight: 400;
    text-align: right;
    white-space: nowrap;
    height: var(--row);
    line-height: var(--row);
  }
  th[scope='row'],
  .left {
    text-align: left;
  }
  thead th {
    color: var(--second);
    font-size: var(--axis);
    padding-top: 5px;
  }
  tbody + tbody::before {
    content: '';
    display: block;
    height: 4px;
  }
  /* A group of which nothing is left takes no room. */
  tbody:not(:has(tr:not(.extra)))::before {
    height: 0;
  }
  .unit,
  .absent {
    color: var(--second);
  }
  th.unit,
  td.unit {
    padding-left: 10px;
    text-align: left;
  }
  .quantities col.symbol-column {
    width: 5.6em;
  }
  .quantities col.number {
    width: 6.6em;
  }
  .quantities col.unit-column {
    width: 3.6em;
  }
  tr.chosen > * {
    background: var(--row-wash);
  }
  tr.chosen > :first-child {
    box-shadow: -8px 0 0 var(--row-wash);
  }
  tr.differs > :first-child {
    border-left: 0;
  }
  .term {
    text-align: left;
    display: block;
    width: 100%;
    overflow: hidden;
    text-overflow: ellipsis;
    cursor: help;
  }
  .term:focus-visible {
    outline-offset: -1px;
  }
  .term:hover {
    text-decoration: none;
  }
  .number-cell {
    cursor: copy;
  }
  .number-cell:hover {
    text-decoration: underline dotted;
    text-underline-offset: 3px;
  }
  .name {
    color: var(--second);
    overflow: hidden;
    text-overflow: ellipsis;
  }
  .momenta {
    margin-top: 8px;
  }
  .momenta tbody + tbody::before {
    height: 3px;
  }
  .momenta tbody + tbody > tr:first-child > * {
    border-top: 1px solid var(--rule);
  }
  .momenta col.who {
    width: 8.6em;
  }
  .momenta col.tag {
    width: 2.7em;
  }
  .momenta .tag-cell {
    color: var(--second);
  }
  .definition {
    position: absolute;
    left: 0;
    right: 0;
    bottom: 0;
    margin: 0;
    padding: 4px 0 3px;
    border-top: 1px solid var(--hairline);
    background: var(--ground);
    color: var(--second);
    font-size: var(--axis);
    line-height: 16px;
  }
  .definition[hidden] {
    display: none;
  }
  .definition b {
    font-weight: 600;
    color: var(--ink);
  }
  dl {
    display: grid;
    grid-template-columns: 11.2em 1fr;
    gap: 0 14px;
    margin: 6px 0 0;
  }
  dl.settings {
    grid-template-columns: 11.2em 1fr 8em 1fr;
    border-top: 1px solid var(--rule);
    padding-top: 5px;
  }
  dt {
    color: var(--second);
  }
  dd {
    margin: 0;
    overflow-wrap: anywhere;
  }
  .hint {
    color: var(--second);
    margin: 6px 0 0;
  }
  .again {
    display: flex;
    gap: 14px;
    align-items: baseline;
    margin-top: 6px;
    padding-top: 5px;
    border-top: 1px solid var(--rule);
  }
  .again code {
    font: inherit;
    flex: 1;
    overflow-wrap: anywhere;
    user-select: all;
  }
  .again button {
    font-weight: 600;
    flex: none;
  }
  @media (max-height: 959px) and (min-width: 860px) {
    tr.extra {
      display: none;
    }
  }
  @container card (max-width: 430px) {
    dl.settings {
      grid-template-columns: 11.2em 1fr;
    }
    .quantities .name-column,
    .quantities .name {
      display: none;
    }
    .momenta .role {
      display: none;
    }
    .momenta col.who {
      width: 3.4em;
    }
  }
`;
