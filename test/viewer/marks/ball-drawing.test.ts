import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { History } from '../../../engine/index.ts';
import { ballEvent, type Camera, coneOf, firstCamera, stageOf } from '../../../viewer/layout/index.ts';
import {
  type BallView,
  ballDrawing,
  ballMarks,
  boxesOf,
  letter,
  type Mark,
  palette,
  plateOf,
  svgDocument,
} from '../../../viewer/marks/index.ts';
import { anyEvent, denseEvent, silentEvent, teraEvent } from '../layout/events.ts';
import { allElements, readElements, wholeText } from './elements.ts';

const OPTIONS = { keys: { left: true, right: true }, corners: true };

function viewOf(history: History, step: number, own: Partial<BallView> = {}): BallView {
  const event = ballEvent(history);
  const known = step >= 0 && step < history.steps.length;
  return {
    event,
    camera: firstCamera(event.strands),
    stage: stageOf(920, 830),
    time: known ? event.strands.stepTime[step] : event.strands.scale.end,
    palette: palette.light,
    cone: known ? coneOf(history, event.strands, step, 0.5) : null,
    hover: -1,
    ...own,
  };
}

const svgOf = (view: BallView): string => svgDocument(ballDrawing(view, OPTIONS));

describe('the ball as a file', () => {
  it('is well formed, and holds its lettering as text in named fonts', () => {
    for (const view of [viewOf(teraEvent(9), 9), viewOf(silentEvent(), -1), viewOf(denseEvent(), 100)]) {
      const document = readElements(svgOf(view));
      const texts = allElements(document).filter(({ name }) => name === 'text');
      const words = texts.map(wholeText);
      expect(words).toContain('direction = momentum');
      expect(words).toContain('radius L = ln(t0/t)');
      expect(words.some((text) => /^now {2}√t = [\d.]+ GeV$/.test(text))).toBe(true);
      expect(words.some((text) => text.startsWith('rim'))).toBe(true);
      for (const { attributes } of texts) {
        expect(attributes['font-family']).toMatch(/^'Source (Sans 3|Serif 4)', .*serif$/);
        expect(Number(attributes['font-size'])).toBeGreaterThanOrEqual(12);
      }
      const [svg] = document.children;
      expect(svg.children.slice(0, 2).map(({ name }) => name)).toEqual(['title', 'desc']);
      expect(svg.children[0].text).not.toBe('');
    }
  });

  it('carries no style that a strict content policy would drop, and refers to nothing outside', () => {
    const svg = svgOf(viewOf(teraEvent(9), 9));
    expect(svg.match(/\sstyle=|<style|<script|<image|\son\w+=/)).toBe(null);
    const references = [...svg.matchAll(/(?:href="|url\()([^")]*)/g)].map(([, target]) => target);
    for (const target of references) {
      expect(target).toMatch(/^#/);
      expect(svg.includes(`id="${target.slice(1)}"`)).toBe(true);
    }
  });

  it('survives labels and processes that were written to break it', () => {
    const history = teraEvent(9);
    const process = { ...history.head.process, name: '</svg>&"<\u0001]]>' };
    const view = viewOf({ ...history, head: { ...history.head, process } }, 3);
    const [svg] = readElements(svgOf(view)).children;
    expect(svg.children[1].text).toContain('</svg>&"<\ufffd]]>');
  });

  it('is the same bytes for the same view', () => {
    const first = svgOf(viewOf(teraEvent(4), 2));
    const again = svgOf(viewOf(teraEvent(4), 2));
    expect(again === first).toBe(true);
  });

  it('has no number that is not one, whatever the event and the clock', () => {
    fc.assert(
      fc.property(
        anyEvent,
        fc.integer({ min: -1, max: 8 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (history, step, share) => {
          const view = viewOf(history, step);
          const svg = svgOf({ ...view, time: share * view.event.strands.scale.end });
          expect(svg.match(/NaN|Infinity|undefined/)).toBe(null);
        },
      ),
      { seed: 3, numRuns: 25 },
    );
  });

  it('draws what is to come faintly and before what has happened', () => {
    const view = viewOf(teraEvent(9), 6);
    const groups = ballMarks(plateOf(view)).map((mark) => (mark.kind === 'group' ? mark.name : ''));
    expect(groups).toEqual(['ground', 'wash', 'to-come', 'happened', 'selection']);
    const strokes = (name: string): Set<string> => {
      const found = new Set<string>();
      const visit = (mark: Mark): void => {
        if (mark.kind === 'group') mark.marks.forEach(visit);
        else if (mark.kind === 'polyline' && mark.stroke) found.add(mark.stroke.tint);
      };
      for (const mark of ballMarks(plateOf(view)))
        if (mark.kind === 'group' && mark.name === name) visit(mark);
      return found;
    };
    for (const tint of strokes('to-come')) expect(lightness(tint)).toBeGreaterThan(0.6);
    expect(Math.min(...[...strokes('happened')].map(lightness))).toBeLessThan(0.4);
  });

  it('at the start shows the hard partons on the inner shell, and all of the rest to come', () => {
    const view = viewOf(teraEvent(9), -1, { time: 0 });
    const words = allElements(readElements(svgOf(view))).map(({ text }) => text);
    expect(words).toContain('hard process');
    expect(words).toContain('2 partons');
    expect(words).toContain(
      `${view.event.history.steps.length} of ${view.event.history.steps.length} steps to come`,
    );
  });
});

describe('the lettering', () => {
  const cameras: fc.Arbitrary<Camera> = fc.record({
    azimuth: fc.double({ min: -3, max: 3, noNaN: true }),
    elevation: fc.double({ min: -1.5, max: 1.5, noNaN: true }),
    zoom: fc.constantFrom(1, 1, 3, 12),
    panX: fc.double({ min: -1, max: 1, noNaN: true }),
    panY: fc.double({ min: -1, max: 1, noNaN: true }),
  });
  const sizes = fc.constantFrom([920, 830], [744, 520], [360, 420]);
  const dense = denseEvent();
  const events = fc.oneof({ weight: 5, arbitrary: anyEvent }, { weight: 1, arbitrary: fc.constant(dense) });

  it('never lays one label over another', () => {
    fc.assert(
      fc.property(
        events,
        cameras,
        sizes,
        fc.integer({ min: -1, max: 20 }),
        (history, camera, [width, height], step) => {
          const stage = stageOf(width, height);
          const keys = { left: width > 700, right: width > 700 };
          const { still } = letter(plateOf(viewOf(history, step, { camera, stage })), {
            keys,
            corners: true,
            foot: 20,
          });
          const boxes = still.flatMap(boxesOf);
          for (const [k, a] of boxes.entries()) {
            for (const b of boxes.slice(0, k)) {
              // Boxes have a margin of two pixels on either side and the room of descenders, which digits lack.
              const over =
                a.x + 2 < b.x + b.width - 2 &&
                b.x + 2 < a.x + a.width - 2 &&
                a.y + 4 < b.y + b.height - 4 &&
                b.y + 4 < a.y + a.height - 4;
              expect(over).toBe(false);
            }
          }
        },
      ),
      { seed: 9, numRuns: 60 },
    );
  });

  it('always numbers the selected step where it is on the paper', () => {
    const history = denseEvent();
    for (const step of [3, 50, 200]) {
      const view = viewOf(history, step);
      const { places } = letter(plateOf(view), OPTIONS);
      expect(places.has(`step ${step}`)).toBe(true);
    }
  });

  it('keeps every label in its place while only the clock moves', () => {
    const view = viewOf(teraEvent(9), -1);
    const first = letter(plateOf({ ...view, time: 3 }), OPTIONS);
    const later = letter(plateOf({ ...view, time: 9 }), { ...OPTIONS, fixed: first.places });
    const placed = (marks: readonly Mark[]): string[] =>
      marks.flatMap((mark) => (mark.kind === 'text' ? [`${mark.x} ${mark.y} ${mark.runs[0].text}`] : []));
    const before = new Set(placed(first.still));
    const moved = placed(later.still).filter((text) => /^\S+ \S+ \d+$/.test(text) && !before.has(text));
    expect(moved).toEqual([]);
  });
});

function lightness(tint: string): number {
  const [r, g, b] = [1, 3, 5].map((k) => Number.parseInt(tint.slice(k, k + 2), 16) / 255);
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}
