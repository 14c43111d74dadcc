import { CHANNELS, ENTRY_COLUMNS, type History, KINDS, ROLES, STEP_COLUMNS } from '../../history/index.ts';
import type { Philox } from '../../random/index.ts';
import { RegrowError } from '../resume.ts';
import type { BranchingTree } from './branching-tree.ts';

const HARD = ROLES.indexOf('hard');
const RECONSTRUCTED = ROLES.indexOf('reconstructed');
const ONE_TO_TWO = KINDS.indexOf('one-to-two');
const G_GG = CHANNELS.indexOf('g_gg');
const G_QQ = CHANNELS.indexOf('g_qq');

/**
 * The first steps of another history, which an event that is grown again keeps.
 *
 * While the tree grows, `tree.row` holds the row that a node has in the other history, -1 for a node that it lacks.
 * A line that lives after the last kept step draws its next branching anew from the beginning of its gap; what lies
 * above the `ceiling` is passed over, which leaves the branchings below distributed as they should be, and with the
 * numbers of the other history gives back what it had.
 */
export class KeptSteps {
  /** t of the last kept step: no other step may lie above. */
  readonly ceiling: number;
  private readonly original: History;
  /** Row to the kept step in which it branches, -1 for none. */
  private readonly step: Int32Array;
  private readonly roots: readonly number[];
  private readonly quarkMass: (flavour: number) => number;

  /**
   * @param quarkMass of the quarks that a gluon splits into [GeV]; the rows hold virtualities.
   * @throws RegrowError for steps of another kind of shower.
   */
  constructor(original: History, keep: number, quarkMass: (flavour: number) => number) {
    this.quarkMass = quarkMass;
    const { steps, entries } = original;
    this.original = original;
    this.ceiling = keep < 0 ? Infinity : steps.t[keep];
    this.step = new Int32Array(entries.length).fill(-1);
    for (let step = 0; step <= keep; step++) {
      if (steps.kind[step] !== ONE_TO_TWO)
        throw new RegrowError(`${KINDS[steps.kind[step]]} in step ${step}`, 'one-to-two branchings');
      this.step[steps.emitter[step]] = step;
    }
    const rows: number[] = [];
    for (let row = 0; row < entries.length; row++)
      if (entries.role[row] === (steps.length > 0 ? RECONSTRUCTED : HARD)) rows.push(row);
    this.roots = rows;
  }

  /** Say which rows the roots are. */
  begin(tree: BranchingTree): void {
    for (let root = 0; root < 2; root++) tree.row[root] = this.roots[root] ?? -1;
  }

  /** Whether the branching of a node is kept. */
  holds(tree: BranchingTree, node: number): boolean {
    return tree.row[node] >= 0 && this.step[tree.row[node]] >= 0;
  }

  /** Fill in the kept branching of a node, and the key of the line that it opens. */
  take(tree: BranchingTree, node: number, random: Philox): void {
    const { steps, entries } = this.original;
    const step = this.step[tree.row[node]];
    const i = steps.i[step];
    const splitting = steps.channel[step] === G_QQ;
    tree.t[node] = steps.t[step];
    tree.z[node] = steps.z[step];
    tree.kT[node] = steps.kT[step];
    tree.azimuth[node] = steps.azimuth[step];
    tree.alphaS[node] = steps.alphaS[step];
    tree.ratio[node] = steps.ratio[step];
    tree.channel[node] = steps.channel[step];
    tree.rejected[node] = steps.rejected[step];
    tree.flavour[node] = splitting ? entries.id[i] : 0;
    tree.flavourMass[node] = splitting ? this.quarkMass(entries.id[i]) : 0;
    tree.side[node] = this.side(step);
    random.startAt(tree.word[node], tree.draw[node] + steps.rejected[step] + 1);
    random.block();
    tree.newWord[node] = random.x2;
    tree.newDraw[node] = random.x3;
  }

  /** Whether what a node found anew is what is kept of it. */
  agrees(tree: BranchingTree, node: number): boolean {
    const { steps } = this.original;
    const step = this.step[tree.row[node]];
    return tree.t[node] === steps.t[step] && tree.rejected[node] === steps.rejected[step];
  }

  /** Say which rows the daughters of a node are. @param i first of the two. */
  descend(tree: BranchingTree, node: number, i: number): void {
    const { steps } = this.original;
    const kept = this.holds(tree, node);
    const step = kept ? this.step[tree.row[node]] : -1;
    tree.row[i] = kept ? steps.i[step] : -1;
    tree.row[i + 1] = kept ? steps.j[step] : -1;
  }

  private side(step: number): number {
    const { steps, entries } = this.original;
    const emitter = steps.emitter[step];
    const colour = entries.colour[emitter];
    if (colour === 0) return 1;
    if (entries.anticolour[emitter] === 0) return 0;
    if (steps.channel[step] === G_GG) return entries.colour[steps.j[step]] === colour ? 0 : 1;
    // between two gluons that share both lines either side names the same partner
    return entries.anticolour[steps.partner[step]] === colour ? 0 : 1;
  }
}

/** Columns of the entries that the jets' reconstruction and the later steps decide. */
const NOT_GENERATED = new Set(['px', 'py', 'pz', 'e', 'm', 'endedBy']);

/** Refuse a history whose kept steps this engine does not claim to the bit: another program's, or changed. */
export function demandSameClaims(made: History, original: History, keep: number): void {
  for (const { name } of STEP_COLUMNS) {
    if (name === 'noEmission') continue;
    for (let step = 0; step <= keep; step++)
      demandSame(`${name} of step ${step}`, original.steps[name][step], made.steps[name][step]);
  }
  const rows = keep < 0 ? 0 : made.steps.j[keep] + 1;
  for (const { name } of ENTRY_COLUMNS) {
    if (NOT_GENERATED.has(name)) continue;
    for (let row = 0; row < rows; row++)
      demandSame(`${name} of entry ${row}`, original.entries[name][row], made.entries[name][row]);
  }
}

function demandSame(place: string, found: number, expected: number): void {
  if (!Object.is(found, expected))
    throw new RegrowError(`${place}: ${found}`, `${expected}, as this engine makes it`);
}
