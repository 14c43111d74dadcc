/** Four-momentum (px, py, pz, e) [GeV]. */
export type Four = readonly [number, number, number, number];
export type Three = readonly [number, number, number];

export const add = (a: Four, b: Four): Four => [a[0] + b[0], a[1] + b[1], a[2] + b[2], a[3] + b[3]];
export const scale = (f: number, a: Four): Four => [f * a[0], f * a[1], f * a[2], f * a[3]];
/** Minkowski product, metric (+,-,-,-). */
export const product = (a: Four, b: Four): number => a[3] * b[3] - a[0] * b[0] - a[1] * b[1] - a[2] * b[2];
export const dot = (a: Three, b: Three): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Three, b: Three): Three => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const space = (a: Four): Three => [a[0], a[1], a[2]];
export const length = (a: Three): number => Math.hypot(a[0], a[1], a[2]);
/** Angle between two directions from their cross product, 0 to pi, good for close pairs too. */
export const angle = (a: Three, b: Three): number => Math.atan2(length(cross(a, b)), dot(a, b));
export const unit = (a: Three): Three => {
  const l = length(a);
  return [a[0] / l, a[1] / l, a[2] / l];
};

/** `p` seen from the rest frame of `frame` (sign -1), or back from there (sign +1). */
export function boost(p: Four, frame: Four, sign: 1 | -1): Four {
  const mass = Math.sqrt(product(frame, frame));
  const b: Three = [(sign * frame[0]) / mass, (sign * frame[1]) / mass, (sign * frame[2]) / mass];
  const gamma = frame[3] / mass;
  const along = dot(b, space(p));
  const f = along / (1 + gamma) + p[3];
  return [p[0] + f * b[0], p[1] + f * b[1], p[2] + f * b[2], gamma * p[3] + along];
}
