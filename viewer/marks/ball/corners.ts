import { rootScaleAt, scaleText, threeDigits } from '../../layout/index.ts';
import type { Mark, Text } from '../display-list.ts';
import { plain, type Run, runs } from '../lettering.ts';
import { letterSize } from './letter-size.ts';
import type { Plate } from './plate.ts';

const countOf = (count: number, word: string): string => `${count} ${word}${count === 1 ? '' : 's'}`;

/** Texts in the two upper corners: what radius and direction mean, and where the clock stands. */
export function cornerMarks(plate: Plate): { still: Mark[]; clock: Mark[] } {
  const { palette, stage, moment } = plate;
  const { scale } = plate.event.strands;
  const size = letterSize(stage.size);
  const head = 1.16 * size;
  const line = (k: number): number => head + 3 + k * 1.36 * size;
  const text = (x: number, k: number, what: readonly Run[], bold: boolean): Text => ({
    kind: 'text',
    x,
    y: k === 0 ? head : line(k),
    runs: what,
    size: bold ? head : size,
    tint: bold ? palette.ink : palette.second,
    anchor: x === 0 ? 'start' : 'end',
    halo: { tint: palette.ground, width: 2 },
  });
  const right = stage.width;
  const left = moment.steps - moment.step - 1;
  return {
    still: [
      text(0, 0, plain('Ball', true), true),
      text(0, 1, runs('radius *L* = ln(*t*_{0}/*t*)'), false),
      text(0, 2, runs('direction = momentum'), false),
      text(0, 3, runs(`inner shell √*t*_{0} = ${scaleText(rootScaleAt(scale, 0))} GeV`), false),
    ],
    clock: [
      text(right, 0, plain(momentText(plate), true), true),
      text(right, 1, runs(`√*t* = ${threeDigits(rootScaleAt(scale, plate.time))} GeV`), false),
      text(right, 2, plain(countOf(moment.partons, 'parton')), false),
      text(right, 3, plain(comingText(left, moment.steps)), false),
    ],
  };
}

/** Where the clock stands, in words. */
export function momentText({ moment }: Pick<Plate, 'moment'>): string {
  if (moment.steps === 0) return 'no branching in this event';
  return moment.step < 0 ? 'hard process' : `after step ${stepName(moment.step)}`;
}

/** A step as every view calls it: its row number in the file, from 0. */
export const stepName = (step: number): string => String(step);

function comingText(left: number, steps: number): string {
  if (left === 0) return 'no step to come';
  return `${left} of ${countOf(steps, 'step')} to come`;
}
