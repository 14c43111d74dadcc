/** Thrust and its axis. */
export interface Thrust {
  /** 1/2 (isotropic) to 1 (two back-to-back jets) in the rest frame. */
  readonly value: number;
  /** Unit vector x, y, z, on the side of the momentum with the largest size. */
  readonly axis: Float64Array;
}

/** Up to this many momenta all sign patterns are tried: 2^(n-1) sums cost less than the sweeps do. */
const MOST_FOR_ALL_SIGNS = 11;

/** Shell sort's steps before the last. Source: Ciura, Lect. Notes Comput. Sci. 2138 (2001) 106. */
const GAPS = [132, 57, 23, 10, 4];

// scratch, not reentrant
let x = new Float64Array(64);
let y = new Float64Array(64);
let z = new Float64Array(64);
let sign = new Float64Array(64);
let key = new Float64Array(64);
let order = new Int32Array(64);
/** The best sum of momenta with signs so far, and its squared length. */
const best = new Float64Array(4);

/**
 * Exact thrust: the maximum over directions n of Sum |p.n| / Sum |p|.
 *
 * @param momenta px, py, pz, E, four to a parton; E is not used.
 * @returns NaN where there is no momentum at all.
 *
 * The maximum is the longest sum of momenta with signs whose signs are those of p.n for some n. As n turns about each
 * momentum in turn, the signs flip one by one in the order of an angle, which visits them all: n^2 log n.
 * Accuracy: 1e-15 of the value times the number of momenta; nothing is iterated to a tolerance.
 * Source: Farhi, Phys. Rev. Lett. 39 (1977) 1587, for the definition.
 */
export function thrust(momenta: Float64Array): Thrust {
  const n = momenta.length >> 2;
  if (n > x.length) widen(n);
  let total = 0;
  let hardest = 0;
  let hardestSize = -1;
  for (let k = 0; k < n; k++) {
    x[k] = momenta[4 * k];
    y[k] = momenta[4 * k + 1];
    z[k] = momenta[4 * k + 2];
    const size = Math.sqrt(x[k] * x[k] + y[k] * y[k] + z[k] * z[k]);
    total += size;
    if (size > hardestSize) {
      hardestSize = size;
      hardest = k;
    }
  }
  if (!(total > 0)) return { value: NaN, axis: new Float64Array(3).fill(NaN) };
  best.fill(0);
  if (n <= MOST_FOR_ALL_SIGNS) tryAllSigns(n);
  else for (let k = 0; k < n; k++) turnAbout(k, n);
  settle(n);
  const length = Math.sqrt(best[3]);
  const side = best[0] * x[hardest] + best[1] * y[hardest] + best[2] * z[hardest] < 0 ? -1 : 1;
  const axis = new Float64Array(3);
  for (let c = 0; c < 3; c++) axis[c] = (side * best[c]) / length;
  return { value: length / total, axis };
}

function keepLonger(sx: number, sy: number, sz: number): void {
  const length2 = sx * sx + sy * sy + sz * sz;
  if (length2 > best[3]) {
    best[0] = sx;
    best[1] = sy;
    best[2] = sz;
    best[3] = length2;
  }
}

/** Every pattern of signs, in an order in which one sign flips at a time (Gray code). */
function tryAllSigns(n: number): void {
  let sx = 0;
  let sy = 0;
  let sz = 0;
  for (let k = 0; k < n; k++) {
    sign[k] = 1;
    sx += x[k];
    sy += y[k];
    sz += z[k];
  }
  keepLonger(sx, sy, sz);
  for (let code = 1; code < 1 << (n - 1); code++) {
    // the lowest set bit of the counter flips; the last momentum keeps its sign
    const k = 31 - Math.clz32(code & -code);
    const twice = 2 * sign[k];
    sign[k] = -sign[k];
    sx -= twice * x[k];
    sy -= twice * y[k];
    sz -= twice * z[k];
    keepLonger(sx, sy, sz);
  }
}

