/**
 * Names, element types and meaning of every column of a history.
 *
 * The one list that builder, files, tables and documentation are made from. `float` columns hold doubles, missing is
 * NaN; `integer` columns hold 32-bit integers; `row` columns hold row or step numbers, absent is -1; `word` columns hold
 * codes into a list of words.
 */
export type ColumnKind = 'float' | 'integer' | 'row' | 'word';

export interface ColumnSpec {
  readonly name: string;
  readonly kind: ColumnKind;
  readonly unit: string;
  readonly meaning: string;
}

const column = <Name extends string>(
  name: Name,
  kind: ColumnKind,
  unit: string,
  meaning: string,
): ColumnSpec & { readonly name: Name } => ({
  name,
  kind,
  unit,
  meaning,
});

export const ENTRY_COLUMNS = [
  column('id', 'integer', '', 'PDG Monte Carlo particle number'),
  column('px', 'float', 'GeV', 'momentum right after the step that made the row'),
  column('py', 'float', 'GeV', 'momentum right after the step that made the row'),
  column('pz', 'float', 'GeV', 'momentum right after the step that made the row'),
  column('e', 'float', 'GeV', 'energy right after the step that made the row'),
  column('m', 'float', 'GeV', 'mass, negative for spacelike'),
  column('colour', 'integer', '', 'colour tag, 0 for none'),
  column('anticolour', 'integer', '', 'anticolour tag, 0 for none'),
  column('from', 'row', '', 'entry that this one continues or comes from'),
  column('madeBy', 'row', '', 'step that made the row, -1: the hard process'),
  column('endedBy', 'row', '', 'step that replaced the row, -1: still there at the end'),
  column('role', 'word', '', 'how the row began'),
  column('line', 'integer', '', 'number of the parton line'),
] as const;

export const STEP_COLUMNS = [
  column('kind', 'word', '', 'which of emitter and partner are final or initial'),
  column('channel', 'word', '', 'splitting kernel'),
  column('t', 'float', 'unit of t', 'evolution variable'),
  column('tStart', 'float', 'unit of t', 'upper end of the gap before the step'),
  column('z', 'float', '', 'momentum fraction as claimed'),
  column('azimuth', 'float', 'rad', 'azimuth about the dipole axis as claimed'),
  column('y', 'float', '', 'recoil variable as claimed'),
  column('kT', 'float', 'GeV', 'transverse momentum as claimed'),
  column('openingAngle', 'float', 'rad', 'angle between the daughters as claimed'),
  column('alphaS', 'float', '', 'strong coupling used'),
  column('emitter', 'row', '', 'entry that branches'),
  column('partner', 'row', '', 'colour-dipole partner before the step'),
  column('recoiler', 'row', '', 'entry that takes the recoil, before the step'),
  column('i', 'row', '', 'emitter after the step'),
  column('j', 'row', '', 'emission'),
  column('recoilerAfter', 'row', '', 'recoiler after the step'),
  column('ratio', 'float', '', 'rate over overestimate of the accepted trial'),
  column('rejected', 'row', '', 'trials rejected since the step before, -1 where not recorded'),
  column('previous', 'row', '', 'step in which the gap began, -1: the hard scale'),
  column('noEmission', 'float', '', 'probability of the gap before the step'),
  column(
    'generation',
    'row',
    '',
    '0: emitted by a line of the hard process, 1: by such an emission, and so on',
  ),
] as const;

/** Name of the one step column that holds several numbers a row, and how many. */
export const BOOST_COLUMN = 'boost';
export const BOOST_NUMBERS = 16;

export const TRIAL_COLUMNS = [
  column('before', 'row', '', 'the step that came next, or the number of steps'),
  column('t', 'float', 'unit of t', 'evolution variable of the rejected trial'),
  column('z', 'float', '', 'momentum fraction of the rejected trial'),
  column('channel', 'word', '', 'splitting kernel tried'),
  column('emitter', 'row', '', 'entry that would have branched'),
  column('partner', 'row', '', 'its colour-dipole partner'),
  column('reason', 'word', '', 'why it was rejected'),
  column('ratio', 'float', '', 'rate over overestimate, NaN outside phase space and below the cutoff'),
] as const;

export const ROLES = [
  'incoming',
  'hard',
  'emitter',
  'emission',
  'recoiled',
  'reconstructed',
  'resonance',
] as const;
export const KINDS = [
  'final-final',
  'final-initial',
  'initial-final',
  'initial-initial',
  'one-to-two',
  'own',
] as const;
/** Channels of our own engine. A foreign history appends its own words after these. */
export const CHANNELS = ['q_qg', 'g_gg', 'g_qq'] as const;
export const REASONS = [
  'phase space',
  'coupling',
  'kernel',
  'cutoff',
  'matrix element',
  'angular veto',
  'lost',
] as const;

export type Role = (typeof ROLES)[number];
export type Kind = (typeof KINDS)[number];
export type Reason = (typeof REASONS)[number];
