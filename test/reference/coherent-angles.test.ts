import { describe, expect, it } from 'vitest';
import { wideFraction } from './coherent-angles.ts';

// physics.md section 8: coherent branching promises its generated angles; of the reconstructed ones a few percent lie
// above the birth angle.
describe('steps that open wider than the step in which their emitter was born', () => {
  it.each([
    ['a light quark at the Z', { quark: 1, energy: 91.1876 }, 0.021],
    ['a massive b at the Z', { quark: 5, masses: true, energy: 91.1876 }, 0.038],
    ['a light quark at 1000 GeV', { quark: 1, energy: 1000 }, 0.017],
    ['gluons at 91 GeV', { process: 'scalar-gg', energy: 91.1876 }, 0.032],
  ] as const)(
    'are a few percent where branching is coherent, near a half where not: %s',
    (_, settings, recorded) => {
      const common = { ...settings, coupling: { kind: 'one-loop' } } as const;
      const coherent = wideFraction({ ...common, coherent: true }, 51, 3000);
      const incoherent = wideFraction({ ...common, coherent: false }, 52, 1000);
      expect(coherent.mean).toBeLessThan(0.05);
      expect(incoherent.mean).toBeGreaterThan(0.4);
      // the coherent fraction as measured once in 20000 events (recorded, not proven)
      expect(Math.abs(coherent.mean - recorded)).toBeLessThan(4 * coherent.error + 0.002);
    },
  );
});
