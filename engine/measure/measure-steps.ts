import { HBAR_C } from '../constants.ts';
import {
  BOOST_NUMBERS,
  type EntryTable,
  entriesAtEnd,
  type History,
  KINDS,
  ROLES,
} from '../history/index.ts';
import { angleBetween, atan2, log, momentum } from '../math/index.ts';
import { fillBirthRows, hardBirthAngles, WIDEST } from './births.ts';
import {
  DAUGHTER,
  type DipoleInvariants,
  dipoleInvariants,
  EMISSION,
  EMITTER,
  makeDipoleInvariants,
  PARTNER,
  PARTNER_AFTER,
} from './dipole-invariants.ts';
import { crossLength, dot3, PACKED, packRow } from './packed-momenta.ts';
import { StepMeasures } from './step-measures.ts';

const EMISSION_ROLE = ROLES.indexOf('emission');
const FINAL_FINAL = KINDS.indexOf('final-final');

// scratch, not reentrant
const packed = new Float64Array(5 * PACKED);
const recoil = new Float64Array(2 * PACKED);
const dipole = makeDipoleInvariants();
let bornAs = new Int32Array(256);

/**
 * Everything that is derived for every branching, from the recorded four-momenta alone.
 *
 * @param out memory of an earlier call to use again where it is large enough; its `length` becomes the number of steps.
 * @returns one array per quantity, index = step; see definitions.ts. A quantity that needs what the history lacks, or
 * rows that it does not have, is NaN (row and leaf numbers: -1); nothing throws on impossible values.
 *
 * Each step in constant time. Angles in the event frame.
 */
export function measureSteps(history: History, out?: StepMeasures): StepMeasures {
  const { entries, steps, head } = history;
  const before = entriesAtEnd(history);
  const measures = out && out.capacity >= steps.length ? out : new StepMeasures(steps.length);
  measures.length = steps.length;
  if (bornAs.length < entries.length) bornAs = new Int32Array(2 * entries.length);
  const birthsKnown = fillBirthRows(bornAs, history);
  const hardAngles = birthsKnown ? hardBirthAngles(history) : null;
  startResiduals(measures, history);
  const inFourMomentumUnits = head.meaning.tUnit === 'GeV^2';
  const tIs = inFourMomentumUnits ? head.meaning.t : null;

  for (let step = 0; step < steps.length; step++) {
    const partner = steps.partner[step];
    packRow(packed, EMITTER, before, steps.emitter[step]);
    packRow(packed, PARTNER, before, partner);
    packRow(packed, DAUGHTER, entries, steps.i[step]);
    packRow(packed, EMISSION, entries, steps.j[step]);
    const partnerRecoils = steps.recoiler[step] === partner;
    packRow(packed, PARTNER_AFTER, entries, partnerRecoils ? steps.recoilerAfter[step] : partner);
    dipoleInvariants(dipole, packed);

    measures.zLightCone[step] = dipole.z;
    measures.y[step] = dipole.y;
    measures.kT[step] = dipole.kT;
    measures.azimuth[step] = dipole.azimuth;
    measures.t[step] = steps.kind[step] === FINAL_FINAL ? evolution(dipole, tIs) : NaN;
    measures.evolutionTime[step] = log(head.hardScale / steps.t[step]);
    measurePair(measures, step);
    nameSofter(measures, step, history);
    const birth = birthAngle(measures, step, history, hardAngles);
    measureCoherence(measures, step, birth, angleBetween(packed, packed, EMITTER, PARTNER));
    measureRecoil(measures, step, history, before);
  }
  return measures;
}

/** t of a final-final step in the meaning of its column, with masses; NaN for a meaning that we do not share. */
function evolution(d: DipoleInvariants, meaning: string | null): number {
  const { y, z, oneMinusZ: w, qBar2, daughterMass2, emissionMass2 } = d;
  if (meaning === 'kT^2') return z * w * y * qBar2 - w * w * daughterMass2 - z * z * emissionMass2;
  if (meaning === 'virtuality^2') return y * qBar2 + daughterMass2 + emissionMass2 - d.emitterMass2;
  return NaN;
}

/** What needs the two daughters alone. */
function measurePair(m: StepMeasures, step: number): void {
  const cross = crossLength(packed, DAUGHTER, EMISSION);
  const dot = dot3(packed, DAUGHTER, EMISSION);
  const lengths = momentum(packed, DAUGHTER) * momentum(packed, EMISSION);
  const energyI = packed[DAUGHTER + 3];
  const energyJ = packed[EMISSION + 3];
  const energy = energyI + energyJ;
  const kT = (Math.min(energyI, energyJ) * cross) / lengths;
  m.openingAngle[step] = atan2(cross, dot);
  // tan(angle/2) = sin/(1+cos) = (1-cos)/sin, whichever adds
  const halfTangent = dot > 0 ? cross / (lengths + dot) : (lengths - dot) / cross;
  m.eta[step] = -log(halfTangent);
  m.kTSofter[step] = kT;
  m.lnKT[step] = log(kT);
  m.zEnergy[step] = energyI / energy;
  const mass2 = dipole.pairMass2;
  m.virtuality[step] = Math.sqrt(mass2);
  m.formationTime[step] = energy / mass2;
  m.formationTimeFm[step] = (HBAR_C * energy) / mass2;
}

