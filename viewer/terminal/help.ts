import type { Command } from './command.ts';
import type { Option } from './option.ts';
import { wrap } from './wrap.ts';

/** Two columns, the second wrapped. */
function pairs(rows: readonly (readonly [string, string])[]): string {
  const width = Math.max(...rows.map(([left]) => left.length)) + 4;
  return rows.map(([left, right]) => `  ${left.padEnd(width - 2)}${wrap(right, width)}`).join('\n');
}

function describe(option: Option<unknown>): string {
  const takes = option.takes ? `${option.takes}. ` : '';
  const otherwise = option.required ? ' (required)' : option.otherwise ? ` (${option.otherwise})` : '';
  return `${takes}${option.purpose}${otherwise}`;
}

/** Help text of one command. */
export function commandHelp(command: Command): string {
  const operands = command.operands.map(({ name, required }) => (required ? name : `[${name}]`));
  const required = Object.entries(command.options).filter(([, option]) => option.required);
  const usage = ['branchlight', command.name, ...operands, ...required.map(([name]) => `--${name} …`)];
  const options = Object.entries(command.options).map(
    ([name, option]) => [`--${name}`, describe(option)] as const,
  );
  const parts = [
    `branchlight ${command.name}: ${command.purpose}`,
    `usage: ${usage.join(' ')} [options]`,
    ...command.details.map((paragraph) => wrap(paragraph, 0)),
    `options (in brackets: what holds otherwise)\n${pairs([...options, ['--help', 'print this']])}`,
  ];
  return `${parts.join('\n\n')}\n`;
}

/** Help text of the whole command line. */
export function overview(commands: readonly { readonly name: string; readonly purpose: string }[]): string {
  const rows = commands.map(({ name, purpose }) => [name, purpose] as const);
  return [
    'branchlight: grow, read and watch parton-shower histories, event by event\n',
    'usage: branchlight COMMAND [arguments] [options]\n',
    `commands\n${pairs(rows)}\n`,
    'options',
    `${pairs([
      ['--help', 'print this; behind a command, what it takes'],
      ['--version', 'print the version'],
    ])}\n`,
    'Results go to standard output, everything else to standard error. A file named - is standard input or output.',
    'Exit status: 0 done, 2 wrong use, 3 a file could not be read or written, 130 interrupted with what was done kept.',
    '',
  ].join('\n');
}
