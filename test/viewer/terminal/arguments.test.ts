import { existsSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { readArguments } from '../../../viewer/terminal/arguments.ts';
import { COMMANDS } from '../../../viewer/terminal/commands.ts';
import { explain } from '../../../viewer/terminal/errors.ts';

const OUT = ['--out', 'never-written.shower'];

/** The command refuses these words with exit status 2, this code and a message like this, and writes nothing. */
async function expectRefused(name: string, words: string[], code: string, said: RegExp): Promise<void> {
  const command = await COMMANDS.find((each) => each.name === name)!.load();
  const attempt = async (): Promise<number> => {
    const read = readArguments(command, words);
    if (read.help) throw new Error('help');
    return command.run(read.values, read.operands, { page: '' });
  };
  const refusal = await attempt().then(() => null, explain);
  expect(refusal).toMatchObject({ code, status: 2 });
  expect(refusal?.message).toMatch(said);
  expect(existsSync(OUT[1])).toBe(false);
}

describe('refused, naming the option or argument and what it takes', () => {
  test.each<[string, string, RegExp]>([
    ['process', 'drell-yan', /takes ee \| scalar-gg \| scalar-bb; found "drell-yan"/],
    ['shower', 'antenna', /takes dipole \| coherent; found "antenna"/],
    ['order', 'angle', /takes kt \| virtuality; found "angle"/],
    ['recoil', 'none', /takes local \| global; found "none"/],
    ['coherence', 'yes', /takes on \| off; found "yes"/],
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
    expectRefused('grow', [`--${name}`, value, ...OUT], 'bad-value', said),
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
    [['--coherence', 'off'], /--coherence off: expected on with --shower dipole/],
    [['--recoil', 'global', '--masses', 'on'], /--(recoil|masses) /],
    [['--shower', 'coherent', '--order', 'virtuality'], /--order virtuality: expected kt with/],
    [['--process', 'scalar-gg', '--quark', 'd'], /--quark d: expected no quark/],
  ])('settings that make no sense: grow %j', (words, said) =>
    expectRefused('grow', [...words, ...OUT], 'setting', said),
  );

  test.each<[string[], string, RegExp]>([
    [['--evnets', '3'], 'unknown-option', /--evnets .*did you mean --events\?.*--energy/],
    [['--shard', '1/2'], 'unknown-option', /--shard .*--process --energy --events/],
    [['--json'], 'unknown-option', /--json/],
    [['-o', 'x'], 'unknown-option', /-o /],
    [['--no-trials'], 'unknown-option', /--no-trials/],
    [['--seed', '1', '--seed', '1'], 'repeated-option', /--seed is given twice/],
    [['--trials', '--trials'], 'repeated-option', /--trials is given twice/],
    [['--seed'], 'missing-value', /--seed takes an integer/],
    [['--seed', '--quiet'], 'missing-value', /--seed takes an integer/],
    [['--trials=yes'], 'needless-value', /--trials takes no value/],
    [['extra'], 'extra-argument', /"extra"/],
  ])('form: grow %j', (words, code, said) => expectRefused('grow', [...words, ...OUT], code, said));

  test('grow without a file to write', () =>
    expectRefused('grow', [], 'missing-option', /--out is needed: FILE/));
  test('an empty name of a file', () =>
    expectRefused('grow', ['--out', ''], 'bad-value', /--out takes FILE/));

  test.each<[string[], string, RegExp]>([
    [['show'], 'missing-argument', /show takes FILE; found nothing/],
    [['show', ''], 'missing-argument', /empty/],
    [['show', 'a.shower', 'b.shower'], 'extra-argument', /"b\.shower"/],
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
  ])('other commands: %j', ([name, ...words], code, said) => expectRefused(name, words, code, said));
});

test('takes every option of the documented example, and defaults spelt out', async () => {
  const grow = await COMMANDS[0].load();
  const words = [
    '--process ee --quark d --energy 91.1876 --shower dipole --order kt --recoil local --coupling one-loop --cutoff 1',
    '--masses off --velocity-factors unit --first-emission kernel --cmw off --alphas-mz 0.118 --flavours 5 --workers 1',
    '--events=50000 --seed 0 --out a.shower',
  ].flatMap((line) => line.split(' '));
  const read = readArguments(grow, words);
  expect(read).toMatchObject({ help: false, operands: [] });
  if (read.help) return;
  expect(Object.keys(read.values)).toHaveLength(18);
  expect(read.values).toMatchObject({
    events: 50000,
    seed: 0,
    energy: 91.1876,
    coupling: { kind: 'one-loop' },
    out: 'a.shower',
  });
});

test('a lone hyphen is a file, and what stands behind two of them is no option', async () => {
  const [, show] = await Promise.all(COMMANDS.map(({ load }) => load()));
  expect(readArguments(show, ['-', '--json'])).toMatchObject({ operands: ['-'], values: { json: true } });
  expect(readArguments(show, ['--json', '--', '--odd-name'])).toMatchObject({ operands: ['--odd-name'] });
});
