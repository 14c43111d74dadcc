import type { History } from '../history/index.ts';
import { exp, log } from '../math/index.ts';
import { CHANNEL_COUNT, dipoleExponents, GLUON } from './dipole-exponents.ts';
import { type DipoleKernels, LIGHT } from './dipole-kernels.ts';
import { KEPT, type LiveDipoles } from './live-dipoles.ts';

/** PDG number of bottom. */
const HEAVIEST_QUARK = 5;

// scratch, not reentrant
const sums = new Float64Array(CHANNEL_COUNT);

/**
 * No-emission probabilities of an event's gaps.
 *
 * Element n belongs to the gap before step n, the last one to the gap after the last step, in which nothing happened
 * down to the lowest t. An exponent is the expected number of branchings in a gap. NaN where a gap cannot be judged: a
 * momentum or colour end is missing, t rises, a parton or its mass is none of the kernels', a dipole is heavier than the
 * event, or the event broke off before its end.
 */
export interface GapProbabilities {
  readonly assessable: true;
  /** Delta(t_prev, t), in the last element Delta(t_last, t_low). */
  readonly delta: Float64Array;
  /** Delta(t_prev, t_low): probability that nothing more would have happened. */
  readonly deltaToLow: Float64Array;
  /** -ln of the two. */
  readonly exponent: Float64Array;
  readonly exponentToLow: Float64Array;
  /** Their parts by channel: CHANNELS in their order for gap 0, then for gap 1 and so on. */
  readonly channelExponent: Float64Array;
  readonly channelExponentToLow: Float64Array;
}

/** Memory for the gaps of an event, without values. */
function makeGaps(gaps: number): GapProbabilities {
  return {
    assessable: true,
    delta: new Float64Array(gaps),
    deltaToLow: new Float64Array(gaps),
    exponent: new Float64Array(gaps),
    exponentToLow: new Float64Array(gaps),
    channelExponent: new Float64Array(CHANNEL_COUNT * gaps),
    channelExponentToLow: new Float64Array(CHANNEL_COUNT * gaps),
  };
}

/** No-emission probabilities of an event's gaps, its dipoles followed by `dipoles`. */
export function judgeGaps(history: History, kernels: DipoleKernels, dipoles: LiveDipoles): GapProbabilities {
  const { head, steps } = history;
  const gaps = steps.length + 1;
  const out = makeGaps(gaps);
  dipoles.begin(history);
  let from = head.hardScale;
  // dipoles keep their exponents up to the end of the gap before, unless its rates were others
  let stale = true;
  for (let gap = 0; gap < gaps; gap++) {
    const last = gap === steps.length;
    const to = last ? head.tLow : steps.t[gap];
    const first = gap === 0 && kernels.first() !== null;
    const ended = !last || head.status === 'complete';
    const judged = ended && to <= from && demandDipoles(dipoles, history, kernels, first);
    if (judged) {
      sumGap(out, gap, history, kernels, dipoles, { lnFrom: log(from), lnTo: log(to), last, first, stale });
    } else blank(out, gap);
    stale = !judged || first;
    if (!last) dipoles.advance(gap);
    from = to;
  }
  return out;
}

/**
 * Whether the kernels are those of every dipole: its ends are gluons or quarks up to bottom with the masses that the
 * kernels give them, and the tables reach its Q^2.
 *
 * @param first whether the first emission's matrix element corrects the rates.
 */
export function demandDipoles(
  dipoles: LiveDipoles,
  { entries, head }: History,
  kernels: DipoleKernels,
  first: boolean,
): boolean {
  if (dipoles.broken > 0) return false;
  const { energy } = kernels.settings;
  const highest = energy * energy;
  const recordsMass = head.columns.entries.includes('m');
  for (let n = 0; n < dipoles.count; n++) {
    const q2 = dipoles.q2[n];
    if (!(q2 > 0 && q2 <= highest * (1 + 1e-9))) return false;
    for (const row of [dipoles.colourRow[n], dipoles.anticolourRow[n]]) {
      const id = entries.id[row];
      if (id !== GLUON && !(id !== 0 && Math.abs(id) <= HEAVIEST_QUARK)) return false;
      if (recordsMass && !(Math.abs(entries.m[row] - kernels.massOf(id)) <= 1e-9 * energy)) return false;
      // the first emission's matrix element is that of two massless partons with all the energy
      if (first && kernels.kindOf(id) !== LIGHT) return false;
    }
    if (first && q2 < highest * (1 - 1e-9)) return false;
  }
  return true;
}

interface Gap {
  readonly lnFrom: number;
  readonly lnTo: number;
  readonly last: boolean;
  readonly first: boolean;
  readonly stale: boolean;
}

function sumGap(
  out: GapProbabilities,
  gap: number,
  { entries }: History,
  kernels: DipoleKernels,
  dipoles: LiveDipoles,
  { lnFrom, lnTo, last, first, stale }: Gap,
): void {
  const at = CHANNEL_COUNT * gap;
  const { channelExponent, channelExponentToLow } = out;
  const { kept } = dipoles;
  for (let n = 0; n < dipoles.count; n++) {
    const colour = entries.id[dipoles.colourRow[n]];
    const anticolour = entries.id[dipoles.anticolourRow[n]];
    const q2 = dipoles.q2[n];
    if (stale || dipoles.fresh[n] === 1) {
      dipoleExponents(sums, kernels, colour, anticolour, q2, lnFrom, first);
      for (let c = 0; c < CHANNEL_COUNT; c++) kept[KEPT * n + c] = sums[c];
    }
    if (last) sums.fill(0);
    else dipoleExponents(sums, kernels, colour, anticolour, q2, lnTo, first);
    for (let c = 0; c < CHANNEL_COUNT; c++) {
      const above = kept[KEPT * n + c];
      channelExponent[at + c] += above - sums[c];
      channelExponentToLow[at + c] += above;
      kept[KEPT * n + c] = sums[c];
    }
  }
  let exponent = 0;
  let toLow = 0;
  for (let c = 0; c < CHANNEL_COUNT; c++) {
    exponent += channelExponent[at + c];
    toLow += channelExponentToLow[at + c];
  }
  out.exponent[gap] = exponent;
  out.exponentToLow[gap] = toLow;
  out.delta[gap] = exp(-exponent);
  out.deltaToLow[gap] = exp(-toLow);
}

function blank(out: GapProbabilities, gap: number): void {
  out.delta[gap] = out.deltaToLow[gap] = out.exponent[gap] = out.exponentToLow[gap] = NaN;
  for (let c = CHANNEL_COUNT * gap; c < CHANNEL_COUNT * (gap + 1); c++)
    out.channelExponent[c] = out.channelExponentToLow[c] = NaN;
}
