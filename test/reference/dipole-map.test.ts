import { describe, expect, it } from 'vitest';
import { branchDipole } from '../../engine/index.ts';
import { angle, branch, type Four, Generator, product, space } from './independent/index.ts';

// references.md section 3, points A to D, momenta written (E, px, py, pz) there; azimuths from the fixed space axis.
const turn = ([e, x, y, z]: number[]): Four => [x, y, z, e];
const POINTS = [
  {
    name: 'A',
    pair: [
      [50, 0, 0, 50],
      [50, 0, 0, -50],
    ],
    y: 0.1,
    z: 0.7,
    azimuth: 5.21238898038469,
    after: [
      [36.5, 12.717379530239501, 6.947536101658295, 33.5],
      [18.5, -12.717379530239501, -6.947536101658295, 11.5],
      [45, 0, 0, -45],
    ],
  },
  {
    name: 'B',
    pair: [
      [50, 0, 0, 50],
      [50, 0, 0, -50],
    ],
    y: 0.001,
    z: 0.999,
    azimuth: 0.9292036732051034,
    after: [
      [49.95005, -0.08007429435461055, 0.05981728331854586, 49.94995],
      [0.09995, 0.08007429435461055, -0.05981728331854586, 5e-5],
      [49.95, 0, 0, -49.95],
    ],
  },
  {
    name: 'C',
    pair: [
      [50, 0, 0, 50],
      [50, 0, 0, -50],
    ],
    y: 0.4,
    z: 0.25,
    azimuth: 1.570796326794897,
    after: [
      [27.5, -27.386127875258307, 0, -2.5],
      [42.5, 27.386127875258307, 0, 32.5],
      [30, 0, 0, -30],
    ],
  },
  {
    name: 'D',
    pair: [
      [30, 10, 20, 20],
      [14, 4, -6, -12],
    ],
    y: 0.2,
    z: 0.6,
    azimuth: 1,
    after: [
      [21.732552973210513, 11.113793958182232, 17.463959260152354, 6.617973220572301],
      [11.067447026789486, -0.3137939581822325, 1.3360407398476466, 10.982026779427699],
      [11.2, 3.2, -4.8, -9.6],
    ],
  },
];

function branched(emitter: Four, partner: Four, z: number, y: number, azimuth: number): Four[] {
  const out = new Float64Array(12);
  expect(branchDipole(out, emitter, partner, z, y, azimuth)).toBe(true);
  return [0, 4, 8].map((n) => [out[n], out[n + 1], out[n + 2], out[n + 3]] as Four);
}

describe('the dipole map', () => {
  it.each(POINTS)('gives worked point $name to 1e-12 of the hard scale', ({ pair, y, z, azimuth, after }) => {
    const found = branched(turn(pair[0]), turn(pair[1]), z, y, azimuth);
    const scale = pair[0][0] + pair[1][0];
    found.forEach((p, n) => {
      p.forEach((x, c) => {
        expect(Math.abs(x - turn(after[n])[c])).toBeLessThan(1e-12 * scale);
      });
    });
  });

  it('has the invariants of an independent map built in the dipole rest frame', () => {
    const random = new Generator(41);
    const direction = (e: number): Four => {
      const c = 2 * random.uniform() - 1;
      const [s, phi] = [Math.sqrt(1 - c * c), 2 * Math.PI * random.uniform()];
      return [e * s * Math.cos(phi), e * s * Math.sin(phi), e * c, e];
    };
    for (let n = 0; n < 500; n++) {
      const [a, b] = [direction(1 + 99 * random.uniform()), direction(1 + 99 * random.uniform())];
      if (angle(space(a), space(b)) < 0.05) continue;
      const [y, z] = [random.uniform(), random.uniform()];
      const [i, j, k] = branched(a, b, z, y, 2 * Math.PI * random.uniform());
      const other = branch(a, b, y, z, 0);
      const scale = (a[3] + b[3]) ** 2;
      expect(Math.abs(product(i, j) - product(other.i, other.j))).toBeLessThan(1e-12 * scale);
      expect(Math.abs(product(i, k) - product(other.i, other.k))).toBeLessThan(1e-12 * scale);
      expect(Math.abs(product(j, k) - product(other.j, other.k))).toBeLessThan(1e-12 * scale);
      for (let c = 0; c < 4; c++) {
        expect(Math.abs(i[c] + j[c] + k[c] - a[c] - b[c])).toBeLessThan(1e-13 * Math.sqrt(scale));
      }
    }
  });
});
