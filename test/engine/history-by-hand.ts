import {
  ENTRY_COLUMNS,
  type EntryTable,
  type EventHead,
  type History,
  HistoryBatch,
  missingValue,
  ROLES,
  type SampleHead,
  STEP_COLUMNS,
  type StepTable,
} from '../../engine/history/index.ts';

type Row<T> = { [K in Exclude<keyof T, 'length'>]?: number };

const HEAD: SampleHead = {
  seed: null,
  process: { name: 'ee', incoming: [11, -11] },
  beams: [],
  sqrtS: 100,
  hardScale: 2500,
  cutoff: 1,
  tLow: 1,
  evolutionVariable: 'kt',
  ordering: 'global',
  meaning: {
    t: 'kT^2',
    tUnit: 'GeV^2',
    z: 'emitter light-cone',
    kT: 'dipole frame',
    azimuth: 'dipole axis',
    openingAngle: 'daughters after the step',
    angleFrame: 'event',
  },
  shower: {},
  producer: { name: 'by hand', version: '1' },
  columns: {
    entries: ENTRY_COLUMNS.map(({ name }) => name),
    steps: STEP_COLUMNS.map(({ name }) => name),
    trials: null,
  },
};

const EVENT: EventHead = {
  event: 0,
  label: null,
  stream: null,
  rerun: null,
  status: 'complete',
  statusReason: null,
  outgoing: [1, -1],
  weight: 1,
};

/** A history from rows; what a row leaves out is missing (roles: hard). */
export function historyByHand(
  entries: readonly Row<EntryTable>[],
  steps: readonly Row<StepTable>[],
  head: Partial<SampleHead & EventHead> = {},
): History {
  const batch = new HistoryBatch({ ...HEAD, ...head }, ['q_qg', 'g_gg', 'g_qq']);
  batch.reserve(entries.length, steps.length, 0);
  const hard = ROLES.indexOf('hard');
  entries.forEach((row, at) => {
    for (const spec of ENTRY_COLUMNS)
      batch.entries[spec.name][at] = row[spec.name] ?? (spec.name === 'role' ? hard : missingValue(spec));
  });
  steps.forEach((row, at) => {
    for (const spec of STEP_COLUMNS) batch.steps[spec.name][at] = row[spec.name] ?? missingValue(spec);
  });
  batch.entries.length = entries.length;
  batch.steps.length = steps.length;
  batch.endEvent({ ...EVENT, ...head });
  return batch.view(0);
}

/** Code of a role. */
export function role(name: (typeof ROLES)[number]): number {
  return ROLES.indexOf(name);
}
