import { describe, expect, it } from 'vitest';
import { judgeEverySteps } from './every-step.ts';

// u_t, u_z, u_phi and u_channel of physics.md section 9, by quadrature of the kernels over the dipoles that the rows
// show. About fourteen p-values a sample, fixed seed, each above 1e-4.
describe.each(['kt', 'virtuality'] as const)('every step in %s ordering', (order) => {
  it('has uniform u_t, u_z, u_phi and u_channel', () => {
    const settings = {
      energy: 91.1876,
      order,
      coupling: { kind: 'one-loop' },
      cutoff: 1,
      flavours: 5,
      quark: 1,
    } as const;
    const verdict = judgeEverySteps(settings, 301, 800, order === 'kt' ? 60 : 20);
    for (const [name, p] of verdict) expect(p, name).toBeGreaterThan(1e-4);
    expect(verdict.size).toBeGreaterThanOrEqual(14);
  });
});
