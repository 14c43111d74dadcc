import { describe, expect, it } from 'vitest';
import { stepProbabilities } from './correlations.ts';
import { judgeFirstDensity, judgeSecondStep } from './correlations-judge.ts';
import {
  couplingFor,
  type End,
  exponent,
  firstStep,
  quarkKernel,
  type Settings,
} from './independent/index.ts';

// Steps in two dimensions, kT and rapidity with respect to the dipole, and the second given the first, against direct
// quadrature of the kernels. Seeds are fixed; a clean sample has a chi-square probability below 1e-4 one time in 1e4.
const LEVEL = 1e-4;
const AT_Z: Settings = {
  energy: 91.1876,
  order: 'kt',
  coupling: { kind: 'one-loop' },
  cutoff: 1,
  flavours: 5,
  quark: 1,
};
const PLANE = {
  kT: [1, 1.3, 1.5, 2, 3, 4.8, 8, 15, 46],
  rapidity: [-5, -2.5, -1.5, -0.5, 0.5, 1.5, 2.5, 3.5, 5],
};
const FEW_FIRST = { kT: [1, 4.8, 46], rapidity: [-5, 1, 5] };
const FEW_SECOND = { kT: [1, 1.5, 3, 46], rapidity: [-5, 0, 1.5, 5] };

describe('the quadrature of these tests', () => {
  it.each(['kt', 'virtuality'] as const)('finds all steps somewhere, %s', (order) => {
    const coupling = couplingFor(AT_Z.coupling, 1, AT_Z.energy ** 2);
    const end: End = { q2: AT_Z.energy ** 2, kernel: quarkKernel, coupling, order, cut2: 1 };
    const competitors = [1, 2].map(() => ({ channel: 'q_qg' as const, end }));
    const hard = AT_Z.energy ** 2 / (order === 'kt' ? 4 : 1);
    const all = { kT: [0.9, 1.5, 5, 50], rapidity: [-20, -1, 0, 2, 20] };
    const [found] = stepProbabilities(competitors, hard, all).values();
    const total = found.reduce((sum, p) => sum + p, 0);
    expect(total).toBeCloseTo(1 - firstStep(end).noBranching, 4);
    // the number of emissions per unit of rapidity at given kT is what the exponent integrates
    expect(total).toBeCloseTo(1 - Math.exp(-2 * exponent(end, 0, hard)), 4);
  });
});

describe.each(['kt', 'virtuality'] as const)('steps in %s ordering', (order) => {
  const settings = { ...AT_Z, order };

  it.each(['ee', 'scalar-gg'] as const)(
    'begin with the density of the kernels in each channel, %s',
    (process) => {
      const density = judgeFirstDensity({ settings, process, seed: 501, events: 20_000 }, PLANE);
      expect([...density.keys()]).toEqual(process === 'ee' ? ['q_qg'] : ['g_gg', 'g_qq']);
      for (const [channel, { pValue, bins }] of density) {
        expect(bins, channel).toBeGreaterThan(15);
        expect(pValue, channel).toBeGreaterThan(LEVEL);
      }
    },
  );

  it('go on with the density that the first step leaves', () => {
    const groups = judgeSecondStep(
      { settings, process: 'ee', seed: 502, events: 700 },
      FEW_FIRST,
      FEW_SECOND,
    );
    expect(groups.size).toBe(4);
    for (const [group, { pValue, bins, events }] of groups) {
      expect(bins, `group ${group}, ${events} events`).toBeGreaterThan(1);
      expect(pValue, `group ${group}, ${events} events`).toBeGreaterThan(LEVEL);
    }
  });
});

describe('the first density', () => {
  it('is found wrong where steps are ordered in the other variable', () => {
    const sample = { settings: AT_Z, process: 'ee', seed: 501, events: 20_000 } as const;
    const density = judgeFirstDensity({ ...sample, fault: { order: 'virtuality' } }, PLANE);
    expect(density.get('q_qg')?.pValue).toBeLessThan(LEVEL);
  });
});
