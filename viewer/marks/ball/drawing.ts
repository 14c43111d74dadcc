import type { Drawing, Mark } from '../display-list.ts';
import { arrowLayers, endLayers, tickLayers } from './arrow-marks.ts';
import { chainLayers } from './chain-marks.ts';
import { coneLayers, washMarks } from './cone-marks.ts';
import { momentText, stepName } from './corners.ts';
import { groundMarks } from './ground.ts';
import { type LabelOptions, letter } from './labels.ts';
import { type BallView, type Layer, type Plate, plateOf } from './plate.ts';
import { selectionMarks, stepLayers } from './step-marks.ts';
import { strandLayers } from './strand-marks.ts';

/** Everything of the ball but its lettering, far marks first: a pure function of the plate. */
export function ballMarks(plate: Plate): Mark[] {
  const strands = strandLayers(plate);
  const arrows = arrowLayers(plate);
  const steps = stepLayers(plate);
  const future = sortByDepth([...strands.future, ...arrows.future, ...steps.future]);
  const past = sortByDepth([
    ...strands.past,
    ...arrows.past,
    ...steps.past,
    ...tickLayers(plate),
    ...chainLayers(plate),
    ...endLayers(plate),
    ...coneLayers(plate),
    shellCircle(plate),
  ]);
  return [
    { kind: 'group', name: 'ground', marks: groundMarks(plate) },
    { kind: 'group', name: 'wash', marks: washMarks(plate) },
    { kind: 'group', name: 'to-come', marks: future },
    { kind: 'group', name: 'happened', marks: past },
    { kind: 'group', name: 'selection', marks: selectionMarks(plate) },
  ];
}

/**
 * The ball as it stands as a drawing of its own, lettering included.
 *
 * @param margin Paper round it [px].
 */
export function ballDrawing(view: BallView, options: LabelOptions, margin = 0): Drawing {
  const plate = plateOf(view);
  const { still, clock } = letter(plate, options);
  const { head } = view.event.history;
  return {
    width: view.stage.width,
    height: view.stage.height,
    margin,
    ground: view.palette.ground,
    title: `Event ${head.event}, ${momentText(plate)}`,
    description: describe(plate),
    marks: [...ballMarks(plate), { kind: 'group', name: 'lettering', marks: [...still, ...clock] }],
  };
}

function describe(plate: Plate): string {
  const { head } = plate.event.history;
  const { moment, cone } = plate;
  const selected = cone ? ` Step ${stepName(cone.step)} is selected.` : '';
  return (
    `Parton shower in a ball: radius is evolution time ln(t0/t), direction is momentum. ` +
    `${head.process.name} at ${head.sqrtS} GeV, ${moment.partons} partons, ${moment.steps} steps.${selected}`
  );
}

function shellCircle(plate: Plate): Layer {
  const { projection, palette, shell, stage } = plate;
  const { x, y, scale } = projection;
  const stroke = { tint: palette.ink, width: 1.7 * stage.size };
  return { depth: -0.004, marks: [{ kind: 'circle', x, y, radius: shell * scale, stroke }] };
}

function sortByDepth(layers: Layer[]): Mark[] {
  return layers.sort((a, b) => a.depth - b.depth).flatMap((layer) => layer.marks);
}
