import { expect, test } from 'vitest';
import { readRange } from '../../../viewer/terminal/byte-range.ts';

test('reads the three forms of a range and clips them to the file', () => {
  expect(readRange('bytes=0-9', 100)).toEqual({ start: 0, end: 9 });
  expect(readRange('bytes=90-', 100)).toEqual({ start: 90, end: 99 });
  expect(readRange('bytes=-10', 100)).toEqual({ start: 90, end: 99 });
  expect(readRange('bytes=-1000', 100)).toEqual({ start: 0, end: 99 });
  expect(readRange('bytes=50-1000', 100)).toEqual({ start: 50, end: 99 });
});

test('says which ranges no byte satisfies', () => {
  expect(readRange('bytes=100-', 100)).toBe('unsatisfiable');
  expect(readRange('bytes=-0', 100)).toBe('unsatisfiable');
  expect(readRange('bytes=0-0', 0)).toBe('unsatisfiable');
});

test('ignores what is no single range of bytes', () => {
  for (const header of [
    undefined,
    'bytes=',
    'bytes=-',
    'bytes=9-3',
    'bytes=0-1,5-6',
    'lines=1-2',
    'bytes=a-b',
  ]) {
    expect(readRange(header, 100), String(header)).toBeNull();
  }
});
