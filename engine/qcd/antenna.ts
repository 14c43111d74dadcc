import { PI } from '../constants.ts';
import { integrate, sin } from '../math/index.ts';

/** 1 - cos of an angle [rad], keeping its digits where the angle is small. */
function versine(angle: number): number {
  const half = sin(0.5 * angle);
  return 2 * half * half;
}

/**
 * Share of parton i in the soft radiation of the pair i, j: W_i = [W + 1/(1 - cos iq) - 1/(1 - cos jq)]/2 with the
 * antenna W = (1 - cos ij)/((1 - cos iq)(1 - cos jq)).
 *
 * @param angleIj Between the two massless emitters [rad], in (0, pi].
 * @param angleIq Between i and the soft gluon q [rad], in (0, pi].
 * @param azimuth Of q about i [rad]; 0 with q in the plane of i and j on the side of j.
 * @returns W_i, negative in places; Infinity where q is along j.
 * Source: Marchesini & Webber, Nucl. Phys. B238 (1984) 1.
 */
export function antennaShare(angleIj: number, angleIq: number, azimuth: number): number {
  const toI = versine(angleIq);
  // 1 - cos jq without the difference of nearly equal cosines.
  const toJ = versine(angleIj - angleIq) + sin(angleIj) * sin(angleIq) * versine(azimuth);
  // cos iq - cos ij as a product: W and 1/(1 - cos jq) cancel where q is close to j.
  const between = 2 * sin(0.5 * (angleIj + angleIq)) * sin(0.5 * (angleIj - angleIq));
  return (0.5 / toI) * (1 + between / toJ);
}

/**
 * Mean of antennaShare over the azimuth of q about i, by quadrature.
 *
 * In closed form it is 1/(1 - cos iq) inside the cone angleIq < angleIj and 0 outside: angular ordering. It is
 * computed here without that knowledge, so that the statement can be shown and tested.
 *
 * Accuracy: 1e-12 of 1/(1 - cos iq) where the two angles differ by a thousandth or more; at equality there is no mean.
 * Source: as antennaShare.
 */
export function antennaAverage(angleIj: number, angleIq: number): number {
  const scale = 1 / versine(angleIq);
  const { value } = integrate((azimuth) => antennaShare(angleIj, angleIq, azimuth), 0, PI, {
    relative: 1e-13,
    absolute: 1e-12 * scale,
  });
  return value / PI;
}
