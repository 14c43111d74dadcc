import { describe, expect, it } from 'vitest';
import { angularCoefficients } from '../../engine/index.ts';
import { engineEvents } from './engine-sample.ts';
import { asymmetry, flavourFractions } from './independent/index.ts';

// references.md section 10: sqrt(s), flavours, A_u/A_d, fraction of one u-type, one d-type, A_FB of u, d and muon.
const TABLE = [
  [10, 4, 4.00300336, 0.40006003, 0.09993997, -0.00961297, -0.01922214, -0.00640883],
  [30, 5, 3.95990471, 0.36263497, 0.09157669, -0.09538741, -0.18707137, -0.06377524],
  [91.1876, 5, 0.77714609, 0.17064037, 0.21957309, 0.07339613, 0.10306433, 0.01610082],
  [200, 5, 1.64385477, 0.26143936, 0.15904043, 0.66894538, 0.60190744, 0.55529549],
  [500, 5, 1.90919967, 0.28000702, 0.14666199, 0.61370218, 0.63161035, 0.48108012],
];

describe('the electroweak hard process', () => {
  it('has the tabulated flavour fractions and asymmetries', () => {
    for (const [e, flavours, ratio, up, down, afbUp, afbDown, afbMuon] of TABLE) {
      const coefficients = (id: number) => angularCoefficients(id, e);
      const afb = (id: number): number => (3 * coefficients(id).odd) / (8 * coefficients(id).even);
      let sum = 0;
      for (let id = 1; id <= flavours; id++) sum += coefficients(id).even;
      expect(coefficients(2).even / coefficients(1).even).toBeCloseTo(ratio, 7);
      expect(coefficients(2).even / sum).toBeCloseTo(up, 7);
      expect(coefficients(1).even / sum).toBeCloseTo(down, 7);
      expect(afb(2)).toBeCloseTo(afbUp, 7);
      expect(afb(1)).toBeCloseTo(afbDown, 7);
      expect(afb(5)).toBeCloseTo(afbDown, 7);
      expect(afb(13)).toBeCloseTo(afbMuon, 7);
    }
  });

  it('has the tabulated values at another mixing angle', () => {
    const afb = (id: number, sin2: number): number => {
      const { even, odd } = angularCoefficients(id, 91.1876, sin2);
      return (3 * odd) / (8 * even);
    };
    expect(afb(2, 0.23122)).toBeCloseTo(0.0747347, 7);
    expect(afb(5, 0.23122)).toBeCloseTo(0.10479713, 7);
    expect(afb(5, 0.2229)).toBeCloseTo(0.15114565, 7);
  });

  it.each([
    [30, 5],
    [91.1876, 5],
    [200, 5],
    [10, 4],
  ])('draws flavours and directions by it at %d GeV, %d flavours', (energy, flavours) => {
    const events = 10000;
    const counts = new Array<number>(flavours).fill(0);
    const forward = new Array<number>(flavours).fill(0);
    let squares = 0;
    for (const history of engineEvents({ energy, flavours, cutoff: energy / 4, seed: 501 }, events)) {
      const quark = history.entries.role.indexOf(1);
      const flavour = history.entries.id[quark];
      if (flavour !== history.head.process.outgoing[0]) throw new Error(`head names another flavour`);
      const { px, py, pz } = history.entries;
      const cosine = pz[quark] / Math.hypot(px[quark], py[quark], pz[quark]);
      counts[flavour - 1]++;
      if (cosine > 0) forward[flavour - 1]++;
      squares += cosine * cosine;
    }
    flavourFractions(energy, flavours).forEach((p, n) => {
      expect(Math.abs(counts[n] - events * p)).toBeLessThan(4 * Math.sqrt(events * p * (1 - p)));
      const f = (1 + asymmetry(n + 1, energy)) / 2;
      expect(Math.abs(forward[n] - counts[n] * f)).toBeLessThan(4 * Math.sqrt(counts[n] * f * (1 - f)));
    });
    // <cos^2> = 2/5 of 1 + cos^2, whatever the odd term; its variance is 9/35 - 4/25
    expect(Math.abs(squares / events - 0.4)).toBeLessThan(4 * Math.sqrt((9 / 35 - 4 / 25) / events));
  });
});
