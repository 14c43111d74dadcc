export {
  arrowRadii,
  endMark,
  radialSlope,
  rayStart,
  rowAt,
} from './arrow-marks.ts';
export { CHAIN } from './chain-marks.ts';
export { endsOf, RING, RING_DASH, RING_PIECES, TIP_LENGTH, turnPath, washShare } from './cone-marks.ts';
export { momentText, stepName } from './corners.ts';
export { ballDrawing, ballMarks } from './drawing.ts';
export { netLines, SHELL_GAP } from './ground.ts';
export { type KeyFold, keyPitch, keysFit } from './keys.ts';
export { boxesOf } from './label.ts';
export {
  type LabelOptions,
  type Lettering,
  letter,
  letterClock,
} from './labels.ts';
export { letterSize } from './letter-size.ts';
export { type Box, boxAt, LabelGrid, type LabelWish, PLACES, placeLabels } from './place-labels.ts';
export { type BallView, type Plate, plateOf, projectSteps, SAME_RADIUS } from './plate.ts';
export { ringRadius, selectionMarks } from './step-marks.ts';
