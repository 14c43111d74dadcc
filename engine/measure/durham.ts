// Scratch, not reentrant: the jets that are left, and the nearest other jet of each.
let size = 0;
let px = new Float64Array(0);
let py = new Float64Array(0);
let pz = new Float64Array(0);
let energy = new Float64Array(0);
let ux = new Float64Array(0);
let uy = new Float64Array(0);
let uz = new Float64Array(0);
let nearest = new Int32Array(0);
let distance = new Float64Array(0);

/**
 * Durham clustering of momenta with E-scheme recombination: the values at which the number of jets changes.
 *
 * @param momenta px, py, pz, E [GeV], four to a parton.
 * @param sqrtS centre-of-mass energy [GeV].
 * @returns y_n(n+1) at index n - 1, from y_12 on: the distance y_ij = 2 min(Ei^2, Ej^2) (1 - cos theta_ij) / s of the pair
 * whose merging leaves n jets. Empty for fewer than two momenta.
 *
 * Accuracy: 1e-15 over the angle [rad] of the pair. A merged pair that is exactly at rest has no direction; it counts as
 * 60 degrees from everything.
 * Source: Catani, Dokshitzer, Olsson, Turnock, Webber, Phys. Lett. B269 (1991) 432.
 */
export function durham(momenta: Float64Array, sqrtS: number): Float64Array {
  let jets = momenta.length >> 2;
  const transitions = new Float64Array(Math.max(0, jets - 1));
  if (jets > size) widen(jets);
  for (let k = 0; k < jets; k++)
    setJet(k, momenta[4 * k], momenta[4 * k + 1], momenta[4 * k + 2], momenta[4 * k + 3]);
  for (let k = 0; k < jets; k++) findNearest(k, jets);
  const perS = 1 / (sqrtS * sqrtS);
  for (; jets > 1; jets--) {
    let a = 0;
    for (let k = 1; k < jets; k++) if (distance[k] < distance[a]) a = k;
    transitions[jets - 2] = distance[a] * perS;
    merge(a, nearest[a], jets);
  }
  return transitions;
}

/**
 * Number of jets at a resolution: merging stops at the first pair with y_ij >= yCut.
 *
 * @param transitions of `durham`. @param yCut 0 < yCut.
 */
export function jetCount(transitions: Float64Array, yCut: number): number {
  let jets = transitions.length + 1;
  while (jets > 1 && transitions[jets - 2] < yCut) jets--;
  return jets;
}

/** Merge two jets into the one with the smaller number; the last of `jets` moves into the gap. */
function merge(one: number, other: number, jets: number): void {
  const a = Math.min(one, other);
  const b = Math.max(one, other);
  const last = jets - 1;
  setJet(a, px[a] + px[b], py[a] + py[b], pz[a] + pz[b], energy[a] + energy[b]);
  if (b !== last) {
    setJet(b, px[last], py[last], pz[last], energy[last]);
    nearest[b] = nearest[last];
    distance[b] = distance[last];
  }
  for (let k = 0; k < last; k++) {
    const near = nearest[k];
    if (k === a || near === a || near === b) {
      findNearest(k, last);
      continue;
    }
    if (near === last) nearest[k] = b;
    const d = distanceOf(k, a);
    if (d < distance[k]) {
      distance[k] = d;
      nearest[k] = a;
    }
  }
}

function setJet(k: number, x: number, y: number, z: number, e: number): void {
  px[k] = x;
  py[k] = y;
  pz[k] = z;
  energy[k] = e;
  const length = Math.sqrt(x * x + y * y + z * z);
  const per = length > 0 ? 1 / length : 0;
  ux[k] = x * per;
  uy[k] = y * per;
  uz[k] = z * per;
}

/** y_ij s = min(Ei^2, Ej^2) |ui - uj|^2 [GeV^2]: 2 (1 - cos) as the square of a chord keeps its digits. */
function distanceOf(a: number, b: number): number {
  const dx = ux[a] - ux[b];
  const dy = uy[a] - uy[b];
  const dz = uz[a] - uz[b];
  const e = Math.min(energy[a], energy[b]);
  return e * e * (dx * dx + dy * dy + dz * dz);
}

function findNearest(k: number, jets: number): void {
  let near = -1;
  let least = Infinity;
  for (let other = 0; other < jets; other++) {
    if (other === k) continue;
    const d = distanceOf(k, other);
    if (d < least) {
      least = d;
      near = other;
    }
  }
  nearest[k] = near;
  distance[k] = least;
}

function widen(jets: number): void {
  size = 2 * jets;
  px = new Float64Array(size);
  py = new Float64Array(size);
  pz = new Float64Array(size);
  energy = new Float64Array(size);
  ux = new Float64Array(size);
  uy = new Float64Array(size);
  uz = new Float64Array(size);
  nearest = new Int32Array(size);
  distance = new Float64Array(size);
}
