import { describe, expect, it } from 'vitest';
import { integrate, log } from '../../../engine/math/index.ts';
import { integratedKernels, integratedKernelsBelow } from '../../../engine/probability/massless-kt.ts';
import { kernelGluon, kernelGluonToQuarks, kernelQuark } from '../../../engine/qcd/index.ts';
import { uniforms } from '../measure/random-numbers.ts';

const KERNELS = [kernelQuark, kernelGluon, kernelGluonToQuarks];
const out = new Float64Array(3);

/** Int (1-y) K dz over z(1-z) >= x up to half rapidity b, the engine's kernels, in half rapidity. */
function slowly(channel: number, x: number, b: number, range: number): number {
  const density = (at: number): number => {
    const z = 1 / (1 + Math.exp(-2 * at));
    const product = 1 / (4 * Math.cosh(at) ** 2);
    const y = Math.min(x / product, 1);
    return 2 * product * (1 - y) * KERNELS[channel](z, y);
  };
  return integrate(density, -range, b, { relative: 1e-13, absolute: 1e-15 }).value;
}

describe('the closed forms of kt ordering', () => {
  const random = uniforms(1);
  // from wide open to y -> 1, where the range closes like a square root
  const points = [
    ...Array.from({ length: 40 }, () => 0.25 * 10 ** (-7 * random())),
    ...[1e-3, 1e-6, 1e-9].map((away) => 0.25 * (1 - away)),
  ];

  it('agree with adaptive quadrature over the whole range to 1e-12 of the largest kernel', () => {
    for (const x of points) {
      const range = Math.acosh(Math.sqrt(0.25 / x));
      integratedKernels(out, x);
      for (let channel = 0; channel < 3; channel++)
        expect(Math.abs(out[channel] - slowly(channel, x, range, range)), `x ${x}`).toBeLessThan(1e-11);
    }
  });

  it('agree with it over part of the range', () => {
    for (const x of points) {
      const range = Math.acosh(Math.sqrt(0.25 / x));
      const b = range * (2 * random() - 1);
      const w = 1 / (1 + Math.exp(2 * b));
      integratedKernelsBelow(out, x, 1 - w, w);
      for (let channel = 0; channel < 3; channel++)
        expect(Math.abs(out[channel] - slowly(channel, x, b, range)), `x ${x}, b ${b}`).toBeLessThan(1e-11);
    }
  });

  it('have the collinear constants and logarithms as x -> 0', () => {
    const x = 1e-14;
    integratedKernels(out, x);
    expect(out[0]).toBeCloseTo((4 / 3) * (-log(x) - 3 / 2), 5);
    expect(out[1]).toBeCloseTo(3 * (-log(x) / 2 - 11 / 12), 5);
    expect(out[2]).toBeCloseTo(1 / 6, 12);
  });

  it('are zero where the range is closed', () => {
    integratedKernels(out, 0.25);
    expect([...out]).toEqual([0, 0, 0]);
  });
});
