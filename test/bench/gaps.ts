import {
  createGrower,
  GapJudge,
  type GrowSettings,
  type History,
  HistoryBatch,
  resolveSettings,
} from '../../engine/index.ts';
import { calibrationTurn } from './calibration.ts';

/** Speed of judging events. */
export interface GapFigures {
  readonly label: string;
  readonly gapsPerEvent: number;
  readonly microsecondsPerGap: number;
  /** Distributions of z and of end and channel, per step. */
  readonly microsecondsPerStep: number;
  /** Time per gap over time per turn of the calibration loop, both the fastest of the same rounds. */
  readonly gapRatio: number;
  readonly stepRatio: number;
  /** From the first event's call until every table that the sample needs is there. */
  readonly tablesMs: number;
}

const ROUNDS = 10;
const WARM_UP = 3;

/** No-emission probabilities and conditional distributions of events that are in memory, one thread. */
export function gapBench(label: string, some: Partial<GrowSettings>, events: number): GapFigures {
  const grower = createGrower(resolveSettings(some));
  const batch = new HistoryBatch(grower.sample);
  for (let stream = 0; stream < events; stream++) grower.grow(batch, stream);
  const histories: History[] = Array.from({ length: events }, (_, n) => batch.view(n));
  const judge = new GapJudge();
  const time = (work: (history: History) => void): number => {
    const start = process.hrtime.bigint();
    for (const history of histories) work(history);
    return Number(process.hrtime.bigint() - start);
  };
  const gapsOf = (history: History): void => {
    judge.gapsOf(history);
  };
  const conditionalsOf = (history: History): void => {
    judge.conditionalsOf(history);
  };
  const cold = time(gapsOf);
  let calibration = Infinity;
  let perGap = Infinity;
  let perStep = Infinity;
  for (let round = 0; round < ROUNDS; round++) {
    const turn = calibrationTurn();
    const gaps = time(gapsOf);
    const steps = time(conditionalsOf);
    if (round < WARM_UP) continue;
    calibration = Math.min(calibration, turn);
    perGap = Math.min(perGap, gaps / (batch.steps.length + events));
    perStep = Math.min(perStep, steps / batch.steps.length);
  }
  return {
    label,
    gapsPerEvent: (batch.steps.length + events) / events,
    microsecondsPerGap: perGap / 1e3,
    microsecondsPerStep: perStep / 1e3,
    gapRatio: perGap / calibration,
    stepRatio: perStep / calibration,
    tablesMs: cold / 1e6,
  };
}

/** The table of settings that the speed is quoted for. */
export function gapTable(): GapFigures[] {
  const heavy: Partial<GrowSettings> = { masses: true };
  return [
    gapBench('kt, 91 GeV', {}, 1000),
    gapBench('virtuality, 91 GeV', { order: 'virtuality' }, 1000),
    gapBench('kt, two loops, rescaled, matched, 91 GeV', MATCHED, 1000),
    gapBench('kt, heavy quarks, 91 GeV', heavy, 1000),
    gapBench('virtuality, heavy quarks, 91 GeV', { ...heavy, order: 'virtuality' }, 1000),
    gapBench('kt, heavy quarks, published factors, 91 GeV', { ...heavy, velocityFactors: 'published' }, 1000),
    gapBench('kt, 1000 GeV', { energy: 1000 }, 400),
    gapBench('virtuality, heavy quarks, 1000 GeV', { ...heavy, order: 'virtuality', energy: 1000 }, 400),
    gapBench('kt, 10000 GeV', { energy: 10_000 }, 200),
  ];
}

const MATCHED: Partial<GrowSettings> = {
  coupling: { kind: 'two-loop' },
  cmw: true,
  firstEmission: 'matched',
};
