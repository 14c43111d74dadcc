import { KINDS, type MutableEntries, type MutableSteps, ROLES } from '../history/index.ts';
import { atan2 } from '../math/index.ts';
import type { DipoleState } from './dipole-state.ts';

const EMITTER = ROLES.indexOf('emitter');
const EMISSION = ROLES.indexOf('emission');
const RECOILED = ROLES.indexOf('recoiled');
const FINAL_FINAL = KINDS.indexOf('final-final');

/** Entries that a step adds. */
export const ENTRIES_OF_STEP = 3;

/** A branching that the sampler found, or that a history holds; one object serves all. */
export class Branching {
  dipole = 0;
  fromColourEnd = false;
  /** Code into CHANNELS. */
  channel = 0;
  /** PDG number and mass [GeV] of the quark that a gluon splits into, 0 where a gluon is emitted. */
  flavour = 0;
  quarkMass = 0;
  /** [GeV^2] */
  t = 0;
  z = 0;
  y = 0;
  /** [GeV] */
  kT = 0;
  azimuth = 0;
  alphaS = 0;
  ratio = 0;
  rejected = 0;
}

/**
 * Carry out a branching and write its rows.
 *
 * @param entryBase, stepBase rows of the event's first entry and step in the tables.
 * @param step number of the step. @param tStart upper end of its gap.
 */
export function recordStep(
  entries: MutableEntries,
  steps: MutableSteps,
  entryBase: number,
  stepBase: number,
  state: DipoleState,
  branching: Branching,
  step: number,
  tStart: number,
): void {
  const { dipole, fromColourEnd, flavour, z, y, quarkMass } = branching;
  const emitter = fromColourEnd ? state.colourEnd[dipole] : state.anticolourEnd[dipole];
  const partner = fromColourEnd ? state.anticolourEnd[dipole] : state.colourEnd[dipole];
  const emitterRow = state.row[emitter];
  const partnerRow = state.row[partner];
  const generation = state.generation[emitter];
  const w = state.emissionFraction(dipole, z, y, branching.kT, quarkMass);
  const j = state.branch(dipole, fromColourEnd, flavour, z, w, y, branching.azimuth, quarkMass);

  const row = entries.length - entryBase;
  writeParton(entries, entryBase + row, state, emitter, emitterRow, step, EMITTER);
  writeParton(entries, entryBase + row + 1, state, j, emitterRow, step, EMISSION);
  writeParton(entries, entryBase + row + 2, state, partner, partnerRow, step, RECOILED);
  entries.endedBy[entryBase + emitterRow] = step;
  entries.endedBy[entryBase + partnerRow] = step;
  state.row[emitter] = row;
  state.row[j] = row + 1;
  state.row[partner] = row + 2;
  entries.length = entryBase + row + ENTRIES_OF_STEP;

  const at = stepBase + step;
  steps.kind[at] = FINAL_FINAL;
  steps.channel[at] = branching.channel;
  steps.t[at] = branching.t;
  steps.tStart[at] = tStart;
  steps.z[at] = z;
  steps.azimuth[at] = branching.azimuth;
  steps.y[at] = y;
  // beside a heavy partner the evolution variable is no transverse momentum: the true one is claimed
  steps.kT[at] = Number.isNaN(state.massiveKT) ? branching.kT : state.massiveKT;
  steps.openingAngle[at] = claimedAngle(state, emitter, j, y * state.shareQ2);
  steps.alphaS[at] = branching.alphaS;
  steps.emitter[at] = emitterRow;
  steps.partner[at] = partnerRow;
  steps.recoiler[at] = partnerRow;
  steps.i[at] = row;
  steps.j[at] = row + 1;
  steps.recoilerAfter[at] = row + 2;
  steps.ratio[at] = branching.ratio;
  steps.rejected[at] = branching.rejected;
  steps.previous[at] = step - 1;
  steps.noEmission[at] = NaN;
  steps.generation[at] = generation;
  if (steps.boost !== null) steps.boost.set(state.boost, 16 * at);
  steps.length = at + 1;
}

/** Opening angle from 2 pi.pj as the shower knows it: an angle that the momenta can be held against. */
function claimedAngle(state: DipoleState, i: number, j: number, twicePiPj: number): number {
  const { after } = state;
  const mi2 = state.mass[i] * state.mass[i];
  const mj2 = state.mass[j] * state.mass[j];
  const pi2 = after[3] * after[3] - mi2;
  const ee = after[3] * after[7];
  const pp = mi2 === 0 && mj2 === 0 ? ee : Math.sqrt(pi2 * (after[7] * after[7] - mj2));
  // |pi||pj| (1 - cos) = pi.pj - (Ei Ej - |pi||pj|)
  const apart = twicePiPj - (2 * (mi2 * after[7] * after[7] + mj2 * pi2)) / (ee + pp);
  const half = Math.max(apart, 0);
  return 2 * atan2(Math.sqrt(half), Math.sqrt(Math.max(4 * pp - half, 0)));
}

/** A row without colour: nine numbers because it runs in the inner loop and an object would be an allocation. */
export function writeRow(
  entries: MutableEntries,
  at: number,
  id: number,
  px: number,
  py: number,
  pz: number,
  e: number,
  m: number,
  role: number,
): void {
  entries.id[at] = id;
  entries.px[at] = px;
  entries.py[at] = py;
  entries.pz[at] = pz;
  entries.e[at] = e;
  entries.m[at] = m;
  entries.colour[at] = 0;
  entries.anticolour[at] = 0;
  entries.from[at] = -1;
  entries.madeBy[at] = -1;
  entries.endedBy[at] = -1;
  entries.role[at] = role;
  entries.line[at] = -1;
}

/** The row of a living parton as its slot stands. */
export function writeParton(
  entries: MutableEntries,
  at: number,
  state: DipoleState,
  slot: number,
  from: number,
  madeBy: number,
  role: number,
): void {
  const momentum = 4 * slot;
  entries.id[at] = state.id[slot];
  entries.px[at] = state.momenta[momentum];
  entries.py[at] = state.momenta[momentum + 1];
  entries.pz[at] = state.momenta[momentum + 2];
  entries.e[at] = state.momenta[momentum + 3];
  entries.m[at] = state.mass[slot];
  entries.colour[at] = state.colour[slot];
  entries.anticolour[at] = state.anticolour[slot];
  entries.from[at] = from;
  entries.madeBy[at] = madeBy;
  entries.endedBy[at] = -1;
  entries.role[at] = role;
  entries.line[at] = slot;
}
