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

/** A round scale as a label prints it [GeV]: at most three significant digits, no trailing zeros. */
export function scaleText(value: number): string {
  const text = threeDigits(value);
  return text.includes('.') ? text.replace(/\.?0+(?=$|·)/, '') : text;
}

/** A positive number to three significant digits, zeros kept: 0.470, 12.0, 1200, `1.20·10^{−4}` (see `runs`). */
export function threeDigits(value: number): string {
  if (!(value > 0 && value < Infinity)) return value === 0 ? '0' : '—';
  if (value >= 0.001 && value < 99_950) {
    const text = value.toPrecision(3);
    return text.includes('e') ? String(Number(text)) : text;
  }
  const [mantissa, exponent] = value.toExponential(2).split('e');
  return `${mantissa}·10^{${exponent.replace('+', '').replace('-', '−')}}`;
}
