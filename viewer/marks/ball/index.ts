export {
  arrowRadii,
  endMark,
  radialSlope,
  rayStart,
  rowAt,
} from './arrow-marks.ts';
export { CHAIN } from './chain-marks.ts';
export { endsOf, RING, RING_DASH, RING_PIECES, turnPath, washShares } from './cone-marks.ts';
export { type KeyFold, keyPitch, momentText } from './corners.ts';
export { ballDrawing, ballMarks } from './drawing.ts';
export { netLines, SHELL_GAP } from './ground.ts';
export {
  angleText,
  boxesOf,
  type LabelOptions,
  type Lettering,
  letter,
  letterClock,
} from './labels.ts';
export { type Box, boxAt, LabelGrid, type LabelWish, PLACES, placeLabels } from './place-labels.ts';
export { type BallView, type Plate, plateOf, projectSteps, SAME_RADIUS } from './plate.ts';
export { ringRadius } from './step-marks.ts';
export { letterSize } from './letter-size.ts';
