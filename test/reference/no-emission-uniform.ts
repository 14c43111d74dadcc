import {
  createGrower,
  GapJudge,
  type GapProbabilities,
  type GrowSettings,
  HistoryBatch,
  resolveSettings,
} from '../../engine/index.ts';
import { Generator, uniformPValue } from './independent/index.ts';

const CHANNELS: readonly string[] = ['q_qg', 'g_gg', 'g_qq'];

/** How the judge is made to differ from the sample, to prove that it is noticed. */
export interface Fault {
  /** What the sample is grown with instead. */
  readonly grown?: Partial<GrowSettings>;
  /** Factor on the kernel of each channel in the judge, CHANNELS in their order. */
  readonly kernels?: readonly [number, number, number];
}

/** p-values of the uniform numbers of physics.md section 9 by name and split, and how many numbers stand behind each. */
export interface Uniformity {
  readonly pValues: ReadonlyMap<string, number>;
  readonly counts: ReadonlyMap<string, number>;
  /** Numbers that could not be computed. */
  readonly missing: number;
}

/**
 * Grow `events` and compute from their rows, by the engine's quadrature:
 *
 * - u_t of every step, split by its number, by the number of partons before it and by the channel of the step before;
 * - gap: Delta of every step and V Delta of the last gap;
 * - clock c: exp(-Lambda_c) of every step of channel c since the last one of that channel, V exp(-Lambda_c) at the end;
 * - u_z by channel and u_channel by step number, where `conditional`.
 */
export function judgeUniformity(
  settings: Partial<GrowSettings>,
  seed: number,
  events: number,
  conditional: boolean,
  fault: Fault = {},
): Uniformity {
  const grower = createGrower(resolveSettings({ ...settings, ...fault.grown, seed }));
  // judged by what the head says, which a fault makes a lie
  const { shower } = createGrower(resolveSettings({ ...settings, seed })).sample;
  const batch = new HistoryBatch({ ...grower.sample, shower });
  const judge = new GapJudge();
  const random = new Generator(seed + 1);
  const numbers = new Map<string, number[]>();
  let missing = 0;
  const put = (name: string, u: number): void => {
    if (Number.isNaN(u)) {
      missing++;
      return;
    }
    const list = numbers.get(name);
    if (list) list.push(u);
    else numbers.set(name, [u]);
  };
  for (let stream = 0; stream < events; stream++) {
    batch.clear();
    grower.grow(batch, stream);
    const history = batch.view(0);
    const { steps, channels } = history;
    const gaps = judge.gapsOf(history);
    if (!gaps.assessable) throw new Error(gaps.reason);
    const [toStep, toLow] = exponents(gaps, fault.kernels ?? [1, 1, 1]);
    const clocks = [0, 0, 0];
    for (let gap = 0; gap <= steps.length; gap++) {
      for (let c = 0; c < 3; c++) clocks[c] += toStep[3 * gap + c];
      const exponent = toStep[3 * gap] + toStep[3 * gap + 1] + toStep[3 * gap + 2];
      if (gap === steps.length) {
        if (exponent > 0) put('gap', random.uniform() * Math.exp(-exponent));
        for (let c = 0; c < 3; c++)
          if (clocks[c] > 0) put(`clock ${CHANNELS[c]}`, random.uniform() * Math.exp(-clocks[c]));
        break;
      }
      const channel = CHANNELS.indexOf(channels[steps.channel[gap]]);
      put('gap', Math.exp(-exponent));
      put(`clock ${CHANNELS[channel]}`, Math.exp(-clocks[channel]));
      clocks[channel] = 0;
      const none = Math.exp(-(toLow[3 * gap] + toLow[3 * gap + 1] + toLow[3 * gap + 2]));
      const u = (Math.exp(-exponent) - none) / (1 - none);
      put('u_t', u);
      put(`u_t step ${Math.min(gap, 4)}`, u);
      if (gap > 0) put(`u_t after ${channels[steps.channel[gap - 1]]}`, u);
    }
    if (!conditional) continue;
    const conditionals = judge.conditionalsOf(history);
    if (!conditionals.assessable) throw new Error(conditionals.reason);
    for (let step = 0; step < steps.length; step++) {
      const u = conditionals.shareBelow[step] + random.uniform() * conditionals.shareOwn[step];
      put('u_channel', u);
      put(`u_channel step ${Math.min(step, 3)}`, u);
      put(`u_z ${channels[steps.channel[step]]}`, conditionals.fractionBelow[step]);
      put(`u_z step ${Math.min(step, 3)}`, conditionals.fractionBelow[step]);
    }
  }
  return {
    pValues: new Map([...numbers].map(([name, list]) => [name, uniformPValue(list)])),
    counts: new Map([...numbers].map(([name, list]) => [name, list.length])),
    missing,
  };
}

/** Exponents of all gaps by channel, the kernels multiplied. */
function exponents(
  { channelExponent, channelExponentToLow }: GapProbabilities,
  kernels: readonly [number, number, number],
): [Float64Array, Float64Array] {
  return [
    channelExponent.map((e, n) => e * kernels[n % 3]),
    channelExponentToLow.map((e, n) => e * kernels[n % 3]),
  ];
}
