import { afterAll, expect, test } from 'vitest';
import { VERSION } from '../../engine/index.ts';
import type { Command } from '../../viewer/terminal/command.ts';
import { convert } from '../../viewer/terminal/convert.ts';
import { grow } from '../../viewer/terminal/grow.ts';
import { show } from '../../viewer/terminal/show.ts';
import { summary } from '../../viewer/terminal/summary.ts';
import { view } from '../../viewer/terminal/view.ts';
import { branchlight, scratchFolder } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;
afterAll(() => folder.remove());

const COMMANDS: Command[] = [grow, show, summary, view, convert];

test('the overview names every command with the purpose that its own help states', async () => {
  const { stdout, stderr, status } = await branchlight(['--help'], { cwd });
  expect([status, stderr]).toEqual([0, '']);
  const listed = [...stdout.matchAll(/^ {2}([a-z]+) {2,}(.*)$/gm)].map(([, name, purpose]) => [
    name,
    purpose,
  ]);
  expect(listed).toEqual(COMMANDS.map(({ name, purpose }) => [name, purpose]));
});

test.each(COMMANDS.map((command) => [command.name, command] as const))(
  '%s --help names every option and argument, and asks for nothing else',
  async (name, command) => {
    const { stdout, stderr, status } = await branchlight([name, '--help'], { cwd });
    expect([status, stderr]).toEqual([0, '']);
    for (const [option, { takes }] of Object.entries(command.options)) {
      expect(stdout).toMatch(new RegExp(`^ {2}--${option} `, 'm'));
      if (takes) expect(stdout.replace(/\n +/g, ' ')).toContain(takes);
    }
    for (const operand of command.operands) expect(stdout).toMatch(new RegExp(`usage: .*${operand.name}`));
    expect(stdout.split('\n').filter((line) => line.length > 100)).toEqual([]);
  },
);

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
