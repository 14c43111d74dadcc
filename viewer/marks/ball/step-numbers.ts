import { plain } from '../lettering.ts';
import { widthOf } from '../text-width.ts';
import { stepName } from './corners.ts';
import type { Label } from './label.ts';
import { CAPITAL, letterSize } from './letter-size.ts';
import { type Plate, SAME_RADIUS } from './plate.ts';
import { ringRadius } from './step-marks.ts';

// In events with more steps those to come have a place but no number yet: nobody looks for one among hundreds.
const MOST_AHEAD = 60;

/** Numbers of the steps: the selected first, then the one under the pointer, then the earliest. @param most At most so many. */
export function stepNumbers(plate: Plate, most: number): Label[] {
  const { palette, steps, cone, hover, shell } = plate;
  const { stepRadius } = plate.event.strands;
  const count = stepRadius.length;
  const first = [cone?.step ?? -1, hover].filter(
    (step, k, all) => step >= 0 && step < count && all.indexOf(step) === k,
  );
  const order = [...first];
  for (let step = 0; step < count; step++) if (!first.includes(step)) order.push(step);
  return order.slice(0, most).map((step) => {
    const chosen = step === cone?.step;
    const past = stepRadius[step] <= shell + SAME_RADIUS;
    const line = plain(stepName(step), chosen || step === hover);
    const size = letterSize(plate.stage.size) * (chosen ? 1.1 : 1);
    return {
      wish: {
        key: `step ${step}`,
        x: steps[3 * step],
        y: steps[3 * step + 1],
        clearance: (chosen ? 12 : ringRadius(count) + 3.6) * plate.stage.size,
        width: widthOf(line, size),
        height: CAPITAL * size + 2,
        must: first.includes(step),
        far: chosen,
      },
      runs: line,
      size,
      unseen: !past && count > MOST_AHEAD && !first.includes(step),
      tint: past || chosen ? palette.ink : palette.faint,
      paper: past ? palette.lit : palette.shade,
    };
  });
}
