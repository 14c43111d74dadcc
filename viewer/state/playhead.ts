/** Calls `tick` before the next picture; the browser's own, or a test's. */
export interface Frames {
  request(tick: (nowMs: number) => void): number;
  cancel(handle: number): void;
}

/** Frames of the browser's window. */
export const windowFrames: Frames = {
  request: (tick) => requestAnimationFrame(tick),
  cancel: (handle) => cancelAnimationFrame(handle),
};

/** Slowest and fastest playback [L per second]. */
export const SPEEDS = [0.125, 0.25, 0.5, 1, 2, 4, 8] as const;

/**
 * The one clock of the workbench: evolution time L = ln(t0/t), from 0 to `end`.
 *
 * It runs at constant L per second, and tells its listeners in the frame in which it moved, without allocating. Listeners
 * are also called at once when they subscribe, and when playback starts or stops.
 */
export class Playhead {
  #time = 0;
  #end = 0;
  #playing = false;
  #direction: 1 | -1 = 1;
  #speed = 1;
  #times: Float64Array = new Float64Array(0);
  #cursor = -1;
  #handle = 0;
  #last = NaN;
  readonly #listeners = new Set<(time: number) => void>();
  readonly #onStep: (step: number) => void;
  readonly #frames: Frames;

  /** @param onStep is told the step on which `stepForward` or `stepBack` came to rest, −1 for the hard process. */
  constructor(onStep: (step: number) => void = () => {}, frames: Frames = windowFrames) {
    this.#onStep = onStep;
    this.#frames = frames;
  }

  /** Evolution time L now. */
  get time(): number {
    return this.#time;
  }
  /** L at which nothing can branch any more, ln(t0/tLow). */
  get end(): number {
    return this.#end;
  }
  get playing(): boolean {
    return this.#playing;
  }
  get direction(): 1 | -1 {
    return this.#direction;
  }
  /** L per second. */
  get speed(): number {
    return this.#speed;
  }
  /** @throws RangeError unless positive and finite. */
  set speed(value: number) {
    if (!(value > 0 && value < Infinity))
      throw new RangeError(`speed ${value}, expected L per second above 0`);
    this.#speed = value;
    this.#tell();
  }
  /** Last step with L of the step <= time, −1 before the first. */
  get passed(): number {
    return this.#countUpTo(this.#time) - 1;
  }

  /** Call `listener` now and whenever the clock moves, starts or stops. @returns what ends that. */
  subscribe(listener: (time: number) => void): () => void {
    this.#listeners.add(listener);
    listener(this.#time);
    return () => this.#listeners.delete(listener);
  }

  /**
   * Take the clock of another event, at rest at `time`.
   *
   * @param times L of every step in the order of evolution; a time that is missing or falls counts as that of the step before.
   */
  load(times: ArrayLike<number>, end: number, time = 0): void {
    this.#halt();
    this.#times = new Float64Array(times.length);
    let latest = 0;
    for (let step = 0; step < times.length; step++) {
      if (times[step] > latest) latest = times[step];
      this.#times[step] = latest;
    }
    this.#end = Math.max(end > 0 && end < Infinity ? end : 0, latest < Infinity ? latest : 0);
    this.#place(time);
    this.#tell();
  }

  /** L of a step as the clock counts it. */
  timeOf(step: number): number {
    return step < 0 ? 0 : this.#times[step];
  }

  /** Run forward, from the start again where the end was reached. */
  play(): void {
    if (this.#time >= this.#end) this.#place(0);
    this.#run(1);
  }

  /** Run backward, from the end again where the start was reached. */
  reverse(): void {
    if (this.#time <= 0) this.#place(this.#end);
    this.#run(-1);
  }

  pause(): void {
    this.#halt();
    this.#tell();
  }

  /** Pause, or run forward. */
  toggle(): void {
    if (this.#playing) this.pause();
    else this.play();
  }

  /** Move the clock; a time outside [0, end] becomes the nearer end. Playback goes on from there. */
  seek(time: number): void {
    this.#place(time);
    this.#tell();
  }

  /** Come to rest on the next step, at its own time; at the end of the clock after the last one. */
  stepForward(): void {
    const next = this.#standing() + 1;
    if (next < this.#times.length) this.rest(next);
    else this.toEnd();
  }

  /** Come to rest on the step before; at the hard process before the first one. */
  stepBack(): void {
    const here = this.#standing();
    const between = here >= 0 && this.#time > this.#times[here];
    this.rest(between ? here : Math.max(here - 1, -1));
  }

  /** Come to rest on a step, −1 for the hard process, and say so. */
  rest(step: number): void {
    this.#halt();
    this.#place(this.timeOf(step));
    this.#cursor = step;
    this.#tell();
    this.#onStep(step);
  }

  toStart(): void {
    this.#halt();
    this.seek(0);
  }

  toEnd(): void {
    this.#halt();
    this.seek(this.#end);
  }

  // The step that the clock stands on or has passed last: of several at one and the same time the one it came to rest on.
  #standing(): number {
    const passed = this.passed;
    return this.#cursor >= 0 && this.#cursor <= passed && this.#times[this.#cursor] === this.#time
      ? this.#cursor
      : passed;
  }

  #countUpTo(time: number): number {
    let low = 0;
    let high = this.#times.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.#times[middle] <= time) low = middle + 1;
      else high = middle;
    }
    return low;
  }

  #place(time: number): void {
    this.#time = time > 0 ? Math.min(time, this.#end) : 0;
    this.#cursor = -1;
  }

  #run(direction: 1 | -1): void {
    this.#direction = direction;
    if (!this.#playing && this.#end > 0) {
      this.#playing = true;
      this.#last = NaN;
      this.#handle = this.#frames.request(this.#tick);
    }
    this.#tell();
  }

  #halt(): void {
    if (this.#playing) this.#frames.cancel(this.#handle);
    this.#playing = false;
  }

  readonly #tick = (nowMs: number): void => {
    // The first frame only sets the watch. A tab that was hidden goes on where it stood: no jump above a quarter second.
    const seconds = nowMs > this.#last ? Math.min((nowMs - this.#last) / 1000, 0.25) : 0;
    this.#last = nowMs;
    this.#place(this.#time + this.#direction * this.#speed * seconds);
    if (this.#direction > 0 ? this.#time >= this.#end : this.#time <= 0) this.#playing = false;
    else this.#handle = this.#frames.request(this.#tick);
    this.#tell();
  };

  #tell(): void {
    for (const listener of this.#listeners) listener(this.#time);
  }
}
