import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aliveEntries, coloursAlive, type History } from '../../../engine/index.ts';
import {
  angleBetween,
  ballEvent,
  layStrands,
  momentOf,
  radiusAt,
  type Strands,
  strandDirection,
  traceChains,
  traceStrands,
} from '../../../viewer/layout/index.ts';
import { historyByHand, role as roleCode } from '../../engine/history-by-hand.ts';
import { anyEvent, denseEvent, directionOf, silentEvent, teraEvent } from './events.ts';

const each = (claim: (history: History, strands: Strands) => void): void =>
  fc.assert(
    fc.property(anyEvent, (history) => claim(history, layStrands(history))),
    { numRuns: 60, seed: 5 },
  );

const length = (p: ArrayLike<number>, at: number): number => Math.hypot(p[at], p[at + 1], p[at + 2]);

describe('strands', () => {
  it('have every branching on the shell of its evolution time, in the direction of the parton that branches', () => {
    each((history, strands) => {
      const { t, emitter } = history.steps;
      for (let step = 0; step < t.length; step++) {
        const time = Math.log(history.head.hardScale / t[step]);
        expect(strands.stepRadius[step]).toBeCloseTo(radiusAt(strands.scale, time), 12);
        const wanted = directionOf(history, emitter[step]);
        const angle = angleBetween(strands.stepDirection, 3 * step, wanted, 0);
        expect(angle).toBeLessThan(1e-14);
      }
    });
  });

  it('put the hard scale on the inner shell and the end of the clock on the rim', () => {
    each((history, { scale }) => {
      expect(radiusAt(scale, 0)).toBe(scale.inner);
      expect(radiusAt(scale, Math.log(history.head.hardScale / history.head.tLow))).toBeCloseTo(1, 12);
    });
  });

  it('show true angles: rays of any two final partons part at the angle of their momenta', () => {
    each((history, strands) => {
      const rows = aliveEntries(history, history.steps.length);
      const a = new Float64Array(3);
      const b = new Float64Array(3);
      for (let k = 1; k < rows.length; k++) {
        strandDirection(a, 0, strands, strands.ofRow[rows[k - 1]], 1);
        strandDirection(b, 0, strands, strands.ofRow[rows[k]], 1);
        const truth = angleBetween(directionOf(history, rows[k - 1]), 0, directionOf(history, rows[k]), 0);
        expect(Math.abs(angleBetween(a, 0, b, 0) - truth)).toBeLessThan(3e-14);
      }
    });
  });

  it('start where their parent ended and end where their parton branches or at the rim', () => {
    each((history, strands) => {
      const lines = traceStrands(strands);
      for (let strand = 0; strand < strands.from.length; strand++) {
        const first = lines.start[strand];
        const last = lines.start[strand + 1] - 1;
        const row = strands.rows[strands.rowStart[strand]];
        const end = strands.rows[strands.rowStart[strand + 1] - 1];
        const madeBy = history.entries.madeBy[row];
        const endedBy = history.entries.endedBy[end];
        expect(length(lines.position, 3 * first)).toBeCloseTo(
          madeBy < 0 ? 0 : strands.stepRadius[madeBy],
          12,
        );
        expect(length(lines.position, 3 * last)).toBeCloseTo(
          endedBy < 0 ? 1 : strands.stepRadius[endedBy],
          12,
        );
        if (madeBy >= 0) {
          const apart = angleBetween(unit(lines.position, 3 * first), 0, strands.stepDirection, 3 * madeBy);
          expect(apart).toBeLessThan(1e-12);
        }
      }
    });
  });

  it('turn within the first tenth of their extent, along the shell at first and radially at last', () => {
    each((_history, strands) => {
      const { turns, turnStart } = strands;
      for (let strand = 0; strand < strands.from.length; strand++) {
        const turn = turnStart[strand];
        const angle = turns.angle[turn];
        const extent = strands.to[strand] - strands.from[strand];
        if (turnStart[strand + 1] - turn > 1 || angle < 1e-3 || extent < 1e-6) continue;
        const height = 0.1 * extent;
        const turnedAt = (share: number): number => {
          const at = new Float64Array(3);
          strandDirection(at, 0, strands, strand, strands.from[strand] + share * height);
          return angleBetween(at, 0, turns.direction, 3 * turn);
        };
        // The ellipse: rise h (1 - cos u) with angle a sin u; slope along the shell at first, radial at last.
        expect(turnedAt(1)).toBeCloseTo(angle, 10);
        expect(turnedAt(5)).toBeCloseTo(angle, 10);
        expect(turnedAt(1 - Math.cos(1))).toBeCloseTo(angle * Math.sin(1), 9);
        expect(turnedAt(1e-4) / angle / 1e-4).toBeGreaterThan(100);
        expect((angle - turnedAt(0.99)) / angle).toBeLessThan(1e-4);
      }
    });
  });

  it('hold every parton exactly once while it is there', () => {
    each((history, strands) => {
      for (const step of [-1, 0, Math.floor(history.steps.length / 2), history.steps.length - 1]) {
        if (step >= history.steps.length) continue;
        const radius = step < 0 ? strands.scale.inner : strands.stepRadius[step];
        const there = [...strands.from.keys()].filter(
          (strand) => strands.from[strand] <= radius && radius < strands.until[strand],
        );
        const alive = [...aliveEntries(history, step)].map((row) => strands.ofRow[row]);
        expect(there.sort((a, b) => a - b)).toEqual(alive.sort((a, b) => a - b));
      }
    });
  });

  it('are straight through a local recoil, which only makes a new row', () => {
    const history = teraEvent(3);
    const strands = layStrands(history);
    const rows = strands.rowStart.at(-1)!;
    expect(rows).toBeGreaterThan(strands.from.length);
    expect(strands.turns.angle.length).toBe(strands.from.length);
  });

  it('turn at a recoil that changes the direction', () => {
    const history = historyByHand(
      [
        { id: 1, px: 10, py: 0, pz: 0, e: 10, from: -1, madeBy: -1, endedBy: 0 },
        { id: -1, px: -10, py: 0, pz: 0, e: 10, from: -1, madeBy: -1, endedBy: 0 },
        { id: 1, px: 6, py: 1, pz: 0, e: 6.1, from: 0, madeBy: 0, endedBy: -1, role: roleCode('emitter') },
        { id: 21, px: 3, py: -2, pz: 0, e: 3.6, from: 0, madeBy: 0, endedBy: -1, role: roleCode('emission') },
        { id: -1, px: -9, py: 1, pz: 0, e: 9.1, from: 1, madeBy: 0, endedBy: -1, role: roleCode('recoiled') },
      ],
      [{ t: 100, emitter: 0, partner: 1, recoiler: 1, i: 2, j: 3, recoilerAfter: 4 }],
    );
    const strands = layStrands(history);
    const strand = strands.ofRow[1];
    expect(strands.ofRow[4]).toBe(strand);
    expect(strands.turnStart[strand + 1] - strands.turnStart[strand]).toBe(2);
    const at = new Float64Array(3);
    strandDirection(at, 0, strands, strand, strands.stepRadius[0]);
    expect(angleBetween(at, 0, directionOf(history, 1), 0)).toBeLessThan(1e-12);
    strandDirection(at, 0, strands, strand, 1);
    expect(angleBetween(at, 0, directionOf(history, 4), 0)).toBeLessThan(1e-12);
  });

  it('lay out an event without a step, one of 300 branchings, and one with damaged numbers', () => {
    const silent = ballEvent(silentEvent());
    expect(silent.strands.from.length).toBe(2);
    expect(silent.lines.start.at(-1)).toBeGreaterThanOrEqual(4);
    const dense = ballEvent(denseEvent());
    expect(dense.strands.stepRadius.length).toBeGreaterThan(300);
    const bad = teraEvent(5);
    bad.entries.px[3] = Number.NaN;
    bad.steps.t[1] = Number.NaN;
    bad.entries.py[4] = Number.POSITIVE_INFINITY;
    for (const event of [silent, dense, ballEvent(bad)]) {
      expect(event.lines.position.every(Number.isFinite)).toBe(true);
      expect([...event.strands.stepRadius].every((r) => r > 0 && r <= 1)).toBe(true);
    }
  });
});

