import type { Head } from './head.ts';

/** One row per parton state; see schema.ts for units and missing values. All columns have `length` elements. */
export interface EntryTable {
  readonly length: number;
  readonly id: Int32Array;
  readonly px: Float64Array;
  readonly py: Float64Array;
  readonly pz: Float64Array;
  readonly e: Float64Array;
  readonly m: Float64Array;
  readonly colour: Int32Array;
  readonly anticolour: Int32Array;
  readonly from: Int32Array;
  readonly madeBy: Int32Array;
  readonly endedBy: Int32Array;
  /** Codes into ROLES. */
  readonly role: Uint8Array;
  readonly line: Int32Array;
}

/** One row per branching, in the order of evolution; see schema.ts. */
export interface StepTable {
  readonly length: number;
  /** Codes into KINDS. */
  readonly kind: Uint8Array;
  /** Codes into History.channels. */
  readonly channel: Uint8Array;
  readonly t: Float64Array;
  readonly tStart: Float64Array;
  readonly z: Float64Array;
  readonly azimuth: Float64Array;
  readonly y: Float64Array;
  readonly kT: Float64Array;
  readonly openingAngle: Float64Array;
  readonly alphaS: Float64Array;
  readonly emitter: Int32Array;
  readonly partner: Int32Array;
  readonly recoiler: Int32Array;
  readonly i: Int32Array;
  readonly j: Int32Array;
  readonly recoilerAfter: Int32Array;
  readonly ratio: Float64Array;
  readonly rejected: Int32Array;
  readonly previous: Int32Array;
  readonly noEmission: Float64Array;
  readonly generation: Int32Array;
  /**
   * Lorentz transformation of every other entry at the step, BOOST_NUMBERS to a step, row by row in the order px py pz e,
   * NaN where none; null where the history has no such column.
   */
  readonly boost: Float64Array | null;
}

/** One row per rejected trial; see schema.ts. */
export interface TrialTable {
  readonly length: number;
  readonly before: Int32Array;
  readonly t: Float64Array;
  readonly z: Float64Array;
  /** Codes into History.channels. */
  readonly channel: Uint8Array;
  readonly emitter: Int32Array;
  readonly partner: Int32Array;
  /** Codes into REASONS. */
  readonly reason: Uint8Array;
  readonly ratio: Float64Array;
}

/**
 * One event, whole.
 *
 * Every column exists in memory; one that its author did not record is filled with its missing value and not named in
 * `head.columns`. `trials` is null where no rejected trials were recorded.
 */
export interface History {
  readonly head: Head;
  readonly entries: EntryTable;
  readonly steps: StepTable;
  readonly trials: TrialTable | null;
  /** Words of the channel codes; the first are CHANNELS. */
  readonly channels: readonly string[];
}
