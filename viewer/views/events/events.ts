import { html, LitElement, nothing, type PropertyValues, svg } from 'lit';
import { customElement, state } from 'lit/decorators.js';
import { ifDefined } from 'lit/directives/if-defined.js';
import { type EventFile, StoreSlice } from '../../state/index.ts';
import { releaseFocus } from '../frame/index.ts';
import {
  controlStyles,
  countText,
  notation,
  notationStyles,
  numberText,
  panelStyles,
} from '../type/index.ts';
import { EventStrips, stripPath } from './event-strips.ts';
import { eventsStyles } from './events.styles.ts';
import { listWindow, scrollToPlace } from './list-window.ts';
import { orderEvents, type SummaryKey, SummaryTable } from './summary-table.ts';

const ROW = 21;
const STRIP = { width: 108, height: 11 };

type OrderKey = 'event' | SummaryKey;

/** Quantities as they head their column. */
const QUANTITIES: Readonly<Record<OrderKey, { name: string; head: string; definition: string }>> = {
  event: { name: 'event number', head: 'event', definition: 'number of the event in the file' },
  branchings: { name: 'steps', head: 'steps', definition: 'branchings of the event' },
  finalPartons: { name: 'final partons', head: 'partons', definition: 'partons at the end of the shower' },
  hardestKT: {
    name: 'hardest kT',
    head: '*k*_{T,max} [GeV]',
    definition: 'largest kT of the event’s steps [GeV]',
  },
  worstCoherence: {
    name: 'largest angle ratio',
    head: '*θ*/*θ*_{ceiling}',
    definition: 'largest coherence ratio of the event’s steps: opening angle over its ceiling',
  },
};

/**
 * The event chooser: every event of the file in a list that holds any number of them, with its steps along L, in the order
 * of its number or of a quantity of the file's index.
 */
@customElement('bl-events')
export class EventsElement extends LitElement {
  static override styles = [panelStyles, controlStyles, notationStyles, eventsStyles];

  readonly #source = new StoreSlice(this, (s) => s.source);
  readonly #event = new StoreSlice(this, (s) => s.event);
  @state() private key: OrderKey = 'event';
  @state() private falling = false;
  @state() private ordering = false;
  @state() private trouble = '';
  @state() private scrolled = 0;
  @state() private boxHeight = 0;
  #file: EventFile | null = null;
  #summaries: SummaryTable | null = null;
  #strips: EventStrips | null = null;
  /** Event number by place, null for the order of the file. */
  #order: Uint32Array | null = null;
  #placeOf: Uint32Array | null = null;
  #shown = -1;
  #observer: ResizeObserver | undefined;
  #watched: HTMLElement | null = null;

