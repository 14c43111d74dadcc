import { cos, sin } from '../../../engine/math/index.ts';
import type { ArcText, Halo, Mark, Text } from '../display-list.ts';
import type { Run } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { CAPITAL } from './letter-size.ts';
import { type Box, boxAt, isFar, type LabelWish } from './place-labels.ts';
import type { Plate } from './plate.ts';

/** A label that wants a place. */
export interface Label {
  readonly wish: LabelWish;
  readonly runs: readonly Run[];
  readonly size: number;
  readonly tint: string;
  readonly paper: string;
  /** Whether a line leads from the mark to the label. */
  readonly leader?: 'always' | 'far';
  /** Keeps its place free without being drawn. */
  readonly unseen?: boolean;
}

/** Labels as marks, one a label, so that a label is the same number of the list in every picture: empty without a place. */
export function drawLabels(
  plate: Plate,
  labels: readonly Label[],
  places: ReadonlyMap<string, number>,
): Mark[] {
  return labels.map((label) => {
    const at = places.get(label.wish.key);
    return at === undefined || label.unseen ? NOTHING : drawLabel(plate, label, at);
  });
}

const NOTHING: Mark = { kind: 'group', name: '', marks: [] };

function drawLabel(plate: Plate, label: Label, at: number): Mark {
  const box = boxAt(label.wish, at);
  const halo: Halo = { tint: label.paper, width: 2.2 };
  const text: Text = {
    kind: 'text',
    x: box.x,
    y: box.y + box.height / 2 + (CAPITAL * label.size) / 2,
    runs: label.runs,
    size: label.size,
    tint: label.tint,
    anchor: 'start',
    halo,
  };
  if (label.leader !== 'always' && !(label.leader === 'far' && isFar(at))) return text;
  const { x, y } = label.wish;
  const toX = Math.max(box.x, Math.min(box.x + box.width, x));
  const toY = Math.max(box.y, Math.min(box.y + box.height, y));
  const stroke = { tint: plate.palette.ink, width: 1.1 * plate.stage.size };
  const line: Mark = { kind: 'polyline', points: [x, y, toX, toY], stroke };
  return { kind: 'group', name: '', marks: [line, text] };
}

/** Boxes along a text on a curve, one every 12 px. */
export function arcBoxes(mark: ArcText): Box[] {
  const length = widthOf(mark.runs, mark.size);
  const count = Math.ceil(length / 12);
  const side = 1.2 * mark.size;
  const middle = mark.radius + CAPITAL * 0.5 * mark.size;
  return Array.from({ length: count }, (_, k) => {
    const angle = mark.angle + (((k + 0.5) / count - 0.5) * length) / mark.radius;
    return {
      x: mark.x + middle * cos(angle) - side / 2,
      y: mark.y + middle * sin(angle) - side / 2,
      width: side,
      height: side,
    };
  });
}

/** Boxes that a mark of lettering covers; shapes cover nothing. */
export function boxesOf(mark: Mark): Box[] {
  if (mark.kind === 'group') return mark.marks.flatMap(boxesOf);
  if (mark.kind !== 'text') return [];
  const width = widthOf(mark.runs, mark.size);
  const x = mark.x - (mark.anchor === 'start' ? 0 : mark.anchor === 'end' ? width : width / 2);
  return [{ x: x - 2, y: mark.y - 0.85 * mark.size, width: width + 4, height: 1.1 * mark.size }];
}
