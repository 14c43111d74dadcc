import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createGrower, growEvent, type History, HistoryBatch, ROLES } from '../../engine/index.ts';
import { settings, stream } from './random-settings.ts';

const HARD = ROLES.indexOf('hard');

/** Everything in a history as plain values, numbers by their bits (so that NaN and -0 count). */
function bits(history: History): unknown {
  const table = (rows: object | null) =>
    rows === null
      ? null
      : Object.entries(rows).map(([name, column]) => [
          name,
          typeof column === 'number' || column === null
            ? column
            : [...new Uint8Array(column.slice().buffer)].join(),
        ]);
  const { head, entries, steps, trials, channels } = history;
  return { head, channels, entries: table(entries), steps: table(steps), trials: table(trials) };
}

describe('an event', () => {
  it('is the same alone, in a run, in a run backwards, and after being grown before', () => {
    let steps = 0;
    fc.assert(
      fc.property(settings, fc.uniqueArray(stream, { minLength: 2, maxLength: 4 }), (choice, streams) => {
        const alone = streams.map((number) => bits(growEvent(choice, number)));
        for (const order of [streams, [...streams].reverse(), [...streams, ...streams]]) {
          const grower = createGrower(choice);
          const batch = new HistoryBatch(grower.sample);
          for (const number of order) grower.grow(batch, number);
          order.forEach((number, n) => {
            expect(bits(batch.view(n))).toEqual(alone[streams.indexOf(number)]);
            steps += batch.view(n).steps.length;
          });
        }
      }),
      { seed: 21, numRuns: 30 },
    );
    expect(steps).toBeGreaterThan(500);
  });

  it('differs from other events, and from the same of another seed', () => {
    fc.assert(
      fc.property(settings, stream, (choice, number) => {
        // an event without a branching still has a direction of its own
        const direction = ({ entries }: History) => entries.px[entries.role.indexOf(HARD)];
        const first = direction(growEvent(choice, number));
        const next = growEvent(choice, number === Number.MAX_SAFE_INTEGER ? 0 : number + 1);
        const reseeded = growEvent({ ...choice, seed: choice.seed === 0 ? 1 : choice.seed - 1 }, number);
        expect(Number.isFinite(first)).toBe(true);
        expect(direction(next)).not.toBe(first);
        expect(direction(reseeded)).not.toBe(first);
      }),
      { seed: 22, numRuns: 30 },
    );
  });
});
