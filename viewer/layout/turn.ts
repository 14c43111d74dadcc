import { asin, cos, sin } from '../../engine/math/index.ts';

/** Fraction of a strand's radial extent within which it turns into its own direction. */
export const TURN_FRACTION = 0.1;

/**
 * How far along the shell a turn has come: a quarter ellipse in the plane of angle and radius, which starts along the
 * shell and ends radial.
 *
 * @param angle Whole angle turned through [rad].
 * @param rise How far from the turn's first radius, of the sign of `height`; at `height` and beyond the turn is complete,
 * and so is a turn without height.
 * @returns Angle turned so far [rad], 0 to `angle`.
 */
export function turnedBy(angle: number, rise: number, height: number): number {
  const share = height === 0 ? 1 : rise / height;
  if (share >= 1) return angle;
  if (!(share > 0)) return 0;
  // rise = height (1 - cos u), turned = angle sin u, u from 0 to pi/2.
  return angle * Math.sqrt(share * (2 - share));
}

/**
 * Points of a turn, ends included, for drawing it as a polyline: so many that no chord is farther than about a thousandth of
 * the rim's radius from the curve, but at most twenty chords; both are divided by `fineness`.
 *
 * @param radius Radius at which it begins, in units of the rim's.
 * @param fineness 1 for the whole ball, more for a part of it that is enlarged.
 * @returns Pairs: rise, angle turned so far [rad].
 */
export function turnPoints(angle: number, height: number, radius: number, fineness = 1): number[] {
  if (angle < 1e-4) return [0, 0, height, angle];
  // A chord over u of an ellipse lies at most axis u^2 / 8 from it.
  const axis = Math.max(angle * radius, Math.abs(height));
  const pieces = Math.max(
    2,
    Math.min(20 * fineness, Math.ceil(QUARTER * Math.sqrt((axis * fineness) / 0.006))),
  );
  const points: number[] = [];
  for (let k = 0; k <= pieces; k++) {
    const u = (QUARTER * k) / pieces;
    points.push(height * (1 - cos(u)), angle * sin(u));
  }
  return points;
}

const QUARTER = asin(1);
