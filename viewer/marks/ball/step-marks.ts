import type { Mark } from '../display-list.ts';
import { depthFade, LIT_EDGE } from '../parton-style.ts';
import { mix } from '../tint.ts';
import { type Layer, type Plate, SAME_RADIUS } from './plate.ts';

/** Radius of a branching's ring [px at size 1]: smaller where there are many. */
export const ringRadius = (steps: number): number => (steps > 150 ? 2.2 : steps > 60 ? 2.7 : 3.2);

/** Rings of the branchings, and the dot of the hard process. */
export function stepLayers(plate: Plate): { future: Layer[]; past: Layer[] } {
  const { palette, steps, shell, event } = plate;
  const { stepRadius } = event.strands;
  const { size } = plate.stage;
  const radius = ringRadius(stepRadius.length) * size;
  const future: Layer[] = [];
  const past: Layer[] = [];
  for (let step = 0; step < stepRadius.length; step++) {
    const x = steps[3 * step];
    const y = steps[3 * step + 1];
    const depth = steps[3 * step + 2];
    if (stepRadius[step] > shell + SAME_RADIUS) {
      const stroke = { tint: mix(palette.hairline, palette.shade, 0.25), width: 1 * size };
      future.push({
        depth: depth + 0.09,
        marks: [{ kind: 'circle', x, y, radius: 0.8 * radius, fill: { tint: palette.shade }, stroke }],
      });
    } else {
      past.push({ depth: depth + 0.09, marks: ring(plate, x, y, radius, depth) });
    }
  }
  const { x, y } = plate.projection;
  past.push({
    depth: 0.12,
    marks: [
      { kind: 'circle', x, y, radius: (4.4 + LIT_EDGE) * size, fill: { tint: palette.lit } },
      { kind: 'circle', x, y, radius: 4.4 * size, fill: { tint: palette.ink } },
    ],
  });
  return { future, past };
}

function ring(plate: Plate, x: number, y: number, radius: number, depth: number): Mark[] {
  const { palette } = plate;
  const { size } = plate.stage;
  const tint = mix(palette.ink, palette.lit, 0.8 * depthFade(depth));
  return [
    {
      kind: 'circle',
      x,
      y,
      radius: radius + 0.5 * size + 0.8 * LIT_EDGE * size,
      fill: { tint: palette.lit },
    },
    { kind: 'circle', x, y, radius, fill: { tint: palette.lit }, stroke: { tint, width: 1.45 * size } },
  ];
}

/** Highlighted branchings: the one under the pointer, and the selected one, in the wash. */
export function selectionMarks(plate: Plate): Mark[] {
  const { palette, steps, cone, hover } = plate;
  const { size } = plate.stage;
  const radius = ringRadius(plate.event.strands.stepRadius.length) * size;
  const marks: Mark[] = [];
  const at = (step: number): { x: number; y: number } => ({ x: steps[3 * step], y: steps[3 * step + 1] });
  if (hover >= 0 && hover < steps.length / 3 && hover !== cone?.step) {
    marks.push({
      kind: 'circle',
      ...at(hover),
      radius: radius + 3.4 * size,
      stroke: { tint: palette.ink, width: 1.2 * size },
    });
  }
  if (cone) {
    const outer = 8.4 * size;
    marks.push(
      { kind: 'circle', ...at(cone.step), radius: outer + 2 * size, fill: { tint: palette.lit } },
      {
        kind: 'circle',
        ...at(cone.step),
        radius: outer,
        fill: { tint: palette.wash },
        stroke: { tint: palette.ink, width: 2.1 * size },
      },
      {
        kind: 'circle',
        ...at(cone.step),
        radius: 2.9 * size,
        fill: { tint: palette.lit },
        stroke: { tint: palette.ink, width: 1.5 * size },
      },
    );
  }
  return marks;
}
