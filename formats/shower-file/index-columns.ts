import type { EventSummaries } from './event-summaries.ts';

/** Summary columns that follow from the events alone. */
export const MADE_HERE: ReadonlySet<string> = new Set([
  'branchings',
  'finalPartons',
  'hardestKT',
  'worstCoherence',
  'weight',
]);
const FINDINGS = 'findings.';

/** Summary columns by their names in the index as summaries; what is missing is NaN, or -1 in whole numbers. */
export function toSummaries(
  columns: Readonly<Record<string, Float64Array>>,
  first: number,
  count: number,
): EventSummaries {
  const absent = () => new Float64Array(count).fill(NaN);
  const whole = (column: Float64Array | undefined) =>
    column
      ? Int32Array.from(column, (value) => (Number.isNaN(value) ? -1 : value))
      : new Int32Array(count).fill(-1);
  const findings: Record<string, Float64Array> = {};
  const unknown: Record<string, Float64Array> = {};
  for (const [name, column] of Object.entries(columns)) {
    if (name.startsWith(FINDINGS)) findings[name.slice(FINDINGS.length)] = column;
    else if (name !== 'oddness' && !MADE_HERE.has(name)) unknown[name] = column;
  }
  return {
    first,
    count,
    branchings: whole(columns.branchings),
    finalPartons: whole(columns.finalPartons),
    hardestKT: columns.hardestKT ?? absent(),
    worstCoherence: columns.worstCoherence ?? absent(),
    weight: columns.weight ?? absent(),
    findings,
    oddness: columns.oddness ?? absent(),
    unknown,
  };
}
