import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { axisTicks, nearestStep, numberedSteps, scaleAt } from '../../../viewer/views/clock/index.ts';

const sample = { hardScale: 250_000, end: Math.log(250_000), root: true, width: 920, size: 12.5 };

describe('scale axis', () => {
  test('labels both ends with the scales themselves', () => {
    const ticks = axisTicks(sample);
    expect(ticks[0]).toMatchObject({ time: 0, label: '500' });
    expect(ticks.at(-1)).toMatchObject({ time: sample.end, label: '1' });
  });

  test('puts every label where the clock has that scale', () => {
    for (const { time, label } of axisTicks(sample)) {
      if (label) expect(scaleAt(sample.hardScale, time, true)).toBeCloseTo(Number(label), 9);
    }
  });

  test('lets no two labels touch, whatever the scales and the width', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e12, noNaN: true }),
        fc.double({ min: 0.01, max: 60, noNaN: true }),
        fc.integer({ min: 60, max: 2000 }),
        fc.boolean(),
        (hardScale, end, width, root) => {
          const size = 12.5;
          const boxes = axisTicks({ hardScale, end, width, size, root })
            .filter(({ label }) => label)
            .map(({ time, label }) => {
              const at = (time / end) * width;
              const long = label.length * size * 0.5;
              // The ends stand inside of the axis, all others are centred.
              const from = time === 0 ? 0 : time === end ? width - long : at - long / 2;
              return [from, from + long];
            });
          for (let k = 1; k < boxes.length; k++) expect(boxes[k][0]).toBeGreaterThanOrEqual(boxes[k - 1][1]);
        },
      ),
    );
  });

  test('has no ticks for a clock that does not run', () => {
    expect(axisTicks({ ...sample, end: 0 })).toEqual([]);
    expect(axisTicks({ ...sample, hardScale: NaN })).toEqual([]);
  });
});

describe('step numbers', () => {
  test('keep 15 px between them, the selected one always printed', () => {
    const positions = [0, 5, 9, 30, 31, 60];
    expect(numberedSteps(positions, -1)).toEqual([true, false, false, true, false, true]);
    expect(numberedSteps(positions, 4)).toEqual([true, false, false, false, true, true]);
  });

  test('are at least 15 px apart for random steps', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 900, noNaN: true })), fc.nat(20), (places, selected) => {
        const positions = places.sort((a, b) => a - b);
        const shown = positions.filter((_, step) => numberedSteps(positions, selected)[step]);
        for (let k = 1; k < shown.length; k++) expect(shown[k] - shown[k - 1]).toBeGreaterThanOrEqual(15);
      }),
    );
  });

  test('find the nearest step within reach only', () => {
    expect(nearestStep([10, 20, 30], 23, 6)).toBe(1);
    expect(nearestStep([10, 20, 30], 26, 3)).toBe(-1);
    expect(nearestStep([], 0, 10)).toBe(-1);
  });
});
