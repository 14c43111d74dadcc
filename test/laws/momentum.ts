import { aliveEntries, type History, measureSteps } from '../../engine/index.ts';

/**
 * What a row's rounding may cost: sqrt(s) times 2^-53 per component, of which a step adds up five rows after some ten
 * operations each.
 */
const PER_STEP = 50 * 2 ** -53;

const COMPONENTS = ['px', 'py', 'pz', 'e'] as const;

/** Steps that make or lose four-momentum. */
export function unbalancedSteps(history: History): string[] {
  const { residual, length } = measureSteps(history);
  const allowed = PER_STEP * history.head.sqrtS;
  const breaches: string[] = [];
  for (let step = 0; step < length; step++)
    COMPONENTS.forEach((name, c) => {
      const found = residual[4 * step + c];
      if (!(Math.abs(found) <= allowed)) breaches.push(`step ${step}: ${name} off by ${found} GeV`);
    });
  return breaches;
}

/** Moments (right after each step, -1: the hard process) at which the living partons do not sum to the beams. */
export function unbalancedMoments(history: History): string[] {
  const { entries, head, steps } = history;
  const breaches: string[] = [];
  for (let step = -1; step < steps.length; step++) {
    const allowed = PER_STEP * head.sqrtS * (step + 2);
    const rows = aliveEntries(history, step);
    for (const name of COMPONENTS) {
      const beams = head.beams.reduce((sum, beam) => sum + beam[name], 0);
      const partons = rows.reduce((sum, row) => sum + entries[name][row], 0);
      if (!(Math.abs(partons - beams) <= allowed))
        breaches.push(`after step ${step}: ${name} sums to ${partons} GeV, beams to ${beams}`);
    }
  }
  return breaches;
}

/** Rows that are not on the mass shell that they name, to the rounding of their energy. */
export function offShellRows({ entries }: History): string[] {
  const breaches: string[] = [];
  for (let row = 0; row < entries.length; row++) {
    const { px, py, pz, e, m } = entries;
    const onShell = Math.sqrt(px[row] ** 2 + py[row] ** 2 + pz[row] ** 2 + m[row] ** 2);
    if (!(Math.abs(e[row] - onShell) <= 8 * 2 ** -53 * e[row]))
      breaches.push(`row ${row}: energy ${e[row]} GeV, its momentum and mass ask for ${onShell}`);
  }
  return breaches;
}
