import { describe, expect, it } from 'vitest';
import { judgeFirstDensity, judgeSecondStep } from './correlations-judge.ts';
import type { CouplingKind, Settings } from './independent/index.ts';

// As correlations.test.ts with finer bins, larger samples and more couplings; each chi-square above 1e-5.
const LEVEL = 1e-5;
const COUPLINGS: CouplingKind[] = [
  { kind: 'fixed', value: 0.118 },
  { kind: 'one-loop' },
  { kind: 'two-loop' },
];
const PLANE = {
  kT: [1, 1.15, 1.3, 1.5, 1.75, 2, 2.5, 3, 4, 4.8, 6, 8, 11, 15, 20, 28, 46],
  rapidity: [-5, -3, -2.5, -2, -1.5, -1, -0.5, 0, 0.5, 1, 1.5, 2, 2.5, 3, 3.5, 4, 5],
};
const FIRST = { kT: [1, 2, 5, 46], rapidity: [-5, 0, 2, 5] };
const SECOND = { kT: [1, 1.3, 2, 4, 46], rapidity: [-5, -1, 0, 1, 2, 5] };

describe.each(['kt', 'virtuality'] as const)('steps of large samples in %s ordering', (order) => {
  it.each(COUPLINGS)('have the two-dimensional densities of quadrature, coupling $kind', (coupling) => {
    const settings: Settings = { energy: 91.1876, order, coupling, cutoff: 1, flavours: 5, quark: 1 };
    for (const process of ['ee', 'scalar-gg'] as const) {
      const density = judgeFirstDensity({ settings, process, seed: 511, events: 400_000 }, PLANE);
      for (const [channel, { pValue, bins }] of density) {
        expect(bins, channel).toBeGreaterThan(60);
        expect(pValue, `${process} ${channel}`).toBeGreaterThan(LEVEL);
      }
    }
    for (const process of ['ee', 'scalar-gg'] as const) {
      const groups = judgeSecondStep({ settings, process, seed: 512, events: 15_000 }, FIRST, SECOND);
      expect(groups.size).toBe(9);
      for (const [group, { pValue, events }] of groups)
        expect(pValue, `${process}, group ${group}, ${events} events`).toBeGreaterThan(LEVEL);
    }
  });
});
