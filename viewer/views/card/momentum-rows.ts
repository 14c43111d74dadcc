import type { History, StepMeasures } from '../../../engine/index.ts';

/** One parton of a step with its colours and momentum. */
export interface MomentumRow {
  /** Notation of who it is in the step: emitter, partner, *i*, *j*, *k*. */
  readonly label: string;
  readonly name: string;
  /** Row in the entries, −1 where the step names none. */
  readonly entry: number;
  /** PDG number, 0 where there is none. */
  readonly id: number;
  readonly colour: number;
  readonly anticolour: number;
  /** E, px, py, pz [GeV]. */
  readonly momentum: readonly number[];
}

export interface MomentumTable {
  readonly before: readonly MomentumRow[];
  readonly after: readonly MomentumRow[];
  /** After minus before of the whole event: E, px, py, pz [GeV]. */
  readonly residual: readonly number[];
  /** Largest size of a component [GeV]. */
  readonly largest: number;
}

/** Momenta and colour tags of the partons of a step, right before and right after it. */
export function momentumTable(history: History, measures: StepMeasures, step: number): MomentumTable {
  const { steps, entries } = history;
  const take = (label: string, name: string, entry: number): MomentumRow => {
    const there = entry >= 0 && entry < entries.length;
    const of = (column: ArrayLike<number>, missing: number): number => (there ? column[entry] : missing);
    return {
      label,
      name,
      entry: there ? entry : -1,
      id: of(entries.id, 0),
      colour: of(entries.colour, 0),
      anticolour: of(entries.anticolour, 0),
      momentum: [of(entries.e, NaN), of(entries.px, NaN), of(entries.py, NaN), of(entries.pz, NaN)],
    };
  };
  const partner = steps.partner[step];
  const recoiler = steps.recoiler[step];
  const before = [take('*ij*', 'emitter', steps.emitter[step]), take('*k*', 'partner', partner)];
  if (recoiler >= 0 && recoiler !== partner) before.push(take('*r*', 'recoiler', recoiler));
  const after = [take('*i*', 'emitter', steps.i[step]), take('*j*', 'emission', steps.j[step])];
  const recoilerAfter = steps.recoilerAfter[step];
  if (recoilerAfter >= 0) {
    after.push(
      recoiler === partner ? take('*k*', 'partner', recoilerAfter) : take('*r*', 'recoiler', recoilerAfter),
    );
  }
  const [px, py, pz, e] = measures.residual.subarray(4 * step, 4 * step + 4);
  const sizes = [...before, ...after].flatMap((row) => row.momentum.map(Math.abs)).filter(Number.isFinite);
  return { before, after, residual: [e, px, py, pz], largest: Math.max(0, ...sizes) };
}
