import { type HistoryBatch, KINDS, ROLES } from '../../history/index.ts';
import { atan2, sinCos } from '../../math/index.ts';
import type { HardProcess } from '../../processes/index.ts';
import { writeRow } from '../dipole-record.ts';
import type { BranchingTree } from './branching-tree.ts';
import type { ColourChain } from './colour-chain.ts';
import type { JetMomenta } from './jet-momenta.ts';
import type { PlaybackOrder } from './playback-order.ts';

const INCOMING = ROLES.indexOf('incoming');
const RESONANCE = ROLES.indexOf('resonance');
const HARD = ROLES.indexOf('hard');
const EMITTER = ROLES.indexOf('emitter');
const EMISSION = ROLES.indexOf('emission');
const RECONSTRUCTED = ROLES.indexOf('reconstructed');
const ONE_TO_TWO = KINDS.indexOf('one-to-two');

const ENTRIES_OF_HARD = 7;
const ENTRIES_OF_STEP = 2;

// scratch, not reentrant: sine and cosine of the azimuth
const turn = new Float64Array(2);

/** What a history is written from. */
export interface FinishedEvent {
  readonly tree: BranchingTree;
  readonly order: PlaybackOrder;
  readonly jets: JetMomenta;
  readonly chain: ColourChain;
  readonly process: HardProcess;
  /** Whether transverse momenta are those generated (the virtualities follow), or follow from the virtualities. */
  readonly generatedPT: boolean;
}

/**
 * Write the rows of a finished event behind those of a batch.
 *
 * The hard partons as born live until step 0; with it come both reconstructed jet roots, of which the one that branches
 * first ends at once. So the living rows sum to the beams after every step. Where nothing branches nothing is
 * reconstructed.
 */
export function recordEvent(batch: HistoryBatch, event: FinishedEvent): void {
  const { tree, order, chain, process } = event;
  batch.reserve(ENTRIES_OF_HARD + ENTRIES_OF_STEP * order.count, order.count, 0);
  chain.start(tree.nodes, process.ring);
  const resonance = writeHardProcess(batch, event);
  if (order.count > 0) writeRoots(batch, event, resonance + 1);
  for (let step = 0; step < order.count; step++) writeStep(batch, event, step);
}

/** Beams, resonance, hard partons. @returns row of the resonance. */
function writeHardProcess(batch: HistoryBatch, { tree, order, chain, process }: FinishedEvent): number {
  const { entries } = batch;
  const base = batch.entryStart[batch.events.length];
  let row = 0;
  for (const { id, px, py, pz, e } of process.beams)
    if (id !== process.resonance) writeRow(entries, base + row++, id, px, py, pz, e, 0, INCOMING);
  const resonance = row++;
  writeRow(entries, base + resonance, process.resonance, 0, 0, 0, process.sqrtS, process.sqrtS, RESONANCE);
  const { outgoing, momenta: p, masses } = process;
  for (let root = 0; root < 2; root++) {
    const at = base + row;
    const k = 4 * root;
    writeRow(entries, at, outgoing[root], p[k], p[k + 1], p[k + 2], p[k + 3], masses[root], HARD);
    entries.colour[at] = chain.colour[root];
    entries.anticolour[at] = chain.anticolour[root];
    entries.from[at] = resonance;
    entries.endedBy[at] = order.count > 0 ? 0 : -1;
    entries.line[at] = root;
    tree.line[root] = root;
    tree.row[root] = row++;
  }
  entries.length = base + row;
  return resonance;
}

function writeRoots(batch: HistoryBatch, event: FinishedEvent, hard: number): void {
  const { tree } = event;
  for (let root = 0; root < 2; root++) {
    tree.kx[root] = 0;
    tree.ky[root] = 0;
    tree.row[root] = hard + 2 + root;
    writeNode(batch, event, root, hard + root, 0, RECONSTRUCTED);
  }
}