  override connectedCallback(): void {
    super.connectedCallback();
    this.#observer = new ResizeObserver(([entry]) => {
      this.boxHeight = entry.contentRect.height;
      this.#shown = -1;
    });
    if (this.#watched) this.#observer.observe(this.#watched);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#observer?.disconnect();
  }

  get #box(): HTMLElement | null {
    return this.renderRoot?.querySelector('.box') ?? null;
  }

  override willUpdate(): void {
    const file = this.#source.store?.file ?? null;
    if (file === this.#file) return;
    this.#file = file;
    this.#summaries = file && new SummaryTable(file);
    this.#strips =
      file &&
      new EventStrips(
        file,
        (history) => stripPath(history, STRIP.width, STRIP.height),
        () => this.requestUpdate(),
      );
    this.#order = null;
    this.#placeOf = null;
    this.key = 'event';
    this.falling = false;
    this.trouble = '';
    this.#shown = -1;
  }

  protected override updated(_changed: PropertyValues): void {
    const box = this.#box;
    if (box !== this.#watched) {
      if (this.#watched) this.#observer?.unobserve(this.#watched);
      if (box) this.#observer?.observe(box);
      this.#watched = box;
    }
    if (!box) return;
    this.#place(box);
    const event = this.#event.value ?? -1;
    if (event !== this.#shown && event >= 0 && this.boxHeight > 0) {
      this.#shown = event;
      this.#reveal(event);
    }
    this.#read();
  }

  // By script and not by style attributes, which a strict content policy drops.
  #place(box: HTMLElement): void {
    const { top, height } = this.#window;
    const content = box.firstElementChild as HTMLElement;
    content.style.height = `${height}px`;
    (content.firstElementChild as HTMLElement).style.transform = `translateY(${top}px)`;
  }

  // Ask for what the rows in view need.
  #read(): void {
    if (!this.#summaries || !this.#strips) return;
    const { from, to } = this.#window;
    const events = Array.from({ length: to - from }, (_, k) => this.#eventAt(from + k));
    this.#strips.want(events);
    const unknown = events.filter((event) => !this.#summaries!.asked(event));
    if (unknown.length === 0) return;
    const pages = unknown.map((event) => this.#summaries!.ensure(event, event + 1));
    Promise.all(pages).then(() => this.requestUpdate(), this.#fail);
  }

  readonly #fail = (error: unknown): void => {
    this.trouble = error instanceof Error ? error.message : String(error);
    this.ordering = false;
  };

  get #count(): number {
    return this.#source.value?.eventCount ?? 0;
  }
  get #window() {
    return listWindow(this.#count, ROW, this.boxHeight, this.scrolled);
  }
  #eventAt(place: number): number {
    return this.#order ? this.#order[place] : place;
  }
  #placeOfEvent(event: number): number {
    return this.#placeOf ? this.#placeOf[event] : event;
  }

  #reveal(event: number): void {
    const box = this.#box!;
    const place = this.#placeOfEvent(event);
    const top = scrollToPlace(place, this.#count, ROW, this.boxHeight, box.scrollTop);
    if (top !== box.scrollTop) box.scrollTop = top;
  }

  override render() {
    if (!this.#file) return nothing;
    const shownKey: SummaryKey = this.key === 'event' || this.key === 'branchings' ? 'hardestKT' : this.key;
    const quantity = QUANTITIES[shownKey];
    const { from, to } = this.#window;
    return html`
      <header>
        <h2>Events</h2>
        <div class="state" role="status">${this.ordering ? 'ordering …' : `${countText(this.#count)} in the file`}</div>
      </header>
      <div class="order">
        <label>order by <span class="choice">
          <select @change=${this.#chooseKey}>
            ${Object.entries(QUANTITIES).map(
              ([key, { name }]) => html`<option value=${key} ?selected=${key === this.key}>${name}</option>`,
            )}
          </select></span></label>
        <button type="button" @click=${this.#turn} aria-label=${this.falling ? 'largest first, press for smallest first' : 'smallest first, press for largest first'}>
          ${this.falling ? '↓ largest first' : '↑ smallest first'}
        </button>
      </div>
      ${this.trouble ? html`<div class="trouble" role="alert">${this.trouble}</div>` : nothing}
      <div class="heads" aria-hidden="true">
        <span>event</span><span>steps</span><span class="along">${notation('along *L*')}</span>
        <span title=${quantity.definition}>${notation(quantity.head)}</span>
      </div>
      <div class="box" role="listbox" tabindex="0" aria-label="events" aria-activedescendant=${ifDefined(this.#activeRow)}
        @scroll=${this.#scroll} @keydown=${this.#press} @click=${this.#click}>
        <div class="content" role="presentation">
          <div class="rows" role="presentation">
            ${Array.from({ length: to - from }, (_, k) => this.#row(from + k, shownKey))}
          </div>
        </div>
      </div>
    `;
  }

  // Only a row that is there can be the active one.
  get #activeRow(): string | undefined {
    const { from, to } = this.#window;
    const event = this.#event.value ?? -1;
    const place = event < 0 ? -1 : this.#placeOfEvent(event);
    return place >= from && place < to ? `row-${event}` : undefined;
  }

  #row(place: number, key: SummaryKey) {
    const event = this.#eventAt(place);
    const value = (name: SummaryKey): string => {
      const number = this.#summaries!.value(name, event);
      if (Number.isNaN(number)) return '';
      return Number.isInteger(number) && name !== 'hardestKT' ? countText(number) : numberText(number, 3);
    };
    const strip = this.#strips!.path(event);
    return html`<div class="row" role="option" id="row-${event}" data-event=${event}
      aria-selected=${event === this.#event.value} aria-posinset=${place + 1} aria-setsize=${this.#count}>
      <span>${countText(event)}</span><span class="steps">${value('branchings')}</span>
      <svg width="100%" height=${STRIP.height} viewBox="0 0 ${STRIP.width} ${STRIP.height}" preserveAspectRatio="none" aria-hidden="true">
        <path class="ground" d="M0 ${STRIP.height - 0.5}H${STRIP.width}" vector-effect="non-scaling-stroke" />
        ${strip ? svg`<path d=${strip} vector-effect="non-scaling-stroke" />` : nothing}
      </svg>
      <span>${notation(value(key))}</span>
    </div>`;
  }

  readonly #scroll = (): void => {
    this.scrolled = this.#box!.scrollTop;
  };

  readonly #click = (event: MouseEvent): void => {
    const row = (event.target as Element).closest<HTMLElement>('.row');
    if (row) this.#open(Number(row.dataset.event));
  };

  readonly #press = (event: KeyboardEvent): void => {
    if (event.altKey || event.ctrlKey || event.metaKey) return;
    const page = Math.max(Math.floor(this.boxHeight / ROW) - 1, 1);
    const here = this.#placeOfEvent(Math.max(this.#event.value ?? 0, 0));
    const last = this.#count - 1;
    const places: Readonly<Record<string, number>> = {
      ArrowDown: here + 1,
      ArrowUp: here - 1,
      PageDown: here + page,
      PageUp: here - page,
      Home: 0,
      End: last,
    };
    const place = places[event.key];
    if (place === undefined) return;
    event.preventDefault();
    event.stopPropagation();
    this.#open(this.#eventAt(Math.min(Math.max(place, 0), last)));
  };

  /** Open the event that is so many places further down the list. */
  openNeighbour(distance: number): void {
    if (!this.#file || this.#count === 0) return;
    const place = this.#placeOfEvent(Math.max(this.#event.value ?? 0, 0)) + distance;
    if (place >= 0 && place < this.#count) this.#open(this.#eventAt(place));
  }

  #open(event: number): void {
    if (event !== this.#event.value) void this.#source.store!.openEvent(event);
  }

  readonly #chooseKey = (event: Event): void => {
    const select = event.target as HTMLSelectElement;
    this.key = select.value as OrderKey;
    releaseFocus(select);
    this.falling = this.key !== 'event';
    void this.#sort();
  };

  readonly #turn = (): void => {
    this.falling = !this.falling;
    void this.#sort();
  };

  async #sort(): Promise<void> {
    const { key, falling } = this;
    const table = this.#summaries!;
    this.ordering = true;
    try {
      if (key !== 'event') await table.ensure(0, table.eventCount);
    } catch (error) {
      this.#fail(error);
      return;
    }
    if (table !== this.#summaries || key !== this.key || falling !== this.falling) return;
    this.ordering = false;
    if (key === 'event' && !falling) this.#order = null;
    else if (key === 'event')
      this.#order = Uint32Array.from({ length: this.#count }, (_, k) => this.#count - 1 - k);
    else this.#order = orderEvents(table.column(key), falling);
    this.#placeOf = this.#order && new Uint32Array(this.#count);
    if (this.#placeOf)
      for (let place = 0; place < this.#count; place++) this.#placeOf[this.#order![place]] = place;
    this.#box!.scrollTop = 0;
    this.scrolled = 0;
    this.requestUpdate();
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-events': EventsElement;
  }
}
