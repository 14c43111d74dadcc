import type { History } from '../../../engine/index.ts';
import { log } from '../../../engine/math/index.ts';
import type { EventFile } from '../../state/index.ts';

/** Steps of an event along L as one path: full ticks, short ones for g → q q̄. */
export function stripPath({ head, steps, channels }: History, width: number, height: number): string {
  const end = log(head.hardScale / head.tLow);
  const parts: string[] = [];
  for (let step = 0; step < steps.length; step++) {
    const share = log(head.hardScale / steps.t[step]) / end;
    if (!(share >= 0 && share <= 1)) continue;
    const short = channels[steps.channel[step]] === 'g_qq';
    const x = Math.round(share * (width - 1) * 2) / 2 + 0.5;
    parts.push(`M${x} ${short ? height / 2 : 0}V${height}`);
  }
  return parts.join('');
}

const KEPT = 3000;

/** Strips of the events that came into view, read one event at a time, the last asked for first. */
export class EventStrips {
  readonly #file: EventFile;
  readonly #changed: () => void;
  readonly #draw: (history: History) => string;
  readonly #known = new Map<number, string>();
  #wanted: number[] = [];
  #busy = false;

  /** @param changed is called when strips that were asked for have become known. */
  constructor(file: EventFile, draw: (history: History) => string, changed: () => void) {
    this.#file = file;
    this.#draw = draw;
    this.#changed = changed;
  }

  /** Path of an event's strip, undefined while it is not known. */
  path(event: number): string | undefined {
    return this.#known.get(event);
  }

  /** Read these events next, and forget what was asked for before. */
  want(events: Iterable<number>): void {
    this.#wanted = [...events].filter((event) => !this.#known.has(event)).reverse();
    if (!this.#busy && this.#wanted.length > 0) void this.#work();
  }

  async #work(): Promise<void> {
    this.#busy = true;
    let since = performance.now();
    for (let event = this.#wanted.pop(); event !== undefined; event = this.#wanted.pop()) {
      // An event that cannot be read has no strip; opening it says why.
      const path = await this.#file.event(event).then(this.#draw, () => '');
      this.#known.set(event, path);
      if (this.#known.size > KEPT) this.#known.delete(this.#known.keys().next().value!);
      if (performance.now() - since > 60) {
        this.#changed();
        // Let the page breathe between two reads.
        await new Promise((resolve) => setTimeout(resolve));
        since = performance.now();
      }
    }
    this.#busy = false;
    this.#changed();
  }
}
