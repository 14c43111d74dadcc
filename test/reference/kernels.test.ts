import { describe, expect, it } from 'vitest';
import { CA, CF, kernelGluon, kernelGluonToQuarks, kernelQuark, TR } from '../../engine/index.ts';
import { integrate } from '../../engine/math/index.ts';

// Kernels: Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1. At y = 0 they are the splitting functions of
// Altarelli & Parisi, Nucl. Phys. B126 (1977) 298 (c), whose moments are exact rational numbers, certainty (a).
// Tolerance: 1e-10.

const collinearQuark = (z: number): number => kernelQuark(z, 0);
/** Both dipoles of a gluon. */
const collinearGluon = (z: number): number => 2 * kernelGluon(z, 0);
const collinearPair = (z: number): number => 2 * kernelGluonToQuarks(z, 0);

const integral = (f: (z: number) => number, a = 0, b = 1): number =>
  integrate(f, a, b, { relative: 1e-12, absolute: 1e-12 }).value;

interface Moment {
  n: number;
  qq: number;
  qg: number;
  gq: number;
  /** Without quarks. */
  gg: number;
  /** With three, four, five flavours. */
  ggFlavours: [number, number, number];
}
// (a), exact
const MOMENTS: Moment[] = [
  { n: 2, qq: -16 / 9, qg: 1 / 6, gq: 16 / 9, gg: 0, ggFlavours: [-1, -4 / 3, -5 / 3] },
  { n: 3, qq: -25 / 9, qg: 7 / 60, gq: 7 / 9, gg: -21 / 5, ggFlavours: [-26 / 5, -83 / 15, -88 / 15] },
  {
    n: 4,
    qq: -157 / 45,
    qg: 11 / 120,
    gq: 22 / 45,
    gg: -63 / 10,
    ggFlavours: [-73 / 10, -229 / 30, -239 / 30],
  },
  {
    n: 5,
    qq: -182 / 45,
    qg: 8 / 105,
    gq: 16 / 45,
    gg: -543 / 70,
    ggFlavours: [-613 / 70, -1909 / 210, -1979 / 210],
  },
  {
    n: 6,
    qq: -1418 / 315,
    qg: 11 / 168,
    gq: 88 / 315,
    gg: -249 / 28,
    ggFlavours: [-277 / 28, -859 / 84, -887 / 84],
  },
  {
    n: 7,
    qq: -1027 / 210,
    qg: 29 / 504,
    gq: 29 / 126,
    gg: -4129 / 420,
    ggFlavours: [-4549 / 420, -1563 / 140, -4829 / 420],
  },
  {
    n: 8,
    qq: -9883 / 1890,
    qg: 37 / 720,
    gq: 37 / 189,
    gg: -319 / 30,
    ggFlavours: [-349 / 30, -359 / 30, -123 / 10],
  },
];

describe('moments of the kernels at y = 0', () => {
  for (const { n, qq, qg, gq, gg, ggFlavours } of MOMENTS) {
    it(`are the anomalous dimensions at N = ${n}`, () => {
      const power = (z: number): number => z ** (n - 1);
      expect(integral((z) => (power(z) - 1) * collinearQuark(z))).toBeCloseTo(qq, 10);
      expect(integral((z) => power(1 - z) * collinearQuark(z))).toBeCloseTo(gq, 10);
      expect(integral((z) => power(z) * collinearPair(z))).toBeCloseTo(qg, 10);
      const gluon = integral((z) => (power(z) + power(1 - z) - 1) * collinearGluon(z));
      expect(gluon).toBeCloseTo(gg, 10);
      const perFlavour = integral(collinearPair);
      ggFlavours.forEach((value, k) => {
        expect(gluon - (k + 3) * perFlavour).toBeCloseTo(value, 10);
      });
    });
  }

  it('agree with the closed formula in harmonic sums, so that the table is typed rightly', () => {
    let s1 = 1;
    for (const { n: N, qq, qg, gq, gg, ggFlavours } of MOMENTS) {
      s1 += 1 / N;
      expect(CF * (3 / 2 + 1 / (N * (N + 1)) - 2 * s1)).toBeCloseTo(qq, 13);
      expect((TR * (N * N + N + 2)) / (N * (N + 1) * (N + 2))).toBeCloseTo(qg, 13);
      expect((CF * (N * N + N + 2)) / (N * (N * N - 1))).toBeCloseTo(gq, 13);
      expect(2 * CA * (11 / 12 + 1 / (N * (N - 1)) + 1 / ((N + 1) * (N + 2)) - s1)).toBeCloseTo(gg, 13);
      ggFlavours.forEach((value, k) => {
        expect(gg - (k + 3) / 3).toBeCloseTo(value, 13);
      });
    }
  });

  it('conserve momentum: quark and gluon moments at N = 2 cancel', () => {
    const z1 = (z: number): number => z;
    const quark = integral((z) => (z - 1) * collinearQuark(z)) + integral((z) => (1 - z) * collinearQuark(z));
    expect(quark).toBeCloseTo(0, 10);
    for (const flavours of [0, 3, 4, 5]) {
      const gluon =
        integral((z) => (z1(z) + z1(1 - z) - 1) * collinearGluon(z)) - flavours * integral(collinearPair);
      expect(gluon + 2 * flavours * integral((z) => z * collinearPair(z))).toBeCloseTo(0, 10);
    }
  });
});

describe('constants and cut integrals', () => {
  it('leave the collinear constants -3/2 CF, -11/6 CA, 2/3 TR beside the soft singularity', () => {
    // (a)
    expect(integral((z) => kernelQuark(z, 0) - (2 * CF) / (1 - z))).toBeCloseTo(-2, 10);
    expect(integral((z) => 2 * kernelGluon(z, 0) - (2 * CA) / (1 - z))).toBeCloseTo(-11 / 2, 10);
    expect(integral((z) => 2 * kernelGluonToQuarks(z, 0))).toBeCloseTo(1 / 3, 12);
  });

  it('between (1-r)/2 and (1+r)/2 have their closed forms, and the reference values at r = 0.9 and 0.98', () => {
    const rows: [number, number, number, number][] = [
      // r, P_qq, P_gg, P_qg   (a); r = 0.98 is 0.01 < z < 0.99
      [0.9, 6.05183727777717, 12.7593838749986, 0.28575],
      [0.98, 10.2936529336922, 22.1904211008075, 0.323432666666667],
    ];
    for (const [r, quark, gluon, pair] of rows) {
      const low = (1 - r) / 2;
      const high = (1 + r) / 2;
      const soft = 2 * Math.log((1 + r) / (1 - r));
      expect(integral(collinearQuark, low, high)).toBeCloseTo(quark, 10);
      expect(integral(collinearGluon, low, high)).toBeCloseTo(gluon, 10);
      expect(integral(collinearPair, low, high)).toBeCloseTo(pair, 10);
      expect(CF * (soft - (3 * r) / 2)).toBeCloseTo(quark, 12);
      expect(CA * (soft - (7 * r) / 4 - r ** 3 / 12)).toBeCloseTo(gluon, 12);
      expect(TR * (r / 2 + r ** 3 / 6)).toBeCloseTo(pair, 12);
    }
  });
});
