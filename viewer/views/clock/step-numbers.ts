import { stepNumber } from '../../state/index.ts';

/**
 * Which steps get their number printed: the selected one, then the earliest first, none closer to another than its room.
 *
 * @param positions Place of each step along the axis [px], in the order of evolution.
 * @param selected Step that is printed in any case, −1 for none.
 * @param room Least distance between two numbers [px]; wider where a number has three digits or more.
 */
export function numberedSteps(positions: ArrayLike<number>, selected: number, room = 15): boolean[] {
  const shown = new Array<boolean>(positions.length).fill(false);
  const taken: { at: number; room: number }[] = [];
  const place = (step: number): void => {
    const digits = stepNumber(step).length;
    const own = room + Math.max(digits - 2, 0) * 6.5;
    const at = positions[step];
    if (taken.some((other) => Math.abs(other.at - at) < Math.max(own, other.room))) return;
    taken.push({ at, room: own });
    shown[step] = true;
  };
  if (selected >= 0 && selected < positions.length) place(selected);
  for (let step = 0; step < positions.length; step++) if (!shown[step]) place(step);
  return shown;
}

/** The step whose place is nearest to `at`, −1 where none lies within `reach` [px]. */
export function nearestStep(positions: ArrayLike<number>, at: number, reach: number): number {
  let best = -1;
  let distance = reach;
  for (let step = 0; step < positions.length; step++) {
    const away = Math.abs(positions[step] - at);
    if (away < distance || (away === distance && best < 0)) {
      best = step;
      distance = away;
    }
  }
  return best;
}
