import { PI } from '../../engine/index.ts';
import { asin, cos } from '../../engine/math/index.ts';
import { type Camera, viewRotation } from './camera.ts';
import type { Strands } from './strands.ts';

// Views tried: a Fibonacci lattice on the sphere of eyes, without the caps about the beam where azimuth loses its meaning.
const VIEWS = 144;
const HIGHEST = 0.9;
// Marks that crowd a view are taken at most this often; the crowding of 400 says enough about 1000.
const MOST_POINTS = 320;
/** Distance below which two marks crowd each other, in units of the rim's radius: a ring's diameter and its number. */
const NEAR = 0.05;
/** Angle between the eye and the direction of a selected step at which its cone is seen best [rad]. */
const CAP_ANGLE = (50 * PI) / 180;

/**
 * The first view of an event: of 144 eyes the one with the least crowding, judged alone from the event.
 *
 * Crowding is the mean over pairs of marks (branchings, and ends at the rim) of 1/(1 + (d/0.05)^2), d their distance on the
 * screen; to it is added a fifth of the mean foreshortening of the hard partons, which should lie across the view, and, with a
 * selected direction, the distance of its angle to the eye from 50 degrees.
 *
 * @param selected Unit vector of a selected step, null for none.
 */
export function firstCamera(strands: Strands, selected: Float64Array | null = null): Camera {
  const marks = marksOf(strands);
  const hard = hardDirections(strands);
  let best: Camera = { azimuth: 0.6, elevation: 0.35, zoom: 1, panX: 0, panY: 0 };
  let least = Infinity;
  const rotation = new Float64Array(9);
  const flat = new Float64Array((2 * marks.length) / 3);
  for (let k = 0; k < VIEWS; k++) {
    const camera = candidate(k);
    viewRotation(rotation, camera);
    const cost = crowding(flat, rotation, marks) + 0.2 * facing(rotation, hard) + capCost(rotation, selected);
    if (cost < least - 1e-9) {
      least = cost;
      best = camera;
    }
  }
  return best;
}

function candidate(k: number): Camera {
  const height = HIGHEST * (1 - (2 * k + 1) / VIEWS);
  const golden = PI * (3 - Math.sqrt(5));
  const azimuth = k * golden;
  return {
    azimuth: azimuth - 2 * PI * Math.floor(azimuth / (2 * PI)),
    elevation: asin(height),
    zoom: 1,
    panX: 0,
    panY: 0,
  };
}

function marksOf(strands: Strands): Float64Array {
  const points: number[] = [];
  const add = (radius: number, direction: Float64Array, at: number): void => {
    points.push(radius * direction[at], radius * direction[at + 1], radius * direction[at + 2]);
  };
  strands.stepRadius.forEach((radius, step) => {
    add(radius, strands.stepDirection, 3 * step);
  });
  const { turns, turnStart } = strands;
  const steps = points.length / 3;
  const end = new Float64Array(3);
  for (let strand = 0; strand < strands.to.length; strand++) {
    if (strands.to[strand] !== 1) continue;
    const turn = turnStart[strand + 1] - 1;
    const c = cos(turns.angle[turn]);
    const s = Math.sqrt(Math.max(0, 1 - c * c));
    for (let x = 0; x < 3; x++) {
      end[x] = c * turns.direction[3 * turn + x] + s * turns.tangent[3 * turn + x];
    }
    add(1, end, 0);
  }
  const count = points.length / 3;
  if (count <= MOST_POINTS) return Float64Array.from(points);
  // The earliest steps are the backbone of the picture and are kept; ends are thinned.
  const kept: number[] = [];
  const stride = count / MOST_POINTS;
  for (let k = 0; k < MOST_POINTS; k++) {
    const n = k < MOST_POINTS / 2 ? Math.min(k, steps) : Math.floor(k * stride);
    kept.push(points[3 * n], points[3 * n + 1], points[3 * n + 2]);
  }
  return Float64Array.from(kept);
}

function hardDirections(strands: Strands): Float64Array {
  const out: number[] = [];
  for (let strand = 0; strand < strands.from.length; strand++) {
    if (strands.from[strand] !== 0) continue;
    const turn = strands.turnStart[strand];
    out.push(...strands.turns.direction.subarray(3 * turn, 3 * turn + 3));
  }
  return Float64Array.from(out);
}

function crowding(flat: Float64Array, r: Float64Array, marks: Float64Array): number {
  const count = flat.length / 2;
  for (let k = 0; k < count; k++) {
    const x = marks[3 * k];
    const y = marks[3 * k + 1];
    const z = marks[3 * k + 2];
    flat[2 * k] = (r[0] * x + r[1] * y + r[2] * z) / NEAR;
    flat[2 * k + 1] = (r[3] * x + r[4] * y + r[5] * z) / NEAR;
  }
  let sum = 0;
  for (let k = 1; k < count; k++) {
    const x = flat[2 * k];
    const y = flat[2 * k + 1];
    for (let n = 0; n < k; n++) {
      const dx = x - flat[2 * n];
      const dy = y - flat[2 * n + 1];
      sum += 1 / (1 + dx * dx + dy * dy);
    }
  }
  return count > 1 ? sum / ((count * (count - 1)) / 2) : 0;
}

// Mean squared cosine between eye and hard partons: 0 where all lie across the view.
function facing(r: Float64Array, hard: Float64Array): number {
  let sum = 0;
  for (let k = 0; k < hard.length; k += 3) {
    const c = r[6] * hard[k] + r[7] * hard[k + 1] + r[8] * hard[k + 2];
    sum += c * c;
  }
  return hard.length > 0 ? sum / (hard.length / 3) : 0;
}

function capCost(r: Float64Array, selected: Float64Array | null): number {
  if (!selected) return 0;
  const c = r[6] * selected[0] + r[7] * selected[1] + r[8] * selected[2];
  return Math.abs(c - cos(CAP_ANGLE));
}
