import { html, LitElement, nothing, svg } from 'lit';
import { customElement, state } from 'lit/decorators.js';
import { type Playhead, StoreSlice, stepNumber } from '../../state/index.ts';
import { nearestStep } from '../clock/index.ts';
import { releaseFocus } from '../frame/index.ts';
import {
  controlStyles,
  drawingStyles,
  notation,
  notationSpans,
  notationStyles,
  numberText,
  panelStyles,
  plainNotation,
} from '../type/index.ts';
import { angleTrailStyles } from './angle-trail.styles.ts';
import { openingMark } from './opening-mark.ts';
import {
  type AngleAxis,
  aboveText,
  angleAxis,
  angleHeight,
  countAbove,
  numberStride,
  playheadPlace,
  type TrailLine,
  trailAngles,
  trailLines,
  trailPositions,
} from './trail-plot.ts';

const LEFT = 42;
const TOP = 8;
const FOOT = 22;

/** Lines whose steps are shown. */
type Choice = 'all' | 'selected' | number;

/**
 * The angle trail: of every step the opening angle, with the partner angle and the birth angle as ceilings, on a logarithmic
 * axis; for all parton lines or for one.
 */
@customElement('bl-angle-trail')
export class AngleTrailElement extends LitElement {
  static override styles = [panelStyles, controlStyles, notationStyles, drawingStyles, angleTrailStyles];

  readonly #history = new StoreSlice(this, (s) => s.history);
  readonly #measures = new StoreSlice(this, (s) => s.measures);
  readonly #step = new StoreSlice(this, (s) => s.step);
  readonly #hover = new StoreSlice(this, (s) => s.hoverStep);
  @state() private choice: Choice = 'all';
  @state() private along: 'step' | 'time' = 'step';
  @state() private width = 0;
  @state() private height = 0;
  #lines: TrailLine[] = [];
  #linesOf: unknown;
  #positions: Float64Array = new Float64Array(0);
  #columns: Element[] = [];
  #passed = -2;
  #leave: (() => void) | undefined;
  #observer: ResizeObserver | undefined;
  #watched: Element | null = null;

