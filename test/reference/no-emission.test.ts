import { describe, expect, it } from 'vitest';
import {
  createGrower,
  type DipoleEnd,
  type DipoleEnds,
  GapJudge,
  type GrowSettings,
  growEvent,
  resolveSettings,
} from '../../engine/index.ts';
import { couplingFor, exponent, lowestT, quarkKernel } from './independent/index.ts';
import { massiveExponent } from './no-emission-massive.ts';

// The tables of references.md section 7; tolerance 1e-7.
type Order = GrowSettings['order'];
const FIXED = { kind: 'fixed', value: 0.12 } as const;
const ONE_LOOP = { kind: 'one-loop' } as const;
const ORDERS: readonly Order[] = ['kt', 'virtuality'];

const judge = new GapJudge();
const headOf = (some: Partial<GrowSettings>) => createGrower(resolveSettings(some)).sample;
function endsOf(some: Partial<GrowSettings>): DipoleEnds {
  const ends = judge.endsOf(headOf(some));
  if (!ends.assessable) throw new Error(ends.reason);
  return ends;
}
const quark = (q2: number): DipoleEnd => ({ channel: 'q_qg', emitter: 1, partner: -1, q2 });

describe.each(ORDERS)('no emission at all, %s ordering', (order) => {
  it.each([
    [200, 2, FIXED, 1.43759958, 0.237497168],
    [200, 2, ONE_LOOP, 2.3601945194, 0.0944018584],
    [10, 1, FIXED, 0.1954056684, 0.8225009278],
    [10, 1, ONE_LOOP, 0.4866403402, 0.6146880718],
  ] as const)('from q qbar at %d GeV down to %d GeV: the table', (energy, cutoff, coupling, total, delta) => {
    const some = { order, energy, cutoff, coupling, quark: 1 };
    const { hardScale, tLow } = headOf(some);
    expect(2 * endsOf(some).exponent(quark(energy ** 2), tLow, hardScale)).toBeCloseTo(total, 7);
    // the same from the rows of an event in which nothing happened
    for (let stream = 0; ; stream++) {
      const history = growEvent(resolveSettings(some), stream);
      if (history.steps.length > 0) continue;
      const gaps = judge.gapsOf(history);
      expect(gaps.assessable && gaps.delta[0]).toBeCloseTo(delta, 7);
      break;
    }
  });

  it.each([
    [200, 2, 5, FIXED, 3.0036307223, 0.384947221, 0.0337566466],
    [200, 2, 5, ONE_LOOP, 4.9595506661, 0.5848116708, 0.0039094353],
    [10, 1, 4, FIXED, 0.3782929278, 0.0818264346, 0.6312082984],
    [10, 1, 4, ONE_LOOP, 0.9471943423, 0.1969952308, 0.3184819195],
  ] as const)('from a scalar to g g at %d GeV down to %d GeV with %d flavours: the table', (...row) => {
    const [energy, cutoff, flavours, coupling, gluons, quarks, delta] = row;
    const some = { process: 'scalar-gg', order, energy, cutoff, flavours, coupling } as const;
    const { hardScale, tLow } = headOf(some);
    const ends = endsOf(some);
    const end = { emitter: 21, partner: 21, q2: energy ** 2 };
    expect(4 * ends.exponent({ channel: 'g_gg', ...end }, tLow, hardScale)).toBeCloseTo(gluons, 7);
    const pairs = 4 * flavours * ends.exponent({ channel: 'g_qq', flavour: 1, ...end }, tLow, hardScale);
    expect(pairs).toBeCloseTo(quarks, 7);
    const history = growEvent(resolveSettings(some), 0);
    const gaps = judge.gapsOf(history);
    expect(gaps.assessable && gaps.deltaToLow[0]).toBeCloseTo(delta, 7);
    expect(gaps.assessable && gaps.channelExponentToLow[1]).toBeCloseTo(gluons, 6);
  });
});

describe('gaps of the q qbar state', () => {
  it.each([
    ['kt', 200, 2, 50, 20, 0.8420355287, 0.8165278768],
    ['kt', 200, 2, 20, 5, 0.5418575805, 0.4045104466],
    ['kt', 200, 2, 5, 2, 0.5328891592, 0.2929134573],
    ['virtuality', 200, 2, 200, 100, 0.9519620013, 0.9467974514],
    ['virtuality', 200, 2, 100, 30, 0.6314246397, 0.5324627814],
    ['virtuality', 200, 2, 30, 4, 0.3951093406, 0.1872553383],
    ['kt', 10, 1, 4, 2, 0.9538553234, 0.9068975864],
    ['kt', 10, 1, 2, 1, 0.8632793982, 0.6791641846],
    ['virtuality', 10, 1, 10, 5, 0.9555015723, 0.9073628221],
    ['virtuality', 10, 1, 5, 2, 0.8608054153, 0.6774446305],
  ] as const)('are those of the table: %s, %d GeV, cut %d, from %d to %d', (...row) => {
    const [order, energy, cutoff, from, to, fixed, running] = row;
    for (const [coupling, delta] of [
      [FIXED, fixed],
      [ONE_LOOP, running],
    ] as const) {
      const ends = endsOf({ order, energy, cutoff, coupling });
      const found = Math.exp(-2 * ends.exponent(quark(energy ** 2), to * to, from * from));
      expect(found).toBeCloseTo(delta, 7);
    }
  });
});

