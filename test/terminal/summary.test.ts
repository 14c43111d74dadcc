import { copyFileSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { branchlight, scratchFolder, shell } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;
const EVENTS = 400;

interface Estimate {
  readonly mean: number;
  readonly error: number;
  readonly count: number;
}
interface ShownEvent {
  readonly steps: { readonly channel: string[]; readonly rejected: number[] };
  readonly entries: { readonly endedBy: number[]; readonly role: string[] };
}

beforeAll(async () => {
  await branchlight(['grow', '--events', String(EVENTS), '--out', 'a.shower'], { cwd });
});
afterAll(() => folder.remove());

const summary = (...words: string[]): ReturnType<typeof branchlight> =>
  branchlight(['summary', ...words], { cwd });

const KEYS = [
  ...[
    'partons',
    'steps',
    'steps.q_qg',
    'steps.g_gg',
    'steps.g_qq',
    'steps.g_cc',
    'steps.g_bb',
    'oneMinusThrust',
  ],
  ...['rejectedPerStep', 'noBranching', 'coherence.aboveBirth', 'coherence.abovePartner'],
];
const RATES = ['durham.R2', 'durham.R3', 'durham.R4', 'durham.R5'];

describe('--json', () => {
  test('has every promised key with mean, error and count', async () => {
    const { stdout, stderr, status } = await summary('a.shower', '--json');
    expect([status, stderr]).toEqual([0, '']);
    const result = JSON.parse(stdout);
    for (const key of KEYS) {
      expect(Object.keys(result[key]), key).toEqual(['mean', 'error', 'count']);
      expect(Number.isFinite(result[key].mean), key).toBe(true);
    }
    for (const key of RATES) {
      expect(Object.keys(result[key]).sort(), key).toEqual(['0.001', '0.003', '0.01', '0.03', '0.1']);
      for (const rate of Object.values<Estimate>(result[key])) expect(rate.count).toBe(EVENTS);
    }
    const { edges, counts, peak } = result.lnInverseX;
    expect(edges).toHaveLength(counts.length + 1);
    expect(Object.keys(peak)).toEqual(['mean', 'error']);
  });

  test('agrees with means that are computed from what show prints', async () => {
    const result = JSON.parse((await summary('a.shower', '--json')).stdout);
    const { stdout } = await branchlight(['show', 'a.shower', '--event', 'all', '--json'], { cwd });
    const events: ShownEvent[] = stdout
      .trimEnd()
      .split('\n')
      .map((line) => JSON.parse(line));
    const mean = (value: (event: ShownEvent) => number): { mean: number; error: number } => {
      const values = events.map(value);
      const average = values.reduce((sum, x) => sum + x, 0) / values.length;
      const scatter = values.reduce((sum, x) => sum + (x - average) ** 2, 0) / (values.length - 1);
      return { mean: average, error: Math.sqrt(scatter / values.length) };
    };
    const expected = {
      steps: mean(({ steps }) => steps.channel.length),
      'steps.q_qg': mean(({ steps }) => steps.channel.filter((name) => name === 'q_qg').length),
      'steps.g_gg': mean(({ steps }) => steps.channel.filter((name) => name === 'g_gg').length),
      'steps.g_qq': mean(({ steps }) => steps.channel.filter((name) => name === 'g_qq').length),
      noBranching: mean(({ steps }) => (steps.channel.length === 0 ? 1 : 0)),
      partons: mean(({ entries: { endedBy, role } }) => {
        return endedBy.filter((step, row) => step === -1 && !['incoming', 'resonance'].includes(role[row]))
          .length;
      }),
    };
    for (const [key, { mean: average, error }] of Object.entries(expected)) {
      expect(result[key].mean, key).toBeCloseTo(average, 12);
      expect(result[key].error, key).toBeCloseTo(error, 12);
      expect(result[key].count, key).toBe(EVENTS);
    }
    const steps = events.flatMap((event) => event.steps.rejected);
    expect(result.rejectedPerStep.mean).toBeCloseTo(steps.reduce((sum, x) => sum + x, 0) / steps.length, 12);
    expect(result.rejectedPerStep.count).toBe(steps.length);
  });

  test('takes other jet resolutions and names them as JavaScript prints the numbers', async () => {
    const result = JSON.parse((await summary('a.shower', '--json', '--ycut', '1e-2,0.0000001,.4')).stdout);
    for (const key of RATES) expect(Object.keys(result[key]).sort()).toEqual(['0.01', '0.4', '1e-7']);
    // the coarser the resolution, the more events are two jets
    expect(result['durham.R2']['0.4'].mean).toBeGreaterThan(result['durham.R2']['0.01'].mean);
  });
});

test('as text has a line a quantity', async () => {
  const { stdout, status } = await summary('a.shower');
  expect(status).toBe(0);
  for (const key of KEYS) expect(stdout).toMatch(new RegExp(`^ {2}${key.replace('.', '\\.')} +\\d`, 'm'));
  expect(stdout).toMatch(/^ {2}durham\.R3 at 0\.01 +\d/m);
});

test('reads standard input', async () => {
  const { stdout } = await shell('branchlight summary - --json < a.shower', cwd);
  expect(stdout).toBe((await summary('a.shower', '--json')).stdout);
});

test('finds a single wrong bit in any chunk, where show of another event need not', async () => {
  const bytes = readFileSync(join(cwd, 'a.shower'));
  copyFileSync(join(cwd, 'a.shower'), join(cwd, 'flipped.shower'));
  bytes[Math.floor(bytes.length / 2)] ^= 4;
  writeFileSync(join(cwd, 'flipped.shower'), bytes);
  const { stdout, stderr, status } = await summary('flipped.shower', '--json');
  expect(stdout).toBe('');
  expect(stderr).toMatch(/flipped\.shower.*byte \d+/);
  expect(status).toBe(3);
});
