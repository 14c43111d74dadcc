import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aliveEntries, coloursAlive } from '../../../engine/index.ts';
import {
  type BallEvent,
  ballEvent,
  coneOf,
  firstCamera,
  projectionOf,
  projectPoints,
  stageOf,
} from '../../../viewer/layout/index.ts';
import {
  chainQuads,
  coneGlyphs,
  coneQuads,
  eventGlyphs,
  GLYPHS,
  glyphQuads,
  LINE_STYLES,
  measureAlong,
  type Quads,
  strandQuads,
} from '../../../viewer/scene/build/index.ts';
import { historyByHand } from '../../engine/history-by-hand.ts';
import { anyEvent, denseEvent, silentEvent, teraEvent } from '../layout/events.ts';

const each = (claim: (event: BallEvent) => void, runs = 40): void =>
  fc.assert(
    fc.property(anyEvent, (history) => claim(ballEvent(history))),
    { numRuns: runs, seed: 12 },
  );

const same = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-6;

function wellFormed({ columns, index }: Quads): void {
  const quads = index.length / 6;
  expect(Number.isInteger(quads)).toBe(true);
  for (const { size, values } of Object.values(columns)) {
    expect(values.length).toBe(4 * quads * size);
    expect(values.every(Number.isFinite)).toBe(true);
  }
  expect([...index].every((vertex) => vertex < 4 * quads)).toBe(true);
}

describe('geometry of the scene', () => {
  it('is whole and finite for any event, for none of its steps and for 300 branchings', () => {
    const check = (event: BallEvent): void => {
      for (const quads of [strandQuads(event), chainQuads(event), glyphQuads(eventGlyphs(event))])
        wellFormed(quads);
    };
    each(check, 20);
    check(ballEvent(silentEvent()));
    check(ballEvent(denseEvent()));
  });

  it('has four vertices a segment, uncovered at the radius at which they stand', () => {
    each((event) => {
      const { columns, index } = strandQuads(event);
      expect(index.length / 6).toBe(event.lines.radius.length - event.strands.from.length);
      const { values } = columns.aPoint;
      for (let vertex = 0; vertex < values.length / 3; vertex++) {
        const radius = Math.hypot(values[3 * vertex], values[3 * vertex + 1], values[3 * vertex + 2]);
        expect(same(radius, columns.aRadius.values[vertex])).toBe(true);
      }
    });
  });

  it('stays small: an event of 300 branchings has fewer than 20 000 quads', () => {
    const event = ballEvent(denseEvent());
    const quads = [strandQuads(event), chainQuads(event), glyphQuads(eventGlyphs(event))];
    expect(quads.reduce((sum, { index }) => sum + index.length / 6, 0)).toBeLessThan(20_000);
  });

  it('gives every parton one mark at its end at any time, and every step one ring', () => {
    each((event) => {
      const glyphs = eventGlyphs(event);
      const { steps } = event.history;
      for (let step = -1; step < steps.length; step++) {
        const radius = step < 0 ? event.strands.scale.inner : event.strands.stepRadius[step];
        const ends = glyphs.filter((g) => g.radius === -1 && g.from <= radius && radius < g.until);
        expect(ends.length).toBe(aliveEntries(event.history, step).length);
      }
      expect(glyphs.filter((g) => g.glyph === GLYPHS.ring).length).toBe(steps.length);
    });
  });

  it('marks a parton of no other style by a dot at each quarter of its ray and one at its end', () => {
    const history = historyByHand(
      [
        { id: 11, px: 10, py: 0, pz: 0, e: 10, from: -1, madeBy: -1, endedBy: -1 },
        { id: 1, px: -10, py: 0, pz: 0, e: 10, from: -1, madeBy: -1, endedBy: -1 },
      ],
      [],
    );
    const dots = eventGlyphs(ballEvent(history)).filter(({ glyph }) => glyph === GLYPHS.dot);
    const [start, end] = [0.1, 1];
    expect(dots.filter(({ radius }) => radius >= 0).map(({ radius }) => radius)).toEqual(
      [0.25, 0.5, 0.75].map((share) => expect.closeTo(start + share * (end - start), 9)),
    );
    expect(dots.filter(({ radius }) => radius === -1).length).toBe(1);
  });

  it('shows at any time as many chain arcs as there are dipoles', () => {
    each((event) => {
      const { aSpan } = chainQuads(event).columns;
      for (let step = -1; step < event.history.steps.length; step++) {
        const radius =
          Math.fround(step < 0 ? event.strands.scale.inner : event.strands.stepRadius[step]) + 1e-7;
        let arcs = 0;
        for (let vertex = 0; vertex < aSpan.values.length / 4; vertex += 4) {
          const [from, until, piece] = aSpan.values.subarray(4 * vertex, 4 * vertex + 3);
          if (from <= radius && radius < until && piece === 0) arcs++;
        }
        expect(arcs).toBe(coloursAlive(event.history, step).tag.length);
      }
    });
  });

  it('measures gaps along the path on the paper', () => {
    const event = ballEvent(teraEvent(9));
    const quads = strandQuads(event);
    const projection = projectionOf(firstCamera(event.strands), stageOf(900, 800));
    expect(measureAlong(quads, projection.rotation, projection.scale)).toBe(true);
    const { aPoint, aAlong, aLine } = quads.columns;
    let checked = 0;
    for (const { quad, count } of quads.runs) {
      if (aLine.values[8 * quad + 1] !== LINE_STYLES.antiquark) continue;
      let sum = 0;
      for (let k = quad; k < quad + count; k++) {
        const ends = Float64Array.from(aPoint.values.subarray(12 * k, 12 * k + 9));
        projectPoints(ends, projection, ends);
        expect(aAlong.values[4 * k]).toBeCloseTo(sum, 2);
        sum += Math.hypot(ends[6] - ends[0], ends[7] - ends[1]);
        expect(aAlong.values[4 * k + 3]).toBeCloseTo(sum, 2);
        checked++;
      }
    }
    expect(checked).toBeGreaterThan(3);
  });

  it('builds the cone of every step', () => {
    const event = ballEvent(teraEvent(9));
    const stage = stageOf(900, 800);
    const projection = projectionOf(firstCamera(event.strands), stage);
    for (let step = 0; step < event.history.steps.length; step++) {
      const cone = coneOf(event.history, event.strands, step, 1);
      const lines = coneQuads(cone, projection, stage.size);
      wellFormed(lines);
      expect(lines.index.length).toBeGreaterThan(0);
      const ends = coneGlyphs(event, cone, projection.scale, stage.size).filter(
        (g) => g.glyph !== GLYPHS.tip,
      );
      expect(ends.length).toBe(3);
    }
    expect(coneQuads(null, projection, 1).index.length).toBe(0);
  });
});
