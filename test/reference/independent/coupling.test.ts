import { describe, expect, it } from 'vitest';
import { b0, b1, implicitCoupling, integratedCoupling } from './index.ts';

// references.md section 1: alpha_s(mu) at one and two loops, thresholds 1.5 and 4.8, alpha_s(MZ) = 0.118.
const TABLE = [
  [1, 0.3625144514227, 0.4544694069847],
  [1.777, 0.2805795263452, 0.3153127126646],
  [2, 0.2687560186948, 0.2983453811872],
  [1.5, 0.299464255027, 0.343589462922],
  [5, 0.2027663871213, 0.2123001073445],
  [10, 0.1730836362208, 0.1778742820858],
  [30, 0.1404875769949, 0.1418896558698],
  [91.1876, 0.118, 0.118],
  [200, 0.1060118251607, 0.1055319115357],
  [1000, 0.08774449316679, 0.08684363051887],
  [3000, 0.07850994390676, 0.07752189438636],
];

describe('the independent coupling', () => {
  it('reproduces the published-convention table by implicit solution', () => {
    for (const [mu, one, two] of TABLE) {
      expect(implicitCoupling(1).alpha(mu * mu) / one).toBeCloseTo(1, 11);
      expect(implicitCoupling(2).alpha(mu * mu) / two).toBeCloseTo(1, 11);
    }
    expect(implicitCoupling(2, 0.118, 1.27, 4.18).alpha(1)).toBeCloseTo(0.4443667514092, 11);
    expect(implicitCoupling(1, 0.118, 1.27, 4.18).alpha(1.27 ** 2)).toBeCloseTo(0.319161244825, 11);
  });

  it('agrees with itself by Runge-Kutta integration to 1e-9', () => {
    for (const loops of [1, 2] as const) {
      const slow = implicitCoupling(loops);
      const fast = integratedCoupling(loops, 1, 1e6);
      for (let mu = 1; mu < 1000; mu *= 1.37) {
        expect(Math.abs(fast.alpha(mu * mu) / slow.alpha(mu * mu) - 1)).toBeLessThan(1e-9);
      }
    }
  });

  it('has the textbook beta coefficients', () => {
    expect(b0(3)).toBeCloseTo(0.716197243913529, 14);
    expect(b0(5)).toBeCloseTo(0.610093948518932, 14);
    expect(b1(4, 2)).toBeCloseTo(0.3250721308525, 12);
    expect(b1(5, 2)).toBeCloseTo(0.24485952713565, 13);
  });
});
