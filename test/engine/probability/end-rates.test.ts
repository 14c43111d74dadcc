import { describe, expect, it } from 'vitest';
import { exp, integrate, log } from '../../../engine/math/index.ts';
import { DipoleKernels } from '../../../engine/probability/dipole-kernels.ts';
import { EndPhaseSpace } from '../../../engine/probability/end-phase-space.ts';
import { QuadratureRates } from '../../../engine/probability/end-rates.ts';
import type { KernelSettings } from '../../../engine/probability/kernel-settings.ts';
import { Strength } from '../../../engine/probability/strength.ts';
import { MassiveDensity, MasslessDensity, type ZDensity } from '../../../engine/probability/z-density.ts';
import { scalarToGluons, vectorToQuarks } from '../../../engine/qcd/index.ts';
import { uniforms } from '../measure/random-numbers.ts';
import { MASSES, settingsOf } from './families.ts';

const out = new Float64Array(3);
const one = new Float64Array(3);

/** Adaptive quadrature of one rate over half rapidity, cut where the coupling bends. */
function slowly(
  density: ZDensity,
  space: EndPhaseSpace,
  strength: Strength,
  t: number,
  q2: number,
  c: number,
  upTo: number,
): number {
  if (!space.open(t, q2, strength.bends[0])) return 0;
  const { low, high, limitS } = space;
  const cuts = [low, Math.min(high, upTo)];
  for (const kT2 of strength.bends.slice(1))
    if (space.setRange(limitS, kT2)) cuts.push(space.low, space.high);
  const inside = cuts.filter((b) => b >= low && b <= cuts[1]).sort((a, b) => a - b);
  density.begin(t, q2);
  const f = (b: number): number => {
    const e = exp(-2 * Math.abs(b));
    const [small, large] = [e / (1 + e), 1 / (1 + e)];
    const [z, w] = b < 0 ? [small, large] : [large, small];
    density.fill(one, Float64Array.of(z), Float64Array.of(w), 1);
    return 2 * small * large * Math.max(0, one[c]);
  };
  let sum = 0;
  for (let n = 0; n + 1 < inside.length; n++)
    sum += integrate(f, inside[n], inside[n + 1], { relative: 1e-10, absolute: 1e-11, limit: 200 }).value;
  return sum;
}

const SETTINGS: [string, Partial<KernelSettings>][] = [
  ['kt', {}],
  ['kt with published velocity factors', { velocityFactors: 'published' }],
  ['virtuality', { order: 'virtuality' }],
  ['virtuality, two loops, rescaled', { order: 'virtuality', coupling: { kind: 'two-loop' }, cmw: true }],
  ['virtuality with published velocity factors', { order: 'virtuality', velocityFactors: 'published' }],
  ['virtuality just above the pole', { order: 'virtuality', coupling: { kind: 'two-loop' }, cutoff: 0.42 }],
];

describe.each(SETTINGS)('rates by panels, %s', (_name, some) => {
  const settings = settingsOf(some);
  const strength = new Strength(settings);
  const virtuality = settings.order === 'virtuality';

  it('agree with adaptive quadrature for massless and massive ends to 1e-8', () => {
    const random = uniforms(4);
    let open = 0;
    for (let n = 0; n < 8 * 18; n++) {
      const [name, masses, channels] = MASSES[n % 8] ?? [
        'light',
        { emitter: 0, partner: 0, i: 0, j: 0 },
        null,
      ];
      const space = new EndPhaseSpace(virtuality, masses);
      const massless = channels === null;
      const massive = massless
        ? null
        : new MassiveDensity(virtuality, settings.velocityFactors, strength, masses, channels);
      const density = massive ?? new MasslessDensity(virtuality, strength, null);
      const rates = new QuadratureRates(virtuality, density, massive, space, strength);
      const columns = space.columns(strength.bends, settings.energy ** 2);
      const q2 = columns[0] * exp(random() * log(settings.energy ** 2 / columns[0]));
      const edges = space.edges(q2, strength.bends).map((edge) => space.placeOf(edge, q2));
      const t = exp(edges[0] + random() * (edges[edges.length - 1] - edges[0]));
      if (!space.open(t, q2, strength.bends[0])) continue;
      const to = space.low + random() * (space.high - space.low);
      const w = 1 / (1 + exp(2 * to));
      open++;
      for (let c = 0; c < rates.channels.length; c++) {
        const what = `${name} ${rates.channels[c]}, q2 ${q2}, t ${t}`;
        rates.rates(out, t, q2);
        const whole = slowly(density, space, strength, t, q2, c, Infinity);
        expect(Math.abs(out[c] - whole), what).toBeLessThan(1e-8 * Math.max(1, whole));
        rates.ratesBelow(out, t, q2, 1 - w, w);
        const part = slowly(density, space, strength, t, q2, c, to);
        expect(Math.abs(out[c] - part), what).toBeLessThan(1e-8 * Math.max(1, part));
      }
    }
    expect(open).toBeGreaterThan(120);
  });
});

describe('rates of massless ends', () => {
  it.each([vectorToQuarks, scalarToGluons])(
    'agree with adaptive quadrature with a first-emission ratio',
    (ratio) => {
      const random = uniforms(5);
      for (const order of ['kt', 'virtuality'] as const) {
        const settings = settingsOf({ order, firstEmission: ratio });
        const strength = new Strength(settings);
        const { rates, space, density, table } = new DipoleKernels(settings).first() ?? expect.unreachable();
        const q2 = settings.energy ** 2;
        expect(table.enter(q2)).toBe(true);
        for (let n = 0; n < 10; n++) {
          const t = q2 * (order === 'kt' ? 0.25 : 1) * exp(-6 * random());
          rates.rates(out, t, q2);
          for (let c = 0; c < 3; c++) {
            const whole = slowly(density, space, strength, t, q2, c, Infinity);
            expect(Math.abs(out[c] - whole)).toBeLessThan(1e-9);
          }
        }
      }
    },
  );

  it('are the same by panels and in closed form', () => {
    const random = uniforms(6);
    const settings = settingsOf({ coupling: { kind: 'two-loop' }, cmw: true });
    const { rates, space, density } = new DipoleKernels(settings).emission(0, 0);
    const panels = new QuadratureRates(false, density, null, space, new Strength(settings));
    for (let n = 0; n < 50; n++) {
      const q2 = 8000 * exp(-5 * random());
      const t = 1 + (q2 / 4 - 1) * random() ** 3;
      rates.rates(out, t, q2);
      panels.rates(one, t, q2);
      for (let c = 0; c < 3; c++) expect(Math.abs(out[c] - one[c])).toBeLessThan(1e-11);
    }
  });
});
