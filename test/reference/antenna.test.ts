import { describe, expect, it } from 'vitest';
import { antennaAverage, antennaShare } from '../../engine/index.ts';

// Source: Marchesini & Webber, Nucl. Phys. B238 (1984) 1 (c). Values (a): closed form and quadrature agree to 1e-15.
// Tolerance 1e-9, or half a unit of the last digit printed where that is larger.

const DEGREE = Math.PI / 180;
/** Tolerance for a value as printed with this many significant digits. */
const tolerance = (printed: string): number => {
  const value = Math.abs(Number(printed));
  const digits = printed.replace(/^-?0*\.?0*/, '').replace('.', '').length;
  const lastPlace = value === 0 ? 0 : 10 ** (Math.floor(Math.log10(value)) + 1 - digits);
  return Math.max(1e-9 * Math.max(value, 1e-3), 0.5 * lastPlace);
};

// theta_ij, theta_iq [degrees], average, W_i at azimuth 0, 90, 180 degrees   (a)
const TABLE: [number, number, string, string, string, string][] = [
  [10, 5, '262.79123814875', '524.5824762975', '210.393264825', '175.3055524681'],
  [30, 20, '16.581718738763', '48.49324264973', '11.57097178001', '10.0006671836'],
  [30, 45, '0', '-6.254672735323', '1.007231222077', '1.341081377402'],
  [60, 45, '3.4142135623731', '12.08309986007', '2.254024941865', '1.987967951796'],
  [60, 80, '0', '-2.669246928841', '0.388828868593', '0.4932568955886'],
  [90, 80, '1.2101383127306', '7.521041260408', '0.7101383127306', '0.6580058481965'],
  [90, 100, '0', '-4.443432240271', '0.3520440955209', '0.3887499481693'],
  [120, 100, '0.85204409552092', '2.731429337093', '0.5782742808084', '0.5047477401871'],
  [120, 150, '0', '-0.4641016151378', '0.09497139966464', '0.1698729810778'],
  [170, 150, '0.53589838486225', '0.7957060766702', '0.4842702485112', '0.4039905627451'],
  [180, 100, '0.85204409552092', '0.8520440955209', '0.8520440955209', '0.8520440955209'],
];

describe('the antenna', () => {
  for (const [ij, iq, average, front, side, back] of TABLE) {
    it(`has its reference values at theta_ij = ${ij}, theta_iq = ${iq} degrees`, () => {
      const share = (azimuth: number): number => antennaShare(ij * DEGREE, iq * DEGREE, azimuth * DEGREE);
      expect(Math.abs(share(0) - Number(front))).toBeLessThanOrEqual(tolerance(front));
      expect(Math.abs(share(90) - Number(side))).toBeLessThanOrEqual(tolerance(side));
      expect(Math.abs(share(180) - Number(back))).toBeLessThanOrEqual(tolerance(back));
      expect(Math.abs(antennaAverage(ij * DEGREE, iq * DEGREE) - Number(average))).toBeLessThanOrEqual(
        Math.max(tolerance(average), 1e-9 / (1 - Math.cos(iq * DEGREE))),
      );
    });
  }

  it('averaged over the azimuth is 1/(1 - cos) inside the cone and 0 outside, at all angles', () => {
    for (const ij of [1e-3, 0.02, 0.3, 1, 2, 3, Math.PI]) {
      for (const ratio of [0.01, 0.3, 0.9, 0.999, 1.001, 1.1, 2, 30]) {
        const iq = ij * ratio;
        if (iq > Math.PI) continue;
        const inside = 1 / (2 * Math.sin(iq / 2) ** 2);
        const expected = ratio < 1 ? inside : 0;
        expect(Math.abs(antennaAverage(ij, iq) - expected), `${ij}, ${iq}`).toBeLessThan(1e-12 * inside);
      }
    }
  });

  it('shares of both emitters add up to the whole antenna', () => {
    // In the plane of i and j with q between them, theta_jq = theta_ij - theta_iq.
    const versine = (a: number): number => 2 * Math.sin(a / 2) ** 2;
    for (const [ij, iq] of [
      [1, 0.3],
      [2.5, 1.2],
      [1e-6, 3e-7],
    ]) {
      const whole = versine(ij) / (versine(iq) * versine(ij - iq));
      expect((antennaShare(ij, iq, 0) + antennaShare(ij, ij - iq, 0)) / whole).toBeCloseTo(1, 12);
    }
  });
});
