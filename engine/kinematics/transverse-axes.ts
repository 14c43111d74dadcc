/**
 * The two space-like axes from which an azimuth is counted, orthogonal to two massless momenta.
 *
 * n1 is n / sqrt(-n.n) of the space axis r (z before y before x) whose
 * n = r - (r.q/p.q) p - (r.p/p.q) q is longest; n2 completes a right-handed set (n1, n2, p) in the rest frame.
 *
 * @param out Float64Array(8): n1 and n2 as px, py, pz, E.
 * @param m momenta, four to a parton. @param a, @param b offsets of p and q. @param q2 2 p.q [GeV^2].
 */
export function transverseAxes(out: Float64Array, m: Float64Array, a: number, b: number, q2: number): void {
  const per = 2 / q2;
  // -n.n = 1 + 4 p_r q_r / Q^2
  let axis = 2;
  let longest = 1 + 2 * per * m[a + 2] * m[b + 2];
  for (let r = 1; r >= 0; r--) {
    const length = 1 + 2 * per * m[a + r] * m[b + r];
    if (length > longest) {
      longest = length;
      axis = r;
    }
  }
  const norm = 1 / Math.sqrt(longest);
  const next = (axis + 1) % 3;
  const last = (axis + 2) % 3;
  for (let c = 0; c < 4; c++)
    out[c] = norm * ((c === axis ? 1 : 0) + per * (m[b + axis] * m[a + c] + m[a + axis] * m[b + c]));
  // n2 = (2/Q^2) ((E_q p - E_p q) x r, -(p x q).r) / |n|
  const along = (c: number): number => m[b + 3] * m[a + c] - m[a + 3] * m[b + c];
  out[4 + axis] = 0;
  out[4 + next] = norm * per * along(last);
  out[4 + last] = -norm * per * along(next);
  out[7] = -norm * per * (m[a + next] * m[b + last] - m[a + last] * m[b + next]);
}
