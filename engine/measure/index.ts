export { hardBirthAngles } from './births.ts';
export {
  MEASURE_DEFINITIONS,
  type MeasureDefinition,
  type MeasureKey,
  type SymbolPiece,
} from './definitions.ts';
export { type DipoleInvariants, dipoleInvariants, makeDipoleInvariants } from './dipole-invariants.ts';
export { durham, jetCount } from './durham.ts';
export { finalMomenta } from './final-momenta.ts';
export { type FractionSpectrum, FractionSpectrumCollector } from './fraction-spectrum.ts';
export { findHump, type HumpWindow, peakInWindow } from './hump.ts';
export { measureSteps } from './measure-steps.ts';
export { type Estimate, RatioMean } from './ratio-mean.ts';
export { DEFAULT_Y_CUTS, SampleSummary, type SampleSummaryResult } from './sample-summary.ts';
export {
  FLOAT_MEASURES,
  type FloatMeasure,
  INTEGER_MEASURES,
  type IntegerMeasure,
  StepMeasures,
} from './step-measures.ts';
export { type Thrust, thrust } from './thrust.ts';
export { worstCoherence } from './worst-coherence.ts';
