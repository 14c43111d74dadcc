import { ROLES } from '../../engine/index.ts';
import { channelRate, exponentTable, type Line, lineRate, makeLine } from './coherent-rates.ts';
import { type CoherentSettings, coherentEvents } from './coherent-sample.ts';
import { countsPValue, uniformPValue } from './independent/index.ts';

/** How the gaps of all lines compare with quadrature; p-values of uniformity, each of its own kind of number. */
export interface GapVerdict {
  readonly steps: number;
  /** Of u_t by generation of the emitting line: 0, 1, 2 and above. */
  readonly times: readonly number[];
  /** Of u_t where the emitter was i, or j, of the step before. */
  readonly afterI: number;
  readonly afterJ: number;
  /** Of z given t and channel. */
  readonly fractions: number;
  /** Of the azimuth, and of the difference of azimuths of a step and its previous one. */
  readonly azimuth: number;
  readonly turns: number;
  /** (splittings of gluons into quarks - expected) in standard errors. */
  readonly splittings: number;
  /** (lines that branched, from birth or their last branching - expected) in standard errors. */
  readonly branched: number;
  /** Of the counts of the quark flavours in massless splittings; NaN with masses. */
  readonly flavours: number;
}

/**
 * Grow events with the engine and hold every gap of every line against quadrature of physics.md section 6.
 *
 * u_t = (D(t) - D(tLow))/(1 - D(tLow)), D(t) the probability of nothing from tStart down to t, is uniform for the steps
 * that happened.
 *
 * @param fault settings in which the judge differs from the engine, to prove that it is noticed.
 */
export function judgeGaps(
  settings: CoherentSettings,
  seed: number,
  events: number,
  fault: CoherentSettings = {},
): GapVerdict {
  const judged = { energy: 91.1876, cutoff: 1, flavours: 5, masses: false, ...settings, ...fault };
  const { energy, masses, flavours } = judged;
  const lines = new Map<number, { line: Line; exponent: (t: number) => number }>();
  const lineOf = (id: number) => {
    const kind = id === 21 ? 21 : masses && Math.abs(id) > 3 ? Math.abs(id) : 1;
    let known = lines.get(kind);
    if (!known) {
      const line = makeLine(kind, energy, { ...judged, coupling: judged.coupling! });
      known = { line, exponent: exponentTable(line, energy ** 2) };
      lines.set(kind, known);
    }
    return known;
  };

  const times: number[][] = [[], [], []];
  const after: number[][] = [[], []];
  const fractions: number[] = [];
  const azimuths: number[] = [];
  const turns: number[] = [];
  const pairs = new Array<number>(flavours).fill(0);
  let [expected, variance, seen, count] = [0, 0, 0, 0];
  let [excess, spread] = [0, 0];
  const live = (id: number, start: number, branches: boolean): void => {
    const p = 1 - Math.exp(-lineOf(id).exponent(start));
    excess += (branches ? 1 : 0) - p;
    spread += p * (1 - p);
  };
  for (const { entries, steps, channels } of coherentEvents(settings, seed, events)) {
    const branched = new Set(
      [...steps.previous.keys()]
        .filter((s) => steps.previous[s] < 0)
        .map((s) => entries.line[steps.emitter[s]]),
    );
    for (let row = 0; row < entries.length; row++) {
      if (ROLES[entries.role[row]] !== 'hard') continue;
      const start = (energy ** 2 * (1 + Math.sqrt(1 - ((2 * entries.m[row]) / energy) ** 2))) / 2;
      live(entries.id[row], start, branched.has(entries.line[row]));
    }
    for (let s = 0; s < steps.length; s++) {
      const id = entries.id[steps.emitter[s]];
      for (const [row, share] of [
        [steps.i[s], steps.z[s]],
        [steps.j[s], 1 - steps.z[s]],
      ])
        live(entries.id[row], share * share * steps.t[s], entries.endedBy[row] >= 0);
      const { line, exponent } = lineOf(id);
      const [t, start] = [steps.t[s], exponent(steps.tStart[s])];
      const lowest = Math.exp(-start);
      const u = (Math.exp(exponent(t) - start) - lowest) / (1 - lowest);
      times[Math.min(2, steps.generation[s])].push(u);
      azimuths.push(steps.azimuth[s] / (2 * Math.PI));
      const previous = steps.previous[s];
      if (previous >= 0) {
        after[steps.emitter[s] === steps.i[previous] ? 0 : 1].push(u);
        const turn = (steps.azimuth[s] - steps.azimuth[previous]) / (2 * Math.PI);
        turns.push(turn - Math.floor(turn));
      }
      const pair = channels[steps.channel[s]] === 'g_qq' ? entries.id[steps.i[s]] : 0;
      if (++count % 4 === 0)
        fractions.push(channelRate(line, pair, t, steps.z[s]) / channelRate(line, pair, t));
      if (id !== 21) continue;
      if (pair > 0) {
        pairs[pair - 1]++;
        seen++;
      }
      if (count % 4 !== 0) continue;
      const share = 1 - channelRate(line, 0, t) / lineRate(line, t);
      expected += share - (pair > 0 ? 1 : 0);
      variance += share * (1 - share);
    }
  }
  return {
    steps: count,
    times: times.map(uniformPValue),
    afterI: uniformPValue(after[0]),
    afterJ: uniformPValue(after[1]),
    fractions: uniformPValue(fractions),
    azimuth: uniformPValue(azimuths),
    turns: uniformPValue(turns),
    splittings: -expected / Math.sqrt(variance),
    branched: excess / Math.sqrt(spread),
    flavours: masses
      ? NaN
      : countsPValue(
          pairs,
          pairs.map(() => seen / flavours),
          1,
        ),
  };
}
