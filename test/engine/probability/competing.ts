import { coloursAlive, type History } from '../../../engine/history/index.ts';
import { dot } from '../../../engine/math/index.ts';
import type { DipoleEnd } from '../../../engine/probability/index.ts';

/** Momentum that a row has right after a step: with global recoil each step after its own has moved it. */
function momentumAfter({ entries, steps }: History, row: number, step: number): Float64Array {
  let p = [entries.px[row], entries.py[row], entries.pz[row], entries.e[row]];
  for (let s = entries.madeBy[row] + 1; s <= step && steps.boost !== null; s++) {
    const boost = steps.boost.subarray(16 * s, 16 * s + 16);
    p = [0, 4, 8, 12].map((at) => p.reduce((sum, x, c) => sum + boost[at + c] * x, 0));
  }
  return Float64Array.from(p);
}

/**
 * Dipole ends and channels that compete before a step, from the replay of the rows.
 *
 * @param flavours of g -> q qbar, each an end of its own.
 */
export function* competing(history: History, step: number, flavours: number): Generator<DipoleEnd> {
  const { entries } = history;
  const { colourEnd, anticolourEnd } = coloursAlive(history, step - 1);
  for (let n = 0; n < colourEnd.length; n++) {
    const [a, b] = [colourEnd[n], anticolourEnd[n]];
    const [p, q] = [momentumAfter(history, a, step - 1), momentumAfter(history, b, step - 1)];
    const q2 = 2 * dot(p, q, entries.m[a], entries.m[b]);
    for (const [from, to] of [
      [a, b],
      [b, a],
    ]) {
      const end = { emitter: entries.id[from], partner: entries.id[to], q2, first: step === 0 };
      if (entries.id[from] !== 21) {
        yield { channel: 'q_qg', ...end };
        continue;
      }
      yield { channel: 'g_gg', ...end };
      for (let flavour = 1; flavour <= flavours; flavour++) yield { channel: 'g_qq', flavour, ...end };
    }
  }
}
