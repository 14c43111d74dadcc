import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { branchDipole } from '../../../engine/kinematics/index.ts';
import { dipoleInvariants, makeDipoleInvariants } from '../../../engine/measure/index.ts';
import { boost, branchInRestFrame, combine, inRestFrame, product, type Vector } from './rest-frame-map.ts';

/** Invariants of a branching from its five momenta and their masses. */
function invariants(momenta: readonly (readonly number[])[], masses = [0, 0, 0, 0, 0]) {
  const packed = new Float64Array(25);
  momenta.forEach((p, n) => {
    packed.set(p, 5 * n);
    packed[5 * n + 4] = masses[n];
  });
  const out = makeDipoleInvariants();
  dipoleInvariants(out, packed);
  return out;
}

/** px, py, pz, E from the order E, px, py, pz of the published points. */
const of = (e: number, x: number, y: number, z: number): Vector => [x, y, z, e];

const turnTo = (phi: number): number => ((phi % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
const between = (a: number, b: number): number => Math.abs(Math.PI - Math.abs(Math.PI - Math.abs(a - b)));

/** A generic number, even over the range: fast-check's own doubles are even over exponents, nearly all of them 0. */
const real = (min: number, max: number) =>
  fc.noBias(fc.integer({ min: 0, max: 2 ** 31 - 1 })).map((n) => min + ((max - min) * n) / 2 ** 31);

/** Whether two space axes are equally transverse to a dipole, but for rounding, so that either may be the origin. */
function axesTie(emitter: readonly number[], partner: readonly number[]): boolean {
  const products = [0, 1, 2].map((c) => (emitter[c] * partner[c]) / (emitter[3] * partner[3]));
  const [, second, largest] = products.sort((a, b) => a - b);
  return largest - second < 1e-9;
}

/** Worked at 40 digits from Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1. */
const POINTS = [
  {
    name: 'A',
    before: [of(50, 0, 0, 50), of(50, 0, 0, -50)],
    after: [
      of(36.5, 12.717379530239501, 6.947536101658295, 33.5),
      of(18.5, -12.717379530239501, -6.947536101658295, 11.5),
      of(45, 0, 0, -45),
    ],
    y: 0.1,
    z: 0.7,
    azimuth: 5.21238898038469,
    kT: 14.49137674618944,
  },
  {
    name: 'B',
    before: [of(50, 0, 0, 50), of(50, 0, 0, -50)],
    after: [
      of(49.95005, -0.08007429435461055, 0.05981728331854586, 49.94995),
      of(0.09995, 0.08007429435461055, -0.05981728331854586, 5e-5),
      of(49.95, 0, 0, -49.95),
    ],
    y: 0.001,
    z: 0.999,
    azimuth: 0.9292036732051034,
    kT: 0.09994998749374609,
  },
  {
    name: 'C',
    before: [of(50, 0, 0, 50), of(50, 0, 0, -50)],
    after: [of(27.5, -27.386127875258307, 0, -2.5), of(42.5, 27.386127875258307, 0, 32.5), of(30, 0, 0, -30)],
    y: 0.4,
    z: 0.25,
    azimuth: 1.570796326794897,
    kT: 27.386127875258307,
  },
  {
    name: 'D',
    before: [of(30, 10, 20, 20), of(14, 4, -6, -12)],
    after: [
      of(21.732552973210513, 11.113793958182232, 17.463959260152354, 6.617973220572301),
      of(11.067447026789486, -0.3137939581822325, 1.3360407398476466, 10.982026779427699),
      of(11.2, 3.2, -4.8, -9.6),
    ],
    y: 0.2,
    z: 0.6,
    azimuth: 1,
    kT: 8.42852300228219,
  },
];

describe('invariants of a dipole branching', () => {
  it.each(POINTS)('gives y, z, kT and azimuth of the worked point $name', (point) => {
    const found = invariants([...point.before, ...point.after]);
    expect(Math.abs(found.y / point.y - 1)).toBeLessThan(1e-13);
    expect(Math.abs(found.z / point.z - 1)).toBeLessThan(1e-13);
    expect(Math.abs(found.kT / point.kT - 1)).toBeLessThan(1e-13);
    expect(between(found.azimuth, point.azimuth)).toBeLessThan(1e-12);
  });

  it('gives y, z, kT, azimuth and pair mass of the worked point E, a massive emitter and partner', () => {
    // Catani, Dittmaier, Seymour, Trocsanyi, Nucl. Phys. B627 (2002) 189, section 5; b -> b g, m = 4.8, phi = 0.5 from x
    const found = invariants(
      [
        of(50, 0, 0, 49.76906669810074),
        of(50, 0, 0, -49.76906669810074),
        of(36.562208, 12.623660316752709, 6.896337061984258, 33.26918678251708),
        of(18.414752, -12.623660316752709, -6.896337061984258, 11.497253000445333),
        of(45.02304, 0, 0, -44.766439782962415),
      ],
      [4.8, 4.8, 4.8, 0, 4.8],
    );
    expect(Math.abs(found.y / 0.1 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.z / 0.7 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.kT / 14.384584271547606 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.pairMass2 / 1018.432 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.qBar2 / (10000 - 2 * 4.8 * 4.8) - 1)).toBeLessThan(1e-12);
    expect(between(found.azimuth, turnTo(0.5 - Math.PI / 2))).toBeLessThan(1e-12);
  });

  it('gives y, z, kT, azimuth and pair mass of the worked point F, a gluon to massive quarks', () => {
    const found = invariants(
      [
        of(50, 0, 0, 50),
        of(50, 0, 0, -50),
        of(21.631328, -4.314024673422839, 9.42631588252266, 18.368672),
        of(31.087552, 4.314024673422839, -9.42631588252266, 28.912448),
        of(47.28112, 0, 0, -47.28112),
      ],
      [0, 0, 4.8, 4.8, 0],
    );
    expect(Math.abs(found.y / 0.05 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.z / 0.4 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.kT / 10.366592497055144 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(found.pairMass2 / 543.776 - 1)).toBeLessThan(1e-12);
    expect(between(found.azimuth, turnTo(2 - Math.PI / 2))).toBeLessThan(1e-12);
  });

  it('agrees with branchings laid out in the rest frame of the dipole and boosted, in long chains', () => {
    let links = 0;
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(real(1e-3, 0.9), real(0.03, 0.97), real(0, 6.283), fc.integer({ min: 0, max: 2 })),
          { minLength: 5, maxLength: 12 },
        ),
        real(-0.99, 0.99),
        real(0, 6.283),
        (chain, cosine, phi) => {
          const sine = Math.sqrt(1 - cosine * cosine);
          let emitter: Vector = [50 * sine * Math.cos(phi), 50 * sine * Math.sin(phi), 50 * cosine, 50];
          let partner: Vector = [-emitter[0], -emitter[1], -emitter[2], 50];
          for (const [y, z, azimuth, next] of chain) {
            const [i, j, k] = branchInRestFrame(emitter, partner, y, z, azimuth);
            const found = invariants([emitter, partner, i, j, k]);
            // the boosts of the brute force lose (E/m)^2 of the digits, its dot products (E/kT)^2
            const frame = combine([1, emitter], [1, partner]);
            const gamma2 = frame[3] ** 2 / product(frame, frame);
            const narrow = 1 / (y * z * (1 - z));
            const allowed = 1e-14 * gamma2 * narrow;
            if (allowed > 1e-6 || axesTie(emitter, partner)) break;
            links++;
            expect(Math.abs(found.y / y - 1)).toBeLessThan(allowed);
            expect(Math.abs(found.z / z - 1)).toBeLessThan(allowed);
            expect(between(found.azimuth, azimuth)).toBeLessThan(allowed);
            const kT = Math.sqrt(z * (1 - z) * y * product(frame, frame));
            expect(Math.abs(found.kT / kT - 1)).toBeLessThan(allowed);
            [emitter, partner] = next === 0 ? [i, j] : next === 1 ? [j, k] : [k, i];
            emitter[3] = Math.hypot(emitter[0], emitter[1], emitter[2]);
            partner[3] = Math.hypot(partner[0], partner[1], partner[2]);
          }
        },
      ),
      { seed: 1, numRuns: 300 },
    );
    expect(links).toBeGreaterThan(1500);
  });

  it('keeps y, z, kT and azimuth to 1e-9 from y = 1e-10 up, for wide and for narrow dipoles', () => {
    let smallest = 1;
    let narrowest = 4;
    fc.assert(
      fc.property(
        real(-10, -0.1),
        real(0.05, 0.95),
        real(0, 6.283),
        real(-3, 0.4),
        fc.tuple(real(-0.95, 0.95), real(0, 6.283), real(0, 6.283)),
        (logY, z, azimuth, logAngle, [cosine, phi, turn]) => {
          const y = 10 ** logY;
          const angle = 10 ** logAngle;
          // the two directions, `angle` apart, about an arbitrary axis
          const sine = Math.sqrt(1 - cosine * cosine);
          const u = [sine * Math.cos(phi), sine * Math.sin(phi), cosine];
          const a = [cosine * Math.cos(phi), cosine * Math.sin(phi), -sine];
          const b = [-Math.sin(phi), Math.cos(phi), 0];
          const v = u.map(
            (c, n) => c * Math.cos(angle) + Math.sin(angle) * (a[n] * Math.cos(turn) + b[n] * Math.sin(turn)),
          );
          const massless = (energy: number, d: number[]): number[] => {
            const p = d.map((c) => energy * c);
            return [...p, Math.hypot(p[0], p[1], p[2])];
          };
          const emitter = massless(3e5, u);
          const partner = massless(1e5, v);
          fc.pre(!axesTie(emitter, partner));
          const out = new Float64Array(12);
          expect(branchDipole(out, emitter, partner, z, y, azimuth)).toBe(true);
          const found = invariants([
            emitter,
            partner,
            [...out.subarray(0, 4)],
            [...out.subarray(4, 8)],
            [...out.subarray(8, 12)],
          ]);
          // the rows themselves are rounded to 1e-16, the pair is sqrt(y) narrower than the dipole
          const allowed = 1e-14 / (Math.sqrt(y) * Math.min(1, angle));
          smallest = Math.min(smallest, y);
          narrowest = Math.min(narrowest, angle);
          expect(Math.abs(found.y / y - 1)).toBeLessThan(allowed);
          expect(Math.abs(found.z / z - 1)).toBeLessThan(allowed);
          expect(between(found.azimuth, azimuth)).toBeLessThan(allowed);
          const q2 = 4 * emitter[3] * partner[3] * Math.sin(angle / 2) ** 2;
          expect(Math.abs(found.kT / Math.sqrt(z * (1 - z) * y * q2) - 1)).toBeLessThan(allowed);
          if (angle > 1) expect(allowed).toBeLessThan(1.1e-9);
        },
      ),
      { seed: 2, numRuns: 3000 },
    );
    expect(smallest).toBeLessThan(2e-10);
    expect(narrowest).toBeLessThan(2e-3);
  });

  it('gives the rapidity of a light-cone fraction: ln of (momentum towards the emitter over towards the partner) / 2', () => {
    const [emitter, partner] = POINTS[3].before;
    const found = invariants([...POINTS[3].before, ...POINTS[3].after]);
    const [i, j] = POINTS[3].after;
    const rapidity = (p: Vector) => Math.log(product(p, partner) / product(p, emitter)) / 2;
    expect(found.emissionRapidity).toBeCloseTo(rapidity(j), 12);
    expect(found.daughterRapidity).toBeCloseTo(rapidity(i), 12);
  });

  it('starts the azimuth at z where two axes tie, at y where x and y do', () => {
    // along an axis the other two are equally transverse; (n1, n2, emitter direction) is right-handed
    const along: [Vector, Vector, number[]][] = [
      [of(50, 50, 0, 0), of(50, -50, 0, 0), [0, 0, 1]],
      [of(50, 0, 50, 0), of(50, 0, -50, 0), [0, 0, 1]],
      [of(50, 0, 0, 50), of(50, 0, 0, -50), [0, 1, 0]],
    ];
    for (const [emitter, partner, origin] of along) {
      const kick: Vector = [origin[0], origin[1], origin[2], 0];
      const i = combine([0.6, emitter], [0.001, partner], [1, kick]);
      const j = combine([0.4, emitter], [0.001, partner], [-1, kick]);
      for (const p of [i, j]) p[3] = Math.hypot(p[0], p[1], p[2]);
      const phi = invariants([emitter, partner, i, j, partner]).azimuth;
      expect(between(phi, 0)).toBeLessThan(1e-12);
    }
  });

  it('gives azimuth, kT and rapidities of massive branchings as they are in the rest frame, however they are boosted', () => {
    const E = [
      of(50, 0, 0, 49.76906669810074),
      of(50, 0, 0, -49.76906669810074),
      of(36.562208, 12.623660316752709, 6.896337061984258, 33.26918678251708),
      of(18.414752, -12.623660316752709, -6.896337061984258, 11.497253000445334),
      of(45.02304, 0, 0, -44.766439782962415),
    ];
    const F = [
      of(50, 0, 0, 50),
      of(50, 0, 0, -50),
      of(21.631328, -4.31402467342284, 9.42631588252266, 18.368672),
      of(31.087552, 4.31402467342284, -9.42631588252266, 28.912448),
      of(47.28112, 0, 0, -47.28112),
    ];
    // a heavy emitter and a massless partner: E with its light partner replaced, so that only one side has a mass
    const points: [Vector[], number[]][] = [
      [E, [4.8, 4.8, 4.8, 0, 4.8]],
      [F, [0, 0, 4.8, 4.8, 0]],
      [
        [E[0], F[1], E[2], E[3], F[4]],
        [4.8, 0, 4.8, 0, 0],
      ],
      [
        [F[0], E[1], F[2], F[3], E[4]],
        [0, 4.8, 4.8, 4.8, 4.8],
      ],
    ];
    fc.assert(
      fc.property(real(-2, 2), real(-2, 2), real(-2, 2), (bx, by, bz) => {
        const frame: Vector = [bx, by, bz, Math.sqrt(1 + bx * bx + by * by + bz * bz)];
        for (const [momenta, masses] of points) {
          const [emitter, partner, i, j, after] = momenta.map((p) => boost(p, frame));
          fc.pre(!axesTie(emitter, partner));
          const found = invariants([emitter, partner, i, j, after], masses);
          const restI = inRestFrame(i, emitter, partner);
          const restJ = inRestFrame(j, emitter, partner);
          expect(between(found.azimuth, turnTo(restI.azimuth))).toBeLessThan(1e-11);
          expect(Math.abs(found.kT / restJ.kT - 1)).toBeLessThan(1e-11);
          expect(Math.abs(found.daughterRapidity - restI.rapidity)).toBeLessThan(1e-11);
          expect(Math.abs(found.emissionRapidity - restJ.rapidity)).toBeLessThan(1e-11);
          expect(
            Math.abs(found.z - product(i, after) / (product(i, after) + product(j, after))),
          ).toBeLessThan(1e-11);
        }
      }),
      { seed: 7, numRuns: 200 },
    );
  });

  it('believes the mass column, so that momenta printed with nine digits still give y to 1e-6', () => {
    const y = 1e-4;
    const digits = (p: Vector) => p.map((c) => Number(c.toPrecision(9)));
    const [emitter, partner] = POINTS[3].before;
    const [i, j, k] = branchInRestFrame(emitter, partner, y, 0.6, 1);
    const found = invariants([emitter, partner, i, j, k].map(digits));
    expect(Math.abs(found.y / y - 1)).toBeLessThan(1e-6);
    // but not against an energy that is off by more: then the momenta speak
    const heavy = [...i.slice(0, 3), Math.hypot(i[3], 5)];
    const off = invariants([emitter, partner, heavy, j, k]);
    expect(off.pairMass2).toBeGreaterThan(25);
  });

  it('gives NaN where a momentum is missing', () => {
    const found = invariants([
      ...POINTS[0].before,
      POINTS[0].after[0],
      [NaN, NaN, NaN, NaN],
      POINTS[0].after[2],
    ]);
    expect(found.y).toBeNaN();
    expect(found.z).toBeNaN();
    expect(found.kT).toBeNaN();
  });
});
