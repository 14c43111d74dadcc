/** A four-vector: px, py, pz, E. */
export type Vector = [number, number, number, number];

/** Minkowski product, metric (+,-,-,-). */
export function product(a: Vector, b: Vector): number {
  return a[3] * b[3] - a[0] * b[0] - a[1] * b[1] - a[2] * b[2];
}

/** Sum of four-vectors with factors. */
export function combine(...terms: readonly (readonly [number, Vector])[]): Vector {
  return [0, 1, 2, 3].map((c) => terms.reduce((sum, [factor, v]) => sum + factor * v[c], 0)) as Vector;
}

/** Pure boost that brings `frame` to rest; with -1 the one back. */
export function boost(v: Vector, frame: Vector, direction: 1 | -1 = 1): Vector {
  const mass = Math.sqrt(product(frame, frame));
  const p = [0, 1, 2].map((c) => (direction * frame[c]) / mass);
  const gamma = frame[3] / mass;
  const along = p[0] * v[0] + p[1] * v[1] + p[2] * v[2];
  const factor = along / (gamma + 1) - v[3];
  return [v[0] + factor * p[0], v[1] + factor * p[1], v[2] + factor * p[2], gamma * v[3] - along];
}

/** The basis n1, n2 of the azimuth in the rest frame of the dipole, from the space axes as they are seen there. */
function transverseBasis(emitter: Vector, frame: Vector): [Vector, Vector] {
  const e = boost(emitter, frame);
  const size = Math.hypot(e[0], e[1], e[2]);
  const axis = [e[0] / size, e[1] / size, e[2] / size];
  let best: number[] = [];
  let longest = 0;
  // ties: z before y before x
  for (const c of [2, 1, 0]) {
    const unit: Vector = [0, 0, 0, 0];
    unit[c] = 1;
    // the spatial part in the rest frame, its part along the axis and its time component taken away
    const r = boost(unit, frame);
    const along = r[0] * axis[0] + r[1] * axis[1] + r[2] * axis[2];
    const n = [0, 1, 2].map((d) => r[d] - along * axis[d]);
    const length = Math.hypot(n[0], n[1], n[2]);
    if (length > longest * (1 + 1e-12)) {
      longest = length;
      best = n.map((component) => component / length);
    }
  }
  const second = [
    axis[1] * best[2] - axis[2] * best[1],
    axis[2] * best[0] - axis[0] * best[2],
    axis[0] * best[1] - axis[1] * best[0],
  ];
  return [
    [best[0], best[1], best[2], 0],
    [second[0], second[1], second[2], 0],
  ];
}

/**
 * The massless dipole map by brute force: everything is laid out in the rest frame of the dipole and boosted back.
 *
 * @returns i, j, partner after.
 */
export function branchInRestFrame(
  emitter: Vector,
  partner: Vector,
  y: number,
  z: number,
  azimuth: number,
): [Vector, Vector, Vector] {
  const frame = combine([1, emitter], [1, partner]);
  const [n1, n2] = transverseBasis(emitter, frame);
  const kT = Math.sqrt(z * (1 - z) * y * product(frame, frame));
  const k = boost(combine([kT * Math.cos(azimuth), n1], [kT * Math.sin(azimuth), n2]), frame, -1);
  return [
    combine([z, emitter], [(1 - z) * y, partner], [1, k]),
    combine([1 - z, emitter], [z * y, partner], [-1, k]),
    combine([1 - y, partner]),
  ];
}

/** Azimuth, transverse momentum and rapidity of a momentum in the rest frame of a dipole, about its axis. */
export function inRestFrame(p: Vector, emitter: Vector, partner: Vector) {
  const frame = combine([1, emitter], [1, partner]);
  const [n1, n2] = transverseBasis(emitter, frame);
  const axis = boost(emitter, frame);
  const q = boost(p, frame);
  const along = (v: Vector) => q[0] * v[0] + q[1] * v[1] + q[2] * v[2];
  const forward = along(axis) / Math.hypot(axis[0], axis[1], axis[2]);
  return {
    azimuth: Math.atan2(along(n2), along(n1)),
    kT: Math.hypot(along(n1), along(n2)),
    rapidity: Math.log((q[3] + forward) / (q[3] - forward)) / 2,
  };
}
