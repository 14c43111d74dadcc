import { afterAll, expect, test } from 'vitest';
import { VERSION } from '../../engine/index.ts';
import { branchlight, scratchFolder } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;
afterAll(() => folder.remove());

test('prints the overview, or the help of a command, on standard output', async () => {
  const overview = await branchlight(['--help'], { cwd });
  expect([overview.status, overview.stderr]).toEqual([0, '']);
  expect(overview.stdout).toMatch(/^branchlight: /);
  for (const name of ['grow', 'show', 'summary', 'view', 'convert']) {
    const { stdout, stderr, status } = await branchlight([name, '--help'], { cwd });
    expect([status, stderr]).toEqual([0, '']);
    expect(stdout).toMatch(new RegExp(`^branchlight ${name}: [^\n]+\n\nusage: branchlight ${name} `));
  }
});

test('help wins over whatever else is wrong', async () => {
  for (const word of ['--seed', '--what', 'extra']) {
    const { status, stdout } = await branchlight(['grow', word, '--help'], { cwd });
    expect([status, stdout.split(':')[0]]).toEqual([0, 'branchlight grow']);
  }
  expect((await branchlight(['grow', '-h'], { cwd })).stdout).toMatch(/^branchlight grow: /);
});

test('--version prints name and version', async () => {
  expect((await branchlight(['--version'], { cwd })).stdout).toBe(`branchlight ${VERSION}\n`);
});