describe('z of q -> q g at kT = 10 GeV and 200 GeV, kt ordering', () => {
  const ends = endsOf({ energy: 200, cutoff: 2, coupling: FIXED });
  const total = ends.rate(quark(200 ** 2), 100);

  it('has the integral and the range of the table', () => {
    expect((total * 2 * Math.PI) / 0.12).toBeCloseTo(5.796507136462, 11);
    const range = ends.range(quark(200 ** 2), 100) ?? expect.unreachable();
    expect(range[0]).toBeCloseTo(0.002506281447, 12);
    expect(range[1]).toBeCloseTo(0.997493718553, 12);
  });

  it.each([
    [0.1, 0.021376546783],
    [0.3, 0.080336146938],
    [0.5, 0.168665153884],
    [0.7, 0.324364396434],
    [0.9, 0.695066083909],
    [0.95, 0.876552882221],
    [0.99, 0.99680615105],
  ])('is below %d with the probability of the table', (z, below) => {
    expect(ends.rateBelow(quark(200 ** 2), 100, z) / total).toBeCloseTo(below, 11);
  });

  it('has that density', () => {
    const step = 1e-4;
    for (const z of [0.1, 0.5, 0.9]) {
      const [low, high] = [z - step, z + step].map((at) => ends.rateBelow(quark(200 ** 2), 100, at));
      expect((high - low) / (2 * step) / ends.density(quark(200 ** 2), 100, z)).toBeCloseTo(1, 5);
    }
    expect(ends.density(quark(200 ** 2), 100, 0.9976)).toBe(0);
  });
});

describe('the exponent of massless ends', () => {
  it('agrees with independent quadrature over random gaps, couplings and dipoles', () => {
    for (const order of ORDERS)
      for (const coupling of [FIXED, ONE_LOOP, { kind: 'two-loop' }] as const) {
        const [energy, cutoff] = [91.1876, 1];
        const ends = endsOf({ order, coupling, energy, cutoff });
        const run = couplingFor(coupling, cutoff ** 2, energy ** 2);
        for (let n = 0; n < 6; n++) {
          const q2 = energy ** 2 * 0.31 ** n;
          const end = { q2, kernel: quarkKernel, coupling: run, order, cut2: cutoff ** 2 };
          const low = lowestT(end) * (1 + 0.3 * n);
          const high = Math.max(low, q2 * 0.4 ** (n % 3));
          expect(ends.exponent(quark(q2), low, high)).toBeCloseTo(exponent(end, low, high), 6);
        }
      }
  });
});

describe('massive ends', () => {
  const b = 4.8;
  const ENDS: [string, DipoleEnd, { ij: number; k: number; i: number; j: number }][] = [
    ['b beside bbar', { channel: 'q_qg', emitter: 5, partner: -5, q2: 0 }, { ij: b, k: b, i: b, j: 0 }],
    ['b beside g', { channel: 'q_qg', emitter: 5, partner: 21, q2: 0 }, { ij: b, k: 0, i: b, j: 0 }],
    ['g beside b', { channel: 'g_gg', emitter: 21, partner: 5, q2: 0 }, { ij: 0, k: b, i: 0, j: 0 }],
    [
      'g to b bbar beside c',
      { channel: 'g_qq', flavour: 5, emitter: 21, partner: 4, q2: 0 },
      { ij: 0, k: 1.5, i: b, j: b },
    ],
    [
      'g to c cbar beside g',
      { channel: 'g_qq', flavour: 4, emitter: 21, partner: 21, q2: 0 },
      { ij: 0, k: 0, i: 1.5, j: 1.5 },
    ],
  ];
  it.each(ENDS)('emit nothing as often in either ordering, and as direct integration says: %s', (...row) => {
    const [, end, masses] = row;
    for (const velocityFactors of ['unit', 'published'] as const) {
      const totals = ORDERS.map((order) => {
        const some = { order, velocityFactors, masses: true, energy: 30, coupling: ONE_LOOP };
        const { tLow, hardScale } = headOf(some);
        return [70, 600].map((q2) => endsOf(some).exponent({ ...end, q2 }, tLow, hardScale));
      });
      [70, 600].forEach((q2, n) => {
        expect(Math.abs(totals[0][n] - totals[1][n])).toBeLessThan(3e-7);
        const direct = massiveExponent(end.channel, q2, masses, velocityFactors === 'published');
        expect(Math.abs(totals[0][n] - direct), `q2 ${q2}, ${velocityFactors}`).toBeLessThan(3e-7);
      });
    }
  });
});
