import { describe, expect, it } from 'vitest';
import {
  aliveEntries,
  createGrower,
  type History,
  HistoryBatch,
  ROLES,
  resolveSettings,
} from '../../engine/index.ts';
import { exponentTable, makeLine } from './coherent-rates.ts';
import { coherentEvents } from './coherent-sample.ts';
import { uniformPValue } from './independent/index.ts';

const ENERGY = 300;
const SETTINGS = {
  quark: 1,
  energy: ENERGY,
  cutoff: 1,
  flavours: 5,
  coupling: { kind: 'one-loop' },
} as const;
const KEEP = 1;

const exponents = new Map(
  [1, 21].map((id) => [id, exponentTable(makeLine(id, ENERGY, { ...SETTINGS, masses: false }), ENERGY ** 2)]),
);

/** Expected branchings between the kept step and t of all lines that live after it. */
function expected({ entries, steps }: History, alive: Iterable<number>, t: number): number {
  let sum = 0;
  for (const row of alive) {
    const s = entries.madeBy[row];
    const root = ROLES[entries.role[row]] === 'reconstructed';
    const share = row === steps.i[s] ? steps.z[s] : 1 - steps.z[s];
    const start = root ? ENERGY ** 2 : share * share * steps.t[s];
    const exponent = exponents.get(entries.id[row] === 21 ? 21 : 1)!;
    const top = Math.min(start, steps.t[KEEP]);
    if (top > t) sum += exponent(top) - exponent(t);
  }
  return sum;
}

// p < 1e-5 and four standard errors: by chance once in ten thousand runs; the seeds are fixed.
describe('regrowing coherent branching', () => {
  it('gives the next step of all lines together the distribution of their kernels, and none as often', () => {
    const shower = createGrower(resolveSettings({ ...SETTINGS, seed: 8, shower: 'coherent' }));
    const batch = new HistoryBatch(shower.sample);
    const uniform: number[] = [];
    let [none, mean, variance] = [0, 0, 0];
    for (const original of coherentEvents(SETTINGS, 9, 40)) {
      if (original.steps.length <= KEEP) continue;
      const alive = aliveEntries(original, KEEP);
      const nothing = Math.exp(-expected(original, alive, shower.sample.tLow));
      for (let stream = 0; stream < 80; stream++) {
        batch.clear();
        shower.regrow(batch, original, KEEP, stream, 0);
        mean += nothing;
        variance += nothing * (1 - nothing);
        if (batch.steps.length === KEEP + 1) none++;
        else {
          const survival = Math.exp(-expected(original, alive, batch.steps.t[KEEP + 1]));
          uniform.push((survival - nothing) / (1 - nothing));
        }
      }
    }
    expect(uniform.length).toBeGreaterThan(1500);
    expect(uniformPValue(uniform)).toBeGreaterThan(1e-5);
    expect(Math.abs(none - mean)).toBeLessThan(4 * Math.sqrt(variance));
  });

  it('from the hard process on gives fresh events', () => {
    const shower = createGrower(resolveSettings({ ...SETTINGS, seed: 8, shower: 'coherent' }));
    const batch = new HistoryBatch(shower.sample);
    const original = coherentEvents(SETTINGS, 9, 1).next().value!;
    const start = 2 * exponents.get(1)!(ENERGY ** 2);
    const uniform: number[] = [];
    for (let stream = 0; stream < 2000; stream++) {
      batch.clear();
      shower.regrow(batch, original, -1, stream, 0);
      if (batch.steps.length === 0) continue;
      const survival = Math.exp(2 * exponents.get(1)!(batch.steps.t[0]) - start);
      uniform.push((survival - Math.exp(-start)) / (1 - Math.exp(-start)));
    }
    expect(uniformPValue(uniform)).toBeGreaterThan(1e-5);
  });
});
