import { expect, test } from 'vitest';
import { COMMANDS } from '../../../viewer/terminal/commands.ts';
import { commandHelp, overview } from '../../../viewer/terminal/help.ts';

test('the overview names every command with the purpose that its own help states', async () => {
  const listed = [...overview(COMMANDS).matchAll(/^ {2}([a-z]+) {2,}(.*)$/gm)];
  const commands = await Promise.all(COMMANDS.map(({ load }) => load()));
  expect(listed.map(([, name, purpose]) => [name, purpose])).toEqual(
    commands.map(({ name, purpose }) => [name, purpose]),
  );
});

test.each(COMMANDS.map(({ name, load }) => [name, load] as const))(
  '%s --help names every option, what it takes, and every argument, in lines that fit',
  async (_name, load) => {
    const command = await load();
    const help = commandHelp(command);
    for (const [option, { takes }] of Object.entries(command.options)) {
      expect(help).toMatch(new RegExp(`^ {2}--${option} `, 'm'));
      expect(help.replace(/\n +/g, ' ')).toContain(takes);
    }
    for (const operand of command.operands) expect(help).toMatch(new RegExp(`usage: .*${operand.name}`));
    expect(help.split('\n').filter((line) => line.length > 100)).toEqual([]);
  },
);
