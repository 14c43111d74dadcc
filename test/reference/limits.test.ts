import { describe, expect, it } from 'vitest';
import { CA, CF, kernelGluon, kernelGluonToQuarks, kernelQuark, TR } from '../../engine/index.ts';

// First emissions against exact matrix elements. Partons i, j, k with energy fractions x = 2E/M have
// s_ij = (1 - x_k) M^2, so the end "i emits j, partner k" stands at y = 1 - x_k, z = (1 - x_j)/x_k, and its rate
// (dy/y) dz (1-y) K is K/(1 - x_k) dx_i dx_j, the Jacobian being 1/x_k. All values exact, certainty (a).

type Kernel = (z: number, y: number) => number;
const end = (kernel: Kernel, xj: number, xk: number): number => kernel((1 - xj) / xk, 1 - xk) / (1 - xk);

/** Matrix element over kernels, e+e- -> q qbar g. Source: Ellis, Gaillard, Ross, Nucl. Phys. B111 (1976) 253 (c). */
function ratioElectronPositron(x1: number, x2: number): number {
  const x3 = 2 - x1 - x2;
  const exact = (CF * (x1 * x1 + x2 * x2)) / ((1 - x1) * (1 - x2));
  return exact / (end(kernelQuark, x3, x2) + end(kernelQuark, x3, x1));
}
/** The same for scalar -> q qbar g, massless quarks. Source: symbolic, (a). */
function ratioScalarQuarks(x1: number, x2: number): number {
  const x3 = 2 - x1 - x2;
  const exact = (CF * (1 + (x1 + x2 - 1) ** 2)) / ((1 - x1) * (1 - x2));
  return exact / (end(kernelQuark, x3, x2) + end(kernelQuark, x3, x1));
}
/** The same for scalar -> g g g, effective point vertex; each configuration is reached in six ways. Source: (a). */
function ratioScalarGluons(x1: number, x2: number): number {
  const x = [x1, x2, 2 - x1 - x2];
  const exact = (1 + x.reduce((sum, a) => sum + (1 - a) ** 4, 0)) / x.reduce((p, a) => p * (1 - a), 1);
  let shower = 0;
  for (let j = 0; j < 3; j++) {
    for (let k = 0; k < 3; k++) if (k !== j) shower += (2 * end(kernelGluon, x[j], x[k])) / CA;
  }
  return exact / shower;
}

