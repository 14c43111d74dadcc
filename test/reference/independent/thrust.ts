import { cross, dot, length, type Three } from './vectors.ts';

/**
 * Thrust by trying every plane through two momenta: the axis that maximises the sum of projections divides the partons
 * by a plane that can be tilted, without a parton crossing it, until it holds two of them; those two are then on either
 * side. Order n^3.
 *
 * Source: textbook argument (de Rujula et al., Nucl. Phys. B138 (1978) 387).
 */
export function thrustByPlanes(momenta: readonly Three[]): number {
  let sum = 0;
  for (const p of momenta) sum += length(p);
  let best = 0;
  for (let a = 0; a < momenta.length; a++) {
    for (let b = a + 1; b < momenta.length; b++) {
      const normal = cross(momenta[a], momenta[b]);
      let [x, y, z] = [0, 0, 0];
      for (let c = 0; c < momenta.length; c++) {
        if (c === a || c === b) continue;
        const p = momenta[c];
        const sign = dot(normal, p) > 0 ? 1 : -1;
        x += sign * p[0];
        y += sign * p[1];
        z += sign * p[2];
      }
      const [p, q] = [momenta[a], momenta[b]];
      for (const s of [1, -1]) {
        for (const t of [1, -1]) {
          const l = Math.hypot(x + s * p[0] + t * q[0], y + s * p[1] + t * q[1], z + s * p[2] + t * q[2]);
          if (l > best) best = l;
        }
      }
    }
  }
  return best / sum;
}

/** Thrust by trying every one of the 2^(n-1) sign choices: the definition itself, for few partons. */
export function thrustBySubsets(momenta: readonly Three[]): number {
  let sum = 0;
  for (const p of momenta) sum += length(p);
  let best = 0;
  for (let mask = 0; mask < 1 << (momenta.length - 1); mask++) {
    let [x, y, z] = [0, 0, 0];
    for (let n = 0; n < momenta.length; n++) {
      const sign = (mask >> n) & 1 ? -1 : 1;
      x += sign * momenta[n][0];
      y += sign * momenta[n][1];
      z += sign * momenta[n][2];
    }
    best = Math.max(best, Math.hypot(x, y, z));
  }
  return best / sum;
}
