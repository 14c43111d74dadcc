import { describe, expect, it } from 'vitest';
import {
  add,
  couplingFor,
  type Four,
  firstStep,
  flavourFractions,
  halfRapidity,
  PlainShower,
  product,
  quarkKernel,
  rate,
  type Settings,
  uniformPValue,
} from './index.ts';

const BASE: Settings = {
  energy: 91.1876,
  order: 'kt',
  coupling: { kind: 'one-loop' },
  cutoff: 1,
  flavours: 5,
  quark: 1,
};
const ENERGY2 = BASE.energy ** 2;

describe('the plain shower', () => {
  it('conserves momentum, keeps partons massless and leaves colour singlets', () => {
    const shower = new PlainShower(BASE, 5);
    for (let n = 0; n < 300; n++) {
      const { partons, steps } = shower.event();
      const sum = partons.reduce<Four>((total, p) => add(total, p.p), [0, 0, 0, 0]);
      for (const component of sum.slice(0, 3)) expect(Math.abs(component)).toBeLessThan(1e-10);
      expect(Math.abs(sum[3] - BASE.energy)).toBeLessThan(1e-10);
      for (const p of partons) expect(Math.abs(product(p.p, p.p))).toBeLessThan(1e-9);
      expect(partons.length).toBe(steps.length + 2);
      expect(partons.reduce((q, p) => q + (p.id === 21 ? 0 : Math.sign(p.id)), 0)).toBe(0);
      for (let k = 1; k < steps.length; k++) expect(steps[k].t).toBeLessThan(steps[k - 1].t);
    }
  });

  it('has the no-branching fraction and first step of quadrature, in both orderings and three couplings', () => {
    const couplings = [{ kind: 'fixed', value: 0.118 }, { kind: 'one-loop' }, { kind: 'two-loop' }] as const;
    for (const order of ['kt', 'virtuality'] as const) {
      for (const coupling of couplings) {
        const end = {
          q2: ENERGY2,
          kernel: quarkKernel,
          coupling: couplingFor(coupling, 1, ENERGY2),
          order,
          cut2: 1,
        };
        const expected = firstStep(end);
        const shower = new PlainShower({ ...BASE, order, coupling }, 17);
        const events = 6000;
        let empty = 0;
        const times: number[] = [];
        const fractions: number[] = [];
        for (let n = 0; n < events; n++) {
          const first = shower.event().steps[0];
          if (!first) {
            empty++;
            continue;
          }
          times.push(expected.survival(first.t));
          if (n % 4 === 0) {
            fractions.push(rate(end, first.t, -Infinity, halfRapidity(first.z)) / rate(end, first.t));
          }
        }
        const p = expected.noBranching;
        expect(Math.abs(empty - events * p)).toBeLessThan(4 * Math.sqrt(events * p * (1 - p)));
        expect(uniformPValue(times)).toBeGreaterThan(1e-4);
        expect(uniformPValue(fractions)).toBeGreaterThan(1e-4);
      }
    }
  });

  it('draws flavours by the electroweak mix', () => {
    const shower = new PlainShower({ ...BASE, quark: null, cutoff: 20 }, 23);
    const counts = [0, 0, 0, 0, 0];
    const events = 40000;
    for (let n = 0; n < events; n++) counts[shower.event().flavour - 1]++;
    flavourFractions(BASE.energy, 5).forEach((p, n) => {
      expect(Math.abs(counts[n] - events * p)).toBeLessThan(4 * Math.sqrt(events * p * (1 - p)));
    });
  });
});
