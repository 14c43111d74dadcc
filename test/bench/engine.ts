import { createGrower, type GrowSettings, HistoryBatch, resolveSettings } from '../../engine/index.ts';
import { calibrationTurn } from './calibration.ts';

export interface EngineFigures {
  readonly label: string;
  readonly stepsPerEvent: number;
  readonly eventsPerSecond: number;
  readonly nsPerStep: number;
  readonly nsPerTrial: number;
  readonly bytesPerEvent: number;
  /** ns per step over ns per turn of the calibration loop, both the fastest of the same rounds. */
  readonly stepRatio: number;
}

const ROUNDS = 12;
const WARM_UP = 4;

/** Speed of growing events into a batch, all columns recorded, one thread; the fastest round counts. */
export function engineBench(label: string, some: Partial<GrowSettings>, events: number): EngineFigures {
  const grower = createGrower(resolveSettings(some));
  const batch = new HistoryBatch(grower.sample);
  let best = Infinity;
  let calibration = Infinity;
  let steps = 0;
  let trials = 0;
  let bytes = 0;
  for (let round = 0; round < ROUNDS; round++) {
    const turn = calibrationTurn();
    steps = 0;
    trials = 0;
    bytes = 0;
    let spent = 0n;
    for (let event = 0; event < events; event += 64) {
      batch.clear();
      const start = process.hrtime.bigint();
      for (let n = event; n < event + 64; n++) grower.grow(batch, n);
      spent += process.hrtime.bigint() - start;
      steps += batch.steps.length;
      for (let n = 0; n < batch.steps.length; n++) trials += 1 + batch.steps.rejected[n];
      bytes += batch.entries.length * ROW_BYTES.entries + batch.steps.length * ROW_BYTES.steps;
    }
    if (round < WARM_UP) continue;
    best = Math.min(best, Number(spent));
    calibration = Math.min(calibration, turn);
  }
  const grown = 64 * Math.ceil(events / 64);
  return {
    label,
    stepsPerEvent: steps / grown,
    eventsPerSecond: (1e9 * grown) / best,
    nsPerStep: best / steps,
    nsPerTrial: best / trials,
    bytesPerEvent: bytes / grown,
    stepRatio: best / steps / calibration,
  };
}

/** Bytes of one row of all columns in memory. */
const ROW_BYTES = { entries: 5 * 8 + 7 * 4 + 1, steps: 11 * 8 + 9 * 4 + 2 };

/** The table of settings that the speed is quoted for. */
export function engineTable(): EngineFigures[] {
  const figures: EngineFigures[] = [];
  for (const energy of [91.1876, 1000, 10000])
    for (const order of ['kt', 'virtuality'] as const)
      figures.push(
        engineBench(`${order}, one loop, ${energy} GeV`, { energy, order }, energy > 5000 ? 2000 : 8000),
      );
  figures.push(
    engineBench('kt, two loops, 1000 GeV', { energy: 1000, coupling: { kind: 'two-loop' } }, 8000),
  );
  return figures;
}
