import { describe, expect, it } from 'vitest';
import { exp, integrate, log } from '../../../engine/math/index.ts';
import { chebyshevRule } from '../../../engine/probability/chebyshev.ts';
import { DipoleKernels, type EndFamily } from '../../../engine/probability/dipole-kernels.ts';
import { ExponentCells } from '../../../engine/probability/exponent-cells.ts';
import type { KernelSettings } from '../../../engine/probability/kernel-settings.ts';
import { Strength } from '../../../engine/probability/strength.ts';
import { vectorToQuarks } from '../../../engine/qcd/index.ts';
import { uniforms } from '../measure/random-numbers.ts';
import { settingsOf } from './families.ts';

const out = new Float64Array(3);
const one = new Float64Array(3);

/** Integral of rate c over ln t from where it begins, adaptively, edges of ln t taken as square roots. */
function slowly({ rates, space }: EndFamily, strength: Strength, q2: number, lnT: number, c: number): number {
  const edges = space.edges(q2, strength.bends).map((edge) => space.placeOf(edge, q2));
  let sum = 0;
  for (let n = 0; n + 1 < edges.length && edges[n] < lnT; n++) {
    const width = edges[n + 1] - edges[n];
    // ln t = from + width x, x = sin^2
    const f = (angle: number): number => {
      rates.rates(one, exp(edges[n] + width * Math.sin(angle) ** 2), q2);
      return one[c] * width * Math.sin(2 * angle);
    };
    const share = Math.min(1, (lnT - edges[n]) / width);
    sum += integrate(f, 0, Math.asin(Math.sqrt(share)), { relative: 1e-9, absolute: 1e-10 }).value;
  }
  return sum;
}

const TABLES: [string, Partial<KernelSettings>, (kernels: DipoleKernels) => EndFamily][] = [
  ['massless, kt, fixed coupling', { coupling: { kind: 'fixed', value: 0.12 } }, (k) => k.emission(0, 0)],
  ['massless, kt', {}, (k) => k.emission(0, 0)],
  ['massless, virtuality', { order: 'virtuality' }, (k) => k.emission(0, 0)],
  [
    'massless, virtuality, two loops, rescaled, 1 TeV',
    { order: 'virtuality', coupling: { kind: 'two-loop' }, cmw: true, energy: 1000 },
    (k) => k.emission(0, 0),
  ],
  [
    'massless, kt, two loops, cutoff just above the pole',
    { coupling: { kind: 'two-loop' }, cutoff: 0.42 },
    (k) => k.emission(0, 0),
  ],
  ['light beside b, virtuality', { order: 'virtuality', masses: true }, (k) => k.emission(0, 2)],
  ['b beside light, kt', { masses: true }, (k) => k.emission(2, 0)],
  ['b beside b, virtuality', { order: 'virtuality', masses: true }, (k) => k.emission(2, 2)],
  ['b beside c, kt', { masses: true }, (k) => k.emission(2, 1)],
  ['g -> c cbar beside light, kt', { masses: true }, (k) => k.splitting(1, 0)],
  [
    'g -> b bbar beside b, published factors',
    { masses: true, velocityFactors: 'published' },
    (k) => k.splitting(2, 2),
  ],
];

describe('the table of exponents', () => {
  it.each(TABLES)('agrees with adaptive quadrature to 2e-7: %s', (_name, some, familyOf) => {
    const settings = settingsOf(some);
    const kernels = new DipoleKernels(settings);
    const strength = new Strength(settings);
    const family = familyOf(kernels);
    const { table, space } = family;
    const highest = settings.energy ** 2;
    const random = uniforms(7);
    const columns = space.columns(strength.bends, highest);
    for (let n = 0; n < 15; n++) {
      // over all Q^2, and close to the places where its columns begin
      const near = n % 3 === 0 ? columns[n % (columns.length - 1)] : columns[0];
      const q2 = near * exp(log(highest / near) * random() ** (n % 3 === 0 ? 4 : 1));
      const edges = space.edges(q2, strength.bends).map((edge) => space.placeOf(edge, q2));
      const lnT = edges[0] + (edges[edges.length - 1] - edges[0]) * random();
      expect(table.enter(q2)).toBe(true);
      table.upTo(out, lnT);
      for (let c = 0; c < table.channels.length; c++) {
        const exact = slowly(family, strength, q2, lnT, c);
        expect(Math.abs(out[c] - exact), `q2 ${q2}, t ${exp(lnT)}`).toBeLessThan(2e-7 * Math.max(1, exact));
      }
    }
  });

  it('has the derivative that the rate is, to 1e-5', () => {
    for (const some of [{}, { order: 'virtuality' }] as const) {
      const { table, rates } = new DipoleKernels(settingsOf(some)).emission(0, 0);
      const random = uniforms(8);
      for (let n = 0; n < 200; n++) {
        const q2 = 8000 * exp(-6 * random());
        const t = (q2 / 4) * exp(-8 * random());
        const known = table.enter(q2);
        table.rate(out, log(t));
        rates.rates(one, t, q2);
        for (let c = 0; known && c < 3; c++)
          expect(Math.abs(out[c] - one[c]), `q2 ${q2}, t ${t}`).toBeLessThan(1e-5);
      }
    }
  });

  it('is nothing below where branching begins and all above where it ends', () => {
    const { table } = new DipoleKernels(settingsOf({})).emission(0, 0);
    expect(table.enter(3.9)).toBe(false);
    table.upTo(out, 5);
    expect([...out]).toEqual([0, 0, 0]);
    expect(table.enter(400)).toBe(true);
    table.upTo(out, log(0.9));
    expect([...out]).toEqual([0, 0, 0]);
    table.upTo(out, log(100));
    table.upTo(one, log(5000));
    expect([...one]).toEqual([...out]);
    expect(() => table.enter(91.1876 ** 2 * 1.001)).toThrow(RangeError);
  });

  it('corrected to the matrix element, holds the one Q^2 of the hard process', () => {
    const settings = settingsOf({ firstEmission: vectorToQuarks });
    const family = new DipoleKernels(settings).first() ?? expect.unreachable();
    const q2 = settings.energy ** 2;
    expect(family.table.enter(q2 * (1 - 1e-15))).toBe(true);
    for (const t of [1.5, 8, 300, 2000]) {
      family.table.upTo(out, log(t));
      for (let c = 0; c < 3; c++)
        expect(out[c]).toBeCloseTo(slowly(family, new Strength(settings), q2, log(t), c), 7);
    }
  });
});

describe('cells', () => {
  it('follow a kink across the square, and add the base', () => {
    const rule = chebyshevRule(8);
    const kink = (v: number): number => 0.2 + 0.5 * v * v;
    const cells = new ExponentCells(
      {
        components: 2,
        integrand: (to, u, v) => {
          to[0] = Math.max(0, u - kink(v));
          to[1] = Math.cos(3 * u) * v;
        },
        base: (to, v) => {
          to[0] = v;
          to[1] = 1;
        },
      },
      rule,
      rule,
      1e-8,
    );
    const random = uniforms(9);
    for (let n = 0; n < 300; n++) {
      const [u, v] = [random(), random()];
      cells.integral(out, u, v);
      expect(Math.abs(out[0] - v - Math.max(0, u - kink(v)) ** 2 / 2)).toBeLessThan(1e-8);
      expect(Math.abs(out[1] - 1 - (Math.sin(3 * u) * v) / 3)).toBeLessThan(1e-8);
    }
    expect(cells.size).toBeGreaterThan(20);
    expect(cells.size).toBeLessThan(5000);
  });
});
