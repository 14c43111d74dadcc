export { antennaAverage, antennaShare } from './antenna.ts';
export {
  type FirstEmissionRatio,
  scalarToGluons,
  scalarToQuarks,
  vectorToQuarks,
} from './first-emission.ts';
export { kernelGluon, kernelGluonToQuarks, kernelQuark } from './kernels.ts';
export { MassivePoint, type VelocityFactors } from './massive-kernels.ts';
export { quarkMass } from './quark-mass.ts';
export {
  b0,
  b1,
  type CouplingChoice,
  type CouplingOptions,
  LandauPoleError,
  RunningCoupling,
  softGluonK,
} from './running-coupling.ts';