/** The softer daughter, its rapidity, and the leaf of the Lund diagram on which the emitter lives. */
function nameSofter(m: StepMeasures, step: number, history: History): void {
  const { steps, entries } = history;
  const energyI = packed[DAUGHTER + 3];
  const energyJ = packed[EMISSION + 3];
  const softerIsI = energyI < energyJ;
  m.softer[step] = softerIsI ? steps.i[step] : energyJ <= energyI ? steps.j[step] : -1;
  m.rapidity[step] = softerIsI ? dipole.daughterRapidity : dipole.emissionRapidity;
  const born = birthRow(steps.emitter[step], entries.length);
  if (born < 0) m.lundLeaf[step] = -1;
  else if (entries.madeBy[born] < 0) m.lundLeaf[step] = 0;
  else {
    const birthStep = entries.madeBy[born];
    const leaf = birthStep < step ? m.lundLeaf[birthStep] : -1;
    m.lundLeaf[step] = leaf >= 0 && m.softer[birthStep] === born ? leaf + 1 : leaf;
  }
}

function birthRow(row: number, rows: number): number {
  return row >= 0 && row < rows ? bornAs[row] : -1;
}

function birthAngle(
  m: StepMeasures,
  step: number,
  history: History,
  hardAngles: Float64Array | null,
): number {
  const { steps, entries } = history;
  const born = birthRow(steps.emitter[step], entries.length);
  if (born < 0) return NaN;
  const birthStep = entries.madeBy[born];
  if (birthStep < 0) return hardAngles ? hardAngles[born] : WIDEST;
  return birthStep < step ? m.openingAngle[birthStep] : NaN;
}

function measureCoherence(m: StepMeasures, step: number, birth: number, partner: number): void {
  const opening = m.openingAngle[step];
  m.birthAngle[step] = birth;
  m.partnerAngle[step] = partner;
  m.coherenceBirth[step] = opening / birth;
  m.coherencePartner[step] = opening / partner;
  // one-to-two branchings have no partner, foreign histories perhaps no birth: then the other alone
  const smaller = partner < birth || Number.isNaN(birth) ? partner : birth;
  m.coherence[step] = opening / smaller;
}

/** Turn, loss and kick of emitter and recoiler, and the four-momentum that the step makes or loses. */
function measureRecoil(m: StepMeasures, step: number, history: History, before: EntryTable): void {
  const { steps, entries } = history;
  m.emitterTurn[step] = angleBetween(packed, packed, EMITTER, DAUGHTER);
  m.emitterEnergyLost[step] = 1 - packed[DAUGHTER + 3] / packed[EMITTER + 3];
  m.emitterKick[step] = crossLength(packed, EMITTER, DAUGHTER) / momentum(packed, EMITTER);
  const recoiler = steps.recoiler[step];
  const recoilerAfter = steps.recoilerAfter[step];
  packRow(recoil, 0, before, recoiler);
  packRow(recoil, PACKED, entries, recoilerAfter);
  m.partnerTurn[step] = angleBetween(recoil, recoil, 0, PACKED);
  m.partnerEnergyLost[step] = 1 - recoil[PACKED + 3] / recoil[3];
  m.partnerKick[step] = crossLength(recoil, 0, PACKED) / momentum(recoil, 0);
  const alone = recoiler < 0 && recoilerAfter < 0;
  for (let c = 0; c < 4; c++) {
    const taken = alone ? 0 : recoil[PACKED + c] - recoil[c];
    const branched = packed[DAUGHTER + c] - packed[EMITTER + c] + packed[EMISSION + c];
    m.residual[4 * step + c] += branched + taken;
  }
  if (steps.boost !== null && !Number.isNaN(steps.boost[BOOST_NUMBERS * step]))
    addRecoilOfTheRest(m, step, steps.boost, history);
}

/** What all other partons gain where they recoil too: B R - R, R the event less the dipole. */
function addRecoilOfTheRest(m: StepMeasures, step: number, boost: Float64Array, history: History): void {
  const rest = [0, 0, 0, history.head.sqrtS];
  for (let c = 0; c < 4; c++) rest[c] -= packed[EMITTER + c] + packed[PARTNER + c];
  for (let c = 0; c < 4; c++) {
    let moved = 0;
    for (let d = 0; d < 4; d++) moved += boost[BOOST_NUMBERS * step + 4 * c + d] * rest[d];
    m.residual[4 * step + c] += moved - rest[c];
  }
}

/** Zero, and the momenta of third and further daughters, which no column of the step names. */
function startResiduals(m: StepMeasures, history: History): void {
  const { entries, steps } = history;
  const { madeBy, role } = entries;
  const { residual } = m;
  residual.fill(0, 0, 4 * steps.length);
  for (let row = 0; row < entries.length; row++) {
    const step = madeBy[row];
    if (role[row] !== EMISSION_ROLE || !(step >= 0 && step < steps.length) || steps.j[step] === row) continue;
    residual[4 * step] += entries.px[row];
    residual[4 * step + 1] += entries.py[row];
    residual[4 * step + 2] += entries.pz[row];
    residual[4 * step + 3] += entries.e[row];
  }
}
