import { describe, expect, it } from 'vitest';
import { angularCoefficients, asymmetry, flavourFractions } from './index.ts';

// references.md section 10: sqrt(s), flavours, A_u/A_d, fraction of one u-type, one d-type, A_FB of u, d and muon.
const ELECTROWEAK = [
  [10, 4, 4.00300336, 0.40006003, 0.09993997, -0.00961297, -0.01922214, -0.00640883],
  [30, 5, 3.95990471, 0.36263497, 0.09157669, -0.09538741, -0.18707137, -0.06377524],
  [91.1876, 5, 0.77714609, 0.17064037, 0.21957309, 0.07339613, 0.10306433, 0.01610082],
  [200, 5, 1.64385477, 0.26143936, 0.15904043, 0.66894538, 0.60190744, 0.55529549],
  [500, 5, 1.90919967, 0.28000702, 0.14666199, 0.61370218, 0.63161035, 0.48108012],
] as const;

describe('the independent electroweak couplings', () => {
  it('reproduce the table of fractions and asymmetries', () => {
    for (const [e, flavours, ratio, up, down, afbUp, afbDown, afbMuon] of ELECTROWEAK) {
      const fractions = flavourFractions(e, flavours);
      expect(fractions[1] / fractions[0]).toBeCloseTo(ratio, 7);
      expect(fractions[1]).toBeCloseTo(up, 7);
      expect(fractions[0]).toBeCloseTo(down, 7);
      expect(asymmetry(2, e)).toBeCloseTo(afbUp, 7);
      expect(asymmetry(1, e)).toBeCloseTo(afbDown, 7);
      const muon = angularCoefficients(-1, e * e);
      expect((3 * muon.B) / (8 * muon.A)).toBeCloseTo(afbMuon, 7);
    }
  });
});
