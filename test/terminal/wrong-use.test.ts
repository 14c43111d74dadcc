import { existsSync, mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { branchlight, scratchFolder } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;

beforeAll(async () => {
  mkdirSync(join(cwd, 'a-folder'));
  writeFileSync(join(cwd, 'foreign.shower'), 'this is a text file, not a sample of histories\n'.repeat(10));
  expect((await branchlight(['grow', '--events', '10', '--out', 'a.shower'], { cwd })).status).toBe(0);
});
afterAll(() => folder.remove());

/** Refused: exit status, code in brackets at the end, one line, nothing on standard output, no stack. */
async function expectRefused(words: string[], code: string, said: RegExp, status = 2): Promise<void> {
  const end = await branchlight(words, { cwd });
  const line = words.join(' ');
  expect(end.stderr, line).toMatch(said);
  expect(end.stderr, line).toMatch(new RegExp(`^branchlight[^\n]*\\(${code}\\)\n$`));
  expect(end.stderr, line).not.toMatch(/\n {4}at |node:internal|\.mjs:\d/);
  expect(end.stdout, line).toBe('');
  expect(end.status, line).toBe(status);
}

describe('a command line that cannot be is refused with 2, naming what exists', () => {
  test.each<[string[], string, RegExp]>([
    [[], 'unknown-command', /grow, show, summary, view, convert/],
    [['grwo'], 'unknown-command', /did you mean grow\?/],
    [['audit', 'a.shower'], 'unknown-command', /grow, show, summary, view, convert/],
    [['--sed', '1'], 'unknown-command', /grow, show/],
  ])('commands: %j', (words, code, said) => expectRefused(words, code, said));

  test.each<[string[], string, RegExp]>([
    [
      ['grow', '--evnets', '3', '--out', 'x'],
      'unknown-option',
      /--evnets .*did you mean --events\?.*--energy/,
    ],
    [['grow', '--seed', '1', '--seed', '1', '--out', 'x'], 'repeated-option', /--seed is given twice/],
    [['grow', '--masses', 'maybe', '--out', 'x'], 'bad-value', /--masses takes on \| off; found "maybe"/],
    [['grow', '--cutoff', '0.1', '--out', 'x'], 'setting', /--cutoff 0\.1: expected more than .*Landau pole/],
    [['grow'], 'missing-option', /--out is needed: FILE/],
    [['show'], 'missing-argument', /show takes FILE; found nothing/],
    [['show', 'a.shower', '--event', '10'], 'no-such-event', /holds events 0 to 9; found --event 10/],
    [['show', 'a.shower', '--event', '5..10'], 'no-such-event', /holds events 0 to 9/],
    [['convert', 'a.shower', 'b.jsonl'], 'unknown-format', /b\.jsonl.*shower/],
  ])('the rest: %j', async (words, code, said) => {
    await expectRefused(words, code, said);
    expect(existsSync(join(cwd, 'x'))).toBe(false);
  });
});

describe('a file that cannot be used is refused with 3, naming it and what was expected', () => {
  for (const command of ['show', 'summary', 'view']) {
    test(`${command}: missing, folder, foreign`, async () => {
      await expectRefused([command, 'none.shower'], 'cannot-read', /none\.shower: no such file/, 3);
      await expectRefused([command, 'a-folder'], 'cannot-read', /a-folder: is a folder/, 3);
      await expectRefused([command, 'foreign.shower'], '[a-z-]+', /foreign\.shower.*byte 0.*expected/, 3);
    });
  }

  test('grow: no such folder, a folder, a file that may not be written', async () => {
    const grow = (out: string): string[] => ['grow', '--events', '1', '--out', out];
    await expectRefused(grow('none/x.shower'), 'cannot-write', /none\/x\.shower: no such file or folder/, 3);
    await expectRefused(grow('a-folder'), 'cannot-write', /a-folder: is a folder/, 3);
    await expectRefused(grow('/proc/x.shower'), 'cannot-write', /\/proc\/x\.shower/, 3);
  });

  test('a full disk stops grow with the byte that it got to', async () => {
    await expectRefused(
      ['grow', '--events', '2000', '--out', '/dev/full'],
      'cannot-write',
      /no space left.*byte \d+/,
      3,
    );
  });
});
