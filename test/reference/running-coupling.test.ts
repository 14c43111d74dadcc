import { describe, expect, it } from 'vitest';
import {
  b0,
  b1,
  type CouplingChoice,
  LandauPoleError,
  PI,
  RunningCoupling,
  softGluonK,
} from '../../engine/index.ts';

// Source of every value here: d a/d ln mu^2 = -b0 a^2 - b1 a^3 (Review of Particle Physics, chapter QCD (c)) with
// alpha_s(91.1876) = 0.118, solved by its implicit solution at 40 digits, which agrees with an order-8 Runge-Kutta
// integration to 3e-14: certainty (a). Tolerance: 1e-9 relative.

const LOW = [1.5, 4.8] as const;
const LOWER = [1.27, 4.18] as const;
const ONE: CouplingChoice = { kind: 'one-loop' };
const TWO: CouplingChoice = { kind: 'two-loop' };

const coupling = (choice: CouplingChoice, thresholds: readonly [number, number]): RunningCoupling =>
  new RunningCoupling(choice, 0.9, { thresholds });

/** Relative distance from the reference. */
const off = (found: number, reference: number): number => Math.abs(found / reference - 1);

describe('the running coupling', () => {
  const table: [number, number, number, number, number][] = [
    // mu [GeV], one loop 1.5/4.8, two loops 1.5/4.8, one loop 1.27/4.18, two loops 1.27/4.18   (a)
    [1, 0.3625144514227, 0.4544694069847, 0.3583142884629, 0.4443667514092],
    [1.777, 0.2805795263452, 0.3153127126646, 0.2794290089486, 0.3133014588555],
    [2, 0.2687560186948, 0.2983453811872, 0.2677002405151, 0.2965569595322],
    // from 4.8 up both sets of thresholds agree   (a)
    [5, 0.2027663871213, 0.2123001073445, 0.2027663871213, 0.2123001073445],
    [10, 0.1730836362208, 0.1778742820858, 0.1730836362208, 0.1778742820858],
    [30, 0.1404875769949, 0.1418896558698, 0.1404875769949, 0.1418896558698],
    [91.1876, 0.118, 0.118, 0.118, 0.118],
    [200, 0.1060118251607, 0.1055319115357, 0.1060118251607, 0.1055319115357],
    [1000, 0.08774449316679, 0.08684363051887, 0.08774449316679, 0.08684363051887],
    [3000, 0.07850994390676, 0.07752189438636, 0.07850994390676, 0.07752189438636],
  ];
  for (const [mu, oneLow, twoLow, oneLower, twoLower] of table) {
    it(`has the reference values at ${mu} GeV`, () => {
      expect(off(coupling(ONE, LOW).at(mu), oneLow)).toBeLessThan(1e-9);
      expect(off(coupling(TWO, LOW).at(mu), twoLow)).toBeLessThan(1e-9);
      expect(off(coupling(ONE, LOWER).at(mu), oneLower)).toBeLessThan(1e-9);
      expect(off(coupling(TWO, LOWER).at(mu), twoLower)).toBeLessThan(1e-9);
    });
  }

  it('has the reference values at the charm threshold, and is continuous across both', () => {
    // (a)
    expect(off(coupling(ONE, LOW).at(1.5), 0.299464255027)).toBeLessThan(1e-9);
    expect(off(coupling(TWO, LOW).at(1.5), 0.343589462922)).toBeLessThan(1e-9);
    expect(off(coupling(ONE, LOWER).at(1.27), 0.319161244825)).toBeLessThan(1e-9);
    expect(off(coupling(TWO, LOWER).at(1.27), 0.374301906406)).toBeLessThan(1e-9);
    for (const choice of [ONE, TWO]) {
      for (const thresholds of [LOW, LOWER]) {
        const c = coupling(choice, thresholds);
        for (const m of thresholds) expect(off(c.at(m * (1 - 1e-13)), c.at(m))).toBeLessThan(1e-12);
      }
    }
  });

  it('has its Landau pole where 1/alpha_s of the three-flavour piece vanishes', () => {
    // (a)
    expect(off(coupling(ONE, LOW).pole, 0.145758551973)).toBeLessThan(1e-9);
    expect(off(coupling(TWO, LOW).pole, 0.4028304990458)).toBeLessThan(1e-9);
    expect(off(coupling(ONE, LOWER).pole, 0.1425050178119)).toBeLessThan(1e-9);
    expect(off(coupling(TWO, LOWER).pole, 0.3917689184416)).toBeLessThan(1e-9);
  });

  it('has the five-flavour Lambda 0.0878270801455 at one loop', () => {
    // Pole of the five-flavour piece continued; thresholds below it make that piece the only one.   (a)
    const five = new RunningCoupling(ONE, 1, { thresholds: [1e-6, 1e-5] });
    const lambda = 91.1876 * Math.exp(-1 / (2 * b0(5) * five.at(91.1876)));
    expect(off(lambda, 0.0878270801455)).toBeLessThan(1e-9);
  });

  it('refuses the pole and everything below it, and says where the pole is', () => {
    for (const choice of [ONE, TWO]) {
      const c = coupling(choice, LOW);
      for (const mu of [c.pole, 0.5 * c.pole, 0, -1, NaN]) expect(() => c.at(mu)).toThrow(LandauPoleError);
      expect(() => new RunningCoupling(choice, c.pole)).toThrow(LandauPoleError);
      expect(c.at(c.pole * 1.001)).toBeGreaterThan(10);
    }
  });

  it('of the sampler, by ln mu^2, agrees with the exact one to 1e-11 from 0.9 GeV to 20 TeV', () => {
    for (const choice of [ONE, TWO]) {
      const c = coupling(choice, LOW);
      for (let k = 0; k <= 2000; k++) {
        const lnMu2 = 2 * Math.log(0.9) + (k / 2000) * 2 * Math.log(20000 / 0.9);
        expect(off(c.atLog(lnMu2), c.at(Math.exp(lnMu2 / 2)))).toBeLessThan(1e-11);
      }
    }
  });

  it('obeys its differential equation, at one and two loops and with 3, 4 and 5 flavours', () => {
    const h = 1e-4;
    for (const [choice, order] of [
      [ONE, 0],
      [TWO, 1],
    ] as const) {
      const c = coupling(choice, LOW);
      for (const [mu, flavours] of [
        [1.2, 3],
        [3, 4],
        [50, 5],
      ]) {
        const lnMu2 = 2 * Math.log(mu);
        const at = (x: number): number => c.at(Math.exp(x / 2));
        // Five-point slope: error h^4/30 times the fifth derivative, below 1e-11 here; rounding 1e-12.
        const slope =
          (8 * (at(lnMu2 + h) - at(lnMu2 - h)) - (at(lnMu2 + 2 * h) - at(lnMu2 - 2 * h))) / (12 * h);
        const a = c.at(mu);
        const expected = -b0(flavours) * a * a - order * b1(flavours) * a * a * a;
        expect(Math.abs(slope - expected)).toBeLessThan(1e-10);
      }
    }
  });

  it('is the given number at every scale when it is fixed', () => {
    const c = new RunningCoupling({ kind: 'fixed', value: 0.118 }, 1);
    for (const mu of [1e-3, 1, 91.1876, 1e4]) expect(c.at(mu)).toBe(0.118);
  });
});

describe('coefficients', () => {
  it('b0 and b1 for three, four and five flavours', () => {
    // (a)
    const reference: [number, number, number][] = [
      [3, 0.716197243913529, 0.405284734569351],
      [4, 0.663145596216231, 0.3250721308525],
      [5, 0.610093948518932, 0.24485952713565],
    ];
    for (const [flavours, first, second] of reference) {
      expect(off(b0(flavours), first)).toBeLessThan(1e-14);
      expect(off(b1(flavours), second)).toBeLessThan(2e-14);
    }
  });

  it('K of the physical scheme, and what it makes of 0.118', () => {
    // Formula: Catani, Marchesini, Webber, Nucl. Phys. B349 (1991) 635; values (a)
    const reference: [number, number, number][] = [
      [3, 4.56519779945532, 0.1281168135352],
      [4, 4.00964224389977, 0.1268856616309],
      [5, 3.45408668834421, 0.1256545097267],
    ];
    for (const [flavours, k, strength] of reference) {
      expect(off(softGluonK(flavours), k)).toBeLessThan(1e-13);
      expect(off(0.118 * (1 + (softGluonK(flavours) * 0.118) / (2 * PI)), strength)).toBeLessThan(1e-12);
    }
  });
});
