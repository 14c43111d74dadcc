import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  ENTRY_COLUMNS,
  growEvent,
  resolveSettings,
  STEP_COLUMNS,
  TRIAL_COLUMNS,
} from '../../engine/index.ts';
import { branchlight, scratchFolder, shell } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;

beforeAll(async () => {
  await branchlight(['grow', '--events', '100', '--energy', '500', '--trials', '--out', 'a.shower'], { cwd });
});
afterAll(() => folder.remove());

const show = (...words: string[]): ReturnType<typeof branchlight> =>
  branchlight(['show', 'a.shower', ...words], { cwd });

describe('--json', () => {
  test('is one object of the tables of the history model, bit for bit what the engine grows', async () => {
    const { stdout, stderr, status } = await show('--event', '17', '--json');
    expect([status, stderr]).toEqual([0, '']);
    expect(stdout.endsWith('}\n')).toBe(true);
    const shown = JSON.parse(stdout);
    const grown = growEvent(resolveSettings({ energy: 500, trials: true }), 17);
    expect(Object.keys(shown)).toEqual(['head', 'entries', 'steps', 'trials']);
    expect(shown.head.event).toBe(17);
    for (const table of ['entries', 'steps', 'trials'] as const) {
      const specs = { entries: ENTRY_COLUMNS, steps: STEP_COLUMNS, trials: TRIAL_COLUMNS }[table];
      const columns = shown[table];
      const present = grown.head.columns[table] ?? [];
      expect(Object.keys(columns).sort()).toEqual([...present].sort());
      for (const { name, kind } of specs) {
        if (kind === 'word' || !present.includes(name)) continue;
        const values = Array.from((grown[table] as unknown as Record<string, ArrayLike<number>>)[name]);
        expect(columns[name], `${table}.${name}`).toEqual(
          values.map((value) => (Number.isNaN(value) ? null : value)),
        );
      }
    }
    expect(shown.steps.channel.every((word: string) => ['q_qg', 'g_gg', 'g_qq'].includes(word))).toBe(true);
  });

  test('prints one object a line for several events, A..B with both ends', async () => {
    const { stdout } = await show('--event', '3..5', '--json');
    const lines = stdout.split('\n');
    expect(lines.pop()).toBe('');
    expect(lines.map((line) => JSON.parse(line).head.event)).toEqual([3, 4, 5]);
  });

  test('all is every event of the file', async () => {
    const { stdout } = await show('--event', 'all', '--json');
    const numbers = stdout
      .trimEnd()
      .split('\n')
      .map((line) => JSON.parse(line).head.event);
    expect(numbers).toEqual(Array.from({ length: 100 }, (_, n) => n));
  });
});

describe('as text', () => {
  test('is event 0 unless asked otherwise, under the head of the file', async () => {
    const { stdout, stderr, status } = await show();
    expect([status, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(/^a\.shower: 100 events\n/);
    expect(stdout).toContain('sqrtS       500 GeV');
    expect(stdout).toMatch(/\nevent 0: e- e\+ -> /);
    expect(stdout).not.toMatch(/\nevent 1:/);
  });

  test('has a line for every entry and step, units below the names, no blanks at the ends of lines', async () => {
    const { stdout } = await show('--event', '17');
    const grown = growEvent(resolveSettings({ energy: 500 }), 17);
    const table = (head: RegExp): string[] => {
      const lines = stdout.split('\n');
      const from = lines.findIndex((line) => head.test(line));
      return lines.slice(from, lines.indexOf('', from));
    };
    expect(table(/^ +entry +id/)).toHaveLength(2 + grown.entries.length);
    expect(table(/^ +entry +id/)[1].match(/GeV/g)).toHaveLength(5);
    expect(table(/^ +step +kind/)).toHaveLength(1 + grown.steps.length);
    expect(table(/^ +step +t /)).toHaveLength(2 + grown.steps.length);
    expect(stdout).not.toMatch(/[ \t]\n/);
  });
});

describe('pipes', () => {
  test('reads standard input as -', async () => {
    const piped = await shell('branchlight show - --event 17 --json < a.shower', cwd);
    expect(piped.stdout).toBe((await show('--event', '17', '--json')).stdout);
    const grown = await shell(
      'branchlight grow --events 20 --quiet --out - | branchlight show - --event 19 --json',
      cwd,
    );
    expect(JSON.parse(grown.stdout).head.event).toBe(19);
  });

  test('ends quietly with 0 when its reader has enough', async () => {
    const line = 'set -o pipefail; branchlight show a.shower --event all --json | head -1 | wc -l';
    const { stdout, stderr, status } = await shell(line, cwd);
    expect(stdout.trim()).toBe('1');
    expect(stderr).toBe('');
    expect(status).toBe(0);
  });
});
