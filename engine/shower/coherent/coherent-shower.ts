import type { History, HistoryBatch, SampleHead } from '../../history/index.ts';
import type { HardProcess } from '../../processes/index.ts';
import { quarkMass } from '../../qcd/index.ts';
import { Philox } from '../../random/index.ts';
import type { Grower } from '../dipole-shower.ts';
import { makeProcess } from '../make-process.ts';
import { copyTrials, demandRegrowable, takeHardPartons } from '../resume.ts';
import { type GrowSettings, makeCoupling } from '../settings.ts';
import { BranchingTree } from './branching-tree.ts';
import { coherentHead } from './coherent-head.ts';
import { type FinishedEvent, recordEvent } from './coherent-record.ts';
import { ColourChain } from './colour-chain.ts';
import { LineEvolution } from './evolve-lines.ts';
import { buildVirtualities, JetMomenta, keepVirtualities } from './jet-momenta.ts';
import { demandSameClaims, KeptSteps } from './kept-steps.ts';
import { LineSampler } from './line-sampler.ts';
import { PlaybackOrder } from './playback-order.ts';
import { TrialLog } from './trial-log.ts';
import { ANGLE, VIRTUALITY } from './trial-windows.ts';

/** Number under which the keys of the roots' lines are drawn, block r for the r-th time that the event is grown. */
const ROOT_KEYS = 1;

/**
 * Coherent branching (angular ordering) behind two colour-connected partons, or the incoherent cascade.
 *
 * Lines evolve each by itself, then the jets are reconstructed; where their masses add up to more than sqrt(s), the
 * whole event but its hard process is grown again from its next random numbers.
 *
 * Source: Marchesini & Webber, Nucl. Phys. B310 (1988) 461; Gieseke, Stephens, Webber, JHEP 12 (2003) 045.
 */
export class CoherentShower implements Grower {
  readonly sample: SampleHead;
  /** How often the present event was begun again. */
  private regrown = 0;
  private readonly settings: GrowSettings;
  private readonly coherent: boolean;
  private readonly random = new Philox();
  private readonly process: HardProcess;
  private readonly lines: LineEvolution;
  private readonly tree = new BranchingTree();
  private readonly order = new PlaybackOrder();
  private readonly jets = new JetMomenta();
  private readonly log: TrialLog | null;
  private readonly event: FinishedEvent;
  private readonly quarkMass = (flavour: number): number => (this.settings.masses ? quarkMass(flavour) : 0);

  constructor(settings: GrowSettings) {
    const coherent = settings.coherence;
    this.settings = settings;
    this.coherent = coherent;
    this.process = makeProcess(settings);
    this.sample = coherentHead(settings, this.process);
    this.log = settings.trials ? new TrialLog() : null;
    const sampler = new LineSampler({
      coupling: makeCoupling(settings),
      cmw: settings.cmw,
      evolution: coherent ? ANGLE : VIRTUALITY,
      angularBound: !coherent,
      flavours: settings.flavours,
      mass: this.quarkMass,
      cutoff: settings.cutoff,
      sqrtS: settings.energy,
    });
    this.lines = new LineEvolution(this.tree, sampler, this.random, this.log);
    this.event = {
      tree: this.tree,
      order: this.order,
      jets: this.jets,
      chain: new ColourChain(),
      process: this.process,
      generatedPT: coherent,
    };
  }

  grow(batch: HistoryBatch, stream: number, event: number = stream): void {
    this.random.startEvent(this.settings.seed, stream);
    this.process.generate(this.random);
    this.regrown = 0;
    while (!this.evolve(null)) this.regrown++;
    this.finish(batch, stream, event, -1);
  }

  /**
   * Append an event that keeps the steps 0 to `keep` of another: what was generated of them, bit for bit. Momenta are
   * reconstructed from the whole event, so that those of the kept rows change with what follows.
   *
   * See Grower.regrow and KeptSteps.
   */
  regrow(batch: HistoryBatch, original: History, keep: number, stream: number, event: number): void {
    demandRegrowable(this.sample, original, keep);
    this.random.startEvent(this.settings.seed, stream);
    takeHardPartons(this.process, original);
    this.regrown = original.head.regrown ?? 0;
    const kept = new KeptSteps(original, keep, this.quarkMass);
    while (!this.evolve(kept)) this.regrown++;
    if (batch.trials !== null) copyTrials(batch, original, keep);
    this.finish(batch, stream, event, keep);
    demandSameClaims(batch.view(batch.events.length - 1), original, keep);
  }

  /** Write what has grown. */
  private finish(batch: HistoryBatch, stream: number, event: number, keep: number): void {
    this.order.sort(this.tree);
    this.jets.start(this.process.momenta);
    recordEvent(batch, this.event);
    this.log?.write(batch, this.tree, this.order, keep);
    batch.endEvent({
      event,
      label: null,
      stream,
      rerun: null,
      status: 'complete',
      statusReason: null,
      outgoing: [...this.process.outgoing],
      weight: 1,
      regrown: this.regrown,
    });
  }

  /** Grow both jets. @returns false where they are too heavy for the event. */
  private evolve(kept: KeptSteps | null): boolean {
    const { random, process, tree, lines, log, coherent } = this;
    log?.clear();
    tree.clear();
    random.startAt(ROOT_KEYS, this.regrown);
    random.block();
    const { outgoing, masses, sqrtS } = process;
    tree.addRoot(outgoing[0], masses[0], this.largestT(0), random.x0, random.x1);
    tree.addRoot(outgoing[1], masses[1], this.largestT(1), random.x2, random.x3);
    if (coherent) {
      lines.byAngle(kept);
      buildVirtualities(tree);
    } else {
      lines.byVirtuality(sqrtS, kept);
      keepVirtualities(tree);
    }
    return this.jets.balance(sqrtS, tree.q2[0], tree.q2[1]);
  }

  /** Start of a hard parton: symmetric in qt, Q^2 (1 + b - c + sqrt(lambda(1,b,c)))/2; the whole Q^2 in q^2. */
  private largestT(root: number): number {
    const { masses, sqrtS } = this.process;
    const s = sqrtS * sqrtS;
    if (!this.coherent) return s;
    const b = (masses[root] * masses[root]) / s;
    const c = (masses[1 - root] * masses[1 - root]) / s;
    const rest = 1 - b - c;
    return (s * (1 + b - c + Math.sqrt(rest * rest - 4 * b * c))) / 2;
  }
}
