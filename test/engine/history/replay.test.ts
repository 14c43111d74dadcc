import { describe, expect, it } from 'vitest';
import {
  aliveEntries,
  colourFaults,
  coloursAlive,
  type History,
  stepAtTime,
} from '../../../engine/history/index.ts';
import { historyByHand, role } from '../history-by-hand.ts';

/**
 * e+e- -> q qbar; the quark emits a gluon (rows 5, 6, antiquark 7), which splits into a pair (8, 9, antiquark 10).
 * Beams are rows 0 and 1, the boson row 2.
 */
function event(): History {
  return historyByHand(
    [
      { id: 11, role: role('incoming') },
      { id: -11, role: role('incoming') },
      { id: 23, role: role('resonance') },
      { id: 1, colour: 501, endedBy: 0, role: role('hard') },
      { id: -1, anticolour: 501, endedBy: 0, role: role('hard') },
      { id: 1, colour: 502, madeBy: 0, from: 3, role: role('emitter') },
      { id: 21, colour: 501, anticolour: 502, madeBy: 0, endedBy: 1, from: 3, role: role('emission') },
      { id: -1, anticolour: 501, madeBy: 0, endedBy: 1, from: 4, role: role('recoiled') },
      { id: 2, colour: 501, madeBy: 1, from: 6, role: role('emitter') },
      { id: -2, anticolour: 502, madeBy: 1, from: 6, role: role('emission') },
      { id: -1, anticolour: 501, madeBy: 1, from: 7, role: role('recoiled') },
    ],
    [
      { t: 400, emitter: 3, partner: 4, recoiler: 4, i: 5, j: 6, recoilerAfter: 7 },
      { t: 30, emitter: 6, partner: 7, recoiler: 7, i: 8, j: 9, recoilerAfter: 10 },
    ],
  );
}

describe('replay', () => {
  it('gives the partons right after each step, beams and boson left out', () => {
    const history = event();
    expect([...aliveEntries(history, -1)]).toEqual([3, 4]);
    expect([...aliveEntries(history, 0)]).toEqual([5, 6, 7]);
    expect([...aliveEntries(history, 1)]).toEqual([5, 8, 9, 10]);
    expect([...aliveEntries(history, 99)]).toEqual([5, 8, 9, 10]);
    expect([...aliveEntries(history, -2)]).toEqual([]);
  });

  it('gives the colour dipoles right after each step by their tags', () => {
    const history = event();
    const lines = (step: number) => {
      const { tag, colourEnd, anticolourEnd } = coloursAlive(history, step);
      return [...tag].map((name, n) => [name, colourEnd[n], anticolourEnd[n]]);
    };
    expect(lines(-1)).toEqual([[501, 3, 4]]);
    expect(lines(0)).toEqual([
      [501, 6, 7],
      [502, 5, 6],
    ]);
    expect(lines(1)).toEqual([
      [501, 8, 10],
      [502, 5, 9],
    ]);
  });

  it('finds no fault where every colour line closes, and names the tag where one does not', () => {
    const history = event();
    for (const step of [-1, 0, 1]) expect(colourFaults(history, step)).toEqual([]);
    history.entries.anticolour[9] = 503;
    expect(colourFaults(history, 0)).toEqual([]);
    expect(colourFaults(history, 1)).toEqual([
      { tag: 502, colourEnds: 1, anticolourEnds: 0 },
      { tag: 503, colourEnds: 0, anticolourEnds: 1 },
    ]);
    const { tag, colourEnd, anticolourEnd } = coloursAlive(history, 1);
    expect([...tag]).toEqual([501, 502, 503]);
    expect([...colourEnd]).toEqual([8, 5, -1]);
    expect([...anticolourEnd]).toEqual([10, -1, 9]);
    history.entries.anticolour[9] = 501;
    expect(colourFaults(history, 1)).toEqual([
      { tag: 501, colourEnds: 1, anticolourEnds: 2 },
      { tag: 502, colourEnds: 1, anticolourEnds: 0 },
    ]);
  });

  it('finds the last step at or before an evolution time', () => {
    const history = event();
    const time = (t: number) => Math.log(2500 / t);
    expect(stepAtTime(history, -1)).toBe(-1);
    expect(stepAtTime(history, 0)).toBe(-1);
    expect(stepAtTime(history, time(400) - 1e-9)).toBe(-1);
    expect(stepAtTime(history, time(400) + 1e-9)).toBe(0);
    expect(stepAtTime(history, time(30) - 1e-9)).toBe(0);
    expect(stepAtTime(history, time(30) + 1e-9)).toBe(1);
    expect(stepAtTime(history, Infinity)).toBe(1);
    expect(stepAtTime(historyByHand([], []), 1)).toBe(-1);
  });
});
