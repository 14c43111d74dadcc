import { PI } from '../constants.ts';
import {
  type HistoryBatch,
  KINDS,
  type MutableEntries,
  type MutableSteps,
  ROLES,
  type SampleHead,
} from '../history/index.ts';
import { atan2, log } from '../math/index.ts';
import type { HardProcess } from '../processes/index.ts';
import type { FirstEmissionRatio } from '../qcd/index.ts';
import { Philox, uniform } from '../random/index.ts';
import { DipoleSampler, G_QQ, type TrialListener } from './dipole-sampler.ts';
import { DipoleState } from './dipole-state.ts';
import { makeFirstEmission, makeProcess } from './make-process.ts';
import { sampleHead } from './sample-head.ts';
import { type GrowSettings, makeCoupling } from './settings.ts';

const INCOMING = ROLES.indexOf('incoming');
const RESONANCE = ROLES.indexOf('resonance');
const HARD = ROLES.indexOf('hard');
const EMITTER = ROLES.indexOf('emitter');
const EMISSION = ROLES.indexOf('emission');
const RECOILED = ROLES.indexOf('recoiled');
const FINAL_FINAL = KINDS.indexOf('final-final');

const ENTRIES_OF_HARD = 5;
const ENTRIES_OF_STEP = 3;

/** Grows events of one sample, each from its own random numbers. */
export interface Grower {
  /** What the events have in common. */
  readonly sample: SampleHead;
  /**
   * Append an event to a batch.
   *
   * @param stream number of the event in the sample of this seed, 0 to 2^53 - 1: fixes the history bit for bit.
   * @param event its number in the file, `stream` unless given.
   */
  grow(batch: HistoryBatch, stream: number, event?: number): void;
}

/** Massless final-final dipole shower with local recoil behind e+e- -> q qbar. Source: see DipoleSampler, mapDipole. */
export class DipoleShower implements Grower, TrialListener {
  readonly sample: SampleHead;
  private readonly settings: GrowSettings;
  private readonly random = new Philox();
  private readonly process: HardProcess;
  private readonly firstEmission: FirstEmissionRatio | null;
  private readonly state = new DipoleState();
  private readonly sampler: DipoleSampler;
  /** The batch that is being written and where its current event begins. */
  private batch: HistoryBatch | null = null;
  private entryBase = 0;
  private stepBase = 0;

  constructor(settings: GrowSettings) {
    this.settings = settings;
    this.process = makeProcess(settings);
    this.firstEmission = makeFirstEmission(settings);
    this.sample = sampleHead(settings, this.process);
    this.sampler = new DipoleSampler(
      settings,
      makeCoupling(settings),
      this.sample.cutoff,
      this.sample.hardScale,
      this.sample.tLow,
    );
  }

  grow(batch: HistoryBatch, stream: number, event: number = stream): void {
    const { random, sampler, state, settings } = this;
    this.batch = batch;
    this.entryBase = batch.entries.length;
    this.stepBase = batch.steps.length;
    random.startEvent(settings.seed, stream);
    this.process.generate(random);
    batch.reserve(ENTRIES_OF_HARD, 0, 0);
    this.writeHardProcess(batch.entries);

    const listener = batch.trials === null ? null : this;
    sampler.start(state, log(this.sample.hardScale));
    let tStart = this.sample.hardScale;
    for (let step = 0; ; step++) {
      random.startStep(step + 1);
      if (!sampler.next(state, random, listener, step === 0 ? this.firstEmission : null)) break;
      batch.reserve(ENTRIES_OF_STEP, 1, 0);
      this.takeStep(batch.entries, batch.steps, step, tStart);
      tStart = sampler.t;
      // the next gap begins at the recorded t, so that a history can be continued from its tables
      sampler.lnT = log(sampler.t);
      sampler.refresh(state);
    }
    batch.endEvent({
      event,
      label: null,
      stream,
      rerun: null,
      status: 'complete',
      statusReason: null,
      outgoing: [...this.process.outgoing],
      weight: 1,
    });
    this.batch = null;
  }

