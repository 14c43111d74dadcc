import type { Camera, Stage } from '../../layout/index.ts';
import type { Mark } from '../display-list.ts';
import { plain } from '../lettering.ts';
import { LIT_EDGE, type PartonStyle, tintOf } from '../parton-style.ts';
import { widthOf } from '../text-width.ts';
import { mix } from '../tint.ts';
import { triangle } from './arrow-marks.ts';
import { letterSize } from './letter-size.ts';
import type { Plate } from './plate.ts';
import { strokeLine } from './strand-marks.ts';

/** Which of the two keys are open. */
export interface KeyFold {
  readonly left: boolean;
  readonly right: boolean;
}

const LEFT_KEY: readonly [string, string][] = [
  ['quark', 'quark, arrow outward'],
  ['antiquark', 'antiquark, arrow inward'],
  ['gluon', 'gluon, doubled'],
  ['chain', 'colour chain, now'],
  ['tick', 'tick: partner pays energy'],
  ['net', '30° net about the beam'],
];
const RIGHT_KEY: readonly [string, string][] = [
  ['opening', 'opening angle'],
  ['partner', 'partner angle'],
  ['birth', 'birth angle'],
  ['turn', "emitter's turn"],
];

/** Height of a line of the keys [px], and the room left under them. */
export const keyPitch = (size: number): number => 1.52 * letterSize(size);

/**
 * Which keys stand clear of the ball: a legend that covers it does more harm than good.
 */
export function keysFit(stage: Stage, camera: Camera): KeyFold {
  const { x, y, scale } = { ...stage, scale: stage.radius * camera.zoom };
  const pitch = keyPitch(stage.size);
  const centreX = x + camera.panX * stage.radius;
  const centreY = y + camera.panY * stage.radius;
  const clear = (rows: readonly [string, string][], left: boolean): boolean =>
    rows.every(([, words], k) => {
      const width = KEY_SAMPLE + KEY_GAP + widthOf(plain(words), letterSize(stage.size));
      const atX = left ? width : stage.width - width;
      const atY = stage.height - KEY_FOOT - pitch * (rows.length - k);
      const dx = left ? Math.max(0, centreX - atX) : Math.max(0, atX - centreX);
      const dy = atY - centreY;
      return dx * dx + dy * dy > scale * scale * KEY_OVERLAP * KEY_OVERLAP;
    });
  return { left: clear(LEFT_KEY, true), right: clear(RIGHT_KEY, false) };
}

// Length of a sample, its distance to the words, the room that folding needs [px], and how far into the ball, where nothing
// of the event lies but the last turns, a line of words may reach.
const KEY_SAMPLE = 42;
const KEY_GAP = 12;
const KEY_FOOT = 20;
const KEY_OVERLAP = 0.93;

/** Keys to the marks in the two lower corners. @param foot Room left under them [px]. */
export function keyMarks(plate: Plate, open: KeyFold, foot: number): Mark[] {
  const { stage, palette } = plate;
  const size = letterSize(stage.size);
  const pitch = keyPitch(stage.size);
  const sample = KEY_SAMPLE;
  const marks: Mark[] = [];
  const column = (rows: readonly [string, string][], left: boolean): void => {
    rows.forEach(([kind, words], k) => {
      const y = stage.height - foot - pitch * (rows.length - k) + 0.4 * pitch;
      const x = left ? 0 : stage.width - sample;
      marks.push(...keySample(plate, kind, x, y, sample));
      marks.push({
        kind: 'text',
        x: left ? sample + KEY_GAP : stage.width - sample - KEY_GAP,
        y: y + 0.335 * size,
        runs: plain(words),
        size,
        tint: palette.ink,
        anchor: left ? 'start' : 'end',
        halo: { tint: palette.ground, width: 2 },
      });
    });
  };
  if (open.left) column(LEFT_KEY, true);
  if (open.right) column(RIGHT_KEY, false);
  return marks;
}

function keySample(plate: Plate, kind: string, x: number, y: number, length: number): Mark[] {
  const { palette } = plate;
  const { size } = plate.stage;
  const points = [x, y, x + length, y];
  const ink = (width: number, dash?: readonly number[]): Mark => ({
    kind: 'polyline',
    points,
    stroke: { tint: palette.ink, width: width * size, ...(dash ? { dash: dash.map((d) => d * size) } : {}) },
  });
  switch (kind) {
    case 'quark':
    case 'antiquark':
    case 'gluon':
      return partonSample(plate, kind, points);
    case 'chain': {
      const dots: number[] = [];
      for (let at = 1; at < length; at += 5 * size) dots.push(x + at, y);
      return [{ kind: 'dots', points: dots, radius: 1.12 * size, fill: { tint: palette.ink } }];
    }
    case 'tick':
      return [
        {
          kind: 'polyline',
          points,
          stroke: { tint: mix(palette.ink, palette.ground, 0.42), width: 2.2 * size },
        },
        {
          kind: 'polyline',
          points: [x + length / 2, y - 6.5 * size, x + length / 2, y + 6.5 * size],
          stroke: { tint: palette.ink, width: 1.25 * size },
        },
      ];
    case 'net':
      return netSample(plate, x, y, length);
    case 'partner':
      return [ink(1.4, [7, 4])];
    case 'birth':
      return [ink(1.3, [8, 3.2, 1.4, 3.2])];
    case 'turn':
      return [
        ink(1.9),
        {
          kind: 'polyline',
          closed: true,
          points: [x, y, x + 8 * size, y - 3.4 * size, x + 8 * size, y + 3.4 * size],
          fill: { tint: palette.ink },
        },
      ];
    default:
      return [ink(1.7)];
  }
}

function partonSample(plate: Plate, style: PartonStyle, points: number[]): Mark[] {
  const { palette } = plate;
  const { size } = plate.stage;
  const [x0, y, x1] = points;
  const tint = tintOf(palette, style);
  const width = (style === 'gluon' ? 4.6 : 3.6) * size;
  const marks: Mark[] = strokeLine(style, points, {
    width,
    tint,
    paper: palette.ground,
    edge: 0,
    along: 0,
    size,
  });
  if (style === 'gluon') return marks;
  const anti = style === 'antiquark';
  const head = { length: 12 * size, half: 5.2 * size };
  const look = { tint, paper: palette.ground, edge: anti ? LIT_EDGE * size : 0, width: 1.4 * size };
  return [...marks, ...triangle((x0 + x1) / 2, y, anti ? -1 : 1, 0, head, anti, look)];
}

function netSample(plate: Plate, x: number, y: number, length: number): Mark[] {
  const { size } = plate.stage;
  const stroke = { tint: plate.palette.hairline, width: 0.9 * size };
  const bow = (at: number, lean: number): number[] =>
    [-1, -0.5, 0, 0.5, 1].flatMap((v) => [x + at + lean * (1 - v * v) * 2.5 * size, y + 6 * v * size]);
  const arc = Array.from({ length: 13 }, (_, k) => {
    const u = k / 6 - 1;
    return [x + (length * k) / 12, y - 2.5 * size + 6.5 * size * u * u];
  }).flat();
  return [arc, bow(0.36 * length, -1), bow(0.64 * length, 1)].map((points) => ({
    kind: 'polyline' as const,
    points,
    stroke,
  }));
}
