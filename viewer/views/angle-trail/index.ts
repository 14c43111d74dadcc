export { AngleTrailElement } from './angle-trail.ts';
export { openingMark } from './opening-mark.ts';
export {
  type AboveCount,
  type AngleAxis,
  aboveText,
  angleAxis,
  angleHeight,
  countAbove,
  numberStride,
  playheadPlace,
  type TrailLine,
  trailAngles,
  trailLines,
  trailPositions,
} from './trail-plot.ts';
