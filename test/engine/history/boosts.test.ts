import { describe, expect, it } from 'vitest';
import {
  entriesAtEnd,
  finalMomenta,
  type GrowSettings,
  growEvent,
  measureSteps,
  resolveSettings,
} from '../../../engine/index.ts';

const SAMPLES: Partial<GrowSettings>[] = [
  { energy: 500, recoil: 'global' },
  { energy: 1000, recoil: 'global', order: 'virtuality', process: 'scalar-gg' },
  { energy: 200, recoil: 'global', firstEmission: 'matched' },
];

describe('global recoil', () => {
  it('keeps the four-momentum of the event, whose final momenta are rows times the later transformations', () => {
    for (const some of SAMPLES)
      for (let event = 0; event < 100; event++) {
        const history = growEvent(resolveSettings(some), event);
        const momenta = finalMomenta(history);
        const sum = [0, 0, 0, -history.head.sqrtS];
        momenta.forEach((value, n) => {
          sum[n % 4] += value;
        });
        // a transformation of Lorentz factor g, made from rounded momenta, is off by g^2 roundings, and stretches by up
        // to 2g what was off before
        const { boost, length } = history.steps;
        const { residual } = measureSteps(history);
        let allowed = 0;
        for (let step = 0; step < length; step++) {
          const factor = boost![16 * step + 15];
          const rounding = 50 * 2 ** -53 * factor * factor * history.head.sqrtS;
          for (let c = 0; c < 4; c++) expect(Math.abs(residual[4 * step + c])).toBeLessThan(rounding);
          allowed += rounding;
        }
        for (const part of sum) expect(Math.abs(part)).toBeLessThan(1e-14 * history.head.sqrtS + allowed);
      }
  });

  it('keeps the claimed t, y, z, kT, azimuth and angle of every step, recomputed from rows and transformations', () => {
    for (const some of SAMPLES)
      for (let event = 0; event < 100; event++) {
        const history = growEvent(resolveSettings(some), event);
        const { steps } = history;
        const measured = measureSteps(history);
        for (let step = 0; step < steps.length; step++) {
          for (const name of ['t', 'y', 'openingAngle'] as const)
            expect(Math.abs(measured[name][step] / steps[name][step] - 1), name).toBeLessThan(1e-8);
          expect(Math.abs(measured.zLightCone[step] - steps.z[step])).toBeLessThan(1e-8);
        }
      }
  });

  it('is told from local recoil by its column alone', () => {
    const local = growEvent(resolveSettings({ energy: 500 }), 0);
    expect(local.steps.boost).toBeNull();
    expect(entriesAtEnd(local)).toBe(local.entries);
    const global = growEvent(resolveSettings({ energy: 500, recoil: 'global' }), 0);
    expect(global.steps.boost).toHaveLength(16 * global.steps.length);
    expect(global.head.columns.steps).toContain('boost');
  });
});
