import { describe, expect, it } from 'vitest';
import { implicitCoupling, integratedCoupling } from '../coupling.ts';
import { gluonKernel, type Kernel, pairKernel, quarkKernel } from '../kernels.ts';
import { type End, exponent, firstStep, halfRapidity, highestT, lowestT, rate } from './index.ts';

const FIXED = { alpha: () => 0.12, kinks: [] };
const ONE_LOOP = implicitCoupling(1);
const ORDERS = ['kt', 'virtuality'] as const;

function end(
  sqrtS: number,
  cut: number,
  coupling: End['coupling'],
  order: End['order'],
  kernel: Kernel = quarkKernel,
): End {
  return { q2: sqrtS ** 2, kernel, coupling, order, cut2: cut ** 2 };
}

const total = (e: End): number => exponent(e, lowestT(e), highestT(e));

describe('no-emission exponents by quadrature (references.md section 7)', () => {
  it('reproduce the totals of q qbar in both orderings', () => {
    const wanted = [
      [200, 2, 1.43759958, 2.3601945194],
      [10, 1, 0.1954056684, 0.4866403402],
    ];
    for (const [sqrtS, cut, fixed, running] of wanted) {
      for (const order of ORDERS) {
        expect(Math.abs(2 * total(end(sqrtS, cut, FIXED, order)) - fixed)).toBeLessThan(1e-9);
        expect(Math.abs(2 * total(end(sqrtS, cut, ONE_LOOP, order)) - running)).toBeLessThan(1e-9);
      }
    }
  });

  it('reproduce the totals of a two-gluon state, four ends', () => {
    const wanted = [
      [200, 2, 5, 3.0036307223, 4.9595506661, 0.384947221, 0.5848116708],
      [10, 1, 4, 0.3782929278, 0.9471943423, 0.0818264346, 0.1969952308],
    ];
    for (const [sqrtS, cut, flavours, gluons, gluonsRunning, pairs, pairsRunning] of wanted) {
      for (const order of ORDERS) {
        const four = (c: End['coupling'], k: Kernel): number => 4 * total(end(sqrtS, cut, c, order, k));
        expect(Math.abs(four(FIXED, gluonKernel) - gluons)).toBeLessThan(1e-9);
        expect(Math.abs(four(ONE_LOOP, gluonKernel) - gluonsRunning)).toBeLessThan(1e-9);
        expect(Math.abs(flavours * four(FIXED, pairKernel) - pairs)).toBeLessThan(1e-9);
        expect(Math.abs(flavours * four(ONE_LOOP, pairKernel) - pairsRunning)).toBeLessThan(1e-9);
      }
    }
  });

  it('reproduce the probabilities of the gaps', () => {
    // sqrt(s), kTmin, order, sqrt(t) from, to, fixed 0.12, one loop
    const wanted: [number, number, End['order'], number, number, number, number][] = [
      [200, 2, 'kt', 50, 20, 0.8420355287, 0.8165278768],
      [200, 2, 'kt', 20, 5, 0.5418575805, 0.4045104466],
      [200, 2, 'kt', 5, 2, 0.5328891592, 0.2929134573],
      [200, 2, 'virtuality', 200, 100, 0.9519620013, 0.9467974514],
      [200, 2, 'virtuality', 100, 30, 0.6314246397, 0.5324627814],
      [200, 2, 'virtuality', 30, 4, 0.3951093406, 0.1872553383],
      [10, 1, 'kt', 4, 2, 0.9538553234, 0.9068975864],
      [10, 1, 'kt', 2, 1, 0.8632793982, 0.6791641846],
      [10, 1, 'virtuality', 10, 5, 0.9555015723, 0.9073628221],
      [10, 1, 'virtuality', 5, 2, 0.8608054153, 0.6774446305],
    ];
    for (const [sqrtS, cut, order, from, to, fixed, running] of wanted) {
      const gap = (c: End['coupling']): number =>
        Math.exp(-2 * exponent(end(sqrtS, cut, c, order), to ** 2, from ** 2));
      expect(Math.abs(gap(FIXED) - fixed)).toBeLessThan(1e-9);
      expect(Math.abs(gap(ONE_LOOP) - running)).toBeLessThan(1e-9);
    }
  });

  it('are equal in both orderings at every coupling, energy and cutoff', () => {
    const couplings = [FIXED, integratedCoupling(1, 1, 1e6), integratedCoupling(2, 1, 1e6)];
    for (const coupling of couplings) {
      for (const [sqrtS, cut] of [
        [91.1876, 1],
        [30, 1.2],
        [1000, 1],
        [12, 2],
      ]) {
        const [kt, virtuality] = ORDERS.map((order) => total(end(sqrtS, cut, coupling, order)));
        expect(Math.abs(kt - virtuality)).toBeLessThan(1e-8);
      }
    }
  });

  it('reproduce the cumulative distribution of z at sqrt(s) = 200, kT = 10', () => {
    const e = end(200, 2, { alpha: () => 2 * Math.PI, kinks: [] }, 'kt');
    const whole = rate(e, 100);
    expect(whole).toBeCloseTo(5.796507136462, 10);
    const wanted = [
      [0.1, 0.021376546783],
      [0.3, 0.080336146938],
      [0.5, 0.168665153884],
      [0.7, 0.324364396434],
      [0.9, 0.695066083909],
      [0.95, 0.876552882221],
      [0.99, 0.99680615105],
    ];
    for (const [z, u] of wanted) {
      expect(rate(e, 100, -Infinity, halfRapidity(z)) / whole).toBeCloseTo(u, 10);
    }
  });

  it('give a first-step distribution that is whole and ends at the no-branching probability', () => {
    for (const coupling of [FIXED, integratedCoupling(1, 1, 1e4)]) {
      for (const order of ORDERS) {
        const e = end(91.1876, 1, coupling, order);
        const first = firstStep(e);
        expect(first.noBranching).toBeCloseTo(Math.exp(-2 * total(e)), 9);
        expect(first.survival(highestT(e))).toBeCloseTo(1, 12);
        expect(first.survival(lowestT(e))).toBeCloseTo(0, 12);
        expect(first.fractionBelow(1 - 1e-9)).toBeCloseTo(1, 6);
        const between = first.gap(9);
        expect(between).toBeCloseTo(Math.exp(-2 * exponent(e, 9, highestT(e))), 6);
      }
    }
  });
});