describe('the ratio of matrix element to kernels', () => {
  const points: [number, number, number, number, number][] = [
    // x1, x2, e+e-, scalar q qbar g, scalar g g g   (a), exact
    [2 / 3, 2 / 3, 8 / 9, 10 / 9, 56 / 45],
    [9 / 10, 9 / 10, 729 / 730, 369 / 365, 570969 / 549425],
    [9 / 10, 7 / 10, 91 / 92, 119 / 115, 1115044 / 1005425],
    [4 / 5, 3 / 5, 15 / 16, 87 / 80, 423 / 350],
    [3 / 4, 1 / 2, 39 / 46, 51 / 46, 1233 / 1028],
    [19 / 20, 19 / 20, 6859 / 6860, 3439 / 3430, NaN],
  ];
  for (const [x1, x2, electron, quarks, gluons] of points) {
    it(`is the exact rational at (${x1.toFixed(2)}, ${x2.toFixed(2)})`, () => {
      expect(ratioElectronPositron(x1, x2)).toBeCloseTo(electron, 12);
      expect(ratioScalarQuarks(x1, x2)).toBeCloseTo(quarks, 12);
      if (!Number.isNaN(gluons)) expect(ratioScalarGluons(x1, x2)).toBeCloseTo(gluons, 12);
    });
  }

  it('at (1/2, 1/2), on the edge where the gluon has all it can, is 1/2, 1 and, as a limit, 1', () => {
    expect(ratioElectronPositron(1 / 2, 1 / 2)).toBeCloseTo(1 / 2, 12);
    expect(ratioScalarQuarks(1 / 2, 1 / 2)).toBeCloseTo(1, 12);
    // x3 = 1 itself is singular; the ratio differs from 1 by O(1 - x3).
    expect(Math.abs(ratioScalarGluons(1 / 2 + 1e-7, 1 / 2 + 1e-7) - 1)).toBeLessThan(1e-5);
  });

  it('has the closed forms: e+e- everywhere, g g g on x1 = x2', () => {
    for (let n = 1; n < 40; n++) {
      for (let m = 1; m < 40; m++) {
        const a = n / 40;
        const b = m / 40;
        if (a + b >= 1) continue;
        const squares = (1 - a) ** 2 + (1 - b) ** 2;
        const closed = squares / (squares + (a * a * b) / (1 - b) + (a * b * b) / (1 - a));
        const found = ratioElectronPositron(1 - a, 1 - b);
        expect(found).toBeCloseTo(closed, 12);
        // Between its bounds: no overestimate of the kernels is ever too small.
        expect(found).toBeGreaterThan(0.5);
        expect(found).toBeLessThan(1);
        expect(ratioScalarQuarks(1 - a, 1 - b)).toBeGreaterThanOrEqual(1 - 1e-12);
        expect(ratioScalarQuarks(1 - a, 1 - b)).toBeLessThan(1.118433799204);
        expect(ratioScalarGluons(1 - a, 1 - b)).toBeLessThan(56 / 45 + 1e-12);
      }
    }
    for (const t of [0.55, 0.6, 0.7, 0.8, 0.9, 0.97]) {
      const above = 4 * t * t * (9 * t ** 4 - 20 * t ** 3 + 18 * t * t - 8 * t + 2);
      const below = 57 * t ** 4 - 130 * t ** 3 + 117 * t * t - 48 * t + 8;
      expect(ratioScalarGluons(t, t)).toBeCloseTo(above / below, 11);
    }
  });

  it('of scalar -> q qbar g has its maximum 1.118433799203 at 0.626538293271', () => {
    // (a)
    const x = 0.626538293271;
    expect(ratioScalarQuarks(x, x)).toBeCloseTo(1.118433799203, 11);
    for (const [dx, dy] of [
      [1e-3, 0],
      [-1e-3, 0],
      [1e-3, -1e-3],
      [1e-3, 1e-3],
      [-1e-3, -1e-3],
    ]) {
      expect(ratioScalarQuarks(x + dx, x + dy)).toBeLessThan(ratioScalarQuarks(x, x));
    }
  });

  it('of scalar -> g q qbar is the squared energy fraction of the gluon that did not split', () => {
    // Both dipoles of the split gluon against TR [(1-xq)^2 + (1-xqbar)^2]/(1 - x_k).   (a), exact
    for (const [quark, antiquark] of [
      [0.9, 0.8],
      [0.6, 0.6],
      [0.97, 0.3],
      [0.35, 0.99],
    ]) {
      const other = 2 - quark - antiquark;
      const exact = (TR * ((1 - quark) ** 2 + (1 - antiquark) ** 2)) / (1 - other);
      expect(exact / (2 * end(kernelGluonToQuarks, antiquark, other))).toBeCloseTo(other * other, 12);
    }
  });

  it('falls to 1 as the cube of a soft gluon and linearly for a collinear one', () => {
    for (const e of [1e-1, 1e-2, 1e-3]) {
      // 1/R - 1 = e^3/(1-e)^3 at a = b = e, of which 1/R - 1 itself keeps 1e-15.
      expect(Math.abs(1 / ratioElectronPositron(1 - e, 1 - e) - 1 - (e / (1 - e)) ** 3)).toBeLessThan(1e-13);
    }
    // To second order in a the excess is a b^2/(1 + (1-b)^2) [1 + a (1/(b(1-b)) + 1 + 2/(1 + (1-b)^2))].
    const b = 0.4;
    const squares = 1 + (1 - b) ** 2;
    for (const a of [1e-2, 1e-3, 1e-4, 1e-5]) {
      const excess = 1 / ratioElectronPositron(1 - a, 1 - b) - 1;
      const relative = excess / ((a * b * b) / squares) - 1;
      expect(Math.abs(relative / a - (1 / (b * (1 - b)) + 1 + 2 / squares))).toBeLessThan(20 * a + 1e-4);
    }
  });
});

describe('the soft limit of two dipole ends', () => {
  it('is the eikonal factor pi.pk/(pi.pj pj.pk) exactly, away from the limit too', () => {
    for (const [ij, ik, jk] of [
      [0.1, 0.7, 0.2],
      [1e-9, 0.5, 0.3],
      [1e-4, 1, 1e-6],
      [0.4, 1e-3, 0.2],
    ]) {
      const sum = ij + ik + jk;
      const y = ij / sum;
      const z = ik / (ik + jk);
      const yOther = jk / sum;
      const zOther = ik / (ik + ij);
      expect(Math.abs(1 - z * (1 - y) - (ij + jk) / sum)).toBeLessThan(4e-16);
      // 1/(1 - z(1-y)) - 1 = pi.pk/(pi.pj + pj.pk): over pi.pj, and alike over pj.pk, it is each end's part.
      const one = ((kernelQuark(z, y) / CF + 1 + z) / 2 - 1) / ij;
      const two = ((kernelQuark(zOther, yOther) / CF + 1 + zOther) / 2 - 1) / jk;
      // What two differences of numbers near 1 leave of 16 digits.
      const tolerance = 1e-12 + 4e-16 * (sum / (ij + jk) + sum / ik);
      expect(Math.abs((one + two) / (ik / (ij * jk)) - 1)).toBeLessThan(tolerance);
    }
  });
});
