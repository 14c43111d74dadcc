const GLUON = 21;

/**
 * The partons of one event of one-to-two branchings, struct of arrays, as a binary tree.
 *
 * A node is a parton from its birth to its own branching; its two daughters are the nodes `daughter` (i, with the
 * fraction z) and `daughter + 1` (j). The roots are nodes 0 and 1. A daughter has a higher number than its mother.
 * Capacity doubles when it runs out; nothing else allocates.
 *
 * Random numbers: each parton line has a key of 64 bits, `word` and `draw`, and its n-th branching draws from the
 * counters (word + n, draw), (word + n, draw + 1), ... of the event: block k decides trial k, and the block after the
 * accepted trial holds azimuth, colour side and the key of the line of j. So a line's numbers follow from its ancestors
 * alone, whatever other lines did and in whatever order the steps are played; and a history's tables give every key
 * back, since `rejected` says which block was the last.
 */
export class BranchingTree {
  nodes = 0;
  /** PDG number and mass [GeV]. */
  id = new Int32Array(256);
  mass = new Float64Array(256);
  /** Node that branched into this one, -1 for a root; first daughter, -1 where it does not branch; jet, 0 or 1. */
  mother = new Int32Array(256);
  daughter = new Int32Array(256);
  jet = new Int32Array(256);
  generation = new Int32Array(256);
  /** Upper end of the gap before the branching, in t. */
  start = new Float64Array(256);
  /** Where the evolution stands, in units of the sampler. */
  position = new Float64Array(256);
  /** Light-cone fraction of the jet. */
  fraction = new Float64Array(256);
  word = new Int32Array(256);
  draw = new Int32Array(256);
  /** Of the branching: t, 0 for none, and all that is recorded of it; valid where t > 0. */
  t = new Float64Array(256);
  z = new Float64Array(256);
  kT = new Float64Array(256);
  azimuth = new Float64Array(256);
  alphaS = new Float64Array(256);
  ratio = new Float64Array(256);
  channel = new Int32Array(256);
  /** PDG number of the quark that a gluon splits into, 0 otherwise; its mass [GeV]. */
  flavour = new Int32Array(256);
  flavourMass = new Float64Array(256);
  /** 1: radiates through its anticolour, 0: through its colour. */
  side = new Int32Array(256);
  rejected = new Int32Array(256);
  /** Key of the line that the branching opens. */
  newWord = new Int32Array(256);
  newDraw = new Int32Array(256);
  /** Row and parton line of the history. */
  row = new Int32Array(256);
  line = new Int32Array(256);
  /** Squared virtuality [GeV^2]. */
  q2 = new Float64Array(256);
  /** Transverse momentum in the jet's own basis [GeV]. */
  kx = new Float64Array(256);
  ky = new Float64Array(256);

  clear(): void {
    this.nodes = 0;
  }

  /** A parton of the hard process with the key of its line. @param start largest t of its branching. */
  addRoot(id: number, mass: number, start: number, word: number, draw: number): number {
    const node = this.nodes++;
    this.id[node] = id;
    this.mass[node] = mass;
    this.mother[node] = -1;
    this.jet[node] = node;
    this.generation[node] = 0;
    this.start[node] = start;
    this.fraction[node] = 1;
    this.word[node] = word;
    this.draw[node] = draw;
    this.t[node] = 0;
    this.daughter[node] = -1;
    this.rejected[node] = 0;
    return node;
  }

  /**
   * The daughters of a node whose branching is known: i continues its line, j opens a new one.
   *
   * @param power of z and 1-z by which the ranges of the daughters shrink: 2 for the angle, 1 for the virtuality.
   * @returns the node of i.
   */
  addDaughters(node: number, power: 1 | 2): number {
    if (this.nodes + 2 > this.id.length) this.grow();
    const i = this.nodes;
    const j = i + 1;
    this.nodes += 2;
    this.daughter[node] = i;
    const z = this.z[node];
    const w = 1 - z;
    const flavour = this.flavour[node];
    if (flavour === 0) {
      this.id[i] = this.id[node];
      this.id[j] = GLUON;
      this.mass[i] = this.mass[node];
      this.mass[j] = 0;
    } else {
      this.id[i] = flavour;
      this.id[j] = -flavour;
      this.mass[i] = this.flavourMass[node];
      this.mass[j] = this.flavourMass[node];
    }
    this.generation[i] = this.generation[node];
    this.generation[j] = this.generation[node] + 1;
    this.word[i] = this.word[node] + 1;
    this.draw[i] = this.draw[node];
    this.word[j] = this.newWord[node];
    this.draw[j] = this.newDraw[node];
    const t = this.t[node];
    this.start[i] = (power === 2 ? z * z : z) * t;
    this.start[j] = (power === 2 ? w * w : w) * t;
    this.fraction[i] = z * this.fraction[node];
    this.fraction[j] = w * this.fraction[node];
    for (let daughter = i; daughter <= j; daughter++) {
      this.mother[daughter] = node;
      this.jet[daughter] = this.jet[node];
      this.t[daughter] = 0;
      this.daughter[daughter] = -1;
      this.rejected[daughter] = 0;
    }
    return i;
  }

  private grow(): void {
    const columns = this as unknown as Record<string, unknown>;
    for (const [name, column] of Object.entries(columns)) {
      if (column instanceof Float64Array) columns[name] = widen(column, new Float64Array(2 * column.length));
      if (column instanceof Int32Array) columns[name] = widen(column, new Int32Array(2 * column.length));
    }
  }
}

/** The same column in longer memory. */
function widen<T extends Float64Array | Int32Array>(column: T, memory: T): T {
  memory.set(column);
  return memory;
}
