import { describe, expect, it } from 'vitest';
import type { GrowSettings } from '../../engine/index.ts';
import { judgeUniformity } from './no-emission-uniform.ts';

// As no-emission-uniform.test.ts: more settings, larger samples. About 23 p-values a sample, each above 1e-5.
const TWO_LOOPS = { coupling: { kind: 'two-loop' }, cmw: true } as const;

const SAMPLES: [string, Partial<GrowSettings>, number][] = [
  ['fixed coupling', { coupling: { kind: 'fixed', value: 0.118 }, energy: 1000 }, 20_000],
  ['one loop', {}, 60_000],
  ['one loop, 1 TeV', { energy: 1000 }, 15_000],
  ['two loops, rescaled, 300 GeV', { ...TWO_LOOPS, energy: 300 }, 20_000],
  ['low cutoff', { cutoff: 0.5 }, 20_000],
  ['heavy quarks', { masses: true }, 30_000],
  ['b quarks near their threshold', { masses: true, quark: 5, energy: 15 }, 60_000],
  ['c quarks', { masses: true, quark: 4, energy: 60, ...TWO_LOOPS }, 20_000],
  [
    'scalar to b bbar, published velocity factors',
    { process: 'scalar-bb', masses: true, velocityFactors: 'published' },
    20_000,
  ],
  ['scalar to gluons', { process: 'scalar-gg' }, 15_000],
  ['scalar to gluons, heavy quarks', { process: 'scalar-gg', masses: true }, 15_000],
  ['matched', { firstEmission: 'matched' }, 30_000],
  ['scalar to gluons, matched', { process: 'scalar-gg', firstEmission: 'matched', energy: 60 }, 20_000],
  ['scalar to b bbar, matched', { process: 'scalar-bb', firstEmission: 'matched' }, 20_000],
  ['matched, global recoil', { firstEmission: 'matched', recoil: 'global', energy: 300 }, 15_000],
  ['three flavours', { flavours: 3, quark: 2 }, 20_000],
  ['no flavour', { flavours: 0, quark: 1 }, 20_000],
];

describe.each(['kt', 'virtuality'] as const)('steps of large samples in %s ordering', (order) => {
  it.each(SAMPLES)('have uniform numbers: %s', (_name, settings, events) => {
    const { pValues, counts, missing } = judgeUniformity({ ...settings, order }, 411, events, true);
    expect(missing).toBe(0);
    for (const [name, p] of pValues) expect(p, `${name}, ${counts.get(name)} numbers`).toBeGreaterThan(1e-5);
  });
});
