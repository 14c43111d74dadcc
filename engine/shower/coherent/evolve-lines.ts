import { REASONS } from '../../history/index.ts';
import type { Philox } from '../../random/index.ts';
import { RegrowError } from '../resume.ts';
import type { BranchingTree } from './branching-tree.ts';
import type { KeptSteps } from './kept-steps.ts';
import type { LineListener, LineSampler } from './line-sampler.ts';

const PHASE_SPACE = REASONS.indexOf('phase space');

/** Grows the lines of a tree from its two roots down to the cutoff. */
export class LineEvolution {
  private readonly tree: BranchingTree;
  private readonly sampler: LineSampler;
  private readonly random: Philox;
  private readonly listener: LineListener | null;

  constructor(tree: BranchingTree, sampler: LineSampler, random: Philox, listener: LineListener | null) {
    this.tree = tree;
    this.sampler = sampler;
    this.random = random;
    this.listener = listener;
  }

  /** Angular ordering: every line by itself. @param kept steps of another history that are kept. */
  byAngle(kept: KeptSteps | null): void {
    const { tree, sampler, random, listener } = this;
    kept?.begin(tree);
    for (let root = 0; root < tree.nodes; root++) sampler.begin(tree, root);
    for (let node = 0; node < tree.nodes; node++) {
      if (kept?.holds(tree, node)) kept.take(tree, node, random);
      else if (!sampler.find(tree, node, random, listener)) continue;
      else if (kept !== null) {
        this.passOver(node, kept.ceiling);
        if (tree.t[node] === 0) continue;
      }
      const i = tree.addDaughters(node, 2);
      kept?.descend(tree, node, i);
      sampler.begin(tree, i);
      sampler.begin(tree, i + 1);
    }
  }

  /**
   * The incoherent cascade: evolution in the true virtuality, the two roots and every pair of daughters evolved anew
   * until they fit.
   *
   * @param sqrtS [GeV]
   */
  byVirtuality(sqrtS: number, kept: KeptSteps | null): void {
    const { tree } = this;
    kept?.begin(tree);
    this.settlePair(0, sqrtS, kept);
    for (let node = 0; node < tree.nodes; node++) {
      if (tree.t[node] === 0) continue;
      const i = tree.addDaughters(node, 1);
      kept?.descend(tree, node, i);
      this.settlePair(i, 0, kept);
    }
  }

  /** Evolve two sisters until they fit. @param i first of the two. @param sqrtS for the roots, 0 for daughters. */
  private settlePair(i: number, sqrtS: number, kept: KeptSteps | null): void {
    const { tree, sampler, random, listener } = this;
    for (let node = i; node <= i + 1; node++) {
      sampler.begin(tree, node);
      sampler.find(tree, node, random, listener);
    }
    while (!this.fits(i, sqrtS)) this.refuse(larger(tree, i));
    if (kept === null) return;
    // The numbers of the kept history end here with what it had. With others, what is kept is put in and its sister,
    // below the ceiling, evolves on until it fits.
    const first = kept.holds(tree, i);
    const second = kept.holds(tree, i + 1);
    const same =
      (first ? kept.agrees(tree, i) : tree.t[i] <= kept.ceiling) &&
      (second ? kept.agrees(tree, i + 1) : tree.t[i + 1] <= kept.ceiling);
    for (let node = i; node <= i + 1; node++) {
      if (kept.holds(tree, node)) kept.take(tree, node, random);
      else this.passOver(node, kept.ceiling);
    }
    if (same) return;
    while (!this.fits(i, sqrtS)) {
      const worse = first ? i + 1 : second ? i : larger(tree, i);
      if (tree.t[worse] === 0) throw new RegrowError('branchings that do not fit', 'those of a cascade');
      this.refuse(worse);
    }
  }

  /** Evolve a node on to below the ceiling. */
  private passOver(node: number, ceiling: number): void {
    while (this.tree.t[node] > ceiling) this.refuse(node);
  }

  private refuse(node: number): void {
    const { tree, sampler, random, listener } = this;
    if (listener !== null)
      listener.reject(node, tree.t[node], tree.z[node], tree.channel[node], PHASE_SPACE, tree.ratio[node]);
    sampler.refuse(tree, node);
    sampler.find(tree, node, random, listener);
  }

  /** q_1 + q_2 < sqrt(s) for the roots, (1-z) q_b^2 + z q_c^2 <= z (1-z) q_a^2 for daughters. */
  private fits(i: number, sqrtS: number): boolean {
    const { tree } = this;
    const b = square(tree, i);
    const c = square(tree, i + 1);
    if (sqrtS > 0) return Math.sqrt(b) + Math.sqrt(c) < sqrtS;
    return b / tree.start[i] + c / tree.start[i + 1] <= 1;
  }
}

/** Squared virtuality of a node [GeV^2]: its t, or its mass where it does not branch. */
function square(tree: BranchingTree, node: number): number {
  return tree.t[node] > 0 ? tree.t[node] : tree.mass[node] * tree.mass[node];
}

/**
 * Of two sisters the one with the larger virtuality relative to its start scale, the one to refuse.
 *
 * @param i first of the two; i + 1 is the other. One that does not branch is never taken: both on their mass shells fit.
 */
function larger(tree: BranchingTree, i: number): number {
  const { t, start } = tree;
  return t[i + 1] * start[i] > t[i] * start[i + 1] ? i + 1 : i;
}
