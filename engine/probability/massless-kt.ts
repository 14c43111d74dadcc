import { CA, CF, TR } from '../constants.ts';
import { asin, atan, log } from '../math/index.ts';

/**
 * Integrals over z of the massless dipole kernels in kt ordering, in closed form: at fixed t the coupling is a constant.
 *
 * With x = t/Q^2, y = x/(z(1-z)) and r = sqrt(1-4x) the range is (1-r)/2 < z < (1+r)/2, and
 * Int (1-y) K dz over it, L = ln((1+r)/(1-r)), S = [3 L + 2 asin(r)/sqrt(x)] x/(1+x), is
 *
 *     q -> q g       CF { L - S - 3r/2 + 3 x L }
 *     g -> g g       CA { (L - S)/2 - r (11/12 + x/3) + 2 x L }
 *     g -> q qbar    (TR/2) { r (2/3 + 4x/3) - 2 x L }
 *
 * @param out three numbers in this order, zero for x >= 1/4.
 * Source: the kernels of Catani & Seymour, Nucl. Phys. B485 (1997) 291, section 5.1; integrals derived here.
 */
export function integratedKernels(out: Float64Array, x: number): void {
  if (!(x < 0.25)) {
    out[0] = out[1] = out[2] = 0;
    return;
  }
  const r = Math.sqrt(1 - 4 * x);
  const rootX = Math.sqrt(x);
  // (1+r)/(1-r) = (1+r)^2/4x
  const L = 2 * log((0.5 * (1 + r)) / rootX);
  const S = ((3 * L + (2 * asin(r)) / rootX) * x) / (1 + x);
  out[0] = CF * (L - S - 1.5 * r + 3 * x * L);
  out[1] = CA * (0.5 * (L - S) - r * (11 / 12 + x / 3) + 2 * x * L);
  out[2] = (TR / 2) * (r * (2 / 3 + (4 / 3) * x) - 2 * x * L);
}

/**
 * The same integrals up to z.
 *
 * @param z in the range of x, w = 1 - z with its own digits.
 *
 * From Int (1-y) 2/(1-z(1-y)) dz = -ln(w^2+x) + [2x/(1+x)] { -ln z + ln(w^2+x)/2 + atan(w/sqrt x)/sqrt x } and
 * Int y (1/z, 1, z) dz alike.
 */
export function integratedKernelsBelow(out: Float64Array, x: number, z: number, w: number): void {
  const root = Math.sqrt(1 - 4 * x);
  const highW = 0.5 * (1 + root);
  primitives(out, x, x / highW, highW);
  const [quark, gluon, pair] = out;
  primitives(out, x, z, w);
  out[0] -= quark;
  out[1] -= gluon;
  out[2] -= pair;
}

function primitives(out: Float64Array, x: number, z: number, w: number): void {
  const lnZ = log(z);
  const lnW = log(w);
  const lnPole = log(w * w + x);
  const rootX = Math.sqrt(x);
  const soft = -lnPole + ((2 * x) / (1 + x)) * (-lnZ + 0.5 * lnPole + atan(w / rootX) / rootX);
  const z2 = z * z;
  const logit = lnZ - lnW;
  out[0] = CF * (soft - z - 0.5 * z2 + x * (lnZ - 2 * lnW));
  // Int (1-y) [-1 + z(1-z)/2] = -z + z^2/4 - z^3/6 + x [ln(z/w) - z/2]
  out[1] = CA * (0.5 * soft - z + 0.25 * z2 - (z2 * z) / 6 + x * (logit - 0.5 * z));
  // Int (1-y) [1 - 2z(1-z)] = z - z^2 + 2 z^3/3 - x [ln(z/w) - 2z]
  out[2] = (TR / 2) * (z - z2 + (2 / 3) * z2 * z - x * (logit - 2 * z));
}
