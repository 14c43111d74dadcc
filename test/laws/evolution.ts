import { type History, REASONS } from '../../engine/index.ts';

/** Steps out of order or out of the phase space that the head promises. */
export function breachesOfEvolution({ steps, head }: History): string[] {
  const breaches: string[] = [];
  for (let step = 0; step < steps.length; step++) {
    const fault = (what: string) => breaches.push(`step ${step}: ${what}`);
    const { [step]: t } = steps.t;
    const { [step]: tStart } = steps.tStart;
    const { [step]: z } = steps.z;
    const { [step]: y } = steps.y;
    const { [step]: kT } = steps.kT;
    const { [step]: ratio } = steps.ratio;
    if (steps.previous[step] !== step - 1) fault(`previous ${steps.previous[step]}`);
    if (tStart !== (step === 0 ? head.hardScale : steps.t[step - 1])) fault(`gap begins at ${tStart}`);
    if (!(t <= tStart)) fault(`t = ${t} above ${tStart}`);
    // t and kT^2 are exponentials and products, good to some units of the last place
    if (!(t >= head.tLow * (1 - 1e-12))) fault(`t = ${t} below ${head.tLow}`);
    if (!(kT * kT >= head.cutoff * (1 - 1e-12))) fault(`kT = ${kT} GeV below ${Math.sqrt(head.cutoff)}`);
    if (!(z > 0 && z < 1)) fault(`z = ${z}`);
    if (!(y > 0 && y < 1)) fault(`y = ${y}`);
    if (!(ratio > 0 && ratio <= 1)) fault(`f/g = ${ratio}`);
    if (!(steps.alphaS[step] > 0)) fault(`alpha_s = ${steps.alphaS[step]}`);
    if (!(steps.azimuth[step] >= 0 && steps.azimuth[step] < 2 * Math.PI))
      fault(`azimuth ${steps.azimuth[step]}`);
    if (!(steps.rejected[step] >= 0)) fault(`rejected ${steps.rejected[step]}`);
  }
  return breaches;
}

/** Rejected trials that do not fit into the gap in which they were thrown, or not into the counts of the steps. */
export function breachesOfTrials({ steps, trials, entries, head }: History): string[] {
  const breaches: string[] = [];
  if (trials === null) return breaches;
  const counted = new Int32Array(steps.length + 1);
  let last = { before: 0, t: head.hardScale };
  for (let trial = 0; trial < trials.length; trial++) {
    const fault = (what: string) => breaches.push(`trial ${trial}: ${what}`);
    const { [trial]: before } = trials.before;
    const { [trial]: t } = trials.t;
    const { [trial]: ratio } = trials.ratio;
    counted[before]++;
    if (before !== last.before) {
      if (before < last.before) fault(`before step ${before}, after one before ${last.before}`);
      last = { before, t: before === 0 ? head.hardScale : steps.t[before - 1] };
    }
    if (!(t <= last.t)) fault(`t = ${t} after ${last.t}`);
    if (before < steps.length && !(t >= steps.t[before]))
      fault(`t = ${t} below the step's ${steps.t[before]}`);
    last.t = t;
    // outside of the resolved phase space there is no rate to speak of
    const outside = ['phase space', 'cutoff'].includes(REASONS[trials.reason[trial]]);
    if (!(ratio >= 0 && ratio <= 1) && !(outside && Number.isNaN(ratio))) fault(`f/g = ${ratio}`);
    for (const row of [trials.emitter[trial], trials.partner[trial]]) {
      const { [row]: ended } = entries.endedBy;
      if (!(entries.madeBy[row] < before && (ended < 0 || ended >= before))) fault(`row ${row} is not there`);
    }
  }
  for (let step = 0; step < steps.length; step++)
    if (counted[step] !== steps.rejected[step])
      breaches.push(`step ${step}: ${counted[step]} trials, ${steps.rejected[step]} counted`);
  return breaches;
}
