import { describe, expect, it } from 'vitest';
import { mathBits, RECORDED_BITS } from './math-bits.ts';

describe('the bits of engine/math', () => {
  it('are those that were recorded, for every function', () => {
    expect(mathBits()).toEqual(RECORDED_BITS);
  });
});
