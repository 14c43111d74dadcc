import { CHANNELS } from '../history/index.ts';
import { type DipoleKernels, LIGHT } from './dipole-kernels.ts';
import type { ExponentTable } from './exponent-table.ts';
import { G_GG, G_QQ, Q_QG } from './z-density.ts';

export const GLUON = 21;
export const CHANNEL_COUNT = CHANNELS.length;

// scratch, not reentrant
const emitted = new Float64Array(CHANNEL_COUNT);
const split = new Float64Array(CHANNEL_COUNT);

/**
 * Exponents of both ends of a dipole from the lowest t up to lnT, by channel.
 *
 * @param colour, @param anticolour PDG numbers of its ends. @param q2 [GeV^2], within the tables.
 * @param first whether the first emission's matrix element corrects the rates.
 */
export function dipoleExponents(
  out: Float64Array,
  kernels: DipoleKernels,
  colour: number,
  anticolour: number,
  q2: number,
  lnT: number,
  first: boolean,
): void {
  out.fill(0);
  const a = kernels.kindOf(colour);
  const b = kernels.kindOf(anticolour);
  const family = (first ? kernels.first() : null) ?? kernels.emission(a, b);
  read(emitted, family.table, q2, lnT);
  addEmission(out, kernels, colour);
  // two massless ends have the same rates
  if (a !== LIGHT || b !== LIGHT) read(emitted, kernels.emission(b, a).table, q2, lnT);
  addEmission(out, kernels, anticolour);
  if (kernels.heavyFlavours.length === 0) return;
  if (colour === GLUON) addSplittings(out, kernels, b, q2, lnT, anticolour === GLUON ? 2 : 1);
  else if (anticolour === GLUON) addSplittings(out, kernels, a, q2, lnT, 1);
}

/** Add one end from what was read of its family. */
function addEmission(out: Float64Array, kernels: DipoleKernels, emitter: number): void {
  if (emitter !== GLUON) out[Q_QG] += emitted[Q_QG];
  else {
    out[G_GG] += emitted[G_GG];
    out[G_QQ] += kernels.lightFlavours * emitted[G_QQ];
  }
}

/** Add heavy flavours of g -> q qbar, for a number of gluon ends whose partner is of this kind. */
function addSplittings(
  out: Float64Array,
  kernels: DipoleKernels,
  partner: number,
  q2: number,
  lnT: number,
  ends: number,
): void {
  for (const flavour of kernels.heavyFlavours) {
    read(split, kernels.splitting(flavour, partner).table, q2, lnT);
    out[G_QQ] += ends * split[0];
  }
}

function read(out: Float64Array, table: ExponentTable, q2: number, lnT: number): void {
  if (table.enter(q2)) table.upTo(out, lnT);
  else out.fill(0);
}
