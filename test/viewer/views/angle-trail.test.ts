import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { measureSteps } from '../../../engine/index.ts';
import {
  aboveText,
  angleAxis,
  angleHeight,
  countAbove,
  numberStride,
  playheadPlace,
  trailLines,
  trailPositions,
} from '../../../viewer/views/angle-trail/index.ts';
import { sampleHistories } from './sample-file.ts';

describe('angle axis', () => {
  test('is logarithmic: a factor of two is the same height everywhere', () => {
    const axis = angleAxis([[0.001]], 400);
    const octave = (angle: number) => angleHeight(axis, angle, 400) - angleHeight(axis, 2 * angle, 400);
    expect(octave(0.01)).toBeCloseTo(octave(1), 9);
  });

  test('holds every angle of the event and pi', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 1e-9, max: Math.PI, noNaN: true })), (angles) => {
        const axis = angleAxis([angles], 300);
        for (const angle of [...angles, Math.PI]) {
          expect(angle).toBeGreaterThan(axis.low);
          expect(angle).toBeLessThan(axis.high);
        }
      }),
    );
  });

  test('has labels at pi and at powers of ten before others, 13 px apart', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-8, max: 1, noNaN: true }),
        fc.integer({ min: 30, max: 600 }),
        (low, height) => {
          const axis = angleAxis([[low]], height);
          const places = axis.ticks.map(({ angle }) => angleHeight(axis, angle, height));
          expect(axis.ticks[0].label).toBe('π');
          for (let k = 1; k < places.length; k++)
            expect(places[k] - places[k - 1]).toBeGreaterThanOrEqual(13);
        },
      ),
    );
    expect(angleAxis([[0.01]], 120).ticks.map(({ label }) => label)).toContain('0.1');
  });

  test('passes over angles that have no place on it', () => {
    expect(angleAxis([[0, NaN, -1]], 300).low).toBeGreaterThan(0.1);
  });
});

describe('parton lines', () => {
  test('share out the steps of an event, each to its emitter', () => {
    for (const history of sampleHistories(20)) {
      const lines = trailLines(history);
      const steps = lines.flatMap((line) => line.steps).sort((a, b) => a - b);
      expect(steps).toEqual(Array.from({ length: history.steps.length }, (_, step) => step));
      for (const { line, steps: own } of lines) {
        for (const step of own) expect(history.entries.line[history.steps.emitter[step]]).toBe(line);
      }
    }
  });
});

describe('counts above a ceiling', () => {
  test('leave out steps whose ratio is not known', () => {
    expect(countAbove([0.5, 1.2, NaN, 3, 1], 5)).toEqual({ above: 2, known: 4 });
    expect(aboveText({ above: 2, known: 4 })).toBe('2 of 4 (50 %)');
    expect(aboveText({ above: 0, known: 0 })).toBe('not known');
  });

  test('are never above birth for the first step, whose emitter is hard', () => {
    for (const history of sampleHistories(20)) {
      if (history.steps.length === 0) continue;
      expect(countAbove(measureSteps(history).coherenceBirth, 1)).toEqual({ above: 0, known: 1 });
    }
  });
});

describe('places across the plot', () => {
  const times = [1, 3, 4];
  const timeOf = (step: number) => times[step];
  const positions = trailPositions(3, 300, 'step', () => 0);

  test('are the middles of equal columns, or shares of the clock', () => {
    expect([...positions]).toEqual([50, 150, 250]);
    expect([...trailPositions(3, 300, 'time', (step) => times[step] / 6)]).toEqual([50, 150, 200]);
  });

  test('put the playhead on a mark exactly at its step, and never backwards', () => {
    const place = (time: number) =>
      playheadPlace(positions, 300, timeOf, 6, times.filter((own) => own <= time).length - 1, time);
    expect(times.map(place)).toEqual([50, 150, 250]);
    expect(place(0)).toBe(0);
    expect(place(6)).toBe(300);
    expect(place(2)).toBe(100);
    let last = -1;
    for (let time = 0; time <= 6; time += 0.01) {
      expect(place(time)).toBeGreaterThanOrEqual(last);
      last = place(time);
    }
  });

  test('leave room between step numbers', () => {
    expect(numberStride(24, 550)).toBe(2);
    expect(numberStride(300, 550)).toBe(20);
    expect(numberStride(0, 550)).toBe(1);
  });
});
