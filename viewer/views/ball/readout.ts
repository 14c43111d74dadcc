import { html, type TemplateResult } from 'lit';
import type { History, StepMeasures } from '../../../engine/index.ts';
import { stepNumber } from '../../state/index.ts';
import { channelNotation, notation, numberText, partonSymbol, plainNotation } from '../type/index.ts';

/** What a step did, as notation: with its own flavours where the rows are there, else its kernel. */
export function branchingNotation(history: History, step: number): string {
  const { steps, entries, channels } = history;
  const rows = [steps.emitter[step], steps.i[step], steps.j[step]];
  if (rows.some((row) => !(row >= 0 && row < entries.length)))
    return channelNotation(channels[steps.channel[step]]);
  const [before, i, j] = rows.map((row) => partonSymbol(entries.id[row]));
  return `${before} → ${i}\u2009${j}`;
}

/** Lines that stand beside the branching under the pointer: measured where there are measures, else as claimed. */
export function readoutOf(history: History, measures: StepMeasures | null, step: number): TemplateResult {
  const { steps } = history;
  const kT = measures ? measures.kT[step] : steps.kT[step];
  const angle = measures ? measures.openingAngle[step] : steps.openingAngle[step];
  return html`<b>${stepNumber(step)}</b>  ${notation(branchingNotation(history, step))}<br />
    ${notation(`*k*_{T} = ${numberText(kT, 3)} GeV`)}<br />
    ${notation(`*θ* = ${numberText(angle, 3)} rad`)}`;
}

/** A step in words, for the live region. */
export function announcementOf(history: History, measures: StepMeasures | null, step: number): string {
  if (step < 0 || step >= history.steps.length) return '';
  const kT = measures ? measures.kT[step] : history.steps.kT[step];
  const angle = measures ? measures.openingAngle[step] : history.steps.openingAngle[step];
  return `step ${stepNumber(step)}, ${plainNotation(branchingNotation(history, step))}, kT ${numberText(kT, 3)} GeV, opening angle ${numberText(angle, 3)} rad`;
}
