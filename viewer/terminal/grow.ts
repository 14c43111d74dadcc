import { setImmediate as nextTurn } from 'node:timers/promises';
import {
  createGrower,
  DEFAULT_SETTINGS,
  type GrowSettings,
  HistoryBatch,
  resolveSettings,
} from '../../engine/index.ts';
import { EVENTS_PER_CHUNK, ShowerFileWriter } from '../../formats/index.ts';
import { defineCommand } from './command.ts';
import { DONE, INTERRUPTED } from './errors.ts';
import { onInterruption } from './interruption.ts';
import { custom, file, flag, integer, number, oneOf, readNumber, type Values } from './option.ts';
import { openOutput } from './output.ts';
import { byteSize, duration, grouped, startProgress } from './progress.ts';
import { note } from './streams.ts';

const QUARKS = ['d', 'u', 's', 'c', 'b'] as const;
const MOST = Number.MAX_SAFE_INTEGER;

type Coupling = GrowSettings['coupling'];

function readCoupling(text: string): Coupling | undefined {
  if (text === 'one-loop' || text === 'two-loop') return { kind: text };
  const value = text.startsWith('fixed:') ? readNumber(text.slice('fixed:'.length)) : undefined;
  return value === undefined ? undefined : { kind: 'fixed', value };
}

const { energy, cutoff, alphasMz, flavours, seed } = DEFAULT_SETTINGS;

const options = {
  process: oneOf(['ee', 'scalar-gg', 'scalar-bb'], {
    purpose: 'hard process: e+e- -> gamma*/Z -> q qbar, or a scalar -> g g or b bbar',
    otherwise: 'ee',
  }),
  energy: number('GeV', { purpose: 'centre-of-mass energy', otherwise: energy }),
  events: integer(1, MOST, { purpose: 'number of events', otherwise: 1000 }),
  seed: integer(0, MOST, { purpose: 'event n of a seed is always the same history', otherwise: seed }),
  shower: oneOf(['dipole', 'coherent'], { purpose: 'kind of shower', otherwise: 'dipole' }),
  order: oneOf(['kt', 'virtuality'], { purpose: 'evolution variable of the dipole shower', otherwise: 'kt' }),
  coherence: oneOf(['on', 'off'], {
    purpose: 'whether angles fall along the coherent shower',
    otherwise: 'on',
  }),
  recoil: oneOf(['local', 'global'], {
    purpose: 'who takes the recoil in the dipole shower: the colour partner, or all',
    otherwise: 'local',
  }),
  coupling: custom(
    'fixed:VALUE | one-loop | two-loop',
    { purpose: 'strong coupling', otherwise: 'one-loop' },
    readCoupling,
  ),
  'alphas-mz': number('', { purpose: 'strong coupling at the Z mass, where it runs', otherwise: alphasMz }),
  cmw: oneOf(['on', 'off'], { purpose: 'coupling in the physical scheme of soft gluons', otherwise: 'off' }),
  cutoff: number('GeV', { purpose: 'smallest kT of a branching (coherent: pT)', otherwise: cutoff }),
  flavours: integer(0, 5, { purpose: 'quark flavours that a gluon splits into', otherwise: flavours }),
  quark: oneOf(QUARKS, { purpose: 'force the quark of ee', otherwise: 'electroweak mix' }),
  masses: oneOf(['on', 'off'], { purpose: 'heavy charm and bottom', otherwise: 'off' }),
  'velocity-factors': oneOf(['unit', 'published'], {
    purpose: 'factors before the collinear parts of massive kernels',
    otherwise: 'unit',
  }),
  'first-emission': oneOf(['matched', 'kernel'], {
    purpose: 'whether the first emission follows the matrix element of the hard process',
    otherwise: 'kernel',
  }),
  trials: flag('record rejected trials as well'),
  workers: custom('1', { purpose: 'number of threads', otherwise: 1 }, (text) =>
    text === '1' ? 1 : undefined,
  ),
  out: file('FILE', { purpose: 'the .shower file to write, - for standard output', required: true }),
  quiet: flag('no progress and no closing line'),
};

const COUNTED_ELSEWHERE = ['events', 'workers', 'out', 'quiet'];

/** Settings of the engine from the options that were given; the engine adds its defaults and judges. */
function settingsFrom(values: Values<typeof options>): GrowSettings {
  const some: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(values)) {
    if (COUNTED_ELSEWHERE.includes(name)) continue;
    const key = name.replace(/-([a-z])/g, (_all, letter: string) => letter.toUpperCase());
    some[key] = value === 'on' ? true : value === 'off' ? false : value;
  }
  if (values.quark) some.quark = QUARKS.indexOf(values.quark) + 1;
  return resolveSettings(some as Partial<GrowSettings>);
}

/** `branchlight grow`: simulate events into a native file. */
export const grow = defineCommand({
  name: 'grow',
  purpose: 'simulate events and record their histories',
  details: [
    'A new FILE is written in place and grows while it is made; an existing one is replaced when the new one is whole, until then that is FILE.part. An interruption keeps the events that are done.',
  ],
  operands: [],
  options,
  async run(values) {
    const settings = settingsFrom(values);
    const events = values.events ?? 1000;
    const quiet = values.quiet ?? false;
    const grower = createGrower(settings);
    let interrupted = false;
    onInterruption(() => {
      interrupted = true;
    });

    const out = await openOutput(values.out as string);
    const writer = new ShowerFileWriter(out, grower.sample);
    const batch = new HistoryBatch(grower.sample);
    const start = performance.now();
    const progress = startProgress(events, 'events', quiet);
    let done = 0;
    let steps = 0;
    // A chunk of the file at a time: what is not yet written is what an interruption would lose.
    while (done < events && !interrupted) {
      batch.clear();
      const until = Math.min(done + EVENTS_PER_CHUNK, events);
      for (; done < until; done++) grower.grow(batch, done);
      steps += batch.steps.length;
      await writer.append(batch);
      progress.at(done);
      await nextTurn();
    }
    await writer.finish();
    progress.end();

    const seconds = (performance.now() - start) / 1000;
    if (done < events) {
      const kept = await out.keep();
      note(`interrupted: ${grouped(done)} of ${grouped(events)} events are kept in ${kept} (interrupted)`);
      return INTERRUPTED;
    }
    await out.finish();
    if (!quiet) {
      const counts = `${grouped(done)} events, ${grouped(steps)} steps, ${byteSize(out.bytes)}`;
      note(`${out.name}: ${counts} in ${duration(seconds)}`);
    }
    return DONE;
  },
});
