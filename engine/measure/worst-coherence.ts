import type { HistoryBatch } from '../history/index.ts';
import { angleBetween } from '../math/index.ts';

// scratch, not reentrant
const p = new Float64Array(3);
const q = new Float64Array(3);

/**
 * Largest ratio of opening angle to partner angle of the steps of event `n` of a batch; NaN where no step has one.
 *
 * The same numbers as `coherencePartner` of measureSteps, straight from the batch's columns: a summary of each event that is
 * written must not take longer than growing it.
 */
export function worstCoherence(batch: HistoryBatch, n: number): number {
  const { steps } = batch;
  let worst = NaN;
  for (let step = batch.stepStart[n]; step < batch.stepStart[n + 1]; step++) {
    const opening = rowsAngle(batch, n, steps.i[step], steps.j[step]);
    const ratio = opening / rowsAngle(batch, n, steps.emitter[step], steps.partner[step]);
    if (ratio > worst || Number.isNaN(worst)) worst = ratio;
  }
  return worst;
}

/** Angle between two entries of event `n` [rad], NaN where there is no such row. */
function rowsAngle(batch: HistoryBatch, n: number, a: number, b: number): number {
  return take(p, batch, n, a) && take(q, batch, n, b) ? angleBetween(p, q) : NaN;
}

function take(out: Float64Array, batch: HistoryBatch, n: number, row: number): boolean {
  const start = batch.entryStart[n];
  if (!(row >= 0 && row < batch.entryStart[n + 1] - start)) return false;
  out[0] = batch.entries.px[start + row];
  out[1] = batch.entries.py[start + row];
  out[2] = batch.entries.pz[start + row];
  return true;
}
