export { GapJudge } from './gap-judge.ts';
export type { GapProbabilities } from './gap-probabilities.ts';
export type { NotAssessable } from './kernel-settings.ts';
