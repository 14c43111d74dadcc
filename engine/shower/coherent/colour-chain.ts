import type { BranchingTree } from './branching-tree.ts';

/** First colour tag of an event. Source: Les Houches Accord, hep-ph/0109068. */
const FIRST_TAG = 501;

/**
 * Colour tags and colour neighbours of the nodes of a tree, followed from step to step of the playback.
 *
 * A gluon emission of a gluon happens on either of its two colour lines with equal chance (`side`); g -> q qbar belongs
 * to both, and `side` only says which neighbour is called the partner.
 */
export class ColourChain {
  /** Node to tags, 0 for none. */
  colour = new Int32Array(256);
  anticolour = new Int32Array(256);
  /** Node to the node at the other end of its colour and of its anticolour line, -1 for none. */
  private colourNext = new Int32Array(256);
  private anticolourNext = new Int32Array(256);
  private nextTag = FIRST_TAG;

  /** The two roots, joined by one line from the first's colour to the second's anticolour, or by a ring of two. */
  start(nodes: number, ring: boolean): void {
    if (this.colour.length < nodes) {
      this.colour = new Int32Array(2 * nodes);
      this.anticolour = new Int32Array(2 * nodes);
      this.colourNext = new Int32Array(2 * nodes);
      this.anticolourNext = new Int32Array(2 * nodes);
    }
    this.nextTag = FIRST_TAG;
    for (let root = 0; root < 2; root++) {
      this.colour[root] = 0;
      this.anticolour[root] = 0;
      this.colourNext[root] = -1;
      this.anticolourNext[root] = -1;
    }
    this.join(0, 1, this.nextTag++);
    if (ring) this.join(1, 0, this.nextTag++);
  }

  /** Node at the other end of the line through which a node radiates. */
  partner(tree: BranchingTree, node: number): number {
    return tree.side[node] === 0 ? this.colourNext[node] : this.anticolourNext[node];
  }

  /** Hand the lines of a node that branches to its daughters. */
  branch(tree: BranchingTree, node: number): void {
    const i = tree.daughter[node];
    const j = i + 1;
    const colour = this.colour[node];
    const anticolour = this.anticolour[node];
    const after = this.colourNext[node];
    const before = this.anticolourNext[node];
    this.clear(i);
    this.clear(j);
    let carriesColour = i;
    let carriesAnticolour = i;
    if (tree.flavour[node] !== 0) carriesAnticolour = j;
    else if (tree.side[node] === 0) {
      // i (c', a), j (c, c')
      this.join(i, j, this.nextTag++);
      carriesColour = j;
    } else {
      // i (c, a'), j (a', a)
      this.join(j, i, this.nextTag++);
      carriesAnticolour = j;
    }
    if (after >= 0) this.join(carriesColour, after, colour);
    if (before >= 0) this.join(before, carriesAnticolour, anticolour);
  }

  private clear(node: number): void {
    this.colour[node] = 0;
    this.anticolour[node] = 0;
    this.colourNext[node] = -1;
    this.anticolourNext[node] = -1;
  }

  private join(colourEnd: number, anticolourEnd: number, tag: number): void {
    this.colour[colourEnd] = tag;
    this.anticolour[anticolourEnd] = tag;
    this.colourNext[colourEnd] = anticolourEnd;
    this.anticolourNext[anticolourEnd] = colourEnd;
  }
}
