import { describe, expect, test } from 'vitest';
import {
  branchingNotation,
  channelNotation,
  parseNotation,
  partonSymbol,
  plainNotation,
  processNotation,
} from '../../../viewer/views/type/index.ts';
import { sampleHistories } from './sample-file.ts';

describe('notation', () => {
  test('sets symbols italic and their indices upright and lowered', () => {
    expect(parseNotation('*k*_{T} [GeV]')).toEqual([
      { text: 'k', symbol: true, height: 'line' },
      { text: 'T', symbol: false, height: 'lowered' },
      { text: ' [GeV]', symbol: false, height: 'line' },
    ]);
  });

  test('keeps an italic symbol inside of an index', () => {
    expect(parseNotation('*α*_{s}(*M*_{*Z*})').at(-2)).toEqual({
      text: 'Z',
      symbol: true,
      height: 'lowered',
    });
  });

  test('lets a lone star, underscore or caret stand for itself', () => {
    const text = 'a * b_c ^ d';
    expect(plainNotation(text)).toBe(text);
  });

  test('reads as plain text with exponents marked', () => {
    expect(plainNotation('1·10^{−14}')).toBe('1·10^−14');
    expect(plainNotation('*k*_{T}^{2}')).toBe('kT^2');
  });
});

describe('symbols', () => {
  test('puts a bar over antiquarks and none over quarks', () => {
    expect(partonSymbol(-5)).toBe('*b\u0304*');
    expect(partonSymbol(5)).toBe('*b*');
    expect(partonSymbol(21)).toBe('*g*');
  });

  test('prints an unknown PDG number as it is', () => {
    expect(partonSymbol(-9000)).toBe('−9000');
  });

  test('writes the positron before its electron', () => {
    expect(plainNotation(processNotation([11, -11], [1, -1]))).toBe('e+\u2009e− → d\u2009d\u0304');
  });

  test('names a step by its own flavours, by its kernel where a row is missing', () => {
    const history = sampleHistories(1)[0];
    expect(plainNotation(branchingNotation(history, 0))).toMatch(/^(d → d\u2009g|d̄ → d̄\u2009g)$/);
    const j = history.steps.j.slice().fill(-1);
    expect(branchingNotation({ ...history, steps: { ...history.steps, j } }, 0)).toBe(
      channelNotation('q_qg'),
    );
  });

  test('leaves a kernel word that is not ours as its author wrote it', () => {
    expect(channelNotation('q_q_photon')).toBe('q_q_photon');
    expect(plainNotation(channelNotation('g_qq'))).toBe('g → q\u2009q\u0304');
  });
});
