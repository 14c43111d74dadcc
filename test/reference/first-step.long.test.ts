import { describe, expect, it } from 'vitest';
import { judgeFirstStep } from './first-step.ts';
import type { CouplingKind } from './independent/index.ts';

// As first-step.test.ts, more events, energies and cutoffs.
const COUPLINGS: CouplingKind[] = [
  { kind: 'fixed', value: 0.118 },
  { kind: 'one-loop' },
  { kind: 'two-loop' },
];
const SCALES = [
  [91.1876, 1],
  [200, 2],
  [12, 1],
  [1000, 1],
];

describe.each(['kt', 'virtuality'] as const)('the first step of large samples in %s ordering', (order) => {
  for (const coupling of COUPLINGS) {
    for (const [energy, cutoff] of SCALES) {
      it(`follows quadrature at ${energy} GeV, cutoff ${cutoff}, ${coupling.kind}`, () => {
        const settings = { energy, cutoff, order, coupling, flavours: 5, quark: 1 };
        const verdict = judgeFirstStep(settings, 201, 100000);
        expect(Math.abs(verdict.emptyPull)).toBeLessThan(4);
        expect(Math.abs(verdict.endPull)).toBeLessThan(4);
        expect(Math.min(verdict.time, verdict.fraction, verdict.azimuth)).toBeGreaterThan(1e-4);
      });
    }
  }
});
