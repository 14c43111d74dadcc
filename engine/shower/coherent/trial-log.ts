import type { HistoryBatch } from '../../history/index.ts';
import type { BranchingTree } from './branching-tree.ts';
import type { LineListener } from './line-sampler.ts';
import type { PlaybackOrder } from './playback-order.ts';

/**
 * Rejected trials of one event, kept until the order of the steps is known.
 *
 * A trial belongs to its own line: `before` is the step in which that line branched next, or the number of steps where
 * it branches no more. Within one `before` trials stand in the order in which they were made, t falling along a line.
 */
export class TrialLog implements LineListener {
  private count = 0;
  private node = new Int32Array(64);
  private t = new Float64Array(64);
  private z = new Float64Array(64);
  private channel = new Int32Array(64);
  private reason = new Int32Array(64);
  private ratio = new Float64Array(64);

  clear(): void {
    this.count = 0;
  }

  reject(node: number, t: number, z: number, channel: number, reason: number, ratio: number): void {
    const at = this.count++;
    if (at === this.node.length) this.grow();
    this.node[at] = node;
    this.t[at] = t;
    this.z[at] = z;
    this.channel[at] = channel;
    this.reason[at] = reason;
    this.ratio[at] = ratio;
  }

  /**
   * Write them behind the batch's trials. The rows of the nodes are known.
   *
   * @param keep trials before this step or an earlier one are left out.
   */
  write(batch: HistoryBatch, tree: BranchingTree, order: PlaybackOrder, keep: number): void {
    if (batch.trials === null) return;
    batch.reserve(0, 0, this.count);
    const { trials } = batch;
    const before = (trial: number): number => {
      const step = order.step[this.node[trial]];
      return step < 0 ? order.count : step;
    };
    // counting sort by `before`
    const next = new Int32Array(order.count + 2);
    let written = 0;
    for (let trial = 0; trial < this.count; trial++) {
      if (before(trial) <= keep) continue;
      next[before(trial) + 1]++;
      written++;
    }
    for (let step = 0; step <= order.count; step++) next[step + 1] += next[step];
    for (let trial = 0; trial < this.count; trial++) {
      const step = before(trial);
      if (step <= keep) continue;
      const at = trials.length + next[step]++;
      trials.before[at] = step;
      trials.t[at] = this.t[trial];
      trials.z[at] = this.z[trial];
      trials.channel[at] = this.channel[trial];
      trials.emitter[at] = tree.row[this.node[trial]];
      // which colour line a trial radiates through is decided only once it is accepted
      trials.partner[at] = -1;
      trials.reason[at] = this.reason[trial];
      trials.ratio[at] = this.ratio[trial];
    }
    trials.length += written;
  }

  private grow(): void {
    const widen = <T extends Float64Array | Int32Array>(column: T): T => {
      const wider = new (column.constructor as new (length: number) => T)(2 * column.length);
      wider.set(column);
      return wider;
    };
    this.node = widen(this.node);
    this.t = widen(this.t);
    this.z = widen(this.z);
    this.channel = widen(this.channel);
    this.reason = widen(this.reason);
    this.ratio = widen(this.ratio);
  }
}
