import { sinCos } from '../math/index.ts';

const turn = new Float64Array(2);

/**
 * Two partons of energy half the total, back to back.
 *
 * @param momenta Float64Array(8), written: px, py, pz, E of both [GeV]; massless ones exactly on their shell.
 * @param sqrtS [GeV]. @param mass of either [GeV]. @param cosine of the first with the z axis. @param azimuth [rad].
 */
export function placeBackToBack(
  momenta: Float64Array,
  sqrtS: number,
  mass: number,
  cosine: number,
  azimuth: number,
): void {
  const half = sqrtS / 2;
  const length = mass === 0 ? half : Math.sqrt((half - mass) * (half + mass));
  const sine = Math.sqrt((1 - cosine) * (1 + cosine));
  sinCos(turn, azimuth);
  const x = length * sine * turn[1];
  const y = length * sine * turn[0];
  const z = length * cosine;
  const energy = Math.sqrt(x * x + y * y + z * z + mass * mass);
  momenta[0] = x;
  momenta[1] = y;
  momenta[2] = z;
  momenta[3] = energy;
  momenta[4] = -x;
  momenta[5] = -y;
  momenta[6] = -z;
  momenta[7] = energy;
}