describe('colour chains', () => {
  it('join at every step the strands that the replayed event joins', () => {
    each((history, strands) => {
      const chains = traceChains(history, strands);
      for (let step = -1; step < history.steps.length; step++) {
        const radius = step < 0 ? strands.scale.inner : strands.stepRadius[step];
        const now = [...chains.from.keys()]
          .filter((k) => chains.from[k] <= radius && radius < chains.to[k])
          .map((k) => `${chains.colour[k]}-${chains.anticolour[k]}`);
        const { colourEnd, anticolourEnd } = coloursAlive(history, step);
        const truth = [...colourEnd.keys()].map(
          (k) => `${strands.ofRow[colourEnd[k]]}-${strands.ofRow[anticolourEnd[k]]}`,
        );
        expect(now.sort()).toEqual(truth.sort());
      }
    });
  });
});

describe('the moment', () => {
  it('counts steps and partons as the replay does', () => {
    const event = ballEvent(teraEvent(7));
    const { stepTime } = event.strands;
    for (let step = 0; step < stepTime.length; step++) {
      const at = momentOf(event, stepTime[step]);
      expect(at).toEqual({ step, steps: stepTime.length, partons: aliveEntries(event.history, step).length });
      expect(momentOf(event, stepTime[step] - 1e-9).step).toBe(step - 1);
    }
  });
});

function unit(p: ArrayLike<number>, at: number): number[] {
  const size = length(p, at);
  return [p[at] / size, p[at + 1] / size, p[at + 2] / size];
}
