import { describe, expect, it } from 'vitest';
import {
  durham,
  finalMomenta,
  growEvent,
  type History,
  jetCount,
  measureSteps,
  resolveSettings,
  SampleSummary,
  thrust,
} from '../../../engine/index.ts';
import { historyByHand, role } from '../history-by-hand.ts';

const KEYS = [
  'partons',
  'steps',
  'steps.q_qg',
  'steps.g_gg',
  'steps.g_qq',
  'steps.g_cc',
  'steps.g_bb',
  'oneMinusThrust',
  'rejectedPerStep',
  'noBranching',
  'coherence.aboveBirth',
  'coherence.abovePartner',
  'durham.R2',
  'durham.R3',
  'durham.R4',
  'durham.R5',
  'lnInverseX',
];

const settings = resolveSettings({ energy: 500, cutoff: 0.7, seed: 11 });
const events: History[] = Array.from({ length: 600 }, (_, n) => growEvent(settings, n));
/** The same events with weights that go with the number of steps, so that they matter. */
const weighted = events.map((history, n) => ({
  ...history,
  head: { ...history.head, weight: 0.5 + (n % 7) + 0.1 * history.steps.length },
}));

const summarise = (sample: readonly History[], yCuts?: readonly number[]) => {
  const summary = new SampleSummary(yCuts);
  for (const history of sample) summary.add(history);
  return summary.result();
};

/** Mean over events with weights, and its error, in two passes. */
const overEvents = (sample: readonly History[], value: (history: History) => number) =>
  overSteps(sample, (history) => [value(history), 1]);

/** Ratio of two sums over events, and its error, in two passes. */
const overSteps = (sample: readonly History[], parts: (history: History) => readonly [number, number]) => {
  const pairs = sample.map((history) => parts(history).map((x) => x * history.head.weight));
  const below = pairs.reduce((sum, [, b]) => sum + b, 0);
  const mean = pairs.reduce((sum, [a]) => sum + a, 0) / below;
  const n = sample.length;
  const scatter = pairs.reduce((sum, [a, b]) => sum + (a - mean * b) ** 2, 0);
  return { mean, error: Math.sqrt(((n / (n - 1)) * scatter) / below ** 2) };
};

const count = (length: number, holds: (n: number) => boolean) =>
  Array.from({ length }, (_, n) => n).filter(holds).length;

describe.each([
  ['events of weight 1', events],
  ['weighted events', weighted],
])('summary of %s', (_, sample) => {
  const result = summarise(sample);
  const agrees = (found: { mean: number; error: number }, expected: { mean: number; error: number }) => {
    expect(Math.abs(found.mean - expected.mean)).toBeLessThan(1e-12 * Math.abs(expected.mean) + 1e-15);
    expect(Math.abs(found.error - expected.error)).toBeLessThan(1e-10 * expected.error + 1e-15);
  };

  it('has exactly the keys of the command line, each a mean, error and count', () => {
    expect(Object.keys(result).sort()).toEqual([...KEYS].sort());
    for (const key of KEYS.slice(0, 12) as (keyof typeof result)[])
      expect(Object.keys(result[key])).toEqual(['mean', 'error', 'count']);
    for (const key of ['durham.R2', 'durham.R5'] as const) {
      expect(Object.keys(result[key]).sort()).toEqual(['0.001', '0.003', '0.01', '0.03', '0.1']);
      expect(Object.keys(result[key]['0.01'])).toEqual(['mean', 'error', 'count']);
    }
    expect(Object.keys(result.lnInverseX)).toEqual(['edges', 'counts', 'peak']);
    expect(Object.keys(result.lnInverseX.peak)).toEqual(['mean', 'error']);
  });

  it('gives multiplicities as two passes over the events do', () => {
    agrees(
      result.partons,
      overEvents(sample, (history) => history.steps.length + 2),
    );
    agrees(
      result.steps,
      overEvents(sample, (history) => history.steps.length),
    );
    agrees(
      result.noBranching,
      overEvents(sample, (history) => (history.steps.length === 0 ? 1 : 0)),
    );
    for (const channel of ['q_qg', 'g_gg', 'g_qq'] as const)
      agrees(
        result[`steps.${channel}`],
        overEvents(sample, ({ steps, channels }) =>
          count(steps.length, (step) => channels[steps.channel[step]] === channel),
        ),
      );
    for (const [key, id] of [
      ['steps.g_cc', 4],
      ['steps.g_bb', 5],
    ] as const) {
      agrees(
        result[key],
        overEvents(sample, ({ steps, entries, channels }) =>
          count(
            steps.length,
            (step) => channels[steps.channel[step]] === 'g_qq' && entries.id[steps.j[step]] === -id,
          ),
        ),
      );
      expect(result[key].mean).toBeGreaterThan(0);
    }
    expect(result.steps.count).toBe(sample.length);
  });

  it('gives thrust and jet rates as two passes do', () => {
    agrees(
      result.oneMinusThrust,
      overEvents(sample, (history) => 1 - thrust(finalMomenta(history)).value),
    );
    for (const [key, n] of [
      ['durham.R2', 2],
      ['durham.R3', 3],
      ['durham.R4', 4],
      ['durham.R5', 5],
    ] as const)
      for (const yCut of [0.1, 0.01, 0.001])
        agrees(
          result[key][String(yCut)],
          overEvents(sample, (history) =>
            jetCount(durham(finalMomenta(history), history.head.sqrtS), yCut) === n ? 1 : 0,
          ),
        );
  });

  it('gives fractions of steps with errors over events, and counts the steps', () => {
    const total = sample.reduce((sum, history) => sum + history.steps.length, 0);
    for (const [key, angle] of [
      ['coherence.aboveBirth', 'birthAngle'],
      ['coherence.abovePartner', 'partnerAngle'],
    ] as const) {
      agrees(
        result[key],
        overSteps(sample, (history) => {
          const measures = measureSteps(history);
          const above = (step: number) => measures.openingAngle[step] > measures[angle][step];
          return [count(history.steps.length, above), history.steps.length];
        }),
      );
      expect(result[key].count).toBe(total);
    }
    agrees(
      result.rejectedPerStep,
      overSteps(sample, ({ steps }) => [
        steps.rejected.subarray(0, steps.length).reduce((a, b) => a + b, 0),
        steps.length,
      ]),
    );
    expect(result.rejectedPerStep.count).toBe(total);
  });

  it('fills the spectrum with every final parton', () => {
    const partons = sample.reduce(
      (sum, history) => sum + history.head.weight * (history.steps.length + 2),
      0,
    );
    const filled = result.lnInverseX.counts.reduce((a, b) => a + b);
    expect(Math.abs(filled / partons - 1)).toBeLessThan(1e-12);
  });
});

