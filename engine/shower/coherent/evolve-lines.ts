import { REASONS } from '../../history/index.ts';
import type { Philox } from '../../random/index.ts';
import type { BranchingTree } from './branching-tree.ts';
import type { LineListener, LineSampler } from './line-sampler.ts';

const PHASE_SPACE = REASONS.indexOf('phase space');

/** Every line by itself, from its start to the cutoff: angular ordering. The roots are in the tree. */
export function evolveByAngle(
  tree: BranchingTree,
  sampler: LineSampler,
  random: Philox,
  listener: LineListener | null,
): void {
  for (let root = 0; root < tree.nodes; root++) sampler.begin(tree, root);
  for (let node = 0; node < tree.nodes; node++) {
    if (!sampler.find(tree, node, random, listener)) continue;
    const i = tree.addDaughters(node, 2);
    sampler.begin(tree, i);
    sampler.begin(tree, i + 1);
  }
}

/**
 * The incoherent cascade: evolution in the true virtuality, each pair of daughters (and the two roots) evolved anew
 * until it fits.
 *
 * @param sqrtS [GeV]
 */
export function evolveByVirtuality(
  tree: BranchingTree,
  sampler: LineSampler,
  random: Philox,
  listener: LineListener | null,
  sqrtS: number,
): void {
  const evolve = (node: number): boolean => sampler.find(tree, node, random, listener);
  const refuse = (node: number): void => {
    if (listener !== null)
      listener.reject(node, tree.t[node], tree.z[node], tree.channel[node], PHASE_SPACE, tree.ratio[node]);
    sampler.refuse(tree, node);
    evolve(node);
  };
  for (let root = 0; root < tree.nodes; root++) {
    sampler.begin(tree, root);
    evolve(root);
  }
  while (virtuality(tree, 0) + virtuality(tree, 1) >= sqrtS) refuse(larger(tree, 0));
  for (let node = 0; node < tree.nodes; node++) {
    if (tree.t[node] === 0) continue;
    const i = tree.addDaughters(node, 1);
    for (let daughter = i; daughter <= i + 1; daughter++) {
      sampler.begin(tree, daughter);
      evolve(daughter);
    }
    // (1-z) q_b^2 + z q_c^2 <= z (1-z) q_a^2
    while (square(tree, i) / tree.start[i] + square(tree, i + 1) / tree.start[i + 1] > 1)
      refuse(larger(tree, i));
  }
}

/** Squared virtuality of a node [GeV^2]: its t, or its mass where it does not branch. */
function square(tree: BranchingTree, node: number): number {
  return tree.t[node] > 0 ? tree.t[node] : tree.mass[node] * tree.mass[node];
}

const virtuality = (tree: BranchingTree, node: number): number => Math.sqrt(square(tree, node));

/**
 * Of two sisters the one with the larger virtuality relative to its start scale, the one to refuse.
 *
 * @param i first of the two; i + 1 is the other. One that does not branch is never taken: both on their mass shells fit.
 */
function larger(tree: BranchingTree, i: number): number {
  const { t, start } = tree;
  return t[i + 1] * start[i] > t[i] * start[i + 1] ? i + 1 : i;
}
