export { ClockElement } from './clock.ts';
export { type AxisTick, axisTicks, type ScaleWords, scaleAt, scaleWords } from './scale-axis.ts';
export { nearestStep, numberedSteps } from './step-numbers.ts';
