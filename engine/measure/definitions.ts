import type { FloatMeasure, IntegerMeasure } from './step-measures.ts';

/**
 * A piece of a symbol: upright or italic text, on the line, below it or above it.
 *
 * `roman` is upright (words, functions, units), `italic` a variable.
 */
export interface SymbolPiece {
  readonly text: string;
  readonly style: 'roman' | 'italic';
  readonly place: 'line' | 'subscript' | 'superscript';
}

/** Name of a measured quantity in StepMeasures. */
export type MeasureKey = FloatMeasure | IntegerMeasure | 'residual';

/** What a measured quantity is called and means. */
export interface MeasureDefinition {
  readonly key: MeasureKey;
  /** In words, lower case. */
  readonly name: string;
  readonly symbol: readonly SymbolPiece[];
  /** Empty for a number without unit; `unit of t` for what the history's own t is measured in. */
  readonly unit: string;
  /** One sentence. */
  readonly definition: string;
}

/**
 * Symbol pieces from a short notation: `_` and `^` put the next word below or above, a leading `'` makes it upright.
 *
 * `k _'T` is an italic k with an upright T below.
 */
function symbol(notation: string): SymbolPiece[] {
  return notation.split(' ').map((word) => {
    const place = word[0] === '_' ? 'subscript' : word[0] === '^' ? 'superscript' : 'line';
    const rest = place === 'line' ? word : word.slice(1);
    const roman = rest[0] === "'";
    return { text: roman ? rest.slice(1) : rest, style: roman ? 'roman' : 'italic', place };
  });
}

const define = (
  key: MeasureKey,
  name: string,
  notation: string,
  unit: string,
  definition: string,
): MeasureDefinition => ({ key, name, symbol: symbol(notation), unit, definition });

/** Every quantity of StepMeasures, in the order in which a reader wants them. */
export const MEASURE_DEFINITIONS: readonly MeasureDefinition[] = [
  define(
    'evolutionTime',
    'evolution time',
    'L',
    '',
    'ln(t0/t), t0 the largest t at which the first step can happen; it rises.',
  ),
  define(
    't',
    'evolution variable',
    't',
    'unit of t',
    'The evolution variable recomputed from the momenta, Q² = 2 pij·pk before the step: z(1−z) y Q² in kt ordering, y Q² in virtuality ordering; with masses z(1−z) (pi + pj)² − (1−z) mi² − z mj² and (pi + pj)² − mij².',
  ),
  define(
    'zLightCone',
    'light-cone fraction',
    'z',
    '',
    'pi·pk / (pi·pk + pj·pk): the share of the emitter with respect to its colour partner.',
  ),
  define('zEnergy', 'energy fraction', 'z _E', '', 'Ei / (Ei + Ej) in the event frame.'),
  define(
    'y',
    'recoil variable',
    'y',
    '',
    'pi·pj / (pi·pj + pi·pk + pj·pk): the energy share that the colour partner gives up.',
  ),
  define(
    'kT',
    'transverse momentum',
    "k _'T",
    'GeV',
    'Of the emission j in the rest frame of the dipole, about the axis of emitter and partner before the step; with a massive partner smaller than the kT of the evolution variable.',
  ),
  define(
    'kTSofter',
    'transverse momentum of the softer',
    "k _'T,soft",
    'GeV',
    'min(Ei, Ej) sin(opening angle) in the event frame.',
  ),
  define(
    'azimuth',
    'azimuth',
    'φ',
    'rad',
    'Of i about the dipole axis, from the space axis that is most transverse to the dipole (ties: z before y before x).',
  ),
  define(
    'openingAngle',
    'opening angle',
    'θ _ij',
    'rad',
    'Between the two daughters right after the step, in the event frame.',
  ),
  define(
    'birthAngle',
    'birth angle',
    "θ _'birth",
    'rad',
    'Opening angle of the last step in which the emitter was a daughter; taking recoil is not a birth; π for a parton of a decay or annihilation at rest.',
  ),
  define(
    'partnerAngle',
    'partner angle',
    "θ _'partner",
    'rad',
    'Between emitter and colour partner right before the step.',
  ),
  define(
    'coherenceBirth',
    'coherence ratio to birth',
    "θ _ij 'over θ _'birth",
    '',
    'Opening angle over birth angle.',
  ),
  define(
    'coherencePartner',
    'coherence ratio to partner',
    "θ _ij 'over θ _'partner",
    '',
    'Opening angle over partner angle.',
  ),
  define(
    'coherence',
    'coherence ratio',
    "θ _ij 'over θ _'min",
    '',
    'Opening angle over the smaller of birth angle and partner angle.',
  ),
  define('virtuality', 'virtuality', 'q', 'GeV', 'Invariant mass of the two daughters, √(pi + pj)².'),
  define('formationTime', 'formation time', 'τ', 'GeV⁻¹', '(Ei + Ej) / (pi + pj)².'),
  define('formationTimeFm', 'formation time', 'τ', 'fm', '(Ei + Ej) / (pi + pj)², times ħc.'),
  define('eta', 'Lund angle', 'η', '', '−ln tan(opening angle / 2).'),
  define('lnKT', 'Lund transverse momentum', "'ln k _'T", '', 'ln of min(Ei, Ej) sin(opening angle) in GeV.'),
  define(
    'rapidity',
    'rapidity in the dipole',
    "η _'dip",
    '',
    'Of the softer daughter in the rest frame of the dipole, positive towards the emitter.',
  ),
  define(
    'softer',
    'softer daughter',
    "'soft",
    '',
    'Row of the daughter with the lower energy in the event frame; for z below 1/2 that can be i, the emitter.',
  ),
  define(
    'lundLeaf',
    'Lund leaf',
    "'leaf",
    '',
    'Leaf on which the emitter lives: 0 primary; the softer daughter opens the next leaf, the harder one stays.',
  ),
  define(
    'emitterTurn',
    'turn of the emitter',
    'Δθ _i',
    'rad',
    'Angle between the emitter before the step and i after it.',
  ),
  define(
    'emitterEnergyLost',
    'loss of the emitter',
    "'1−E _i 'over E _ij",
    '',
    '1 − Ei / E of the emitter before.',
  ),
  define(
    'emitterKick',
    'kick on the emitter',
    'Δp _⊥,i',
    'GeV',
    'Momentum of i transverse to the direction of the emitter before the step.',
  ),
  define(
    'partnerTurn',
    'turn of the recoiler',
    'Δθ _k',
    'rad',
    'Angle by which the recoiler turns; zero for a colour partner that keeps its direction.',
  ),
  define(
    'partnerEnergyLost',
    'loss of the recoiler',
    "ΔE _k 'over E _k",
    '',
    'Share of its energy that the recoiler gives up.',
  ),
  define(
    'partnerKick',
    'kick on the recoiler',
    'Δp _⊥,k',
    'GeV',
    'Momentum of the recoiler after the step transverse to its direction before.',
  ),
  define(
    'residual',
    'four-momentum balance',
    'Δp',
    'GeV',
    'Four-momentum after the step minus before it; zero but for rounding where it is conserved.',
  ),
];