describe('summary', () => {
  it('takes other resolutions, named as JavaScript prints them, and refuses one that is not above 0', () => {
    expect(Object.keys(summarise(events.slice(0, 3), [0.0000001, 0.5])['durham.R3']).sort()).toEqual([
      '0.5',
      '1e-7',
    ]);
    expect(() => new SampleSummary([0])).toThrow(RangeError);
    expect(() => new SampleSummary([NaN])).toThrow(RangeError);
  });

  it('leaves out what is not recorded', () => {
    const bare = events.slice(0, 5).map((history) => ({
      ...history,
      steps: { ...history.steps, rejected: history.steps.rejected.map(() => -1) },
    }));
    expect(summarise(bare).rejectedPerStep).toEqual({ mean: NaN, error: NaN, count: 0 });
    expect(JSON.parse(JSON.stringify(summarise(bare))).rejectedPerStep.mean).toBeNull();
  });

  it('counts birth angles in coherent branching only for emitters that come from a step', () => {
    const rows = [
      { id: 1, px: 0, py: 0, pz: 50, e: 50, m: 0, endedBy: 0, role: role('hard') },
      { id: 1, px: 0, py: 0, pz: 30, e: 30, m: 0, madeBy: 0, from: 0, role: role('emitter') },
      { id: 21, px: 1, py: 0, pz: 20, e: 20, m: 0, madeBy: 0, endedBy: 1, from: 0, role: role('emission') },
      { id: 21, px: 1, py: 0, pz: 9, e: 9, m: 0, madeBy: 1, from: 2, role: role('emitter') },
      { id: 21, px: 0, py: 0, pz: 11, e: 11, m: 0, madeBy: 1, from: 2, role: role('emission') },
      { id: -1, px: 0, py: 0, pz: -50, e: 50, m: 0, role: role('hard') },
    ];
    const steps = (kind: number) => [
      { kind, t: 4, emitter: 0, i: 1, j: 2 },
      { kind, t: 1, emitter: 2, i: 3, j: 4 },
    ];
    const coherent = summarise([historyByHand(rows, steps(4))]);
    // 0.11 rad after 0.05 rad
    expect(coherent['coherence.aboveBirth']).toEqual({ mean: 1, error: NaN, count: 1 });
    expect(coherent['coherence.abovePartner'].count).toBe(0);
    const dipole = summarise([historyByHand(rows, steps(0))]);
    expect(dipole['coherence.aboveBirth']).toEqual({ mean: 0.5, error: NaN, count: 2 });
  });

  it('is not moved by an event without momenta', () => {
    const empty = historyByHand([], []);
    const result = summarise([...events.slice(0, 20), empty]);
    expect(result.oneMinusThrust.count).toBe(20);
    expect(result.oneMinusThrust.mean).toBeCloseTo(summarise(events.slice(0, 20)).oneMinusThrust.mean, 14);
  });
});
