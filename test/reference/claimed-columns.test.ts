import { describe, expect, it } from 'vitest';
import { engineEvents } from './engine-sample.ts';
import { type Coupling, type CouplingKind, implicitCoupling } from './independent/index.ts';

const LOOPS: Record<CouplingKind['kind'], Coupling> = {
  fixed: { alpha: () => 0.118, kinks: [] },
  'one-loop': implicitCoupling(1),
  'two-loop': implicitCoupling(2),
};
const COUPLINGS: CouplingKind[] = [
  { kind: 'fixed', value: 0.118 },
  { kind: 'one-loop' },
  { kind: 'two-loop' },
];

describe.each(['kt', 'virtuality'] as const)('the claimed columns in %s ordering', (order) => {
  it.each(COUPLINGS)('name the coupling at kT^2 and the scales of physics.md, coupling $kind', (coupling) => {
    const energy = 91.1876;
    for (const { head, steps } of engineEvents({ order, coupling, energy, cutoff: 1.2, seed: 801 }, 200)) {
      expect(head.hardScale / energy ** 2).toBeCloseTo(order === 'kt' ? 0.25 : 1, 14);
      expect(head.cutoff).toBeCloseTo(1.44, 14);
      expect(head.tLow).toBeCloseTo(order === 'kt' ? 1.44 : 4 * 1.44, 14);
      for (let s = 0; s < steps.length; s++) {
        const kT2 = steps.kT[s] ** 2;
        expect(steps.alphaS[s] / LOOPS[coupling.kind].alpha(kT2)).toBeCloseTo(1, 9);
        const { [s]: z } = steps.z;
        expect((order === 'kt' ? kT2 : z * (1 - z) * steps.t[s]) / kT2).toBeCloseTo(1, 10);
        if (order === 'kt') expect(steps.t[s] / kT2).toBeCloseTo(1, 10);
        expect(steps.ratio[s]).toBeGreaterThan(0);
        expect(steps.ratio[s]).toBeLessThanOrEqual(1);
        expect(steps.rejected[s]).toBeGreaterThanOrEqual(0);
        expect(steps.previous[s]).toBe(s - 1);
        expect(steps.tStart[s]).toBe(s === 0 ? head.hardScale : steps.t[s - 1]);
      }
    }
  });
});
