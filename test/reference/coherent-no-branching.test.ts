import { describe, expect, it } from 'vitest';
import { channelRate, type Line, lineExponent, makeLine } from './coherent-rates.ts';
import { type CoherentSettings, countEmpty } from './coherent-sample.ts';
import { integrate } from './independent/index.ts';

// references.md section 7, closed forms at fixed coupling: alpha_s, qt0, pTmin, nf; E_q, E_gg, E_qqbar.
const CLOSED = [
  [0.12, 200, 2, 5, 0.7140389258991, 1.512297668308, 0.1571498582757],
  [0.12, 10, 1, 4, 0.08537104412824, 0.1754009270242, 0.02224522968574],
  [0.118, 91.1876, 0.5, 5, 0.9520194198907, 2.027264269213, 0.1912990425689],
] as const;

const fixedLine = (id: number, value: number, energy: number, cutoff: number, flavours: number): Line =>
  makeLine(id, energy, { coupling: { kind: 'fixed', value }, cutoff, flavours, masses: false });

/** (events without a branching - expected) in binomial standard errors. */
function pull(settings: CoherentSettings, seed: number, events: number, probability: number): number {
  const empty = countEmpty(settings, seed, events);
  return (empty - events * probability) / Math.sqrt(events * probability * (1 - probability));
}

/** Probability that neither of two equal partons of the hard process branches. */
function noBranching(id: number, settings: CoherentSettings): number {
  const { energy = 91.1876, cutoff = 1, flavours = 5, masses = false, coupling } = settings;
  const line = makeLine(id, energy, { coupling: coupling!, cutoff, flavours, masses });
  const m2 = masses && id === 5 ? 4.8 ** 2 : masses && id === 4 ? 1.5 ** 2 : 0;
  const start = (energy ** 2 * (1 + Math.sqrt(1 - (4 * m2) / energy ** 2))) / 2;
  return Math.exp(-2 * lineExponent(line, start));
}

describe('the quadrature that coherent branching is held against', () => {
  it('agrees with the closed forms of the massless rates at fixed coupling', () => {
    for (const [value, energy, cutoff, flavours, quark, gluons, pairs] of CLOSED) {
      const q = fixedLine(1, value, energy, cutoff, flavours);
      const g = fixedLine(21, value, energy, cutoff, flavours);
      expect(Math.abs(lineExponent(q, energy ** 2) / quark - 1)).toBeLessThan(1e-9);
      expect(Math.abs(lineExponent(g, energy ** 2) / (gluons + pairs) - 1)).toBeLessThan(1e-9);
      const lnLow = Math.log(16 * cutoff ** 2);
      const ofPairs = integrate(
        (x) => 2 * x * flavours * channelRate(g, 1, Math.exp(lnLow + x * x)),
        0,
        Math.sqrt(Math.log(energy ** 2) - lnLow),
        0.25,
      );
      expect(Math.abs(ofPairs / pairs - 1)).toBeLessThan(1e-9);
    }
  });
});

// Four binomial standard errors: one of these some twenty by chance with probability 1e-3; the seeds are fixed.
describe('the probability that nothing branches', () => {
  it.each(CLOSED)(
    'follows the closed form: alpha_s %f, %f GeV, pTmin %f',
    (value, energy, cutoff, flavours, eq, egg, eqq) => {
      const common = { coupling: { kind: 'fixed', value }, energy, cutoff, flavours } as const;
      expect(Math.abs(pull({ ...common, quark: 1 }, 31, 20000, Math.exp(-2 * eq)))).toBeLessThan(4);
      const gluons = { ...common, process: 'scalar-gg' } as const;
      expect(Math.abs(pull(gluons, 32, 20000, Math.exp(-2 * (egg + eqq))))).toBeLessThan(4);
    },
  );

  const RUNNING: readonly [string, number, CoherentSettings][] = [
    ['one loop', 1, { quark: 1, coupling: { kind: 'one-loop' } }],
    ['two loops', 1, { quark: 1, coupling: { kind: 'two-loop' } }],
    ['one loop, 1000 GeV', 1, { quark: 1, coupling: { kind: 'one-loop' }, energy: 1000 }],
    ['one loop, low pTmin', 1, { quark: 1, coupling: { kind: 'one-loop' }, energy: 15, cutoff: 0.4 }],
    ['massive b', 5, { quark: 5, masses: true, coupling: { kind: 'one-loop' } }],
    ['massive b, fixed', 5, { quark: 5, masses: true, coupling: { kind: 'fixed', value: 0.118 } }],
    [
      'massive b near threshold',
      5,
      { quark: 5, masses: true, coupling: { kind: 'one-loop' }, energy: 12, cutoff: 0.5 },
    ],
    ['massive c', 4, { quark: 4, masses: true, coupling: { kind: 'two-loop' }, energy: 40 }],
    ['gluons, one loop', 21, { process: 'scalar-gg', coupling: { kind: 'one-loop' }, energy: 125 }],
    [
      'gluons, masses',
      21,
      { process: 'scalar-gg', coupling: { kind: 'one-loop' }, energy: 40, masses: true },
    ],
    [
      'scalar to massive b',
      5,
      { process: 'scalar-bb', coupling: { kind: 'one-loop' }, energy: 125, masses: true },
    ],
  ];
  it.each(RUNNING)('follows quadrature: %s', (_, id, settings) => {
    expect(Math.abs(pull(settings, 33, 20000, noBranching(id, settings)))).toBeLessThan(4);
  });

  it('would show a cutoff that is off by eight percent', () => {
    const settings = { quark: 1, coupling: { kind: 'one-loop' } } as const;
    const expected = noBranching(1, { ...settings, cutoff: 1.08 });
    expect(Math.abs(pull(settings, 33, 20000, expected))).toBeGreaterThan(4);
  });
});
