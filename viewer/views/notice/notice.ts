import { css, html, LitElement, nothing } from 'lit';
import { customElement, property } from 'lit/decorators.js';
import { CommandEvent } from '../bar/index.ts';
import { controlStyles } from '../type/index.ts';

const styles = css`
  :host {
    display: grid;
    align-content: center;
    justify-content: center;
    color: var(--ink);
    padding: 24px;
    min-height: 260px;
    box-sizing: border-box;
  }
  div {
    max-width: 34em;
    font-size: 15px;
    line-height: 22px;
  }
  h2 {
    font: 600 19px/26px 'Source Serif 4', serif;
    margin: 0 0 8px;
    border-bottom: 1px solid var(--ink);
    padding-bottom: 6px;
  }
  p {
    margin: 0 0 10px;
    overflow-wrap: anywhere;
  }
  button {
    font-weight: 600;
    text-decoration: underline;
    text-decoration-thickness: 1px;
    text-underline-offset: 3px;
  }
  code {
    font: inherit;
    color: var(--second);
  }
`;

/**
 * What stands in the place of the view when there is nothing to see: no file yet, a file being read, one that could not
 * be opened, an event that could not be read.
 *
 * @fires bl-command to open a file.
 */
@customElement('bl-notice')
export class NoticeElement extends LitElement {
  static override styles = [controlStyles, styles];

  @property() kind: 'empty' | 'loading' | 'failed' | 'event-failed' | 'no-events' = 'empty';
  @property() name = '';
  @property() message = '';
  /** Number of the event that could not be read. */
  @property({ type: Number }) event = -1;

  override render() {
    return html`<div role=${this.kind.endsWith('failed') ? 'alert' : 'status'}>${this.#content()}</div>`;
  }

  #content() {
    switch (this.kind) {
      case 'loading':
        return html`<h2>Reading</h2><p>${this.name}</p>`;
      case 'failed':
        return html`<h2>${this.name} could not be opened</h2><p>${this.message}</p>${this.#open('Open another file')}`;
      case 'event-failed':
        return html`<h2>Event ${this.event} could not be read</h2><p>${this.message}</p><p>The other events of ${this.name} can still be chosen.</p>`;
      case 'no-events':
        return html`<h2>${this.name} holds no events</h2>${this.#open('Open another file')}`;
      default:
        return html`<h2>No file is open</h2>
          <p>Drop a <code>.shower</code> file anywhere on this page, or ${this.#open('open one')}. It is read in this browser and goes nowhere else.</p>
          <p><code>branchlight grow --out a.shower</code> makes one, <code>branchlight view a.shower</code> shows it.</p>`;
    }
  }

  #open(words: string) {
    return this.kind === 'loading'
      ? nothing
      : html`<button type="button" @click=${() => this.dispatchEvent(new CommandEvent('open'))}>${words}</button>`;
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-notice': NoticeElement;
  }
}