/** Every pattern of signs that a direction orthogonal to momentum i makes, with both signs of i. */
function turnAbout(i: number, n: number): void {
  const px = x[i];
  const py = y[i];
  const pz = z[i];
  // a and b span the plane orthogonal to p; their lengths do not matter
  const ax = Math.abs(px) < Math.abs(py) ? 0 : -pz;
  const ay = Math.abs(px) < Math.abs(py) ? -pz : 0;
  const az = Math.abs(px) < Math.abs(py) ? py : px;
  const bx = py * az - pz * ay;
  const by = pz * ax - px * az;
  const bz = px * ay - py * ax;
  const scale = Math.sqrt(px * px + py * py + pz * pz);
  if (!(scale > 0)) return;
  let sx = 0;
  let sy = 0;
  let sz = 0;
  // i, and whatever is exactly collinear with it
  let tx = px;
  let ty = py;
  let tz = pz;
  let crossings = 0;
  for (let k = 0; k < n; k++) {
    if (k === i) continue;
    const a = x[k] * ax + y[k] * ay + z[k] * az;
    const b = x[k] * bx + y[k] * by + z[k] * bz;
    if (a === 0 && b === 0) {
      const along = x[k] * px + y[k] * py + z[k] * pz < 0 ? -1 : 1;
      tx += along * x[k];
      ty += along * y[k];
      tz += along * z[k];
      continue;
    }
    const s = a > 0 || (a === 0 && b > 0) ? 1 : -1;
    sx += s * x[k];
    sy += s * y[k];
    sz += s * z[k];
    if (a === 0) continue;
    // n = a cos + b sin crosses k's plane where the cotangent, which falls from +inf to -inf, is -b/a
    sign[k] = s;
    key[crossings] = b / a;
    order[crossings++] = k;
  }
  sortByKey(crossings);
  // |s +- t|^2 = |s|^2 +- 2 s.t + |t|^2: the sum itself only where it beats the best
  const t2 = tx * tx + ty * ty + tz * tz;
  let longest2 = best[3];
  for (let c = 0; ; c++) {
    const st = sx * tx + sy * ty + sz * tz;
    const length2 = sx * sx + sy * sy + sz * sz + 2 * Math.abs(st) + t2;
    if (length2 > longest2) {
      const side = st < 0 ? -1 : 1;
      keepLonger(sx + side * tx, sy + side * ty, sz + side * tz);
      longest2 = length2;
    }
    if (c === crossings) break;
    const k = order[c];
    const twice = 2 * sign[k];
    sx -= twice * x[k];
    sy -= twice * y[k];
    sz -= twice * z[k];
  }
}

/** Sort the first n keys upwards, their owners with them. Up to 64 plain insertion is a quarter faster than Shell's steps. */
function sortByKey(n: number): void {
  if (n > 64) for (const gap of GAPS) sortWithGap(n, gap);
  sortWithGap(n, 1);
}

function sortWithGap(n: number, gap: number): void {
  for (let c = gap; c < n; c++) {
    const k = key[c];
    const owner = order[c];
    let at = c;
    while (at >= gap && key[at - gap] > k) {
      key[at] = key[at - gap];
      order[at] = order[at - gap];
      at -= gap;
    }
    key[at] = k;
    order[at] = owner;
  }
}

/**
 * Sum anew with the signs that the best sum's own direction gives, until it grows no longer.
 *
 * A sum so made is never shorter. It rids the best of what many flips rounded, and puts right a sign that the sweeps
 * could not tell because two momenta are collinear to the last digit.
 */
function settle(n: number): void {
  let previous: number;
  do {
    previous = best[3];
    let sx = 0;
    let sy = 0;
    let sz = 0;
    for (let k = 0; k < n; k++) {
      const s = x[k] * best[0] + y[k] * best[1] + z[k] * best[2] < 0 ? -1 : 1;
      sx += s * x[k];
      sy += s * y[k];
      sz += s * z[k];
    }
    best[0] = sx;
    best[1] = sy;
    best[2] = sz;
    best[3] = sx * sx + sy * sy + sz * sz;
  } while (best[3] > previous);
}

function widen(n: number): void {
  x = new Float64Array(2 * n);
  y = new Float64Array(2 * n);
  z = new Float64Array(2 * n);
  sign = new Float64Array(2 * n);
  key = new Float64Array(2 * n);
  order = new Int32Array(2 * n);
}