  /** Record a rejected trial. */
  reject(sampler: DipoleSampler, reason: number, ratio: number): void {
    const { batch, state } = this;
    if (batch?.trials == null) return;
    batch.reserve(0, 0, 1);
    const { trials } = batch;
    const at = trials.length++;
    const colourEnd = state.row[state.colourEnd[sampler.dipole]];
    const anticolourEnd = state.row[state.anticolourEnd[sampler.dipole]];
    trials.before[at] = batch.steps.length - this.stepBase;
    trials.t[at] = sampler.t;
    trials.z[at] = sampler.z;
    trials.channel[at] = sampler.channel;
    trials.emitter[at] = sampler.fromColourEnd ? colourEnd : anticolourEnd;
    trials.partner[at] = sampler.fromColourEnd ? anticolourEnd : colourEnd;
    trials.reason[at] = reason;
    trials.ratio[at] = ratio;
  }

  private writeHardProcess(entries: MutableEntries): void {
    const { state, process } = this;
    const base = this.entryBase;
    let row = 0;
    for (const { id, px, py, pz, e } of process.beams)
      if (id !== process.resonance) writeRow(entries, base + row++, id, px, py, pz, e, 0, INCOMING);
    const resonance = row++;
    writeRow(entries, base + resonance, process.resonance, 0, 0, 0, process.sqrtS, process.sqrtS, RESONANCE);
    state.clear();
    const { outgoing, masses, momenta } = process;
    const first = state.addParton(outgoing[0], masses[0], momenta, 0);
    const second = state.addParton(outgoing[1], masses[1], momenta, 4);
    state.connect(first, second);
    if (process.ring) state.connect(second, first);
    for (let slot = first; slot <= second; slot++) {
      writeParton(entries, base + row, state, slot, resonance, -1, HARD);
      state.row[slot] = row++;
    }
    entries.length = base + row;
  }

  /** Carry out and record the branching that the sampler found. */
  private takeStep(entries: MutableEntries, steps: MutableSteps, step: number, tStart: number): void {
    const { state, sampler, random } = this;
    const { dipole, fromColourEnd, channel, z, w, y } = sampler;
    const azimuth = 2 * PI * uniform(random.x0);
    const emitter = fromColourEnd ? state.colourEnd[dipole] : state.anticolourEnd[dipole];
    const partner = fromColourEnd ? state.anticolourEnd[dipole] : state.colourEnd[dipole];
    const emitterRow = state.row[emitter];
    const partnerRow = state.row[partner];
    const generation = state.generation[emitter];
    const flavour = channel === G_QQ ? sampler.flavour : 0;
    const quarkMass = flavour === 0 ? 0 : sampler.quarkMass;
    const twicePiPj = y * (state.q2[dipole] - 2 * quarkMass * quarkMass);
    const j = state.branch(dipole, fromColourEnd, flavour, z, w, y, azimuth, quarkMass);

    const base = this.entryBase;
    const row = entries.length - base;
    writeParton(entries, base + row, state, emitter, emitterRow, step, EMITTER);
    writeParton(entries, base + row + 1, state, j, emitterRow, step, EMISSION);
    writeParton(entries, base + row + 2, state, partner, partnerRow, step, RECOILED);
    entries.endedBy[base + emitterRow] = step;
    entries.endedBy[base + partnerRow] = step;
    state.row[emitter] = row;
    state.row[j] = row + 1;
    state.row[partner] = row + 2;
    entries.length = base + row + ENTRIES_OF_STEP;

    const at = this.stepBase + step;
    steps.kind[at] = FINAL_FINAL;
    steps.channel[at] = channel;
    steps.t[at] = sampler.t;
    steps.tStart[at] = tStart;
    steps.z[at] = z;
    steps.azimuth[at] = azimuth;
    steps.y[at] = y;
    steps.kT[at] = Math.sqrt(sampler.kT2);
    steps.openingAngle[at] = claimedAngle(state, emitter, j, twicePiPj);
    steps.alphaS[at] = sampler.alphaS;
    steps.emitter[at] = emitterRow;
    steps.partner[at] = partnerRow;
    steps.recoiler[at] = partnerRow;
    steps.i[at] = row;
    steps.j[at] = row + 1;
    steps.recoilerAfter[at] = row + 2;
    steps.ratio[at] = sampler.ratio;
    steps.rejected[at] = sampler.rejected;
    steps.previous[at] = step - 1;
    steps.noEmission[at] = NaN;
    steps.generation[at] = generation;
    steps.length = at + 1;
  }
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
function writeRow(
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
function writeParton(
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
