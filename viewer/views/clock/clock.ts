import { html, LitElement, nothing, type PropertyValues, svg } from 'lit';
import { customElement, state } from 'lit/decorators.js';
import { live } from 'lit/directives/live.js';
import { type Playhead, SPEEDS, StoreSlice, stepNumber } from '../../state/index.ts';
import { BoxSize, releaseFocus } from '../frame/index.ts';
import {
  channelNotation,
  controlStyles,
  drawingStyles,
  notation,
  notationSpans,
  notationStyles,
  numberText,
  panelStyles,
  plainNotation,
} from '../type/index.ts';
import { clockStyles } from './clock.styles.ts';
import { type ClockIcon, clockIcon, stepMark } from './clock-icons.ts';
import { axisTicks, scaleAt, scaleWords } from './scale-axis.ts';
import { nearestStep, numberedSteps } from './step-numbers.ts';

/** Rows of the drawing [px from its top]. */
interface Rows {
  readonly marks: number;
  readonly bar: number;
  readonly barHeight: number;
  readonly numbers: number;
  readonly axis: number;
  readonly labels: number;
  readonly caption: number;
  readonly height: number;
}

const ROOMY: Rows = {
  marks: 24,
  bar: 54,
  barHeight: 18,
  numbers: 86,
  axis: 96,
  labels: 114,
  caption: 135,
  height: 142,
};
const CLOSE: Rows = {
  marks: 20,
  bar: 40,
  barHeight: 14,
  numbers: 67,
  axis: 75,
  labels: 91,
  caption: 109,
  height: 114,
};

// A click this near to a mark means its step [px].
const REACH = 6;

/**
 * The clock: evolution time on a logarithmic scale axis from the hard scale to the cutoff, one mark per step, and the
 * playhead that can be dragged.
 *
 * The playhead follows the clock by itself, without the component being drawn again.
 */
@customElement('bl-clock')
export class ClockElement extends LitElement {
  static override styles = [panelStyles, controlStyles, notationStyles, drawingStyles, clockStyles];

