import { css, html, LitElement, nothing } from 'lit';
import { customElement, property } from 'lit/decorators.js';
import { live } from 'lit/directives/live.js';
import { StoreSlice } from '../../state/index.ts';
import { showerNotation } from '../card/index.ts';
import {
  controlStyles,
  countText,
  notation,
  notationStyles,
  processNotation,
  shortNumber,
} from '../type/index.ts';
import { type Command, CommandEvent, GoToEventEvent, NeighbourEvent } from './bar-events.ts';

const styles = css`
  :host {
    display: flex;
    align-items: center;
    gap: 4px 18px;
    border-bottom: 1.6px solid var(--ink);
    min-height: var(--bar);
    box-sizing: border-box;
    color: var(--ink);
    font-size: var(--text);
    white-space: nowrap;
  }
  h1 {
    font: 600 var(--name) 'Source Serif 4', serif;
    margin: 0;
    padding-right: 18px;
    border-right: 1px solid var(--rule);
  }
  .process {
    font-size: var(--process);
  }
  .shower {
    color: var(--second);
    overflow: hidden;
    text-overflow: ellipsis;
    min-width: 0;
    flex: 0 1 auto;
  }
  .event {
    display: flex;
    align-items: baseline;
    gap: 8px;
  }
  .event input {
    field-sizing: content;
    min-width: 2.2em;
    text-align: right;
    appearance: textfield;
    font-weight: 600;
  }
  .event input::-webkit-inner-spin-button {
    display: none;
  }
  .total {
    color: var(--second);
  }
  nav {
    display: flex;
    gap: 4px 18px;
    margin-left: auto;
    align-items: baseline;
  }
  nav button,
  .event button {
    padding: 2px 0;
  }
  .file {
    color: var(--second);
    max-width: 16em;
    overflow: hidden;
    text-overflow: ellipsis;
  }
  .list {
    display: none;
  }
  @media (max-width: 1559px) {
    .shower,
    .file {
      display: none;
    }
    .list {
      display: inline;
    }
  }
  @media (max-width: 1119px) {
    :host {
      gap: 2px 14px;
      flex-wrap: wrap;
      padding: 6px 0 5px;
    }
    nav {
      gap: 4px 14px;
    }
    h1 {
      border: 0;
      padding: 0;
    }
  }
  @media (max-width: 859px) {
    .list {
      display: none;
    }
    nav {
      margin-left: 0;
      width: 100%;
      justify-content: space-between;
    }
    .event {
      margin-left: auto;
    }
  }
`;

/**
 * The top bar: product, process, which event of how many, the words that open and save.
 *
 * @fires bl-go-to-event
 * @fires bl-neighbour
 * @fires bl-command
 */
@customElement('bl-bar')
export class BarElement extends LitElement {
  static override styles = [controlStyles, notationStyles, styles];

  /** Whether there is a ball that can be saved. */
  @property({ type: Boolean }) savable = false;
  /** Whether the list of events stands in the place of card and trail. */
  @property({ type: Boolean }) listOpen = false;

  readonly #history = new StoreSlice(this, (s) => s.history);
  readonly #source = new StoreSlice(this, (s) => s.source);
  readonly #event = new StoreSlice(this, (s) => s.event);
  readonly #theme = new StoreSlice(this, (s) => s.theme);

  /** Put the cursor into the event number. */
  focusEvent(): void {
    const input = this.renderRoot.querySelector('input');
    input?.focus();
    input?.select();
  }

  override render() {
    const head = this.#history.value?.head;
    const source = this.#source.value;
    return html`
      <h1>Branchlight</h1>
      ${
        head
          ? html`<div class="process">
                ${notation(`${processNotation(head.process.incoming, head.process.outgoing)}, √*s* = ${shortNumber(head.sqrtS)} GeV`)}
              </div>`
          : nothing
      }
      ${source?.eventCount ? this.#chooser(source.eventCount) : nothing}
      ${head ? html`<div class="shower">${notation(showerNotation({ head }))}</div>` : nothing}
      <nav aria-label="file and view">
        ${source?.name ? html`<span class="file" title=${source.name}>${source.name}</span>` : nothing}
        ${this.#word('open', 'open file …', 'o')}
        ${this.savable ? html`${this.#word('save-svg', 'save SVG', '')}${this.#word('save-png', 'save PNG', '')}` : nothing}
        <button type="button" @click=${this.#turnTheme}>${this.#theme.value === 'dark' ? 'light' : 'dark'}</button>
        ${this.#word('help', 'keys', '?')}
      </nav>
    `;
  }

  #word(command: Command, word: string, key: string) {
    return html`<button type="button" title=${key ? `key ${key}` : word} @click=${() => this.dispatchEvent(new CommandEvent(command))}>${word}</button>`;
  }

  #chooser(count: number) {
    const event = this.#event.value ?? 0;
    const step = (distance: 1 | -1, sign: string, label: string, key: string) =>
      html`<button type="button" aria-label=${label} title="${label} (${key})" @click=${() => this.dispatchEvent(new NeighbourEvent(distance))}>${sign}</button>`;
    return html`<div class="event" role="group" aria-label="event">
      ${step(-1, '◀', 'previous event', '↑ or p')}
      <label>event
        <input type="number" min="0" max=${count - 1} .value=${live(String(event))} @change=${this.#goTo} /></label>
      <span class="total">of ${countText(count)}</span>
      ${step(1, '▶', 'next event', '↓ or n')}
      <button type="button" class="list" aria-pressed=${this.listOpen} @click=${() => this.dispatchEvent(new CommandEvent('events'))}>
        ${this.listOpen ? 'close list' : 'list'}
      </button>
    </div>`;
  }

  readonly #goTo = (event: Event): void => {
    const input = event.target as HTMLInputElement;
    const number = Number(input.value);
    const count = this.#source.value!.eventCount;
    if (input.value !== '' && Number.isInteger(number) && number >= 0 && number < count) {
      this.dispatchEvent(new GoToEventEvent(number));
      input.blur();
    } else {
      input.setCustomValidity(`The file has events 0 to ${count - 1}.`);
      input.reportValidity();
      input.setCustomValidity('');
      this.requestUpdate();
    }
  };

  readonly #turnTheme = (): void => {
    this.#theme.store?.setTheme(this.#theme.value === 'dark' ? 'light' : 'dark');
  };
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-bar': BarElement;
  }
}
