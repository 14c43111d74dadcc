import type { Mark } from '../display-list.ts';
import { angleLabels, endLabels } from './cone-labels.ts';
import { cornerMarks } from './corners.ts';
import { type KeyFold, keyMarks } from './keys.ts';
import { arcBoxes, boxesOf, drawLabels, type Label } from './label.ts';
import { selectedBox, spreadInk } from './label-ink.ts';
import { LabelGrid, placeLabels } from './place-labels.ts';
import type { Plate } from './plate.ts';
import {
  freestName,
  freestRay,
  NAME,
  RAY,
  rimName,
  shellLabels as shellLabelsOf,
  shellName,
} from './shell-labels.ts';
import { stepNumbers } from './step-numbers.ts';

/** What labels need besides the plate. */
export interface LabelOptions {
  /** Whether the keys in the lower corners are open; null where they are left out. */
  readonly keys: KeyFold | null;
  /** Corner texts that name the ball and say where the clock stands. */
  readonly corners: boolean;
  /** Places in the last picture, by key, to be kept where they are still good. */
  readonly before?: ReadonlyMap<string, number>;
  /** Places to be used as they are: nothing but the clock has changed. */
  readonly fixed?: ReadonlyMap<string, number>;
  /** Room left under the keys [px]. */
  readonly foot?: number;
  /** Most steps that are numbered, all where absent: fewer while the ball is turned, so that it turns smoothly. */
  readonly most?: number;
}

/** The lettering of a plate: what changes with the clock alone, apart from the rest. */
export interface Lettering {
  readonly still: Mark[];
  readonly clock: Mark[];
  readonly places: ReadonlyMap<string, number>;
}

/** All lettering of the ball, no label over another. */
export function letter(plate: Plate, options: LabelOptions): Lettering {
  const { width, height } = plate.stage;
  const corners = options.corners ? cornerMarks(plate) : { still: [], clock: [] };
  const keys = options.keys ? keyMarks(plate, options.keys, options.foot ?? 0) : [];
  const labels = labelsOf(plate, options.most ?? Infinity);
  let places = options.fixed;
  let name = places?.get(NAME) ?? 0;
  let shellLabels = shellLabelsOf(plate, places?.get(RAY) ?? 0);
  if (!places) {
    const grid = new LabelGrid(width, height);
    spreadInk(grid, plate);
    for (const mark of [...corners.still, ...corners.clock, ...keys]) {
      for (const box of boxesOf(mark)) grid.take(box);
    }
    for (const box of [...arcBoxes(rimName(plate)), ...selectedBox(plate)]) grid.take(box);
    name = freestName(plate, grid, options.before?.get(NAME));
    for (const box of arcBoxes(shellName(plate, name))) grid.take(box);
    const ray = freestRay(plate, grid, options.before?.get(RAY));
    shellLabels = shellLabelsOf(plate, ray);
    const found = placeLabels(
      grid,
      [...shellLabels, ...labels].map(({ wish }) => wish),
      options.before,
    );
    places = found.set(RAY, ray).set(NAME, name);
  }
  return {
    still: [
      ...corners.still,
      ...keys,
      rimName(plate),
      ...drawLabels(plate, [...shellLabels, ...labels], places),
    ],
    clock: [...corners.clock, shellName(plate, name)],
    places,
  };
}

// The number of the selected step first, then what its cone shows, then the other numbers.
function labelsOf(plate: Plate, most: number): Label[] {
  const numbers = stepNumbers(plate, most);
  return [...numbers.splice(0, plate.cone ? 1 : 0), ...endLabels(plate), ...angleLabels(plate), ...numbers];
}

/** The lettering that follows the clock while nothing else changes, in the places that it has. */
export function letterClock(plate: Plate, places: ReadonlyMap<string, number>): Mark[] {
  return [...cornerMarks(plate).clock, shellName(plate, places.get(NAME) ?? 0)];
}
