import { mkdirSync, writeFileSync } from 'node:fs';
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
    [['--evnets', '3'], 'unknown-option', /--evnets .*did you mean --events\?.*--energy/],
    [['--shard', '1/2'], 'unknown-option', /--shard .*--process --energy --events/],
    [['--coherence', 'on'], 'unknown-option', /--coherence/],
    [['--json'], 'unknown-option', /--json/],
    [['-o', 'x'], 'unknown-option', /-o /],
    [['--no-trials'], 'unknown-option', /--no-trials/],
    [['--seed', '1', '--seed', '1'], 'repeated-option', /--seed is given twice/],
    [['--trials', '--trials'], 'repeated-option', /--trials is given twice/],
    [['--seed'], 'missing-value', /--seed takes an integer/],
    [['--seed', '--quiet'], 'missing-value', /--seed takes an integer/],
    [['--trials=yes'], 'needless-value', /--trials takes no value/],
    [['extra'], 'extra-argument', /"extra"/],
  ])('form: grow %j', (words, code, said) =>
    expectRefused(['grow', '--out', 'x.shower', ...words], code, said),
  );

  test.each<[string, string, RegExp]>([
    ['process', 'drell-yan', /takes ee \| scalar-gg \| scalar-bb; found "drell-yan"/],
    ['shower', 'coherent', /takes dipole; found "coherent"/],
    ['order', 'angle', /takes kt \| virtuality; found "angle"/],
    ['recoil', 'global', /takes local; found "global"/],
    ['coupling', 'three-loop', /takes fixed:VALUE \| one-loop \| two-loop/],
    ['coupling', 'fixed', /takes fixed:VALUE/],
    ['coupling', 'fixed:', /takes fixed:VALUE/],
    ['coupling', 'fixed:big', /takes fixed:VALUE/],
    ['cmw', 'yes', /takes on \| off/],
    ['masses', 'true', /takes on \| off; found "true"/],
    ['velocity-factors', 'none', /takes unit \| published/],
    ['first-emission', 'exact', /takes matched \| kernel/],
    ['quark', 't', /takes d \| u \| s \| c \| b/],
    ['workers', '2', /takes 1; found "2"/],
    ['flavours', '6', /takes an integer, 0 to 5/],
    ['flavours', '2.5', /takes an integer, 0 to 5/],
    ['events', '0', /takes an integer, 1 to 2\^53 - 1/],
    ['events', '1e3', /takes an integer, 1/],
    ['events', '-1', /takes an integer, 1/],
    ['seed', '-1', /takes an integer, 0 to 2\^53 - 1/],
    ['seed', '9007199254740992', /takes an integer, 0/],
    ['seed', '99999999999999999999999', /takes an integer, 0/],
    ['seed', '1.5', /takes an integer, 0/],
    ['seed', '0x10', /takes an integer, 0/],
    ['seed', '', /takes an integer, 0/],
    ['energy', 'high', /takes a number \[GeV\]/],
    ['energy', 'Infinity', /takes a number \[GeV\]/],
    ['energy', '1,5', /takes a number \[GeV\]/],
    ['cutoff', 'NaN', /takes a number \[GeV\]/],
  ])('values: grow --%s %j', (name, value, said) =>
    expectRefused(['grow', '--out', 'x.shower', `--${name}`, value], 'bad-value', said),
  );

  test.each<[string[], RegExp]>([
    [['--energy', '0'], /--energy 0: expected a number of GeV above 0/],
    [['--energy', '-5'], /--energy -5: expected a number of GeV above 0/],
    [['--cutoff', '0'], /--cutoff 0: expected/],
    [['--cutoff', '0.1'], /--cutoff 0\.1: expected more than 0\.\d+ GeV, the Landau pole/],
    [['--cutoff', '50'], /--cutoff 50: expected less than half of the energy/],
    [['--alphas-mz', '1'], /--alphas-mz 1: expected/],
    [['--coupling', 'fixed:-1'], /--coupling fixed:-1: expected/],
    [['--flavours', '0'], /--flavours 0: expected at least 1/],
    [
      ['--process', 'scalar-bb', '--masses', 'on', '--energy', '9'],
      /--energy 9: expected more than 9\.6 GeV/,
    ],
    [['--process', 'scalar-gg', '--quark', 'd'], /--quark 1: expected no quark/],
  ])('settings that make no sense: grow %j', (words, said) =>
    expectRefused(['grow', '--out', 'x.shower', ...words], 'setting', said),
  );

  test('grow without a file to write', () =>
    expectRefused(['grow'], 'missing-option', /--out is needed: FILE/));
  test('an empty name of a file', () =>
    expectRefused(['grow', '--out', ''], 'bad-value', /--out takes FILE/));

  test.each<[string[], string, RegExp]>([
    [['show'], 'missing-argument', /show takes FILE; found nothing/],
    [['show', ''], 'missing-argument', /empty/],
    [['show', 'a.shower', 'b.shower'], 'extra-argument', /"b\.shower"/],
    [['show', 'a.shower', '--event', '10'], 'no-such-event', /holds events 0 to 9; found --event 10/],
    [['show', 'a.shower', '--event', '5..10'], 'no-such-event', /holds events 0 to 9/],
    [['show', 'a.shower', '--event', '5..3'], 'bad-value', /--event takes N \| A\.\.B \| all/],
    [['show', 'a.shower', '--event', '-1'], 'bad-value', /--event takes N \| A\.\.B \| all/],
    [['show', 'a.shower', '--event', 'first'], 'bad-value', /--event takes N \| A\.\.B \| all/],
    [['show', 'a.shower', '--event', '1..2..3'], 'bad-value', /--event takes/],
    [['show', 'a.shower', '--event', '9007199254740992'], 'bad-value', /--event takes/],
    [['summary', 'a.shower', '--ycut', 'small'], 'bad-value', /--ycut takes/],
    [['summary', 'a.shower', '--ycut', '0.1,,0.2'], 'bad-value', /--ycut takes/],
    [['summary', 'a.shower', '--ycut', '2'], 'bad-value', /--ycut takes/],
    [['summary', 'a.shower', '--ycut', '0.1,0.1'], 'bad-value', /--ycut takes/],
    [['view', 'a.shower', '--port', '70000'], 'bad-value', /--port takes an integer, 0 to 65535/],
    [['convert', 'a.shower'], 'missing-argument', /convert takes OUT/],
    [['convert', 'a.shower', 'b.jsonl'], 'unknown-format', /b\.jsonl.*shower/],
    [['convert', 'a.shower', 'b.shower', '--to', 'jsonl'], 'bad-value', /--to takes shower/],
  ])('other commands: %j', (words, code, said) => expectRefused(words, code, said));
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
