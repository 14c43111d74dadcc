import type { Bins, Channel } from './correlations.ts';
import { binOfStep, competitorsAfter, stepProbabilities } from './correlations.ts';
import { engineEvents } from './engine-sample.ts';
import { chiSquareSurvival, type Settings } from './independent/index.ts';

/** Fewest expected entries of a bin that is compared by itself. */
const FEWEST = 10;

/** A comparison of counts: chi-square probability and the number of bins behind it. */
export interface Comparison {
  readonly pValue: number;
  readonly bins: number;
  readonly events: number;
}

/** What a sample is judged as, and, to prove that it is noticed, what it is grown with instead. */
export interface Sample {
  readonly settings: Settings;
  readonly process: 'ee' | 'scalar-gg';
  readonly seed: number;
  readonly events: number;
  readonly fault?: Partial<Settings>;
}

const samples = ({ settings, process, seed, events, fault }: Sample, leastSteps: number) => {
  const { quark, ...rest } = { ...settings, ...fault };
  return engineEvents({ ...rest, quark: process === 'ee' ? quark : null, process, seed }, events, leastSteps);
};

/** Density of the first step in (ln kT, rapidity), one chi-square per channel. */
export function judgeFirstDensity(sample: Sample, bins: Bins): Map<Channel, Comparison> {
  const counts = new Map<Channel, Float64Array>();
  let expected: Map<Channel, Float64Array> | null = null;
  for (const history of samples(sample, 0)) {
    if (expected === null) {
      const competitors = competitorsAfter(history, -1, sample.settings);
      expected = stepProbabilities(competitors, history.head.hardScale, bins);
      for (const [channel, column] of expected) counts.set(channel, new Float64Array(column.length));
    }
    if (history.steps.length === 0) continue;
    const column = counts.get(history.channels[history.steps.channel[0]] as Channel);
    const bin = binOfStep(history, 0, bins);
    if (column && bin >= 0) column[bin]++;
  }
  const out = new Map<Channel, Comparison>();
  for (const [channel, column] of expected ?? [])
    out.set(
      channel,
      compare(
        counts.get(channel) ?? column,
        column.map((p) => p * sample.events),
        sample.events,
      ),
    );
  return out;
}

/**
 * Second steps by channel and bin, for each bin of the first step by itself, one chi-square each.
 *
 * Every event adds the probabilities of its own state after the first step, so the counts in a bin spread a little less
 * than Poisson's: the chi-square is on the safe side.
 */
export function judgeSecondStep(sample: Sample, first: Bins, second: Bins): Map<number, Comparison> {
  const groups = new Map<number, { counts: Float64Array; expected: Float64Array; events: number }>();
  const size = (second.kT.length - 1) * (second.rapidity.length - 1);
  for (const history of samples(sample, 1)) {
    const { steps, channels } = history;
    const group = binOfStep(history, 0, first);
    if (group < 0) continue;
    const sums = groups.get(group) ?? {
      counts: new Float64Array(3 * size),
      expected: new Float64Array(3 * size),
      events: 0,
    };
    groups.set(group, sums);
    sums.events++;
    for (const [channel, column] of stepProbabilities(
      competitorsAfter(history, 0, sample.settings),
      steps.t[0],
      second,
    ))
      column.forEach((p, bin) => {
        sums.expected[ORDER.indexOf(channel) * size + bin] += p;
      });
    if (steps.length < 2) continue;
    const bin = binOfStep(history, 1, second);
    if (bin >= 0) sums.counts[ORDER.indexOf(channels[steps.channel[1]] as Channel) * size + bin]++;
  }
  return new Map(
    [...groups].map(([group, { counts, expected, events }]) => [group, compare(counts, expected, events)]),
  );
}

const ORDER: readonly Channel[] = ['q_qg', 'g_gg', 'g_qq'];

/** Counts against expectations; what is rare, and what fell nowhere, makes one more bin. */
function compare(counts: Float64Array, expected: Float64Array, events: number): Comparison {
  let chiSquare = 0;
  let bins = 0;
  let [restCount, restExpected] = [events, events];
  counts.forEach((count, n) => {
    if (expected[n] < FEWEST) return;
    chiSquare += (count - expected[n]) ** 2 / expected[n];
    restCount -= count;
    restExpected -= expected[n];
    bins++;
  });
  if (restExpected >= FEWEST) {
    chiSquare += (restCount - restExpected) ** 2 / restExpected;
    bins++;
  }
  return { pValue: chiSquareSurvival(chiSquare, bins - 1), bins, events };
}