  override connectedCallback(): void {
    super.connectedCallback();
    this.#observer = new ResizeObserver(([entry]) => {
      this.width = entry.contentRect.width;
      this.height = entry.contentRect.height;
    });
    if (this.#watched) this.#observer.observe(this.#watched);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#observer?.disconnect();
    this.#leave?.();
    this.#leave = undefined;
  }

  override willUpdate(): void {
    const history = this.#history.value;
    if (this.#linesOf !== history) {
      this.#linesOf = history;
      this.#lines = history ? trailLines(history) : [];
      if (typeof this.choice === 'number') this.choice = 'all';
    }
    const playhead = this.#playhead;
    if (playhead && !this.#leave) this.#leave = playhead.subscribe(this.#follow);
    const count = history?.steps.length ?? 0;
    const plot = this.#plotWidth;
    this.#positions = trailPositions(count, plot, this.along, (step) =>
      playhead && playhead.end > 0 ? playhead.timeOf(step) / playhead.end : 0,
    );
  }

  override updated(): void {
    this.#watchPlot();
    this.#columns = [...this.renderRoot.querySelectorAll('.column')];
    this.#passed = -2;
    this.#follow();
  }

  #watchPlot(): void {
    const plot = this.renderRoot.querySelector('.plot');
    if (plot === this.#watched) return;
    if (this.#watched) this.#observer?.unobserve(this.#watched);
    if (plot) this.#observer?.observe(plot);
    this.#watched = plot;
  }

  get #playhead(): Playhead | undefined {
    return this.#history.store?.playhead;
  }
  get #plotWidth(): number {
    return Math.max(this.width - LEFT - 6, 0);
  }
  get #plotHeight(): number {
    return Math.max(this.height - TOP - FOOT, 0);
  }

  // The clock's line and what is still to come, set without drawing the component again.
  readonly #follow = (): void => {
    const playhead = this.#playhead;
    const line = this.renderRoot.querySelector<SVGGElement>('.now-mark');
    if (!playhead || !line) return;
    const { passed, time, end } = playhead;
    const x =
      this.along === 'time'
        ? end > 0
          ? (time / end) * this.#plotWidth
          : 0
        : playheadPlace(this.#positions, this.#plotWidth, this.#timeOf, end, passed, time);
    line.transform.baseVal.getItem(0).setTranslate(x, 0);
    if (passed === this.#passed) return;
    this.#passed = passed;
    this.#columns.forEach((column, step) => {
      column.classList.toggle('future', step > passed);
    });
  };

  readonly #timeOf = (step: number): number => this.#playhead!.timeOf(step);

  override render() {
    const history = this.#history.value;
    const measures = this.#measures.value;
    if (!history || !measures) return nothing;
    return html`
      <header>
        <h2>Angle trail</h2>
        ${this.#key()}
      </header>
      <div class="choices">
        <span class="what">${notation(`angle [rad], log, ${history.head.meaning.angleFrame ?? 'event'} frame`)}</span>
        <label><span class="unseen">parton line</span><span class="choice">
          <select @change=${this.#choose}>
            <option value="all" ?selected=${this.choice === 'all'}>all parton lines</option>
            <option value="selected" ?selected=${this.choice === 'selected'}>line of the selected step</option>
            ${this.#lines.map(
              ({ line, symbol, steps }) =>
                html`<option value=${line} ?selected=${this.choice === line}>line ${line}, ${plainNotation(symbol)}, ${steps.length} ${steps.length === 1 ? 'step' : 'steps'}</option>`,
            )}
          </select></span></label>
        <label>along <span class="choice">
          <select @change=${this.#turn}>
            <option value="step" ?selected=${this.along === 'step'}>step</option>
            <option value="time" ?selected=${this.along === 'time'}>evolution time</option>
          </select></span></label>
      </div>
      <div class="plot">${this.#plot()}</div>
      <footer>
        ${this.#readout() ?? this.#counts()}
      </footer>
    `;
  }

  #key() {
    const mark = (channel: string, text: string) =>
      html`<span><svg width="11" height="11" viewBox="-5.5 -5.5 11 11">${openingMark(channel, 4)}</svg><b>${notation(text)}</b></span>`;
    const bar = (name: string) =>
      html`<span><svg class="sample" width="22" height="8"><path class=${name} d="M0 4.5H22" /></svg>${name}</span>`;
    return html`<div class="key">
      ${mark('q_qg', '*q* → *q*\u2009*g*')} ${mark('g_gg', '*g* → *g*\u2009*g*')} ${mark('g_qq', '*g* → *q*\u2009*q\u0304*')}
      ${bar('partner')} ${bar('birth')}
    </div>`;
  }

  #counts() {
    const { coherenceBirth, coherencePartner, length } = this.#measures.value!;
    if (length === 0) return html`no branching in this event`;
    const birth = aboveText(countAbove(coherenceBirth, length));
    const partner = aboveText(countAbove(coherencePartner, length));
    return html`above birth ${birth}, above partner ${partner}, this event`;
  }

  // What the pointer is on; of the selected step the card says more.
  #readout() {
    const measures = this.#measures.value!;
    const step = this.#hover.value ?? -1;
    if (step < 0 || step >= this.#positions.length) return null;
    const part = (name: string, angle: number, ratio: number) =>
      Number.isNaN(angle) ? '' : `, ${name} ${numberText(angle, 3)} (×${numberText(ratio, 3)})`;
    const text = [
      `step ${stepNumber(step)}: *θ* = ${numberText(measures.openingAngle[step], 4)}`,
      part('partner', measures.partnerAngle[step], measures.coherencePartner[step]),
      part('birth', measures.birthAngle[step], measures.coherenceBirth[step]),
      ' rad',
    ];
    return notation(text.join(''));
  }

  #plot() {
    const measures = this.#measures.value!;
    const width = this.#plotWidth;
    const height = this.#plotHeight;
    if (width === 0 || height < 20) return nothing;
    const axis = angleAxis(trailAngles(measures), height);
    const y = (angle: number): number => angleHeight(axis, angle, height);
    const count = this.#positions.length;
    const pitch = this.along === 'step' ? width / Math.max(count, 1) : 14;
    return svg`<svg width=${this.width} height=${this.height} role="img"
        aria-label=${`opening angle of ${count} steps with partner and birth angle`}
        @pointermove=${this.#point} @pointerleave=${this.#unpoint} @click=${this.#select}>
      <g transform="translate(${LEFT} ${TOP})">
        ${this.#bands(pitch, height)}
        ${axis.ticks.map(
          ({ angle, label }) => svg`<path class="grid" d="M0 ${y(angle)}H${width}" />
            <text x="-8" y=${y(angle) + 4} text-anchor="end">${notationSpans(label, 12.5)}</text>`,
        )}
        <path class="axis" d="M0 ${height}H${width}" />
        ${this.#numbers(width, height)}
        <g class="now-mark" transform="translate(0 0)"><path class="now-line" d="M0 ${-TOP}V${height + 5}" /></g>
        ${this.#thread(y)}
        ${this.#marks(axis, height, pitch)}
        <rect class="hit" x="0" y=${-TOP} width=${width} height=${height + TOP + FOOT} />
      </g>
    </svg>`;
  }

  #bands(pitch: number, height: number) {
    const wide = Math.max(Math.min(pitch, 26), 8);
    const band = (step: number | undefined, name: string) =>
      step === undefined || step < 0 || step >= this.#positions.length
        ? nothing
        : svg`<rect class=${name} x=${this.#positions[step] - wide / 2} y=${-TOP} width=${wide} height=${height + TOP} />`;
    const selected = this.#step.value ?? -1;
    const bar =
      selected >= 0 && selected < this.#positions.length
        ? svg`<path class="chosen-bar" d="M${this.#positions[selected] - wide / 2} ${height}h${wide}" />`
        : nothing;
    return svg`${band(this.#step.value, 'chosen')}${band(this.#hover.value, 'pointed')}${bar}`;
  }

  // Own steps of the chosen line, null where all are shown.
  get #own(): readonly number[] | null {
    if (this.choice === 'all') return null;
    let line = this.choice;
    if (line === 'selected') {
      const history = this.#history.value!;
      const emitter = history.steps.emitter[this.#step.value ?? -1] ?? -1;
      if (emitter < 0) return null;
      line = history.entries.line[emitter];
    }
    return this.#lines.find((own) => own.line === line)?.steps ?? [];
  }

  #thread(y: (angle: number) => number) {
    const own = this.#own;
    if (!own) return nothing;
    const { openingAngle } = this.#measures.value!;
    const points = own.filter((step) => openingAngle[step] > 0);
    const path = points.map((step, k) => `${k ? 'L' : 'M'}${this.#positions[step]} ${y(openingAngle[step])}`);
    return svg`<path class="thread" d=${path.join('')} />`;
  }

  #marks(axis: AngleAxis, height: number, pitch: number) {
    const { openingAngle, partnerAngle, birthAngle } = this.#measures.value!;
    const { steps, channels } = this.#history.value!;
    const own = this.#own;
    const size = Math.min(Math.max(pitch * 0.34, 1.4), 4.4);
    const half = Math.min(Math.max(pitch * 0.36, 1.5), 9);
    const y = (angle: number): number => angleHeight(axis, angle, height);
    const bar = (name: string, angle: number, reach: number) =>
      angle > 0
        ? svg`<path class="under" d="M${-reach} ${y(angle)}h${2 * reach}" /><path class=${name} d="M${-reach} ${y(angle)}h${2 * reach}" />`
        : nothing;
    return Array.from(this.#positions, (at, step) => {
      const opening = openingAngle[step];
      const partner = partnerAngle[step];
      const aside = own && !own.includes(step) ? 'aside' : '';
      return svg`<g class="column ${aside}" transform="translate(${at} 0)">
        ${opening > 0 && partner > 0 ? svg`<path class="stem" d="M0 ${y(opening)}V${y(partner)}" />` : nothing}
        ${bar('birth', birthAngle[step], half * 1.25)}
        ${bar('partner', partner, half)}
        ${
          opening > 0
            ? svg`<g transform="translate(0 ${y(opening)})">${openingMark(channels[steps.channel[step]] ?? '', size)}</g>`
            : nothing
        }
      </g>`;
    });
  }

  #numbers(width: number, height: number) {
    const selected = this.#step.value ?? -1;
    const label = this.along === 'step' ? 'step' : '*L*';
    return svg`
      ${this.along === 'step' ? this.#stepNumbers(width, height, selected) : this.#timeNumbers(width, height)}
      <text x="-8" y=${height + 16} text-anchor="end">${notationSpans(label, 12.5)}</text>`;
  }

  #stepNumbers(width: number, height: number, selected: number) {
    const count = this.#positions.length;
    const stride = numberStride(count, width);
    const room = 20;
    const number = (step: number, name: string) =>
      svg`<text class=${name} x=${this.#positions[step]} y=${height + 16} text-anchor="middle">${stepNumber(step)}</text>`;
    const found = [];
    for (let step = 0; step < count; step += stride) {
      const near = selected >= 0 && Math.abs(this.#positions[step] - this.#positions[selected]) < room;
      if (!near) found.push(number(step, ''));
    }
    if (selected >= 0 && selected < count) found.push(number(selected, 'chosen-number'));
    return found;
  }

  #timeNumbers(width: number, height: number) {
    const { end } = this.#playhead!;
    const stride = numberStride(end, width);
    const found = [];
    for (let time = 0; time <= end; time += stride) {
      found.push(svg`<text x=${(time / end) * width} y=${height + 16} text-anchor="middle">${time}</text>`);
    }
    return found;
  }

  #stepAt(event: MouseEvent): number {
    const left = (event.currentTarget as Element).getBoundingClientRect().left + LEFT;
    return nearestStep(
      this.#positions,
      event.clientX - left,
      Math.max(this.#plotWidth / Math.max(this.#positions.length, 1), 8),
    );
  }

  readonly #point = (event: PointerEvent): void => {
    this.#history.store?.setHoverStep(this.#stepAt(event));
  };
  readonly #unpoint = (): void => {
    this.#history.store?.setHoverStep(-1);
  };
  readonly #select = (event: MouseEvent): void => {
    const step = this.#stepAt(event);
    if (step >= 0) this.#history.store?.selectStep(step);
  };
  readonly #choose = (event: Event): void => {
    const select = event.target as HTMLSelectElement;
    const { value } = select;
    this.choice = value === 'all' || value === 'selected' ? value : Number(value);
    releaseFocus(select);
  };
  readonly #turn = (event: Event): void => {
    const select = event.target as HTMLSelectElement;
    this.along = select.value === 'time' ? 'time' : 'step';
    releaseFocus(select);
  };
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-angle-trail': AngleTrailElement;
  }
}
