import { describe, expect, it } from 'vitest';
import { judgeEverySteps } from './every-step.ts';
import type { CouplingKind } from './independent/index.ts';

// As every-step.test.ts, more events, energies and couplings.
const COUPLINGS: CouplingKind[] = [
  { kind: 'fixed', value: 0.118 },
  { kind: 'one-loop' },
  { kind: 'two-loop' },
];

describe.each(['kt', 'virtuality'] as const)('every step of large samples in %s ordering', (order) => {
  it.each(COUPLINGS)('has uniform u_t, u_z, u_phi and u_channel at 91 GeV, coupling $kind', (coupling) => {
    const settings = { energy: 91.1876, order, coupling, cutoff: 1, flavours: 5, quark: 1 } as const;
    const verdict = judgeEverySteps(settings, 302, 10000, 150);
    for (const [name, p] of verdict) expect(p, name).toBeGreaterThan(1e-4);
  });

  it('has them at 1000 GeV', () => {
    const settings = {
      energy: 1000,
      order,
      coupling: { kind: 'one-loop' },
      cutoff: 1,
      flavours: 5,
      quark: null,
    } as const;
    const verdict = judgeEverySteps(settings, 303, 2000, 30);
    for (const [name, p] of verdict) expect(p, name).toBeGreaterThan(1e-4);
  });
});
