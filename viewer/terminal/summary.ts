import { SampleSummary, type SampleSummaryResult } from '../../engine/index.ts';
import { ShowerFileReader } from '../../formats/index.ts';
import { numberText, type TextColumn, typeset } from './columns.ts';
import { defineCommand } from './command.ts';
import { DONE } from './errors.ts';
import { openInput } from './input.ts';
import { custom, flag, readNumber } from './option.ts';
import { startProgress } from './progress.ts';
import { print } from './streams.ts';

/** Numbers above 0 up to 1, each once. */
function readYCuts(text: string): readonly number[] | undefined {
  const cuts = text.split(',').map(readNumber);
  const sane = cuts.every((cut) => cut !== undefined && cut > 0 && cut <= 1);
  return sane && new Set(cuts).size === cuts.length ? (cuts as number[]) : undefined;
}

type Row = readonly [name: string, mean: number, error: number, count: number | null];

function rowsOf(result: SampleSummaryResult): Row[] {
  const { lnInverseX, ...means } = result;
  const rows: Row[] = [];
  for (const [key, value] of Object.entries(means)) {
    // a rate is an object of means by y
    const byY: [string, Estimate][] = isEstimate(value)
      ? [[key, value]]
      : Object.entries(value).map(([y, each]) => [`${key} at ${y}`, each]);
    for (const [name, { mean, error, count }] of byY) rows.push([name, mean, error, count]);
  }
  rows.push(['lnInverseX peak', lnInverseX.peak.mean, lnInverseX.peak.error, null]);
  return rows;
}

type Estimate = SampleSummaryResult['steps'];
const isEstimate = (value: Estimate | Readonly<Record<string, Estimate>>): value is Estimate =>
  typeof value.mean === 'number';

function summaryText(result: SampleSummaryResult): string {
  const rows = rowsOf(result);
  const column = (name: string, align: TextColumn['align'], cell: (row: Row) => string): TextColumn => {
    return { name, unit: '', align, cells: rows.map(cell) };
  };
  return typeset([
    column('quantity', 'word', ([name]) => name),
    column('mean', 'number', ([, mean]) => numberText(mean)),
    column('error', 'number', ([, , error]) => numberText(error)),
    column('count', 'number', ([, , , count]) => (count === null ? '-' : String(count))),
  ]);
}

/** `branchlight summary`: means over a sample. */
export const summary = defineCommand({
  name: 'summary',
  purpose: 'sample means with statistical errors; reads and verifies every chunk',
  details: [
    'Each value is a mean with the standard error of the mean and what it was counted over: events, or steps where it is a fraction of steps. durham.Rn at y is the fraction of events with exactly n jets; lnInverseX is the distribution of ln(1/x), x = 2E/sqrt(s), as a histogram with --json and as the place of its peak in the text.',
  ],
  operands: [{ name: 'FILE', required: true }],
  options: {
    ycut: custom(
      'LIST of numbers above 0 up to 1, each once, with commas',
      { purpose: 'resolutions y of the jet rates', otherwise: '0.1,0.03,0.01,0.003,0.001' },
      readYCuts,
    ),
    json: flag('one JSON object'),
    quiet: flag('no progress'),
  },
  async run(values, operands) {
    const source = await openInput(operands[0]);
    const reader = await ShowerFileReader.open(source);
    const sums = new SampleSummary(values.ycut);
    const progress = startProgress(reader.eventCount, 'events', values.quiet ?? false);
    let done = 0;
    for await (const batch of reader.batches()) {
      for (let n = 0; n < batch.events.length; n++) sums.add(batch.view(n));
      done += batch.events.length;
      progress.at(done);
    }
    progress.end();
    await source.close();
    const result = sums.result();
    if (values.json) await print(`${JSON.stringify(result)}\n`);
    else await print(`${source.name}: ${reader.eventCount} events\n\n${summaryText(result)}\n`);
    return DONE;
  },
});
