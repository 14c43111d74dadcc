import { describe, expect, it } from 'vitest';
import type { GrowSettings } from '../../engine/index.ts';
import { judgeUniformity } from './no-emission-uniform.ts';

// Steps that the engine samples against probabilities that it computes by quadrature from the rows: two roads to the
// same kernels. About 23 p-values a sample; below 1e-4 one in four thousand clean samples. Seeds are fixed.
const LEVEL = 1e-4;
const TWO_LOOPS = { coupling: { kind: 'two-loop' }, cmw: true } as const;

const SAMPLES: [string, Partial<GrowSettings>][] = [
  ['one loop', {}],
  ['two loops, rescaled', TWO_LOOPS],
  ['heavy quarks', { masses: true, quark: 5, energy: 60 }],
  ['scalar to gluons, matched', { process: 'scalar-gg', firstEmission: 'matched', energy: 60 }],
  ['matched, global recoil', { firstEmission: 'matched', recoil: 'global' }],
];

describe.each(['kt', 'virtuality'] as const)('steps in %s ordering', (order) => {
  it.each(SAMPLES)('have uniform u_t, gaps, channel clocks, u_z and u_channel: %s', (_name, settings) => {
    const { pValues, counts, missing } = judgeUniformity({ ...settings, order }, 401, 1500, true);
    expect(missing).toBe(0);
    for (const [name, p] of pValues) expect(p, `${name}, ${counts.get(name)} numbers`).toBeGreaterThan(LEVEL);
    expect(pValues.size).toBeGreaterThanOrEqual(19);
    expect(counts.get('u_t')).toBeGreaterThan(1500);
  });
});

describe('the same numbers', () => {
  const settings = { coupling: { kind: 'fixed', value: 0.2 }, quark: 1, energy: 500 } as const;
  const EVENTS = 4000;

  it('are uniform in a sample of the size of the controls', () => {
    const { pValues, counts } = judgeUniformity(settings, 402, EVENTS, false);
    for (const [name, p] of pValues) expect(p, name).toBeGreaterThan(LEVEL);
    expect(counts.get('u_t')).toBeGreaterThan(20_000);
  });

  it('find a coupling that is 5 percent too large', () => {
    const grown = { coupling: { kind: 'fixed', value: 1.05 * 0.2 } } as const;
    const { pValues } = judgeUniformity(settings, 402, EVENTS, false, { grown });
    expect(pValues.get('gap')).toBeLessThan(LEVEL);
  });

  it.each([
    ['q_qg', [1.05, 1, 1]],
    ['g_gg', [1, 1.05, 1]],
  ] as const)('find a kernel of %s that is 5 percent off, by its own clock', (channel, kernels) => {
    const { pValues } = judgeUniformity(settings, 402, EVENTS, false, { kernels });
    for (const name of ['q_qg', 'g_gg', 'g_qq'])
      if (name === channel) expect(pValues.get(`clock ${name}`)).toBeLessThan(LEVEL);
      else expect(pValues.get(`clock ${name}`)).toBeGreaterThan(LEVEL);
  });

  it('find a coupling that runs at two loops and not at one', () => {
    const { pValues } = judgeUniformity({ quark: 1 }, 402, EVENTS, false, {
      grown: { coupling: { kind: 'two-loop' } },
    });
    expect(pValues.get('gap')).toBeLessThan(LEVEL);
  });
});
