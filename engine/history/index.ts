export { HistoryBatch } from './batch.ts';
export { entriesAtEnd } from './boosts.ts';
export {
  type Column,
  growEntries,
  growSteps,
  growTrials,
  type MutableEntries,
  type MutableSteps,
  type MutableTrials,
  makeColumn,
  makeEntries,
  makeSteps,
  makeTrials,
  missingValue,
} from './columns.ts';
export {
  type Beam,
  type EventHead,
  type FractionMeaning,
  type Head,
  joinHead,
  type Meaning,
  type Process,
  type SampleHead,
  type SettingValue,
} from './head.ts';
export type { EntryTable, History, StepTable, TrialTable } from './history.ts';
export {
  aliveEntries,
  type ColourFault,
  type ColourLines,
  colourFaults,
  coloursAlive,
  isAlive,
  stepAtTime,
} from './replay.ts';
export {
  BOOST_COLUMN,
  BOOST_NUMBERS,
  CHANNELS,
  type ColumnKind,
  type ColumnSpec,
  ENTRY_COLUMNS,
  KINDS,
  type Kind,
  REASONS,
  type Reason,
  ROLES,
  type Role,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from './schema.ts';
