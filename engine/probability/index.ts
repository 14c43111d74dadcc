export { DipoleEnds } from './dipole-ends.ts';
export type { DipoleEnd } from './dipole-kernels.ts';
export { GapJudge } from './gap-judge.ts';
export type { GapProbabilities } from './gap-probabilities.ts';
export type { NotAssessable } from './kernel-settings.ts';
export type { StepConditionals } from './step-conditionals.ts';
