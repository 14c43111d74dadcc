import { describe, expect, it } from 'vitest';
import { engineEvents } from './engine-sample.ts';
import { hardEnd, judgeFirstStep } from './first-step.ts';
import { type CouplingKind, countsPValue, firstStep, type Settings } from './independent/index.ts';

// The no-branching probability and the first step of e+e- -> q qbar against quadrature of physics.md section 4. Seeds
// are fixed; a pull beyond four happens by chance with probability 6e-5, a p-value below 1e-4 with that probability.
const COUPLINGS: CouplingKind[] = [
  { kind: 'fixed', value: 0.118 },
  { kind: 'one-loop' },
  { kind: 'two-loop' },
];
const AT_Z = { energy: 91.1876, cutoff: 1, flavours: 5, quark: 1 } as const;

describe.each(['kt', 'virtuality'] as const)('the first step in %s ordering', (order) => {
  it.each(COUPLINGS)('follows quadrature with coupling $kind', (coupling) => {
    const verdict = judgeFirstStep({ ...AT_Z, order, coupling }, 101, 6000);
    expect(Math.abs(verdict.emptyPull)).toBeLessThan(4);
    expect(Math.abs(verdict.endPull)).toBeLessThan(4);
    expect(Math.min(verdict.time, verdict.fraction, verdict.azimuth)).toBeGreaterThan(1e-4);
  });
});

describe('the first step', () => {
  it('is found wrong when the coupling is 8 percent too large', () => {
    const settings: Settings = { ...AT_Z, order: 'kt', coupling: { kind: 'fixed', value: 0.118 } };
    const verdict = judgeFirstStep(settings, 101, 6000, { coupling: { kind: 'fixed', value: 0.1274 } });
    expect(Math.abs(verdict.emptyPull)).toBeGreaterThan(4);
  });

  it('is found wrong when it is drawn in the other ordering', () => {
    const settings: Settings = { ...AT_Z, order: 'kt', coupling: { kind: 'one-loop' } };
    const verdict = judgeFirstStep(settings, 101, 6000, { order: 'virtuality' });
    expect(verdict.time).toBeLessThan(1e-4);
  });

  it.each(['kt', 'virtuality'] as const)('has the z distribution of quadrature, %s', (order) => {
    const settings: Settings = { ...AT_Z, order, coupling: { kind: 'one-loop' } };
    const expected = firstStep(hardEnd(settings));
    const edges = [0, 0.05, 0.15, 0.3, 0.45, 0.6, 0.7, 0.8, 0.87, 0.92, 0.95, 0.97, 0.985, 0.995, 1];
    const counts = new Array<number>(edges.length - 1).fill(0);
    let total = 0;
    for (const { steps } of engineEvents({ ...settings, seed: 102 }, 10000)) {
      if (steps.length === 0) continue;
      total++;
      counts[edges.findIndex((edge) => edge > steps.z[0]) - 1]++;
    }
    const below = edges.map((z) => (z === 0 ? 0 : z === 1 ? 1 : expected.fractionBelow(z)));
    const wanted = counts.map((_, n) => total * (below[n + 1] - below[n]));
    expect(countsPValue(counts, wanted, 1)).toBeGreaterThan(1e-4);
  });
});
