import { html, LitElement, nothing } from 'lit';
import { customElement, state } from 'lit/decorators.js';
import { aliveEntries, KINDS } from '../../../engine/index.ts';
import { StoreSlice, stepNumber } from '../../state/index.ts';
import {
  branchingNotation,
  controlStyles,
  countText,
  decimalText,
  momentumDecimals,
  notation,
  notationStyles,
  numberText,
  panelStyles,
  partonSymbol,
  plainNotation,
  residualText,
} from '../type/index.ts';
import { cardStyles } from './card.styles.ts';
import { eventRows } from './event-rows.ts';
import { type MomentumRow, momentumTable } from './momentum-rows.ts';
import { rerunCommand } from './rerun-command.ts';
import { type StepRow, stepRows } from './step-rows.ts';

/**
 * The step card: of the selected step what the shower claimed beside what the momenta show, then the momenta themselves;
 * of no step the head of the event.
 */
@customElement('bl-card')
export class CardElement extends LitElement {
  static override styles = [panelStyles, controlStyles, notationStyles, cardStyles];

  readonly #history = new StoreSlice(this, (s) => s.history);
  readonly #measures = new StoreSlice(this, (s) => s.measures);
  readonly #step = new StoreSlice(this, (s) => s.step);
  /** Row whose definition is printed. */
  @state() private explained = '';
  @state() private copied = '';
  #forget: ReturnType<typeof setTimeout> | undefined;

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.#forget);
  }

  override render() {
    const history = this.#history.value;
    const measures = this.#measures.value;
    const step = this.#step.value ?? -1;
    if (!history || !measures) return nothing;
    return step < 0 ? this.#event() : this.#stepCard(step);
  }

  #event() {
    const history = this.#history.value!;
    const partons = aliveEntries(history, history.steps.length).length;
    const rerun = rerunCommand(history.head);
    return html`
      <header>
        <h2>Event ${countText(history.head.event)}</h2>
        <div class="state" role="status">${this.copied || 'no step selected'}</div>
      </header>
      <div class="body">
        ${eventRows(history, partons).map(
          (rows, group) =>
            html`<dl class=${group === 2 ? 'settings' : ''}>${rows.map(({ name, value }) => html`<dt>${name}</dt><dd>${notation(value)}</dd>`)}</dl>`,
        )}
        ${
          rerun
            ? html`<div class="again">
                <span class="unit">make again</span><code>${rerun}</code>
                <button type="button" @click=${() => this.#copy(rerun, 'command')}>copy</button>
              </div>`
            : nothing
        }
      </div>
    `;
  }

  #stepCard(step: number) {
    const history = this.#history.value!;
    const { steps, head } = history;
    const groups = stepRows(history, this.#measures.value!, step);
    const generation = steps.generation[step] >= 0 ? `, generation ${steps.generation[step]}` : '';
    const measuredTitle = `from the four-momenta, angles in the ${head.meaning.angleFrame ?? 'event'} frame`;
    const explained = groups.flat().find(({ key }) => key === this.explained);
    return html`
      <header>
        <h2>Step ${stepNumber(step)}</h2>
        <div class="state" role="status">
          ${this.copied || html`${notation(branchingNotation(history, step))}, ${KINDS[steps.kind[step]]}${generation}`}
        </div>
      </header>
      <div class="body" tabindex="-1">
        <table class="quantities">
          <colgroup>
            <col class="symbol-column" /><col class="name-column" /><col class="number" /><col class="number" /><col class="unit-column" />
          </colgroup>
          <thead>
            <tr>
              <th class="left" scope="col"><span class="unseen">symbol</span></th>
              <th class="left name" scope="col"><span class="unseen">quantity</span></th>
              <th scope="col" title="as the shower recorded it">claimed</th>
              <th scope="col" title=${measuredTitle}>measured</th><th scope="col" class="unit">unit</th>
            </tr>
          </thead>
          ${groups.map((rows) => html`<tbody>${rows.map((row) => this.#quantity(row))}</tbody>`)}
        </table>
        ${this.#momenta(step)}
      </div>
      <p class="definition" role="status" ?hidden=${!explained}>
        ${explained ? html`<b>${plainNotation(explained.name)}</b> ${explained.definition}` : nothing}
      </p>
    `;
  }

  #quantity(row: StepRow) {
    const { key, symbol, name, claimed, measured, unit, differs, extra } = row;
    const explain = () => {
      this.explained = key;
    };
    const label = `${plainNotation(symbol)} ${plainNotation(name)}`.trim();
    return html`<tr class="${differs ? 'differs chosen' : ''} ${extra ? 'extra' : ''}" data-key=${key} @mouseenter=${explain} @mouseleave=${this.#stopExplaining}>
      <th scope="row">
        <button type="button" class="term" @focus=${explain} @blur=${this.#stopExplaining}
          @click=${() => this.#copy(`${label}\t${claimed}\t${measured}\t${plainNotation(unit)}`, label)}
        >${notation(symbol)}<span class="unseen"> ${plainNotation(name)}: copy claimed and measured</span></button>
      </th>
      <td class="left name">${notation(name)}</td>
      ${this.#number(claimed, label)}${this.#number(measured, label)}
      <td class="unit">${notation(unit)}</td>
    </tr>`;
  }

  #number(value: number, name: string) {
    if (Number.isNaN(value)) return html`<td class="absent">—</td>`;
    const text = Number.isInteger(value) ? countText(value) : numberText(value);
    return this.#copyable(value, text, name);
  }

  // A press copies the full double; the text itself can be selected like any other.
  #copyable(value: number, text: string, name: string) {
    return html`<td class="number-cell" title="${String(value).replace('-', '−')}, press to copy" @click=${() => this.#copy(String(value), name)}>${notation(text)}</td>`;
  }

  #momenta(step: number) {
    const table = momentumTable(this.#history.value!, this.#measures.value!, step);
    const decimals = momentumDecimals(table.largest);
    return html`<table class="momenta">
      <colgroup><col class="who" /><col class="tag" /><col class="tag" /><col span="4" /></colgroup>
      <thead>
        <tr>
          <th class="left" scope="col"><span class="role">momenta </span>[GeV]</th>
          <th scope="col" title="colour tag">col.</th><th scope="col" title="anticolour tag">anti</th>
          ${['*E*', '*p*_{x}', '*p*_{y}', '*p*_{z}'].map((symbol) => html`<th scope="col">${notation(symbol)}</th>`)}
        </tr>
      </thead>
      <tbody>${table.before.map((row) => this.#parton(row, ', before', decimals))}</tbody>
      <tbody>${table.after.map((row) => this.#parton(row, '', decimals))}</tbody>
      <tbody>
        <tr class="residual" title="four-momentum of the whole event, after minus before">
          <th scope="row" colspan="3">after − before</th>
          ${table.residual.map((value) => this.#copyable(value, residualText(value), 'residual'))}
        </tr>
      </tbody>
    </table>`;
  }

  #parton(row: MomentumRow, when: string, decimals: number) {
    const tag = (value: number, name: string) =>
      html`<td class="tag-cell" title=${name}>${value > 0 ? value : '·'}</td>`;
    return html`<tr>
      <th scope="row" title="entry ${row.entry}">
        ${when ? html`<span class="role">${row.name}${when} </span>` : html`${notation(row.label)}<span class="role"> ${row.name} </span>`}
        ${row.id === 0 ? '—' : notation(partonSymbol(row.id))}
      </th>
      ${tag(row.colour, 'colour tag')}${tag(row.anticolour, 'anticolour tag')}
      ${row.momentum.map((value) => this.#copyable(value, decimalText(value, decimals), row.name))}
    </tr>`;
  }

  readonly #stopExplaining = (): void => {
    this.explained = '';
  };

  async #copy(text: string, name: string): Promise<void> {
    // A selection that someone is drawing across the number is not a press.
    if (getSelection()?.type === 'Range') return;
    try {
      await navigator.clipboard.writeText(text);
      this.copied = `copied ${name}`;
    } catch {
      this.copied = 'the browser allows no copying here';
    }
    clearTimeout(this.#forget);
    this.#forget = setTimeout(() => {
      this.copied = '';
    }, 1500);
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-card': CardElement;
  }
}
