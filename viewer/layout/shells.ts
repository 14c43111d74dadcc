import { log } from '../../engine/math/index.ts';
import { type RadiusScale, radiusAt } from './radius-scale.ts';

/** A labelled shell: where sqrt(t) has a round value. */
export interface Shell {
  /** sqrt(t) [GeV]. */
  readonly value: number;
  readonly radius: number;
}

const STEPS = [[1, 2, 5], [1, 3], [1]] as const;

/**
 * Shells at round values of sqrt(t) strictly between hard scale and rim, from the centre outwards.
 *
 * The densest of 1-2-5, 1-3 and whole decades whose neighbours stay at least `gap` apart; the nearest to centre and rim keep
 * `gap` and half of it. Empty where even decades are too close.
 *
 * @param gap Least distance between shells, as a fraction of the rim's radius.
 */
export function shells(scale: RadiusScale, gap: number): Shell[] {
  const hard = log(scale.hardScale) / 2;
  if (!Number.isFinite(hard)) return [];
  for (const digits of STEPS) {
    const found = roundShells(scale, hard, digits).filter(
      ({ radius }) => radius > scale.inner + gap / 2 && radius < 1 - gap / 2,
    );
    if (found.every((shell, k) => k === 0 || shell.radius - found[k - 1].radius >= gap)) return found;
  }
  return [];
}

function roundShells(scale: RadiusScale, hard: number, digits: readonly number[]): Shell[] {
  const LN10 = log(10);
  const found: Shell[] = [];
  const top = Math.ceil(hard / LN10);
  const bottom = Math.floor((hard - scale.end / 2) / LN10);
  for (let decade = top; decade >= bottom; decade--) {
    for (let k = digits.length - 1; k >= 0; k--) {
      const value = Number(`${digits[k]}e${decade}`);
      const time = 2 * (hard - log(value));
      if (time > 0 && time < scale.end) found.push({ value, radius: radiusAt(scale, time) });
    }
  }
  return found;
}

/** A scale as a label prints it: three significant digits, no exponent between 0.001 and 99999 [GeV]. */
export function scaleText(value: number): string {
  if (!(value > 0 && value < Infinity)) return '—';
  const digits = Math.floor(log(value) / log(10) + 1e-9);
  if (digits < -3 || digits > 4) return value.toExponential(2).replace('e', '·10^').replace('+', '');
  return String(Number(value.toPrecision(3)));
}
