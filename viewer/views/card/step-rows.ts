import {
  type FractionMeaning,
  type History,
  MEASURE_DEFINITIONS,
  type MeasureKey,
  type StepMeasures,
} from '../../../engine/index.ts';

/** One quantity of a step: what the shower claimed beside what the momenta show. */
export interface StepRow {
  readonly key: string;
  /** Notation, see views/type. */
  readonly symbol: string;
  readonly name: string;
  /** NaN where the author recorded none, or where a quantity is only ever measured. */
  readonly claimed: number;
  /** NaN where momenta cannot show it. */
  readonly measured: number;
  /** Notation; empty for a number without unit. */
  readonly unit: string;
  readonly definition: string;
  /** Whether claimed and measured are the same quantity and differ by more than 1e-6 of it. */
  readonly differs: boolean;
  /** Shown only where there is room. */
  readonly extra: boolean;
}

/** Rows that belong together, set apart from the next ones. */
export type StepRows = readonly (readonly StepRow[])[];

/** Relative difference of claimed and measured above which a row is marked. */
export const TOLERANCE = 1e-6;

const definitions = new Map(MEASURE_DEFINITIONS.map(({ key, definition }) => [key, definition]));
const definitionOf = (key: MeasureKey): string => definitions.get(key) ?? '';

/** Whether two values of a quantity differ by more than 1e-6 of the larger; a missing one differs from nothing. */
export function valuesDiffer(claimed: number, measured: number, period = Infinity): boolean {
  if (Number.isNaN(claimed) || Number.isNaN(measured)) return false;
  let apart = Math.abs(claimed - measured);
  if (apart > period / 2) apart = Math.abs(period - apart);
  return apart > TOLERANCE * Math.max(Math.abs(claimed), Math.abs(measured));
}

type Optional = { unit?: string; claimed?: number; definition?: string; extra?: boolean; period?: number };

function row(
  key: string,
  symbol: string,
  name: string,
  measured: number,
  { unit = '', claimed = NaN, definition = definitionOf(key as MeasureKey), extra = false, period }: Optional,
): StepRow {
  const differs = valuesDiffer(claimed, measured, period);
  return { key, symbol, name, claimed, measured, unit, definition, differs, extra };
}

/** Notation of the unit in which a history's t is recorded. */
export function unitOfT(tUnit: 'GeV^2' | 'GeV' | '1' | null): string {
  if (tUnit === 'GeV^2') return 'GeV^{2}';
  return tUnit === 'GeV' ? 'GeV' : '';
}

const SYMBOL_OF_T: Readonly<Record<string, string>> = {
  'kT^2': '*t* = *k*_{T}^{2}',
  'virtuality^2': '*t* = *y Q*^{2}',
  'angle^2': '*t* = *q̃*^{2}',
};

