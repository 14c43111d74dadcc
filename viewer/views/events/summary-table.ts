import type { EventFile } from '../../state/index.ts';

/** Quantities of the file's index that events can be listed and ordered by. */
export const SUMMARY_KEYS = ['branchings', 'finalPartons', 'hardestKT', 'worstCoherence'] as const;
export type SummaryKey = (typeof SUMMARY_KEYS)[number];

const PAGE = 4096;

/**
 * The index of an open file as it becomes known: pages are asked for when events come into view, all of it when events are
 * ordered by a quantity.
 */
export class SummaryTable {
  readonly eventCount: number;
  readonly #columns: Readonly<Record<SummaryKey, Float32Array>>;
  readonly #pages = new Map<number, Promise<void>>();
  readonly #file: EventFile;

  constructor(file: EventFile) {
    this.#file = file;
    this.eventCount = file.eventCount;
    const column = (): Float32Array => new Float32Array(file.eventCount).fill(NaN);
    this.#columns = {
      branchings: column(),
      finalPartons: column(),
      hardestKT: column(),
      worstCoherence: column(),
    };
  }

  /** Value of an event, NaN while it is not known or where the file holds none. */
  value(key: SummaryKey, event: number): number {
    return this.#columns[key][event];
  }

  /** Whether an event's page of the index was read, or is being read. */
  asked(event: number): boolean {
    return this.#pages.has(Math.floor(event / PAGE));
  }

  /** All values of a quantity by event, as far as they are known. */
  column(key: SummaryKey): Float32Array {
    return this.#columns[key];
  }

  /** Make events `from` up to, not including, `to` known. Rejects with what reading the index rejects with. */
  async ensure(from: number, to: number): Promise<void> {
    const waits: Promise<void>[] = [];
    for (let page = Math.floor(from / PAGE); page * PAGE < Math.min(to, this.eventCount); page++) {
      let known = this.#pages.get(page);
      if (!known) {
        known = this.#load(page);
        this.#pages.set(page, known);
      }
      waits.push(known);
    }
    await Promise.all(waits);
  }

  async #load(page: number): Promise<void> {
    const from = page * PAGE;
    const to = Math.min(from + PAGE, this.eventCount);
    const found = await this.#file.summaries(from, to);
    for (const key of SUMMARY_KEYS) {
      const column = this.#columns[key];
      // Whole numbers that are not known are −1.
      for (let k = 0; k < to - from; k++) column[from + k] = found[key][k] < 0 ? NaN : found[key][k];
    }
  }
}

/**
 * Events in the order of a quantity, missing values last whichever way it runs, equals by event number.
 *
 * @returns event number by place.
 */
export function orderEvents(values: ArrayLike<number>, falling: boolean): Uint32Array {
  const order = Uint32Array.from({ length: values.length }, (_, event) => event);
  const sign = falling ? -1 : 1;
  return order.sort((a, b) => {
    const missing = Number(Number.isNaN(values[a])) - Number(Number.isNaN(values[b]));
    if (missing !== 0) return missing;
    return sign * (values[a] - values[b]) || a - b;
  });
}
