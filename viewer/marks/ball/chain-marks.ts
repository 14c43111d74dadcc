import { greatCircle, onCircle, strandDirection } from '../../layout/index.ts';
import type { Mark } from '../display-list.ts';
import { mix } from '../tint.ts';
import { type Layer, type Plate, place, SAME_RADIUS } from './plate.ts';

/** Distance between the dots of a colour chain on the paper, and their radius [px at size 1]. */
export const CHAIN = { spacing: 5, dot: 1.12, behindDot: 0.85, behindFade: 0.45 } as const;

/** Longest step along a chain when its length on the paper is added up [rad]. */
const SAMPLE = 0.05;

/** The colour dipoles of this moment: ink dots, evenly spaced on the paper, along great circles on the current shell. */
export function chainLayers(plate: Plate): Layer[] {
  const { chains, strands } = plate.event;
  const layers: Layer[] = [];
  const a = new Float64Array(3);
  const b = new Float64Array(3);
  const now = plate.shell + SAME_RADIUS;
  for (let k = 0; k < chains.from.length; k++) {
    if (chains.from[k] > now || now >= chains.to[k]) continue;
    strandDirection(a, 0, strands, chains.colour[k], plate.shell);
    strandDirection(b, 0, strands, chains.anticolour[k], plate.shell);
    layers.push(...arcDots(plate, a, b));
  }
  return layers;
}

interface Stretch {
  depth: number;
  readonly behind: boolean;
  readonly points: number[];
}

// Dots of one side of the ball share a mark, a few at a time so that lines may pass between them.
function arcDots(plate: Plate, a: Float64Array, b: Float64Array): Layer[] {
  const spacing = CHAIN.spacing * plate.stage.size;
  const tangent = new Float64Array(3);
  const angle = greatCircle(tangent, 0, a, 0, b, 0);
  const count = Math.max(2, Math.ceil(angle / SAMPLE));
  const direction = new Float64Array(3);
  const stretches: Stretch[] = [];
  let before = place(plate, a, plate.shell);
  let left = spacing / 2;
  for (let k = 1; k <= count; k++) {
    onCircle(direction, 0, a, 0, tangent, 0, (angle * k) / count);
    const here = place(plate, direction, plate.shell);
    const dx = here[0] - before[0];
    const dy = here[1] - before[1];
    const length = Math.sqrt(dx * dx + dy * dy);
    let run = left;
    for (; run < length; run += spacing) {
      const share = run / length;
      const depth = before[2] + (here[2] - before[2]) * share;
      let stretch = stretches[stretches.length - 1];
      if (!stretch || stretch.behind !== depth < 0 || stretch.points.length >= 12) {
        stretch = { depth, behind: depth < 0, points: [] };
        stretches.push(stretch);
      }
      stretch.points.push(before[0] + dx * share, before[1] + dy * share);
    }
    left = run - length;
    before = here;
  }
  return stretches.map((stretch) => ({ depth: stretch.depth + 0.001, marks: [dotsOf(plate, stretch)] }));
}

function dotsOf(plate: Plate, { behind, points }: Stretch): Mark {
  const { palette } = plate;
  return {
    kind: 'dots',
    points,
    radius: (behind ? CHAIN.behindDot : CHAIN.dot) * plate.stage.size,
    fill: { tint: behind ? mix(palette.ink, palette.lit, CHAIN.behindFade) : palette.ink },
  };
}