  readonly #history = new StoreSlice(this, (s) => s.history);
  readonly #step = new StoreSlice(this, (s) => s.step);
  readonly #hover = new StoreSlice(this, (s) => s.hoverStep);
  readonly #box = new BoxSize(this);
  @state() private motion = '';
  @state() private speed = 1;
  #leave: (() => void) | undefined;
  #positions = new Float64Array(0);
  #marks: Element[] = [];
  #passed = -2;
  #dragging = false;

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.#leave?.();
    this.#leave = undefined;
  }

  override willUpdate(): void {
    const store = this.#history.store;
    if (store && !this.#leave) this.#leave = store.playhead.subscribe(this.#follow);
    const count = this.#history.value?.steps.length ?? 0;
    const { end } = this.#playhead ?? { end: 0 };
    const width = this.#box.width;
    this.#positions = new Float64Array(count);
    for (let step = 0; step < this.#positions.length; step++) {
      this.#positions[step] = end > 0 ? (this.#playhead!.timeOf(step) / end) * width : 0;
    }
  }

  override updated(_changed: PropertyValues): void {
    this.#marks = [...this.renderRoot.querySelectorAll('.mark')];
    this.#passed = -2;
    if (this.#playhead) this.#follow();
  }

  get #playhead(): Playhead | undefined {
    return this.#history.store?.playhead;
  }

  // Everything that moves with the clock, set without drawing the component again.
  readonly #follow = (): void => {
    const playhead = this.#playhead!;
    this.motion = playhead.playing ? (playhead.direction > 0 ? 'forward' : 'back') : '';
    this.speed = playhead.speed;
    const now = this.renderRoot.querySelector<SVGGElement>('.now-mark');
    // The event may be gone already while the drawing still stands.
    if (!now || !this.#history.value) return;
    const x = playhead.end > 0 ? (playhead.time / playhead.end) * this.#box.width : 0;
    now.transform.baseVal.getItem(0).setTranslate(x, 0);
    this.renderRoot.querySelector<SVGRectElement>('.past')!.width.baseVal.value = x;
    const passed = playhead.passed;
    if (passed !== this.#passed) {
      this.#marks.forEach((mark, step) => {
        mark.classList.toggle('future', step > passed);
      });
      this.#passed = passed;
    }
    this.#tellNow(passed);
  };

  #tellNow(passed: number): void {
    const { hardScale, meaning } = this.#history.value!.head;
    const { root, unit, symbol } = scaleWords(meaning.tUnit);
    const scale = `${numberText(scaleAt(hardScale, this.#playhead!.time, root), 3)} ${unit}`;
    const count = this.#positions.length;
    const after = passed < 0 ? 'hard process' : `after step ${stepNumber(passed)}`;
    this.renderRoot.querySelector('.now-scale')!.textContent = scale;
    this.renderRoot.querySelector('.now-step')!.textContent = after;
    // A slider that speaks sixty times a second says nothing.
    if (this.#playhead!.playing) return;
    const slider = this.renderRoot.querySelector('[role=slider]')!;
    slider.setAttribute('aria-valuenow', this.#playhead!.time.toFixed(3));
    slider.setAttribute('aria-valuetext', `${plainNotation(symbol)} = ${scale}, ${after}, ${count} steps`);
  }

  override render() {
    return html`
      <header>
        <h2>Clock</h2>
        ${this.#transport()}
        <label class="speed">
          <span class="choice">
            <select aria-label="speed, evolution time L per second" @change=${this.#changeSpeed}>
              ${SPEEDS.map((speed) => html`<option value=${speed} ?selected=${live(speed === this.speed)}>${speed}</option>`)}
            </select>
          </span>
          ${notation('*L* per s')}
        </label>
        <div class="key" aria-hidden="true">
          ${['q_qg', 'g_gg', 'g_qq'].map(
            (channel) =>
              html`<span><svg width="9" height="14" viewBox="-4.5 -3 9 14">${stepMark(channel, 11)}</svg><b>${notation(channelNotation(channel))}</b></span>`,
          )}
        </div>
        ${this.#now()}
      </header>
      ${this.#plot()}
    `;
  }

  #now() {
    if (!this.#history.value) return nothing;
    const { symbol } = scaleWords(this.#history.value.head.meaning.tUnit);
    return html`<div class="state now">
      ${notation(`${symbol} = `)}<span class="now-scale"></span>, <span class="now-step"></span>
    </div>`;
  }

  #transport() {
    const button = (icon: ClockIcon, word: string, label: string, keys: string, act: () => void) =>
      html`<button type="button" aria-label=${label} title="${label} (${keys})" ?disabled=${!this.#history.value} @click=${act}>
        ${clockIcon(icon)}<span>${word}</span>
      </button>`;
    const playhead = this.#playhead;
    if (!playhead) return nothing;
    const forward = this.motion === 'forward';
    const back = this.motion === 'back';
    return html`<div class="transport" role="group" aria-label="playback">
      ${button('start', 'start', 'start: to the hard process', 'Home', () => playhead.toStart())}
      ${button('back', 'step', 'step back', '←', () => playhead.stepBack())}
      ${button(back ? 'pause' : 'reverse', back ? 'pause' : 'reverse', back ? 'pause' : 'play in reverse', back ? 'Space' : 'Shift ←', () => (back ? playhead.pause() : playhead.reverse()))}
      ${button(forward ? 'pause' : 'play', forward ? 'pause' : 'play', forward ? 'pause' : 'play', 'Space', () => (forward ? playhead.pause() : playhead.play()))}
      ${button('forward', 'step', 'step forward', '→', () => playhead.stepForward())}
      ${button('end', 'end', 'end: to the cutoff', 'End', () => playhead.toEnd())}
    </div>`;
  }

  get #rows(): Rows {
    return this.#box.width >= 860 ? ROOMY : CLOSE;
  }

  #plot() {
    const history = this.#history.value;
    const playhead = this.#playhead;
    if (!history || !playhead) return nothing;
    const rows = this.#rows;
    const { width } = this.#box;
    const { head } = history;
    const words = scaleWords(head.meaning.tUnit);
    const size = rows === ROOMY ? 12.5 : 12;
    const ticks = axisTicks({
      hardScale: head.hardScale,
      end: playhead.end,
      root: words.root,
      width,
      size,
    });
    const x = (time: number): number => (playhead.end > 0 ? (time / playhead.end) * width : 0);
    return html`<div class="plot">
      <svg
        width=${width} height=${rows.height}
        role="slider" tabindex="0" aria-label="evolution time"
        aria-valuemin="0" aria-valuemax=${playhead.end.toFixed(3)} aria-valuenow="0"
        @pointerdown=${this.#press} @pointermove=${this.#move} @pointerup=${this.#release}
        @pointercancel=${this.#release} @pointerleave=${this.#leaveMarks}
      >
        ${this.#selection(rows)}
        <rect class="bar" x="0" y=${rows.bar} width=${width} height=${rows.barHeight} />
        <rect class="past" x="0.5" y=${rows.bar + 0.5} width="0" height=${rows.barHeight - 1} />
        ${this.#stepMarks(rows)}
        <path class="axis" d="M0 ${rows.axis}H${width}" />
        ${ticks.map(({ time, label, major }) => {
          const anchor = time === 0 ? 'start' : time === playhead.end ? 'end' : 'middle';
          return svg`<path class=${major ? 'axis' : 'minor'} d="M${x(time)} ${rows.axis}v${major ? 6 : 4}" />
            ${label ? svg`<text x=${x(time)} y=${rows.labels} text-anchor=${anchor}>${label}</text>` : nothing}`;
        })}
        ${this.#caption(rows, size)}
        <g class="now-mark" transform="translate(0 0)">
          <path class="now-line" d="M0 8V${rows.bar + rows.barHeight}M0 ${rows.axis - 5}V${rows.axis}" />
          <path class="now-end" d="M-6 0H6V7L0 13L-6 7Z" />
          <path class="now-end" d="M0 ${rows.axis - 1}L-5 ${rows.axis + 7}H5Z" />
        </g>
      </svg>
    </div>`;
  }

  #selection(rows: Rows) {
    const band = (step: number | undefined, name: string) =>
      step === undefined || step < 0 || step >= this.#positions.length
        ? nothing
        : svg`<rect class=${name} x=${this.#positions[step] - 7} y=${rows.marks - 8} width="14" height=${rows.axis - rows.marks + 8} />`;
    return svg`${band(this.#step.value, 'chosen')}${band(this.#hover.value, 'pointed')}`;
  }

  #stepMarks(rows: Rows) {
    const { steps, channels } = this.#history.value!;
    const selected = this.#step.value ?? -1;
    const numbered = numberedSteps(this.#positions, selected);
    const foot = rows.bar + rows.barHeight - rows.marks;
    return Array.from(this.#positions, (at, step) => {
      const channel = channels[steps.channel[step]] ?? '';
      return svg`<g class="mark" transform="translate(${at} ${rows.marks})" ?data-selected=${step === selected}>
        ${stepMark(channel, foot)}
        ${numbered[step] ? svg`<text y=${rows.numbers - rows.marks}>${stepNumber(step)}</text>` : nothing}
      </g>`;
    });
  }

  #caption(rows: Rows, size: number) {
    const { head } = this.#history.value!;
    const { end } = this.#playhead!;
    const { width } = this.#box;
    const words = scaleWords(head.meaning.tUnit);
    const t =
      head.meaning.t === 'kT^2'
        ? ', *t* = *k*_{T}^{2}'
        : head.meaning.t === 'virtuality^2'
          ? ', *t* = *s*_{ij}'
          : '';
    return svg`
      <text x="0" y=${rows.caption}>${notationSpans('hard scale, *L* = 0', size)}</text>
      <text class="middle" x=${width / 2} y=${rows.caption} text-anchor="middle">${notationSpans(`${words.axis}${t}, *L* = ln(*t*_{0}/*t*) rises to the right`, size)}</text>
      <text x=${width} y=${rows.caption} text-anchor="end">${notationSpans(`cutoff, *L* = ${numberText(end, 4)}`, size)}</text>`;
  }

  readonly #changeSpeed = (event: Event): void => {
    const select = event.target as HTMLSelectElement;
    if (this.#playhead) this.#playhead.speed = Number(select.value);
    releaseFocus(select);
  };

  #placeOf(event: PointerEvent): number {
    return event.clientX - (event.currentTarget as Element).getBoundingClientRect().left;
  }

  readonly #press = (event: PointerEvent): void => {
    if (event.button !== 0) return;
    const at = this.#placeOf(event);
    const step = nearestStep(this.#positions, at, REACH);
    if (step >= 0) this.#playhead!.rest(step);
    else {
      this.#playhead!.pause();
      this.#seek(at);
    }
    this.#dragging = true;
    (event.currentTarget as Element).setPointerCapture(event.pointerId);
  };

  readonly #move = (event: PointerEvent): void => {
    const at = this.#placeOf(event);
    if (this.#dragging && (event.buttons & 1) === 1) this.#seek(at);
    else this.#history.store?.setHoverStep(nearestStep(this.#positions, at, REACH));
  };

  readonly #release = (): void => {
    this.#dragging = false;
  };

  readonly #leaveMarks = (): void => {
    this.#history.store?.setHoverStep(-1);
  };

  #seek(at: number): void {
    const playhead = this.#playhead!;
    playhead.seek((at / this.#box.width) * playhead.end);
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-clock': ClockElement;
  }
}
