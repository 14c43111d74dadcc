/** Quantities of a step that are one double each, in the order of their memory. */
export const FLOAT_MEASURES = [
  'openingAngle',
  'birthAngle',
  'partnerAngle',
  'coherenceBirth',
  'coherencePartner',
  'coherence',
  'zLightCone',
  'zEnergy',
  'y',
  't',
  'kT',
  'kTSofter',
  'azimuth',
  'virtuality',
  'formationTime',
  'formationTimeFm',
  'eta',
  'lnKT',
  'rapidity',
  'emitterTurn',
  'emitterEnergyLost',
  'emitterKick',
  'partnerTurn',
  'partnerEnergyLost',
  'partnerKick',
  'evolutionTime',
] as const;

/** Quantities of a step that are one integer each. */
export const INTEGER_MEASURES = ['softer', 'lundLeaf'] as const;

export type FloatMeasure = (typeof FLOAT_MEASURES)[number];
export type IntegerMeasure = (typeof INTEGER_MEASURES)[number];

/**
 * What the momenta of an event say about each of its steps: struct of arrays, index = step.
 *
 * definitions.ts says what each quantity is, and its unit. NaN (or -1) where the history lacks what the quantity needs.
 * The first `length` elements are in use; memory that is used again may be longer.
 */
export class StepMeasures {
  /** Number of steps. */
  length = 0;
  /** Number of steps that there is memory for. */
  readonly capacity: number;
  readonly openingAngle: Float64Array;
  readonly birthAngle: Float64Array;
  readonly partnerAngle: Float64Array;
  readonly coherenceBirth: Float64Array;
  readonly coherencePartner: Float64Array;
  readonly coherence: Float64Array;
  readonly zLightCone: Float64Array;
  readonly zEnergy: Float64Array;
  readonly y: Float64Array;
  readonly t: Float64Array;
  readonly kT: Float64Array;
  readonly kTSofter: Float64Array;
  readonly azimuth: Float64Array;
  readonly virtuality: Float64Array;
  readonly formationTime: Float64Array;
  readonly formationTimeFm: Float64Array;
  readonly eta: Float64Array;
  readonly lnKT: Float64Array;
  readonly rapidity: Float64Array;
  readonly emitterTurn: Float64Array;
  readonly emitterEnergyLost: Float64Array;
  readonly emitterKick: Float64Array;
  readonly partnerTurn: Float64Array;
  readonly partnerEnergyLost: Float64Array;
  readonly partnerKick: Float64Array;
  readonly evolutionTime: Float64Array;
  /** Row of the daughter with the lower energy. */
  readonly softer: Int32Array;
  /** Leaf of the Lund diagram on which the emitter lives: 0 primary, 1 secondary, and so on. */
  readonly lundLeaf: Int32Array;
  /** Four-momentum after minus before, px, py, pz, E [GeV], four to a step. */
  readonly residual: Float64Array;

  /** Memory for up to `capacity` steps, in two allocations. */
  constructor(capacity: number) {
    const doubles = new ArrayBuffer(8 * capacity * (FLOAT_MEASURES.length + 4));
    let at = 0;
    const float = (length: number): Float64Array => {
      at += 8 * length;
      return new Float64Array(doubles, at - 8 * length, length);
    };
    this.capacity = capacity;
    this.openingAngle = float(capacity);
    this.birthAngle = float(capacity);
    this.partnerAngle = float(capacity);
    this.coherenceBirth = float(capacity);
    this.coherencePartner = float(capacity);
    this.coherence = float(capacity);
    this.zLightCone = float(capacity);
    this.zEnergy = float(capacity);
    this.y = float(capacity);
    this.t = float(capacity);
    this.kT = float(capacity);
    this.kTSofter = float(capacity);
    this.azimuth = float(capacity);
    this.virtuality = float(capacity);
    this.formationTime = float(capacity);
    this.formationTimeFm = float(capacity);
    this.eta = float(capacity);
    this.lnKT = float(capacity);
    this.rapidity = float(capacity);
    this.emitterTurn = float(capacity);
    this.emitterEnergyLost = float(capacity);
    this.emitterKick = float(capacity);
    this.partnerTurn = float(capacity);
    this.partnerEnergyLost = float(capacity);
    this.partnerKick = float(capacity);
    this.evolutionTime = float(capacity);
    this.residual = float(4 * capacity);
    const integers = new Int32Array(2 * capacity);
    this.softer = integers.subarray(0, capacity);
    this.lundLeaf = integers.subarray(capacity);
  }
}
