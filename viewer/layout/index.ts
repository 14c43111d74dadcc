export { type BallEvent, ballEvent, finenessAt, type Moment, momentOf, retrace } from './ball-event.ts';
export {
  type Camera,
  clampCamera,
  MAX_ELEVATION,
  orbit,
  type Projection,
  pan,
  projectionOf,
  projectPoints,
  type Stage,
  stageOf,
  viewRotation,
  ZOOM_RANGE,
  zoomAbout,
} from './camera.ts';
export { type Chains, traceChains } from './chains.ts';
export { type Cone, coneOf, coneSilhouette, type Ring, ringPoints } from './cone.ts';
export { angleBetween, anyNormal, dot, greatCircle, onCircle, unitVector } from './directions.ts';
export { firstCamera } from './first-camera.ts';
export { pickPoint } from './pick.ts';
export {
  INNER_RADIUS,
  type RadiusScale,
  radiusAt,
  radiusScale,
  rootScaleAt,
  stepTimes,
  timeAtRadius,
} from './radius-scale.ts';
export { type Shell, scaleText, shells, threeDigits } from './shells.ts';
export { type StrandLines, traceStrands } from './strand-lines.ts';
export { layStrands, type Strands, strandDirection, type Turns } from './strands.ts';
export { TURN_FRACTION, turnedBy, turnPoints } from './turn.ts';
