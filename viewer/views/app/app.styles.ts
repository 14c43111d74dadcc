import { css } from 'lit';

export const appStyles = css`
  :host {
    display: grid;
    grid-template: auto minmax(0, 1fr) / 292px minmax(0, 1fr) clamp(468px, 30.42vw, 640px);
    grid-template-areas: 'bar bar bar' 'events centre right';
    column-gap: 34px;
    height: 100dvh;
    min-height: 600px;
    box-sizing: border-box;
    padding: 0 var(--margin) 20px;
    background: var(--ground);
    color: var(--ink);
  }
  .top {
    grid-area: bar;
  }
  bl-events {
    grid-area: events;
    padding-top: 12px;
  }
  .centre {
    grid-area: centre;
    display: grid;
    grid-template-rows: minmax(0, 1fr) auto;
    row-gap: 10px;
    min-width: 0;
    min-height: 0;
    padding-top: 8px;
  }
  .centre.alone {
    grid-column: centre / right;
  }
  :host([list-open]) .centre.alone {
    grid-column: centre;
  }
  bl-ball,
  bl-notice {
    min-width: 0;
    min-height: 0;
  }
  bl-notice {
    grid-row: 1 / -1;
  }
  .right {
    grid-area: right;
    display: grid;
    grid-template-rows: minmax(150px, 1fr) minmax(0, 614px);
    row-gap: 14px;
    min-height: 0;
    min-width: 0;
    padding-top: 12px;
  }
  .banner {
    display: flex;
    gap: 12px;
    align-items: baseline;
    padding: 5px 0 5px 10px;
    border-left: 2.4px solid var(--finding);
    border-bottom: 1px solid var(--rule);
    font-size: var(--text);
    line-height: 18px;
  }
  .banner b {
    font-weight: 600;
    color: var(--finding);
  }
  .drop {
    position: fixed;
    inset: 10px;
    border: 2px solid var(--ink);
    background: color-mix(in srgb, var(--ground) 82%, transparent);
    display: grid;
    place-content: center;
    font: 600 22px 'Source Serif 4', serif;
    z-index: 10;
    pointer-events: none;
  }
  .wash-skip {
    position: absolute;
    left: -9999px;
  }
  @media (max-width: 1559px) {
    :host {
      grid-template: auto minmax(0, 1fr) / minmax(0, 1fr) clamp(356px, 36.56vw, 468px);
      grid-template-areas: 'bar bar' 'centre right';
      column-gap: 28px;
    }
    bl-events {
      display: none;
      grid-area: right;
    }
    :host([list-open]) bl-events {
      display: flex;
    }
    :host([list-open]) .right {
      display: none;
    }
  }
  @media (max-width: 1119px) {
    :host {
      column-gap: 20px;
    }
  }
  @media (max-height: 959px) {
    .right {
      grid-template-rows: minmax(150px, 1fr) minmax(0, 462px);
    }
  }
  @media (max-width: 859px) {
    :host,
    :host([list-open]) {
      display: flex;
      flex-direction: column;
      height: auto;
    }
    .centre {
      grid-template-rows: min(calc(100vw - 2 * var(--margin)), 86vh) auto;
    }
    .centre.alone {
      grid-template-rows: 60vh;
    }
    .right,
    :host([list-open]) .right {
      display: flex;
      flex-direction: column;
      gap: 20px;
      padding-top: 16px;
    }
    bl-card {
      order: -1;
    }
    bl-angle-trail {
      height: 300px;
    }
    bl-events,
    :host([list-open]) bl-events {
      display: flex;
      order: 1;
      height: 420px;
      padding-top: 20px;
    }
  }
  @media (prefers-reduced-motion: no-preference) {
    .drop {
      transition: none;
    }
  }
`;
