import { describe, expect, it } from 'vitest';
import { Philox } from '../../engine/index.ts';

// Known answers of Philox4x32-10, references.md section 18 (Salmon, Moraes, Dror, Shaw, SC11 (2011)).
const VECTORS = [
  ['00000000 00000000 00000000 00000000', '00000000 00000000', '6627e8d5 e169c58d bc57ac4c 9b00dbd8'],
  ['ffffffff ffffffff ffffffff ffffffff', 'ffffffff ffffffff', '408f276d 41c83b0e a20bc7c6 6d5451fd'],
  ['243f6a88 85a308d3 13198a2e 03707344', 'a4093822 299f31d0', 'd16cfe09 94fdcceb 5001e420 24126ea1'],
  ['00000001 00000000 00000000 00000000', '00000000 00000000', 'f8e4cca4 5cb200db b1a574eb 097eff67'],
  ['00000000 00000000 00000000 00000001', '00000000 00000000', '2dce73e5 1348e23f fcf8e0ec a287aadb'],
  ['00000000 00000000 00000000 00000000', '00000001 00000000', 'e3e80670 e50a0ebc 95f222c0 b615aa27'],
  ['00000001 00000002 00000003 00000004', '00000005 00000006', 'c0c839bc 889c87c5 61986739 2d4623d0'],
];
const words = (text: string): number[] => text.split(' ').map((word) => Number.parseInt(word, 16));

describe('the random numbers', () => {
  it.each(VECTORS)('are those known for counter %s and key %s', (counter, key, output) => {
    expect(Philox.words(words(counter), words(key))).toEqual(words(output));
  });
});
