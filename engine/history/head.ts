/** Meaning of an author's z: our words, or `own`. */
export type FractionMeaning =
  | 'emitter light-cone'
  | 'emission light-cone'
  | 'emitter energy'
  | 'emission energy'
  | 'own';

/** What the claimed columns of a history mean to their author; null where undeclared. */
export interface Meaning {
  readonly t: 'kT^2' | 'virtuality^2' | 'angle^2' | 'own' | null;
  readonly tUnit: 'GeV^2' | 'GeV' | '1' | null;
  readonly z: FractionMeaning | null;
  readonly kT: 'dipole frame' | 'own' | null;
  readonly azimuth: 'dipole axis' | 'own' | null;
  readonly openingAngle: 'daughters after the step' | 'own' | null;
  /** Frame in which angles are measured. */
  readonly angleFrame: 'event' | 'own' | null;
}

export interface Beam {
  readonly id: number;
  readonly px: number;
  readonly py: number;
  readonly pz: number;
  readonly e: number;
}

export interface Process {
  /** Name as on the command line: ee. */
  readonly name: string;
  /** PDG numbers. */
  readonly incoming: readonly number[];
  /** PDG numbers of the partons of the hard process. */
  readonly outgoing: readonly number[];
}

export type SettingValue = string | number | boolean | null;

/** Head of an event: the file's head, and what is the event's own. Energies in GeV. */
export interface Head {
  /** Number in the file, from 0. */
  readonly event: number;
  /** The author's own label, null where there is none. */
  readonly label: string | null;
  readonly seed: number | null;
  /** Number of the event in the sample of this seed. */
  readonly stream: number | null;
  /** Command that makes this event again. */
  readonly rerun: string | null;
  readonly status: 'complete' | 'aborted' | 'vetoed';
  readonly statusReason: string | null;
  readonly process: Process;
  readonly beams: readonly Beam[];
  readonly sqrtS: number;
  readonly weight: number;
  /** How often the event was begun again because its jets were too heavy; absent where a shower never does that. */
  readonly regrown?: number;
  /** The largest t at which the first step can happen [unit of t]. */
  readonly hardScale: number;
  /** kT^2 resolution [GeV^2]. */
  readonly cutoff: number;
  /** The smallest t at which anything can branch [unit of t]. */
  readonly tLow: number;
  readonly evolutionVariable: 'kt' | 'virtuality' | 'angle' | 'own';
  /** Along what t must fall. */
  readonly ordering: 'global' | 'line' | 'none';
  readonly meaning: Meaning;
  /** Every setting that shaped the shower, under its command-line name. */
  readonly shower: Readonly<Record<string, SettingValue>>;
  readonly producer: { readonly name: string; readonly version: string };
  /** Names of the columns that are present, per table. */
  readonly columns: {
    readonly entries: readonly string[];
    readonly steps: readonly string[];
    readonly trials: readonly string[] | null;
  };
}

/** The fields of a head that every event of a file has in common. */
export type SampleHead = Omit<
  Head,
  'event' | 'label' | 'stream' | 'rerun' | 'status' | 'statusReason' | 'process' | 'weight' | 'regrown'
> & { readonly process: Omit<Process, 'outgoing'> };

/** The fields of a head that differ between the events of a file. */
export interface EventHead {
  readonly event: number;
  readonly label: string | null;
  readonly stream: number | null;
  readonly rerun: string | null;
  readonly status: Head['status'];
  readonly statusReason: string | null;
  /** PDG numbers of the partons of the hard process. */
  readonly outgoing: readonly number[];
  readonly weight: number;
  /** See Head. */
  readonly regrown?: number;
}

/** Keys that heads have where their authors added none. */
const SAMPLE_KEYS = 13;
const PROCESS_KEYS = 2;
const EVENT_KEYS = 8;

/**
 * Head of one event from what the file and the event say, keys that we do not know included.
 *
 * Written out key by key where there are no others: spreading two objects took longer than growing the event.
 */
export function joinHead(sample: SampleHead, event: EventHead): Head {
  const others =
    Object.keys(sample).length - SAMPLE_KEYS ||
    Object.keys(sample.process).length - PROCESS_KEYS ||
    Object.keys(event).length - EVENT_KEYS;
  if (others !== 0) {
    const { outgoing, ...own } = event;
    return { ...sample, ...own, process: { ...sample.process, outgoing } };
  }
  return {
    event: event.event,
    label: event.label,
    seed: sample.seed,
    stream: event.stream,
    rerun: event.rerun,
    status: event.status,
    statusReason: event.statusReason,
    process: { name: sample.process.name, incoming: sample.process.incoming, outgoing: event.outgoing },
    beams: sample.beams,
    sqrtS: sample.sqrtS,
    weight: event.weight,
    hardScale: sample.hardScale,
    cutoff: sample.cutoff,
    tLow: sample.tLow,
    evolutionVariable: sample.evolutionVariable,
    ordering: sample.ordering,
    meaning: sample.meaning,
    shower: sample.shower,
    producer: sample.producer,
    columns: sample.columns,
  };
}
