import { expect, test } from 'vitest';
import { growEvent, resolveSettings } from '../../../engine/index.ts';
import { eventText, headText } from '../../../viewer/terminal/event-text.ts';
import { partonName } from '../../../viewer/terminal/parton-name.ts';

/** Cells of the table whose first column has this name. */
function tableOf(text: string, name: string): string[][] {
  const lines = text.split('\n');
  const head = lines.findIndex((line) => line.trimStart().startsWith(`${name} `));
  if (head < 0) return [];
  const rows = lines.slice(head, lines.indexOf('', head)).filter((line) => /^ +(\d|[a-z])/.test(line));
  return rows.map((line) => line.trim().split(/ {2,}/));
}

test('with global recoil the momenta of the end stand in a table of their own and sum to the beams', () => {
  const history = growEvent(resolveSettings({ energy: 500, recoil: 'global', seed: 3 }), 4);
  const [names, ...rows] = tableOf(eventText(history), 'final');
  expect(names).toEqual(['final', 'id', 'px', 'py', 'pz', 'e', 'm']);
  expect(rows).toHaveLength(history.steps.length + 2);
  expect(history.steps.length).toBeGreaterThan(3);
  const sums = [2, 3, 4, 5].map((column) => rows.reduce((sum, cells) => sum + Number(cells[column]), 0));
  for (const [at, expected] of [0, 0, 0, 500].entries()) {
    // every printed number is rounded to 1e-5
    expect(Math.abs(sums[at] - expected)).toBeLessThan(0.5e-5 * rows.length + 1e-9);
  }
});

test('with local recoil the rows themselves are those of the end, and no such table repeats them', () => {
  expect(tableOf(eventText(growEvent(resolveSettings(), 1)), 'final')).toEqual([]);
});

test('an event without a branching has no table of steps', () => {
  const settings = resolveSettings({ cutoff: 40 });
  const text = eventText(growEvent(settings, 0));
  expect(text).toContain('0 steps, 5 entries');
  expect(tableOf(text, 'step')).toEqual([]);
});

test('trials have a table where they were recorded', () => {
  const history = growEvent(resolveSettings({ trials: true }), 17);
  expect(tableOf(eventText(history), 'trial')).toHaveLength(1 + history.trials!.length);
});

test('the head is in lines that fit', () => {
  const text = headText(growEvent(resolveSettings(), 0).head);
  expect(text.split('\n').filter((line) => line.length > 100)).toEqual([]);
  expect(text).toContain('hardScale   2078.79 GeV^2');
});

test('names particles and antiparticles, and leaves others their number', () => {
  expect([1, -5, 21, 11, -11, 23, 22, -12, 24, -24, 9900012].map(partonName)).toEqual([
    ...['d', 'bbar', 'g', 'e-', 'e+', 'gamma*/Z', 'gamma', 'nu_ebar', 'W+', 'W-', '9900012'],
  ]);
});
