import { PI } from '../constants.ts';
import {
  type History,
  type HistoryBatch,
  type MutableEntries,
  ROLES,
  type SampleHead,
} from '../history/index.ts';
import { log } from '../math/index.ts';
import type { HardProcess } from '../processes/index.ts';
import type { FirstEmissionRatio } from '../qcd/index.ts';
import { Philox, uniform } from '../random/index.ts';
import { Branching, ENTRIES_OF_STEP, recordStep, writeParton, writeRow } from './dipole-record.ts';
import { DipoleSampler, G_QQ, type TrialListener } from './dipole-sampler.ts';
import { DipoleState } from './dipole-state.ts';
import { makeFirstEmission, makeProcess } from './make-process.ts';
import { copyTrials, demandRegrowable, demandSameRows, takeHardPartons, takeRecorded } from './resume.ts';
import { sampleHead } from './sample-head.ts';
import { type GrowSettings, makeCoupling } from './settings.ts';

const INCOMING = ROLES.indexOf('incoming');
const RESONANCE = ROLES.indexOf('resonance');
const HARD = ROLES.indexOf('hard');

const ENTRIES_OF_HARD = 5;

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
  /**
   * Append an event that keeps the steps 0 to `keep` of another, bit for bit, and grows the rest again.
   *
   * The steps that follow take the random numbers of this grower's seed and of `stream`: with those of the original,
   * and its settings, the original comes back.
   *
   * @param keep -1: the hard process alone.
   * @throws RegrowError for a history that these settings cannot continue or this engine did not make.
   */
  regrow(batch: HistoryBatch, original: History, keep: number, stream: number, event: number): void;
}

/** Final-final dipole shower with local recoil. Source: see DipoleSampler, DipoleState. */
export class DipoleShower implements Grower, TrialListener {
  readonly sample: SampleHead;
  private readonly settings: GrowSettings;
  private readonly random = new Philox();
  private readonly process: HardProcess;
  private readonly firstEmission: FirstEmissionRatio | null;
  private readonly state = new DipoleState();
  private readonly sampler: DipoleSampler;
  private readonly branching = new Branching();
  /** The batch that is being written and where its current event begins. */
  private batch: HistoryBatch | null = null;
  private entryBase = 0;
  private stepBase = 0;

  constructor(settings: GrowSettings) {
    this.settings = settings;
    this.process = makeProcess(settings);
    this.firstEmission = makeFirstEmission(settings);
    this.state.eventMass = settings.recoil === 'global' ? settings.energy : 0;
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
    this.beginEvent(batch, stream);
    this.process.generate(this.random);
    this.writeHardProcess(batch.entries);
    this.evolve(batch, 0, this.sample.hardScale);
    this.endEvent(batch, event, stream);
  }

  regrow(batch: HistoryBatch, original: History, keep: number, stream: number, event: number): void {
    demandRegrowable(this.sample, original, keep);
    this.beginEvent(batch, stream);
    takeHardPartons(this.process, original);
    this.writeHardProcess(batch.entries);
    const { state, branching, entryBase, stepBase } = this;
    let tStart = this.sample.hardScale;
    for (let step = 0; step <= keep; step++) {
      takeRecorded(branching, state, original, step);
      batch.reserve(ENTRIES_OF_STEP, 1, 0);
      recordStep(batch.entries, batch.steps, entryBase, stepBase, state, branching, step, tStart);
      tStart = branching.t;
    }
    if (batch.trials !== null) copyTrials(batch, original, keep);
    demandSameRows(batch, entryBase, stepBase, original, keep);
    this.evolve(batch, keep + 1, tStart);
    this.endEvent(batch, event, stream);
  }

  private beginEvent(batch: HistoryBatch, stream: number): void {
    this.batch = batch;
    this.entryBase = batch.entries.length;
    this.stepBase = batch.steps.length;
    this.random.startEvent(this.settings.seed, stream);
    batch.reserve(ENTRIES_OF_HARD, 0, 0);
  }

  /** Branch from `step` on, whose gap begins at tStart, down to the lowest t. */
  private evolve(batch: HistoryBatch, step: number, tStart: number): void {
    const { random, sampler, state, branching, entryBase, stepBase } = this;
    const listener = batch.trials === null ? null : this;
    sampler.start(state, log(tStart));
    for (; ; step++) {
      random.startStep(step + 1);
      if (!sampler.next(state, random, listener, step === 0 ? this.firstEmission : null)) break;
      this.takeFound();
      batch.reserve(ENTRIES_OF_STEP, 1, 0);
      recordStep(batch.entries, batch.steps, entryBase, stepBase, state, branching, step, tStart);
      tStart = branching.t;
      // the next gap begins at the recorded t, so that a history can be continued from its tables
      sampler.lnT = log(tStart);
      sampler.refresh(state);
    }
  }

  private endEvent(batch: HistoryBatch, event: number, stream: number): void {
    batch.endEvent({
      event,
      label: null,
      stream,
      rerun: null,
      status: 'complete',
      statusReason: null,
      outgoing: [this.process.outgoing[0], this.process.outgoing[1]],
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

  /** What the sampler found, with an azimuth from the block of random numbers that it left. */
  private takeFound(): void {
    const { sampler, branching } = this;
    const splitting = sampler.channel === G_QQ;
    branching.dipole = sampler.dipole;
    branching.fromColourEnd = sampler.fromColourEnd;
    branching.channel = sampler.channel;
    branching.flavour = splitting ? sampler.flavour : 0;
    branching.quarkMass = splitting ? sampler.quarkMass : 0;
    branching.t = sampler.t;
    branching.z = sampler.z;
    branching.y = sampler.y;
    branching.kT = Math.sqrt(sampler.kT2);
    branching.azimuth = 2 * PI * uniform(this.random.x0);
    branching.alphaS = sampler.alphaS;
    branching.ratio = sampler.ratio;
    branching.rejected = sampler.rejected;
  }
}
