import { expect, test } from 'vitest';
import { numberText, typeset } from '../../../viewer/terminal/columns.ts';

test('writes numbers with six digits whatever their size and a hyphen for a missing one', () => {
  expect([45.5938, 1.5e-7, 0, Number.NaN, 8315.17836, 1e9, -0.25].map(numberText)).toEqual([
    '45.5938',
    '1.50000e-7',
    '0',
    '-',
    '8315.18',
    '1.00000e+9',
    '-0.250000',
  ]);
});

test('puts decimal points below each other and ends no line with a blank', () => {
  const text = typeset([
    { name: 'step', unit: '', cells: ['0', '10'], align: 'number' },
    { name: 'kT', unit: 'GeV', cells: ['1.5', '-'], align: 'number' },
    { name: 'z', unit: '', cells: ['100.25', '-3.5'], align: 'number' },
    { name: 'channel', unit: '', cells: ['q_qg', 'g_gg'], align: 'word' },
  ]);
  const lines = text.split('\n');
  expect(lines).toEqual([
    '  step   kT       z  channel',
    '        GeV',
    '     0  1.5  100.25  q_qg',
    '    10  -     -3.5   g_gg',
  ]);
});

test('leaves the line of units out where nothing has one', () => {
  expect(typeset([{ name: 'a', unit: '', cells: ['1'], align: 'number' }]).split('\n')).toHaveLength(2);
});
