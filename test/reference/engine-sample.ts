import {
  aliveEntries,
  createGrower,
  type GrowSettings,
  type History,
  HistoryBatch,
  resolveSettings,
} from '../../engine/index.ts';
import { angle, type Four, type MeasuredStep, type Settings, space } from './independent/index.ts';

/**
 * Events 0 to `count` of a seed, one after another; each is valid until the next is asked for.
 *
 * @param leastSteps events with fewer steps are grown but not handed out (building a view costs more than growing).
 */
export function* engineEvents(
  settings: Partial<GrowSettings>,
  count: number,
  leastSteps = 0,
): Generator<History> {
  const grower = createGrower(resolveSettings(settings));
  const batch = new HistoryBatch(grower.sample);
  for (let stream = 0; stream < count; stream++) {
    batch.clear();
    grower.grow(batch, stream);
    if (batch.steps.length >= leastSteps) yield batch.view(0);
  }
}

/** The engine's settings for those of the independent shower. */
export function engineSettings(settings: Settings, seed: number): Partial<GrowSettings> {
  const { energy, order, coupling, cutoff, flavours, quark } = settings;
  return { energy, order, coupling, cutoff, flavours, quark, seed };
}

/** Momentum of an entry row. */
export const momentumOf = ({ entries: e }: History, row: number): Four => [
  e.px[row],
  e.py[row],
  e.pz[row],
  e.e[row],
];

/** Momenta of the partons alive right after a step. */
export const momentaAfter = (history: History, step: number): Four[] =>
  Array.from(aliveEntries(history, step), (row) => momentumOf(history, row));

/** Angles of every step from the momenta of its rows alone, the engine's own measures not used. */
export function measuredSteps(history: History): MeasuredStep[] {
  const { entries, steps, channels } = history;
  const birth = new Float64Array(entries.length).fill(Math.PI);
  const between = (a: number, b: number): number =>
    angle(space(momentumOf(history, a)), space(momentumOf(history, b)));
  const out: MeasuredStep[] = [];
  for (let s = 0; s < steps.length; s++) {
    const [i, j] = [steps.i[s], steps.j[s]];
    const openingAngle = between(i, j);
    const channel = channels[steps.channel[s]] as MeasuredStep['channel'];
    out.push({
      channel,
      pair: channel === 'g_qq' ? Math.abs(entries.id[i]) : 0,
      openingAngle,
      birthAngle: birth[steps.emitter[s]],
      partnerAngle: between(steps.emitter[s], steps.partner[s]),
    });
    birth[i] = openingAngle;
    birth[j] = openingAngle;
    birth[steps.recoilerAfter[s]] = birth[steps.partner[s]];
  }
  return out;
}
