import type { BranchingTree } from './branching-tree.ts';

const RUN = 8;

/**
 * The branchings of a tree in the order of playback: t falling, of equal t the lower node first.
 *
 * Merging of runs in memory of its own: a mother has a higher t and a lower number than her daughters, so she always
 * comes first.
 */
export class PlaybackOrder {
  count = 0;
  /** Step to node. */
  node = new Int32Array(256);
  /** Node to step, -1 where it does not branch. */
  step = new Int32Array(512);
  private other = new Int32Array(256);

  sort(tree: BranchingTree): void {
    const { nodes, daughter } = tree;
    if (this.step.length < nodes) {
      this.step = new Int32Array(2 * nodes);
      this.node = new Int32Array(nodes);
      this.other = new Int32Array(nodes);
    }
    const { step } = this;
    let { node } = this;
    let count = 0;
    for (let n = 0; n < nodes; n++) {
      step[n] = -1;
      if (daughter[n] >= 0) node[count++] = n;
    }
    this.count = count;
    const { t } = tree;
    for (let start = 0; start < count; start += RUN) {
      const end = Math.min(start + RUN, count);
      for (let n = start + 1; n < end; n++) {
        const moved = node[n];
        let place = n;
        for (; place > start && t[node[place - 1]] < t[moved]; place--) node[place] = node[place - 1];
        node[place] = moved;
      }
    }
    let { other } = this;
    for (let width = RUN; width < count; width *= 2) {
      for (let start = 0; start < count; start += 2 * width) merge(t, node, other, start, width, count);
      [node, other] = [other, node];
    }
    this.node = node;
    this.other = other;
    for (let n = 0; n < count; n++) step[node[n]] = n;
  }
}

/** Merge from[start, start + width) with the run behind it into `to`. */
function merge(
  t: Float64Array,
  from: Int32Array,
  to: Int32Array,
  start: number,
  width: number,
  count: number,
): void {
  const middle = Math.min(start + width, count);
  const end = Math.min(middle + width, count);
  let left = start;
  let right = middle;
  for (let place = start; place < end; place++) {
    const takeRight = left >= middle || (right < end && t[from[right]] > t[from[left]]);
    to[place] = takeRight ? from[right++] : from[left++];
  }
}
