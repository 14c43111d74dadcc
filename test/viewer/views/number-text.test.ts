import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  countText,
  decimalText,
  momentumDecimals,
  numberText,
  plainNotation,
  residualText,
  shortNumber,
} from '../../../viewer/views/type/index.ts';

// What a reader of the screen would type: minus as a hyphen, a power of ten as an exponent.
const readBack = (text: string): number =>
  Number(text.replaceAll('−', '-').replace(/·10\^\{(-?\d+)\}/, 'e$1'));

describe('numbers as text', () => {
  test('keeps six digits of any number', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }), (value) => {
        const text = numberText(value);
        expect(text).not.toMatch(/e|-/);
        expect(Math.abs(readBack(text) - value)).toBeLessThanOrEqual(Math.abs(value) * 5.1e-6);
      }),
    );
  });

  test.each([
    [8.209432, '8.20943'],
    [-4.3631, '−4.36310'],
    [0.000012345678, '1.23457·10^{−5}'],
    [1234567, '1.23457·10^{6}'],
    [0, '0'],
    [NaN, '—'],
    [-Infinity, '−∞'],
  ])('%d reads %s', (value, text) => {
    expect(numberText(value)).toBe(text);
  });

  test('never shows a negative zero', () => {
    expect(decimalText(-0.0000001, 3)).toBe('0.000');
    expect(decimalText(-0.0009, 3)).toBe('−0.001');
  });

  test('gives momenta of any scale six digits at the largest, between 0 and 9 decimals', () => {
    expect(momentumDecimals(432.02)).toBe(3);
    expect(momentumDecimals(45.59)).toBe(4);
    expect(momentumDecimals(1e9)).toBe(0);
    expect(momentumDecimals(1e-9)).toBe(9);
    expect(momentumDecimals(0)).toBe(3);
  });

  test('shows a residual by its size, and an exact one as 0', () => {
    expect(residualText(-2.3e-14)).toBe('−2·10^{−14}');
    expect(residualText(0)).toBe('0');
    expect(residualText(NaN)).toBe('—');
  });

  test('drops zeros that say nothing from axis labels', () => {
    expect(shortNumber(91.1876)).toBe('91.1876');
    expect(shortNumber(1000)).toBe('1000');
    expect(shortNumber(0.5)).toBe('0.5');
    expect(plainNotation(shortNumber(1e-7))).toBe('1·10^−7');
  });

  test('groups the digits of large counts', () => {
    expect(countText(9999)).toBe('9999');
    expect(countText(1234567)).toBe('1\u202f234\u202f567');
  });
});
