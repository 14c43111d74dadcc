import { BOOST_COLUMN, type History, type SampleHead } from '../history/index.ts';
import { Competitors } from './competitors.ts';
import { DipoleEnds, openKernels } from './dipole-ends.ts';
import { DipoleKernels } from './dipole-kernels.ts';
import { type GapProbabilities, judgeGaps } from './gap-probabilities.ts';
import { type NotAssessable, notAssessable } from './kernel-settings.ts';
import { LiveDipoles } from './live-dipoles.ts';
import { judgeConditionals, type StepConditionals } from './step-conditionals.ts';

const ENTRY_COLUMNS = ['id', 'px', 'py', 'pz', 'e', 'colour', 'anticolour', 'madeBy', 'endedBy'] as const;
const STEP_COLUMNS = ['t'] as const;
const CONDITIONAL_COLUMNS = ['z', 'channel', 'emitter', 'partner', 'i', 'j'] as const;

/**
 * Computes how likely events were, by quadrature of the kernels that their heads name.
 *
 * Nothing is taken from a sampler: dipoles come from the rows, rates from the kernels' formulas. The tables of a set of
 * settings are made at its first event and kept for the next ones of the same settings.
 */
export class GapJudge {
  /** Head of the last event, and what of it the kernels depend on as text. */
  private known: SampleHead | null = null;
  private fingerprint = '';
  private kernels: DipoleKernels | NotAssessable = notAssessable('no event yet');
  private readonly competitors = new Competitors();
  private readonly dipoles = new LiveDipoles((id) => this.massOf(id));

  /**
   * No-emission probabilities of all gaps of an event, or why there are none.
   *
   * Accuracy: 1e-6 of each exponent, absolute, and better than 1e-7 for one dipole end.
   */
  gapsOf(history: History): GapProbabilities | NotAssessable {
    const kernels = this.kernelsOf(history.head);
    return kernels instanceof DipoleKernels ? judgeGaps(history, kernels, this.dipoles) : kernels;
  }

  /** Distribution of z, and of end and channel, at each step's own t, or why there is none. */
  conditionalsOf(history: History): StepConditionals | NotAssessable {
    const kernels = this.kernelsOf(history.head);
    if (!(kernels instanceof DipoleKernels)) return kernels;
    for (const name of CONDITIONAL_COLUMNS)
      if (!history.head.columns.steps.includes(name))
        return notAssessable(`column ${name} of the steps is absent`);
    return judgeConditionals(history, kernels, this.dipoles, this.competitors);
  }

  /** Rates of single dipole ends by the kernels that a head names, from the same tables, or why there are none. */
  endsOf(head: SampleHead): DipoleEnds | NotAssessable {
    const kernels = this.kernelsOf(head);
    return kernels instanceof DipoleKernels ? new DipoleEnds(kernels) : kernels;
  }

  private massOf(id: number): number {
    return this.kernels instanceof DipoleKernels ? this.kernels.massOf(id) : 0;
  }

  private kernelsOf(head: SampleHead): DipoleKernels | NotAssessable {
    // events of one file share these objects
    const { shower, columns, meaning, evolutionVariable, ordering, hardScale, tLow } = head;
    const known = this.known;
    const same =
      known !== null &&
      known.shower === shower &&
      known.columns === columns &&
      known.meaning === meaning &&
      known.evolutionVariable === evolutionVariable &&
      known.ordering === ordering &&
      known.hardScale === hardScale &&
      known.tLow === tLow;
    if (same) return this.kernels;
    this.known = head;
    const all = JSON.stringify([shower, columns, meaning, evolutionVariable, ordering, hardScale, tLow]);
    if (all !== this.fingerprint) {
      this.fingerprint = all;
      this.kernels = makeKernels(head);
    }
    return this.kernels;
  }
}

function makeKernels(head: SampleHead): DipoleKernels | NotAssessable {
  for (const name of ENTRY_COLUMNS)
    if (!head.columns.entries.includes(name)) return notAssessable(`column ${name} of the entries is absent`);
  for (const name of STEP_COLUMNS)
    if (!head.columns.steps.includes(name)) return notAssessable(`column ${name} of the steps is absent`);
  if (head.shower.recoil === 'global' && !head.columns.steps.includes(BOOST_COLUMN))
    return notAssessable(`column ${BOOST_COLUMN} of the steps is absent, and recoil is global`);
  return openKernels(head);
}
