import type { Beam } from '../history/index.ts';
import type { Philox } from '../random/index.ts';

/** A hard process that ends in two partons back to back, at rest in the event frame. */
export interface HardProcess {
  /** PDG numbers. */
  readonly incoming: readonly number[];
  readonly beams: readonly Beam[];
  /** PDG number of what the two partons come from. */
  readonly resonance: number;
  /** [GeV] */
  readonly sqrtS: number;
  /** One colour line between the two partons, or two: a closed ring of two gluons. */
  readonly ring: boolean;
  /** Of the last event: PDG numbers of the two partons, the first being the colour end of the first line. */
  readonly outgoing: Int32Array;
  /** Of the last event: px, py, pz, E [GeV] of both partons. */
  readonly momenta: Float64Array;
  /** Of the last event: mass of both partons [GeV]. */
  readonly masses: Float64Array;
  /** Of the last event: weight of the accepted throw, the maximum it was held against, and the throws it took. */
  weight: number;
  maximum: number;
  throws: number;
  /** Throw the event. */
  generate(random: Philox): void;
}