/** Rows of a step in the order of a physicist's questions: scale, sharing, angles, pair, recoil, sampler. */
export function stepRows(history: History, measures: StepMeasures, step: number): StepRows {
  const { steps, head, entries } = history;
  const { meaning } = head;
  const m = measures;
  const t = SYMBOL_OF_T[meaning.t ?? ''] ?? '*t*';
  const tMeasured = meaning.t === 'kT^2' || meaning.t === 'virtuality^2' ? m.t[step] : NaN;
  // Held against the momenta only where the author says that it means the same.
  const ifOurs = (is: boolean, value: number): number => (is ? value : NaN);
  const softer = m.softer[step] === steps.i[step] ? '*i*' : '*j*';
  const alone = entries.e[steps.i[step]] === entries.e[steps.j[step]];
  return [
    [
      row('t', t, 'evolution variable', tMeasured, { claimed: steps.t[step], unit: unitOfT(meaning.tUnit) }),
      row('evolutionTime', '*L*', 'evolution time', m.evolutionTime[step], { extra: true }),
      row('kT', '*k*_{T}', 'transverse momentum', ifOurs(meaning.kT !== 'own', m.kT[step]), {
        claimed: steps.kT[step],
        unit: 'GeV',
      }),
    ],
    [
      ...fractionRows(meaning.z, steps.z[step], m.zLightCone[step], m.zEnergy[step]),
      row('y', '*y*', 'recoil variable', m.y[step], { claimed: steps.y[step] }),
      row('azimuth', '*φ*', 'azimuth, dipole axis', ifOurs(meaning.azimuth !== 'own', m.azimuth[step]), {
        claimed: steps.azimuth[step],
        unit: 'rad',
        period: 2 * Math.PI,
      }),
    ],
    [
      row('openingAngle', '*θ*', 'opening angle', m.openingAngle[step], {
        claimed: ifOurs(meaning.openingAngle !== 'own', steps.openingAngle[step]),
        unit: 'rad',
      }),
      row('partnerAngle', '*θ*_{partner}', 'partner angle', m.partnerAngle[step], { unit: 'rad' }),
      row('birthAngle', '*θ*_{birth}', 'birth angle', m.birthAngle[step], { unit: 'rad' }),
      row('coherencePartner', '*θ*/*θ*_{partner}', 'ratio to partner', m.coherencePartner[step], {}),
      row('coherenceBirth', '*θ*/*θ*_{birth}', 'ratio to birth', m.coherenceBirth[step], {}),
    ],
    [
      row('virtuality', '*m*_{ij}', 'virtuality of the pair', m.virtuality[step], { unit: 'GeV' }),
      row('formationTimeFm', '*τ*', 'formation time', m.formationTimeFm[step], { unit: 'fm' }),
      row('eta', '*η*', 'Lund angle', m.eta[step], { extra: true }),
      row(
        'kTSofter',
        '*k*_{T,soft}',
        alone ? 'of the softer' : `of the softer, ${softer}`,
        m.kTSofter[step],
        {
          unit: 'GeV',
          extra: true,
        },
      ),
    ],
    [
      row('emitterTurn', 'Δ*θ*_{i}', 'emitter turns', m.emitterTurn[step], { unit: 'rad', extra: true }),
      row('emitterEnergyLost', 'Δ*E*_{i}/*E*', 'emitter loses', m.emitterEnergyLost[step], { extra: true }),
      row('partnerTurn', 'Δ*θ*_{k}', 'recoiler turns', m.partnerTurn[step], { unit: 'rad', extra: true }),
      row('partnerEnergyLost', 'Δ*E*_{k}/*E*', 'recoiler loses', m.partnerEnergyLost[step], { extra: true }),
    ],
    [
      row('alphaS', '*α*_{s}', 'strong coupling used', NaN, {
        claimed: steps.alphaS[step],
        definition:
          'The coupling that the shower used for this step, at the scale of its own choice. Momenta do not show it.',
      }),
      row('ratio', '*f*/*g*', 'accepted trial', NaN, {
        claimed: steps.ratio[step],
        definition:
          'Rate over overestimate of the accepted trial, the probability with which it was kept. It describes the sampler, not the physics.',
      }),
      row('rejected', '*n*_{rej}', 'trials rejected before', NaN, {
        claimed: steps.rejected[step] < 0 ? NaN : steps.rejected[step],
        definition:
          'Trials that the sampler rejected since the step before. It describes the sampler, not the physics.',
      }),
    ],
  ];
}

// z stands beside the fraction that its author means; the other kind follows as measured only.
function fractionRows(
  meaning: FractionMeaning | null,
  z: number,
  lightCone: number,
  energy: number,
): StepRow[] {
  const own = meaning === null || meaning === 'own';
  const ofEmission = meaning === 'emission light-cone' || meaning === 'emission energy';
  const claimsEnergy = meaning === 'emitter energy' || meaning === 'emission energy';
  const flip = (value: number): number => (ofEmission ? 1 - value : value);
  const whose = ofEmission ? 'emission' : 'emitter';
  const rows = [
    row('zLightCone', '*z*', `light-cone, ${whose}`, flip(lightCone), {
      claimed: !own && !claimsEnergy ? z : NaN,
    }),
    row('zEnergy', '*z*_{E}', `energy, ${whose}`, flip(energy), { claimed: claimsEnergy ? z : NaN }),
  ];
  if (!own) return rows;
  const definition =
    'The momentum fraction as its author recorded it; what it means was not declared in our words.';
  return [row('z', '*z*', 'own', NaN, { claimed: z, definition }), ...rows];
}
