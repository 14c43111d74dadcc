/** What stands where there is no number. */
export const ABSENT = '—';

const withMinus = (text: string): string => text.replace('-', '−');

/**
 * A number to so many significant digits, with the true minus; below 10⁻⁴ and from 10⁶ on as `2.5·10^{−7}` (see
 * `parseNotation`). NaN is a dash.
 */
export function numberText(value: number, digits = 6): string {
  if (Number.isNaN(value)) return ABSENT;
  if (!Number.isFinite(value)) return value > 0 ? '∞' : '−∞';
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-4 && size < 1e6) return withMinus(fixedDigits(value, digits));
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
  return powerText(mantissa, Number(exponent));
}

// toPrecision turns to the exponent form where the integer part has more digits than were asked for.
function fixedDigits(value: number, digits: number): string {
  const text = value.toPrecision(digits);
  return text.includes('e') ? String(Math.round(value)) : text;
}

const powerText = (mantissa: string, exponent: number): string =>
  `${withMinus(mantissa)}·10^{${withMinus(String(exponent))}}`;

/** A number with so many decimals, for columns in which the points stand under one another. NaN is a dash. */
export function decimalText(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return numberText(value);
  const text = value.toFixed(decimals);
  return withMinus(Number(text) === 0 ? text.replace('-', '') : text);
}

/** A rounding residual: `1·10^{−14}`, or 0 where it vanishes exactly. */
export function residualText(value: number): string {
  if (!Number.isFinite(value)) return numberText(value);
  if (value === 0) return '0';
  const [mantissa, exponent] = value.toExponential(0).split('e');
  return powerText(mantissa, Number(exponent));
}

/** Decimals that show the largest of some momenta to six digits, from 0 to 9. */
export function momentumDecimals(largest: number): number {
  if (!(largest > 0)) return 3;
  const exponent = Number(largest.toExponential().split('e')[1]);
  return Math.min(Math.max(5 - exponent, 0), 9);
}

/** A short number for axes and settings: no trailing zeros, the true minus. */
export function shortNumber(value: number): string {
  return numberText(value, 6)
    .replace(/(\.\d*?)0+(?=$|·)/, '$1')
    .replace(/\.(?=$|·)/, '');
}

/** Whole number with a thin space every three digits from 10 000 on. */
export function countText(value: number): string {
  const text = String(value);
  return text.length < 5 ? withMinus(text) : withMinus(text.replace(/\B(?=(\d{3})+(?!\d))/g, '\u202f'));
}
