import { describe, expect, it } from 'vitest';
import { type GapVerdict, judgeGaps } from './coherent-gaps.ts';
import type { CoherentSettings } from './coherent-sample.ts';

const ONE_LOOP = { coupling: { kind: 'one-loop' } } as const;
const FIXED = { coupling: { kind: 'fixed', value: 0.118 } } as const;

const pValues = (v: GapVerdict): [string, number][] =>
  [
    ...v.times.map((p, n): [string, number] => [`gaps of generation ${n}`, p]),
    ['gaps of lines that went on', v.afterI] as [string, number],
    ['gaps of new lines', v.afterJ] as [string, number],
    ['fractions', v.fractions] as [string, number],
    ['azimuths', v.azimuth] as [string, number],
    ['turns of the azimuth', v.turns] as [string, number],
    ['flavours', v.flavours] as [string, number],
  ].filter(([, p]) => !Number.isNaN(p));

// Some nine p-values and two pulls a sample. p < 1e-5 or a pull beyond 4.5: by chance once in ten thousand runs; the
// seeds are fixed.
describe('the gaps of all lines', () => {
  const SAMPLES: readonly [string, CoherentSettings][] = [
    ['one loop, 1000 GeV', { ...ONE_LOOP, quark: 1, energy: 1000 }],
    ['fixed, 1000 GeV', { ...FIXED, quark: 1, energy: 1000 }],
    ['massive b, one loop', { ...ONE_LOOP, quark: 5, energy: 300, masses: true }],
    [
      'scalar to gluons, masses',
      { ...ONE_LOOP, process: 'scalar-gg', energy: 300, masses: true, cutoff: 0.7 },
    ],
    ['scalar to gluons, two loops', { coupling: { kind: 'two-loop' }, process: 'scalar-gg', energy: 300 }],
  ];
  it.each(SAMPLES)('are uniform by quadrature, line by line: %s', (_, settings) => {
    const verdict = judgeGaps(settings, 61, settings.process ? 700 : 1200);
    expect(verdict.steps).toBeGreaterThan(4000);
    for (const [name, p] of pValues(verdict)) expect(p, name).toBeGreaterThan(1e-5);
    expect(Math.abs(verdict.splittings)).toBeLessThan(4.5);
    expect(Math.abs(verdict.branched)).toBeLessThan(4.5);
  });

  it('would show a coupling that is off by three percent, and masses that are missing', () => {
    const fixed = { ...FIXED, quark: 1, energy: 1000 } as const;
    const wrong = judgeGaps(fixed, 61, 3000, { coupling: { kind: 'fixed', value: 0.1215 } });
    expect(Math.abs(wrong.branched)).toBeGreaterThan(4.5);
    const massless = judgeGaps({ ...ONE_LOOP, quark: 5, masses: true }, 61, 1200, { masses: false });
    expect(massless.times[0]).toBeLessThan(1e-10);
  });
});
