import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  EventStrips,
  listWindow,
  orderEvents,
  SummaryTable,
  scrollToPlace,
} from '../../../viewer/views/events/index.ts';
import { fileOf, sampleHistories } from './sample-file.ts';

const ROW = 21;
const BOX = 600;

describe('list window', () => {
  test('shows a place that it was scrolled to, in lists of any length', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 50_000_000 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (count, share) => {
          const place = Math.min(Math.floor(share * count), count - 1);
          const { height } = listWindow(count, ROW, BOX, 0);
          const top = Math.min(scrollToPlace(place, count, ROW, BOX, 0), Math.max(height - BOX, 0));
          const { from, to } = listWindow(count, ROW, BOX, top);
          expect(from).toBeLessThanOrEqual(place);
          expect(to).toBeGreaterThan(place);
        },
      ),
    );
  });

  test('stays below what browsers can scroll', () => {
    expect(listWindow(100_000_000, ROW, BOX, 0).height).toBeLessThan(16_000_000);
  });

  test('reaches the last row at the lowest scroll', () => {
    for (const count of [40, 100_000, 10_000_000]) {
      const { height } = listWindow(count, ROW, BOX, 0);
      expect(listWindow(count, ROW, BOX, height - BOX).to).toBe(count);
    }
  });

  test('does not scroll for a row that is in view', () => {
    expect(scrollToPlace(20, 1000, ROW, BOX, 300)).toBe(300);
  });
});

describe('order of events', () => {
  test('sorts either way, missing values last, equals by number', () => {
    const values = [2, NaN, 5, 2, NaN, 1];
    expect([...orderEvents(values, false)]).toEqual([5, 0, 3, 2, 1, 4]);
    expect([...orderEvents(values, true)]).toEqual([2, 0, 3, 5, 1, 4]);
  });
});

describe('index of a file', () => {
  test('reads each page once and only when it is asked for', async () => {
    const asked: [number, number][] = [];
    const file = fileOf(sampleHistories(3));
    const table = new SummaryTable({
      ...file,
      eventCount: 10_000,
      summaries: async (from, to) => {
        asked.push([from, to]);
        const column = Float64Array.from({ length: to - from }, (_, k) => from + k);
        return { branchings: column, finalPartons: column, hardestKT: column, worstCoherence: column };
      },
    });
    expect(table.value('branchings', 5000)).toBeNaN();
    await Promise.all([table.ensure(5000, 5001), table.ensure(5100, 5200)]);
    expect(asked).toEqual([[4096, 8192]]);
    expect(table.value('branchings', 5000)).toBe(5000);
    await table.ensure(0, 10_000);
    expect(asked).toEqual([
      [4096, 8192],
      [0, 4096],
      [8192, 10_000],
    ]);
    expect(table.value('hardestKT', 9999)).toBe(9999);
  });
});

describe('strips', () => {
  test('are read for what was asked last, and an unreadable event has none', async () => {
    const read: number[] = [];
    const histories = sampleHistories(4);
    const file = fileOf(histories);
    const strips = await new Promise<EventStrips>((resolve) => {
      const reading = new EventStrips(
        {
          ...file,
          event: async (n) => {
            read.push(n);
            if (n === 2) throw new Error('damaged');
            return file.event(n);
          },
        },
        (history) => `strip of ${history.head.event}`,
        () => resolve(reading),
      );
      reading.want([0, 1, 3]);
      reading.want([2, 3]);
    });
    expect(read).toEqual([0, 2, 3]);
    expect(strips.path(3)).toBe('strip of 3');
    expect(strips.path(2)).toBe('');
    expect(strips.path(1)).toBeUndefined();
  });
});
