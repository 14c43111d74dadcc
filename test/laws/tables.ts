import { aliveEntries, type History, isAlive, measureSteps, ROLES, stepAtTime } from '../../engine/index.ts';

const name = (code: number) => ROLES[code];

/** Steps whose rows do not begin, end and follow one another as the history model says. */
export function brokenRows(history: History): string[] {
  const { entries, steps } = history;
  const { from, madeBy, endedBy, role, line } = entries;
  const breaches: string[] = [];
  const lines = new Set<number>();
  for (let row = 0; row < entries.length; row++) {
    const made = madeBy[row];
    const hard = made < 0;
    if (hard !== ['incoming', 'hard', 'resonance'].includes(name(role[row])))
      breaches.push(`row ${row}: role ${name(role[row])}, made by step ${made}`);
    if (hard && name(role[row]) === 'hard') lines.add(line[row]);
    if (!hard && !(made < steps.length)) breaches.push(`row ${row}: made by step ${made} of ${steps.length}`);
    if (!hard && ![steps.i[made], steps.j[made], steps.recoilerAfter[made]].includes(row))
      breaches.push(`row ${row}: step ${made} does not know that it made it`);
    if (!(endedBy[row] === -1 || endedBy[row] > made)) breaches.push(`row ${row}: ended before it was made`);
    const end = endedBy[row];
    if (end >= 0 && steps.emitter[end] !== row && steps.recoiler[end] !== row)
      breaches.push(`row ${row}: step ${end} does not know that it ended it`);
    if (!(from[row] >= -1 && from[row] < row)) breaches.push(`row ${row}: comes from row ${from[row]}`);
  }
  for (let step = 0; step < steps.length; step++) {
    const expected = [
      ['emitter', steps.emitter[step], steps.i[step]],
      ['emission', steps.emitter[step], steps.j[step]],
      ['recoiled', steps.recoiler[step], steps.recoilerAfter[step]],
    ] as const;
    for (const [what, before, after] of expected) {
      const fault = (detail: string) => breaches.push(`step ${step}, ${what} row ${after}: ${detail}`);
      if (!isAlive(entries, before, step - 1)) fault(`row ${before} is not there before the step`);
      if (endedBy[before] !== step) fault(`row ${before} is not ended by the step`);
      if (madeBy[after] !== step) fault('not made by the step');
      if (from[after] !== before) fault(`comes from row ${from[after]}, not ${before}`);
      if (name(role[after]) !== what) fault(`role ${name(role[after])}`);
      if (what === 'emission' ? lines.has(line[after]) : line[after] !== line[before])
        fault(`on line ${line[after]}`);
    }
    lines.add(line[steps.j[step]]);
    if (!isAlive(entries, steps.partner[step], step - 1)) breaches.push(`step ${step}: its partner is gone`);
  }
  return breaches;
}

/** Steps whose generation is not 0 on a hard line and one more than that of the step which made the emitter's line. */
export function wrongGenerations({ entries, steps }: History): string[] {
  const breaches: string[] = [];
  const ofLine = new Map<number, number>();
  for (let step = 0; step < steps.length; step++) {
    const expected = ofLine.get(entries.line[steps.emitter[step]]) ?? 0;
    if (steps.generation[step] !== expected)
      breaches.push(`step ${step}: generation ${steps.generation[step]}, expected ${expected}`);
    ofLine.set(entries.line[steps.j[step]], expected + 1);
  }
  return breaches;
}

/** Moments at which replay differs from carrying out the steps one after the other, and the end from the final state. */
export function wrongReplay(history: History): string[] {
  const { entries, steps } = history;
  const breaches: string[] = [];
  const living = new Set<number>();
  const compare = (step: number) => {
    const replayed = [...aliveEntries(history, step)];
    const expected = [...living].sort((a, b) => a - b);
    if (replayed.join() !== expected.join())
      breaches.push(`after step ${step}: replay has rows ${replayed}, the steps leave ${expected}`);
  };
  for (let row = 0; row < entries.length; row++)
    if (entries.madeBy[row] < 0 && name(entries.role[row]) === 'hard') living.add(row);
  compare(-1);
  for (let step = 0; step < steps.length; step++) {
    for (const gone of [steps.emitter[step], steps.recoiler[step]])
      if (!living.delete(gone)) breaches.push(`step ${step}: row ${gone} is used and not there`);
    for (const made of [steps.i[step], steps.j[step], steps.recoilerAfter[step]]) living.add(made);
    compare(step);
  }
  for (let row = 0; row < entries.length; row++) {
    const final = entries.endedBy[row] === -1 && !['incoming', 'resonance'].includes(name(entries.role[row]));
    if (final !== living.has(row))
      breaches.push(`row ${row}: ${final ? '' : 'not '}in the recorded final state`);
  }
  return breaches;
}

/**
 * Evolution times at which the clock gives another step than counting the steps that have happened does.
 *
 * Tried are shares of the whole evolution, and each step's own time, which must give that step.
 */
export function wrongClock(
  history: History,
  shares: readonly number[],
  clock: (history: History, time: number) => number = stepAtTime,
): string[] {
  const { steps, head } = history;
  const end = Math.log(head.hardScale / head.tLow);
  const { evolutionTime } = measureSteps(history);
  const breaches: string[] = [];
  const compare = (time: number) => {
    let happened = 0;
    for (let step = 0; step < steps.length; step++) if (evolutionTime[step] <= time) happened++;
    const found = clock(history, time);
    if (found !== happened - 1)
      breaches.push(`at L = ${time}: step ${found}, counting gives ${happened - 1}`);
  };
  for (const share of shares) compare(share * end);
  for (let step = 0; step < steps.length; step++) compare(evolutionTime[step]);
  return breaches;
}