/** The row of a node, at its number behind the event's first. */
function writeNode(
  batch: HistoryBatch,
  event: FinishedEvent,
  node: number,
  from: number,
  madeBy: number,
  role: number,
): void {
  const { tree, jets, chain, order } = event;
  const { entries } = batch;
  const { out } = jets;
  const at = entries.length++;
  jets.place(tree, node);
  entries.id[at] = tree.id[node];
  entries.px[at] = out[0];
  entries.py[at] = out[1];
  entries.pz[at] = out[2];
  entries.e[at] = out[3];
  entries.m[at] = tree.daughter[node] < 0 ? tree.mass[node] : Math.sqrt(tree.q2[node]);
  entries.colour[at] = chain.colour[node];
  entries.anticolour[at] = chain.anticolour[node];
  entries.from[at] = from;
  entries.madeBy[at] = madeBy;
  entries.endedBy[at] = order.step[node];
  entries.role[at] = role;
  entries.line[at] = tree.line[node];
}

function writeStep(batch: HistoryBatch, event: FinishedEvent, step: number): void {
  const { tree, order, chain, jets } = event;
  const { steps } = batch;
  const node = order.node[step];
  const i = tree.daughter[node];
  const j = i + 1;
  const row = batch.entries.length - batch.entryStart[batch.events.length];
  const emitterRow = tree.row[node];
  const partnerRow = tree.row[chain.partner(tree, node)];
  const z = tree.z[node];
  const w = 1 - z;
  const kT = tree.kT[node];

  chain.branch(tree, node);
  tree.row[i] = row;
  tree.row[j] = row + 1;
  tree.line[i] = tree.line[node];
  tree.line[j] = 2 + step;
  shareTransverse(tree, node, event.generatedPT);
  writeNode(batch, event, i, emitterRow, step, EMITTER);
  writeNode(batch, event, j, emitterRow, step, EMISSION);

  const at = steps.length++;
  steps.kind[at] = ONE_TO_TWO;
  steps.channel[at] = tree.channel[node];
  steps.t[at] = tree.t[node];
  steps.tStart[at] = tree.start[node];
  steps.z[at] = z;
  steps.azimuth[at] = tree.azimuth[node];
  steps.y[at] = NaN;
  steps.kT[at] = kT;
  // pT/(z(1-z)) = 2 E sin(theta/2) of massless daughters, E the generated energy of the emitter
  const sine = kT / (2 * z * w * tree.fraction[node] * jets.hardEnergy[tree.jet[node]]);
  steps.openingAngle[at] = 2 * atan2(sine, Math.sqrt(Math.max(0, (1 - sine) * (1 + sine))));
  steps.alphaS[at] = tree.alphaS[node];
  steps.emitter[at] = emitterRow;
  steps.partner[at] = partnerRow;
  steps.recoiler[at] = -1;
  steps.i[at] = row;
  steps.j[at] = row + 1;
  steps.recoilerAfter[at] = -1;
  steps.ratio[at] = tree.ratio[node];
  steps.rejected[at] = tree.rejected[node];
  const mother = tree.mother[node];
  steps.previous[at] = mother < 0 ? -1 : order.step[mother];
  steps.noEmission[at] = NaN;
  steps.generation[at] = tree.generation[node];
}

/** k_b = z k_a + pT, k_c = (1-z) k_a - pT. */
function shareTransverse(tree: BranchingTree, node: number, generatedPT: boolean): void {
  const i = tree.daughter[node];
  const j = i + 1;
  const z = tree.z[node];
  const w = 1 - z;
  let pT = tree.kT[node];
  if (!generatedPT) {
    const { q2 } = tree;
    pT = Math.sqrt(Math.max(0, z * w * q2[node] - w * q2[i] - z * q2[j]));
  }
  sinCos(turn, tree.azimuth[node]);
  const x = pT * turn[1];
  const y = pT * turn[0];
  tree.kx[i] = z * tree.kx[node] + x;
  tree.ky[i] = z * tree.ky[node] + y;
  tree.kx[j] = w * tree.kx[node] - x;
  tree.ky[j] = w * tree.ky[node] - y;
}
