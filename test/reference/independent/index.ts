export { branch } from './branching.ts';
export { CA, CF, GAMMA_Z, M_BOTTOM, M_CHARM, MZ, SIN2, TR } from './constants.ts';
export {
  b0,
  b1,
  type Coupling,
  type CouplingKind,
  couplingFor,
  implicitCoupling,
  integratedCoupling,
} from './coupling.ts';
export { durhamTransitions, jetCount } from './durham.ts';
export { angularCoefficients, asymmetry, flavourFractions } from './electroweak.ts';
export { gluonKernel, type Kernel, pairKernel, quarkKernel } from './kernels.ts';
export {
  type Estimate,
  EventMean,
  type MeasuredStep,
  Observables,
  StepFraction,
  Y_CUTS,
} from './observables.ts';
export {
  density,
  type End,
  exponent,
  type FirstStep,
  firstStep,
  halfRapidity,
  highestT,
  integrate,
  lowestT,
  openRange,
  rate,
} from './quadrature/index.ts';
export { Generator } from './random.ts';
export { PlainShower, type Settings, type ShowerEvent } from './shower.ts';
export { chiSquareSurvival, countsPValue, kolmogorov, uniformPValue } from './statistics.ts';
export { thrustByPlanes, thrustBySubsets } from './thrust.ts';
export { add, angle, cross, dot, type Four, product, scale, space, type Three, unit } from './vectors.ts';
