export { ElectronPositron } from './electron-positron.ts';
export { type AngularCoefficients, angularCoefficients } from './electroweak.ts';
export type { HardProcess } from './hard-process.ts';
export { ScalarDecay } from './scalar-decay.ts';
