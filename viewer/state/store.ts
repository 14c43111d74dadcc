import type { History, SampleHead, StepMeasures } from '../../engine/index.ts';
import { log } from '../../engine/math/index.ts';
import type { ByteSource } from '../../formats/index.ts';
import type { EventFile, OpenedFile } from './event-file.ts';
import { type Frames, Playhead, windowFrames } from './playhead.ts';

export type Theme = 'light' | 'dark';

/** What is on the workbench. A slice that did not change keeps its identity. */
export interface ViewerState {
  readonly source: {
    readonly status: 'empty' | 'loading' | 'ready' | 'failed';
    readonly name: string;
    readonly eventCount: number;
    /** Why the file could not be opened, or what a lasting banner says about it. */
    readonly message: string | null;
  };
  readonly sample: SampleHead | null;
  /** Number of the event asked for, which is the one shown unless it is loading or failed. */
  readonly event: number;
  /** Why the event asked for could not be read, null where it could. */
  readonly eventMessage: string | null;
  readonly history: History | null;
  readonly measures: StepMeasures | null;
  /** Selected step, −1 for none. */
  readonly step: number;
  /** Step under the pointer in any view, −1 for none. */
  readonly hoverStep: number;
  readonly theme: Theme;
}

/** The parts of the program that the store works with. */
export interface StoreParts {
  /** Opens a file, what is whole of a damaged one; rejects with an error whose message can be shown. */
  open(source: ByteSource): Promise<OpenedFile>;
  measure(history: History): StepMeasures;
  frames?: Frames;
}

const NOTHING: ViewerState = {
  source: { status: 'empty', name: '', eventCount: 0, message: null },
  sample: null,
  event: -1,
  eventMessage: null,
  history: null,
  measures: null,
  step: -1,
  hoverStep: -1,
  theme: 'light',
};

const textOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/**
 * The one state of the workbench: file, event, selection and theme; the clock is its `playhead`.
 *
 * Every view reads slices of it and calls its methods; no view knows another.
 */
export class Store {
  #state: ViewerState = NOTHING;
  #file: EventFile | null = null;
  // Answers that arrive after a newer question are dropped.
  #question = 0;
  readonly #listeners = new Set<() => void>();
  readonly #parts: StoreParts;
  readonly playhead: Playhead;

  constructor(parts: StoreParts) {
    this.#parts = parts;
    this.playhead = new Playhead((step) => this.#set({ step }), parts.frames ?? windowFrames);
  }

  get state(): ViewerState {
    return this.#state;
  }

  /** The open file, null where there is none. */
  get file(): EventFile | null {
    return this.#file;
  }

  /** Call `listener` with a slice of the state now and whenever it becomes another value. @returns what ends that. */
  subscribe<T>(slice: (state: ViewerState) => T, listener: (value: T) => void): () => void {
    let value = slice(this.#state);
    const check = (): void => {
      const next = slice(this.#state);
      if (Object.is(next, value)) return;
      value = next;
      listener(next);
    };
    this.#listeners.add(check);
    listener(value);
    return () => this.#listeners.delete(check);
  }

  /**
   * Open a file and its event `event`, at `step`. A file that cannot be opened leaves an empty workbench with
   * `source.message`; a damaged one opens with what is whole of it, and the message stays.
   */
  async openSource(source: ByteSource, event = 0, step = -1): Promise<void> {
    const question = ++this.#question;
    const { theme } = this.#state;
    const before = this.#file;
    this.#file = null;
    this.#set({
      ...NOTHING,
      theme,
      source: { status: 'loading', name: source.name, eventCount: 0, message: null },
    });
    this.playhead.load([], 0);
    await before?.close?.();
    try {
      const { file, warning } = await this.#parts.open(source);
      if (question !== this.#question) {
        await file.close?.();
        return;
      }
      this.#file = file;
      this.#set({
        sample: file.sample,
        source: { status: 'ready', name: source.name, eventCount: file.eventCount, message: warning },
      });
    } catch (error) {
      if (question !== this.#question) return;
      this.#set({
        source: { status: 'failed', name: source.name, eventCount: 0, message: textOf(error) },
      });
      return;
    }
    if (this.#file.eventCount > 0) {
      await this.openEvent(Math.min(Math.max(event, 0), this.#file.eventCount - 1), step);
    }
  }

  /**
   * Read an event and show it from its hard process on, or at rest on `step`. Where it cannot be read `eventMessage` says why,
   * and `source.message` from then on.
   *
   * @throws RangeError where the file has no such event; nothing changes then.
   */
  async openEvent(n: number, step = -1): Promise<void> {
    const file = this.#file;
    if (!file || !Number.isInteger(n) || n < 0 || n >= file.eventCount) {
      throw new RangeError(`event ${n} of a file of ${file?.eventCount ?? 0} events`);
    }
    const question = ++this.#question;
    this.playhead.pause();
    this.#set({ event: n, eventMessage: null, hoverStep: -1 });
    let history: History;
    try {
      history = await file.event(n);
    } catch (error) {
      if (question !== this.#question) return;
      const message = textOf(error);
      const { source } = this.#state;
      this.playhead.load([], 0);
      // From now on the reader knows that the file is damaged, whichever event is on the screen.
      this.#set({
        source: { ...source, message: source.message ?? message },
        ...{ history: null, measures: null, step: -1, eventMessage: message },
      });
      return;
    }
    if (question !== this.#question) return;
    const measures = this.#parts.measure(history);
    const { hardScale, tLow } = history.head;
    this.playhead.load(measures.evolutionTime.subarray(0, history.steps.length), log(hardScale / tLow));
    this.#set({ history, measures, step: -1 });
    if (step >= 0 && step < history.steps.length) this.playhead.rest(step);
  }

  /** Select a step, −1 for none. A step that is still to come takes the clock along, so that it can be seen. */
  selectStep(step: number): void {
    const count = this.#state.history?.steps.length ?? 0;
    const next = Number.isInteger(step) && step >= 0 && step < count ? step : -1;
    if (next > this.playhead.passed) this.playhead.rest(next);
    else this.#set({ step: next });
  }

  setHoverStep(step: number): void {
    this.#set({ hoverStep: step });
  }

  setTheme(theme: Theme): void {
    this.#set({ theme });
  }

  #set(change: Partial<ViewerState>): void {
    this.#state = { ...this.#state, ...change };
    for (const check of this.#listeners) check();
  }
}
