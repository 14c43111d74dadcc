export { ElectronPositron } from './electron-positron.ts';
export { type AngularCoefficients, angularCoefficients } from './electroweak.ts';
