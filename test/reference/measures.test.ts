import { describe, expect, it } from 'vitest';
import {
  durham,
  finalMomenta,
  measureSteps,
  SampleSummary,
  StepMeasures,
  thrust,
} from '../../engine/index.ts';
import { engineEvents, measuredSteps, momentaAfter } from './engine-sample.ts';
import { durhamTransitions, Observables, space, thrustByPlanes, Y_CUTS } from './independent/index.ts';

// The engine's measures against this folder's brute-force ones on the same grown events: deterministic, so any
// difference is one of definition or arithmetic.
const SAMPLES = [
  { energy: 91.1876, order: 'kt', seed: 701 },
  { energy: 91.1876, order: 'virtuality', seed: 702 },
  { energy: 1000, order: 'kt', seed: 703 },
] as const;

describe.each(SAMPLES)('the measures of grown events at $energy GeV, $order', (settings) => {
  it('are the angles, thrust and Durham transitions of a brute-force calculation', () => {
    for (const history of engineEvents(settings, 400)) {
      const measures = measureSteps(history, new StepMeasures(history.steps.length));
      measuredSteps(history).forEach((step, s) => {
        expect(Math.abs(measures.openingAngle[s] / step.openingAngle - 1)).toBeLessThan(1e-9);
        expect(Math.abs(measures.birthAngle[s] / step.birthAngle - 1)).toBeLessThan(1e-9);
        expect(Math.abs(measures.partnerAngle[s] / step.partnerAngle - 1)).toBeLessThan(1e-9);
      });
      const momenta = momentaAfter(history, history.steps.length - 1);
      const packed = finalMomenta(history);
      expect(Math.abs(thrust(packed).value - thrustByPlanes(momenta.map(space)))).toBeLessThan(1e-12);
      const found = durham(packed, settings.energy);
      const wanted = durhamTransitions(momenta, settings.energy);
      expect(found.length).toBe(wanted.length);
      wanted.forEach((y, n) => {
        expect(Math.abs(found[n] - y)).toBeLessThan(1e-12);
      });
    }
  });

  it('have the sample means and errors of a plain accumulation', () => {
    const summary = new SampleSummary();
    const plain = new Observables(settings.energy);
    for (const history of engineEvents(settings, 1000)) {
      summary.add(history);
      plain.add(momentaAfter(history, history.steps.length - 1), measuredSteps(history));
    }
    const result = summary.result();
    const rates = result as unknown as Record<string, Record<string, { mean: number; error: number }>>;
    const flat = result as unknown as Record<string, { mean: number; error: number; count: number }>;
    let compared = 0;
    for (const [key, estimate] of plain.estimates()) {
      if (key.startsWith('lnInverseX')) continue;
      const [name, yCut] = key.split(' ');
      const found = yCut ? rates[name][yCut] : flat[name];
      expect(found.mean, key).toBeCloseTo(estimate.mean, 10);
      // a ratio's error may carry n/(n-1)
      expect(Math.abs(found.error - estimate.error), key).toBeLessThanOrEqual(
        1.5e-3 * estimate.error + 1e-12,
      );
      if (!yCut) expect(flat[name].count, key).toBe(estimate.count);
      compared++;
    }
    expect(compared).toBe(11 + 4 * Y_CUTS.length);
    const { edges, counts } = result.lnInverseX;
    for (let bin = 0; bin < 8; bin++) {
      const inside = counts.filter((_, n) => edges[n] >= bin - 1e-9 && edges[n + 1] <= bin + 1 + 1e-9);
      const sum = inside.reduce((a, b) => a + b, 0);
      // An energy within rounding of a bin edge may fall either side: none does in these samples but at x = 1.
      const wanted = plain.estimates().get(`lnInverseX ${bin}`)!.mean * 1000;
      expect(sum, `ln 1/x bin ${bin}`).toBeCloseTo(wanted, 6);
    }
  });
});
