export {
  density,
  type End,
  exponent,
  halfRapidity,
  highestT,
  lowestT,
  openRange,
  rate,
} from './exponent.ts';
export { type FirstStep, firstStep } from './first-step.ts';
export { integrate, integratePieces, legendreRule } from './rules.ts';
