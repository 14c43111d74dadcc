import { describe, expect, it } from 'vitest';
import { type History, HistoryBatch, Philox, uniform } from '../../../../engine/index.ts';
import { coherentBatch, coherentEvent, firstDifference, makeShower, SAMPLES } from './events.ts';

const TWO_PI = 2 * 3.141592653589793;

/**
 * Azimuths of every step from the tables alone, by the rule of BranchingTree: a line has a key (word, draw); its n-th
 * branching draws from the counters (draw + k, word + n); block `rejected + 1` holds the azimuth in word 0 and the key
 * of the new line in words 2 and 3. The roots have their keys from the counter (number of fresh beginnings, 1).
 */
function azimuthsFromTables(history: History, seed: number): number[] {
  const { steps, head } = history;
  const words = (draw: number, step: number): number[] =>
    Philox.words([draw, step, head.stream!, 0], [seed, 0]);
  const keys = new Map<number, [number, number]>();
  const roots = words(head.regrown!, 1);
  for (let root = 0; root < 2; root++) {
    const row = history.entries.role.findIndex((role, n) => role === 5 && history.entries.line[n] === root);
    keys.set(row, [roots[2 * root], roots[2 * root + 1]]);
  }
  return Array.from({ length: steps.length }, (_, s) => {
    const [word, draw] = keys.get(steps.emitter[s])!;
    const block = words((draw + steps.rejected[s] + 1) | 0, word);
    keys.set(steps.i[s], [(word + 1) | 0, draw]);
    keys.set(steps.j[s], [block[2], block[3]]);
    return TWO_PI * uniform(block[0]);
  });
}

describe('random numbers of a parton line', () => {
  it('follow from the tables alone, step by step', () => {
    for (const sample of SAMPLES) {
      const batch = coherentBatch({ ...sample, seed: 77 }, 30);
      for (let n = 0; n < 30; n++) {
        const history = batch.view(n);
        expect([...history.steps.azimuth]).toEqual(azimuthsFromTables(history, 77));
      }
    }
  });

  it('give an event the same bits alone, after other events, in reverse order, and with trials', () => {
    for (const sample of SAMPLES) {
      const shower = makeShower(sample);
      const forward = new HistoryBatch(shower.sample);
      for (let event = 0; event < 12; event++) shower.grow(forward, event);
      const backward = new HistoryBatch(shower.sample);
      for (let event = 11; event >= 0; event--) shower.grow(backward, event);
      for (let event = 0; event < 12; event++) {
        expect(firstDifference(coherentEvent(sample, event), forward.view(event))).toBe('');
        expect(firstDifference(backward.view(11 - event), forward.view(event))).toBe('');
        expect(firstDifference(coherentEvent({ ...sample, trials: true }, event), forward.view(event))).toBe(
          '',
        );
      }
    }
  });

  it('do not depend on what other lines do', () => {
    // what emitted gluons may do changes nothing of the branchings of the quarks' own lines
    const claims = (flavours: number): number[][] => {
      const batch = coherentBatch({ coherent: true, quark: 2, flavours, energy: 300 }, 200);
      return [...Array(200).keys()].map((n) => {
        const { steps } = batch.view(n);
        return [...steps.t].filter((_, s) => steps.generation[s] === 0);
      });
    };
    expect(claims(0)).toEqual(claims(5));
  });

  it('differ between seeds and between events', () => {
    const azimuths = [1, 2, 4294967297].flatMap((seed) => [
      ...coherentBatch({ coherent: true, energy: 1000, seed }, 50).steps.azimuth.subarray(0, 400),
    ]);
    expect(new Set(azimuths).size).toBe(1200);
  });
});
