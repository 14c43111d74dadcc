import { describe, expect, it } from 'vitest';
import {
  angleBetween,
  boostFromRest,
  boostToRest,
  cos,
  dot,
  mass,
  massSquared,
  momentum,
  product,
  sin,
} from '../../../engine/math/index.ts';
import * as exact from './high-precision.ts';
import { Samples } from './samples.ts';

/** On the shell of mass m, momentum of the given length along (theta, phi). */
function onShell(length: number, theta: number, phi: number, m = 0): Float64Array {
  const across = length * sin(theta);
  return Float64Array.of(
    across * cos(phi),
    across * sin(phi),
    length * cos(theta),
    Math.sqrt(length * length + m * m),
  );
}
const randomOnShell = (s: Samples, m = 0): Float64Array =>
  onShell(s.scale(-3, 9), Math.acos(s.uniform(-1, 1)), s.uniform(0, 7), m);

describe('dot', () => {
  it('of two massless vectors is 2 E1 E2 sin^2(theta/2), for angles down to 1e-12', () => {
    for (const angle of [3, 1, 0.1, 1e-3, 1e-6, 1e-9, 1e-12]) {
      // One of them along the axis, so that rounded momenta tell the angle to all digits.
      const p = onShell(37.5, 0, 0);
      const q = onShell(4.25, angle, 0.7);
      const closed = 2 * 37.5 * 4.25 * sin(angle / 2) ** 2;
      expect(Math.abs(dot(p, q) / closed - 1)).toBeLessThan(4e-15);
    }
  });
  it('loses its digits without the cross product: the plain product is off by more than 1e-3 at 1e-6', () => {
    const p = onShell(37.5, 1, 0.3);
    const q = onShell(4.25, 1 + 1e-7, 0.3);
    const closed = 2 * 37.5 * 4.25 * sin(0.5e-7) ** 2;
    expect(Math.abs(product(p, q) / closed - 1)).toBeGreaterThan(1e-3);
    expect(Math.abs(dot(p, q) / closed - 1)).toBeLessThan(1e-7);
  });
  it('of two massive vectors agrees with whole-number arithmetic on the same momenta', () => {
    const samples = new Samples(11);
    const P = 1200;
    const square = (n: bigint): bigint => (n * n) >> BigInt(P);
    for (let n = 0; n < 200; n++) {
      const m1 = n % 3 === 0 ? 0 : 4.8;
      const m2 = n % 2 === 0 ? 1.5 : 4.8;
      const p = randomOnShell(samples, m1);
      const q = randomOnShell(samples, m2);
      if (n % 5 === 0)
        for (let k = 0; k < 3; k++) q[k] = p[k] * samples.uniform(0.3, 1) + 1e-9 * samples.uniform();
      q[3] = Math.sqrt(momentum(q) ** 2 + m2 * m2);
      const P3 = [0, 1, 2].map((k) => exact.fixed(p[k], P));
      const Q3 = [0, 1, 2].map((k) => exact.fixed(q[k], P));
      const energy = (v: bigint[], m: number): bigint =>
        exact.squareRoot(
          (square(v[0]) + square(v[1]) + square(v[2]) + square(exact.fixed(m, P))) << BigInt(P),
        );
      const along = (P3[0] * Q3[0] + P3[1] * Q3[1] + P3[2] * Q3[2]) >> BigInt(P);
      const truth = ((energy(P3, m1) * energy(Q3, m2)) >> BigInt(P)) - along;
      const found = dot(p, q, m1, m2);
      const off = Number(((exact.fixed(found, P) - truth) * 10n ** 25n) / truth) / 1e25;
      expect(Math.abs(off)).toBeLessThan(2e-15);
    }
  });
  it('is the plain product at wide angles, for vectors anywhere in an array', () => {
    const samples = new Samples(12);
    const row = new Float64Array(12);
    for (let n = 0; n < 200; n++) {
      row.set(randomOnShell(samples, 4.8), 2);
      row.set(randomOnShell(samples), 7);
      const scale = row[5] * row[10];
      expect(Math.abs(dot(row, row, 4.8, 0, 2, 7) - product(row, row, 2, 7))).toBeLessThan(1e-14 * scale);
    }
  });
});

describe('angleBetween', () => {
  it('is the polar angle for a vector along z, from 1e-15 to pi', () => {
    for (const angle of [1e-15, 1e-9, 1e-4, 0.3, 1, 2, 3, 3.14159]) {
      expect(Math.abs(angleBetween(onShell(5, 0, 0), onShell(80, angle, 2)) / angle - 1)).toBeLessThan(1e-15);
    }
    expect(angleBetween(Float64Array.of(0, 0, 0, 1), onShell(3, 1, 1))).toBe(0);
  });
});

describe('mass', () => {
  it('of (p, E) is sqrt(E^2 - p^2), and negative for a spacelike vector', () => {
    expect(mass(Float64Array.of(0, 3, 0, 5))).toBe(4);
    expect(mass(Float64Array.of(0, 0, 5, 3))).toBe(-4);
    expect(massSquared(Float64Array.of(9, 9, 2, 3, 6, 9), 2)).toBeCloseTo(81 - 49, 12);
  });
});

describe('boosts', () => {
  it('takes the frame itself to rest and undoes itself', () => {
    const samples = new Samples(13);
    const out = new Float64Array(4);
    for (let n = 0; n < 200; n++) {
      const m = samples.uniform(0.5, 90);
      const frame = onShell(samples.uniform(0, 300), samples.uniform(0, 3), samples.uniform(0, 6), m);
      const gamma = frame[3] / m;
      boostToRest(out, frame, frame, m);
      expect(Math.abs(out[3] - m)).toBeLessThan(1e-15 * gamma * frame[3]);
      expect(momentum(out)).toBeLessThan(4e-15 * gamma * frame[3]);
      const p = randomOnShell(samples, 1.5);
      boostToRest(out, p, frame, m);
      boostFromRest(out, out, frame, m);
      for (let k = 0; k < 4; k++) expect(Math.abs(out[k] - p[k])).toBeLessThan(4e-15 * gamma * gamma * p[3]);
    }
  });
  it('along z multiplies E + pz by exp of the rapidity', () => {
    const frame = Float64Array.of(0, 0, 3, 5);
    const p = Float64Array.of(9, 1, 2, 3, 7);
    boostFromRest(p, p, frame, 4, 1);
    // Rapidity of the frame: ln((5 + 3)/4) = ln 2.
    expect(p[4] + p[3]).toBeCloseTo(20, 12);
    expect(p[4] - p[3]).toBeCloseTo(2, 12);
    expect([p[0], p[1], p[2]]).toEqual([9, 1, 2]);
  });
  it('leaves products of vectors as they are', () => {
    const samples = new Samples(14);
    for (let n = 0; n < 100; n++) {
      const frame = onShell(samples.uniform(0, 30), samples.uniform(0, 3), samples.uniform(0, 6), 20);
      const p = randomOnShell(samples, 1.5);
      const q = randomOnShell(samples);
      const before = product(p, q);
      const scale = p[3] * q[3];
      boostToRest(p, p, frame, 20);
      boostToRest(q, q, frame, 20);
      expect(Math.abs(product(p, q) - before)).toBeLessThan(1e-13 * Math.max(scale, p[3] * q[3]));
    }
  });
});
