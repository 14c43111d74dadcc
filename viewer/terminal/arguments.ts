import { parseArgs } from 'node:util';
import type { Command } from './command.ts';
import { WrongUse } from './errors.ts';
import { nearest } from './nearest.ts';

/** What a command line says: help wanted, or values by option name and arguments by position. */
export type Arguments =
  | { readonly help: true }
  | { readonly help: false; readonly values: Record<string, unknown>; readonly operands: readonly string[] };

/**
 * Read the words behind a command's name.
 *
 * @throws WrongUse naming the option or argument and what it takes: nothing unknown, repeated, empty or out of its
 * range passes, and nothing is guessed.
 */
export function readArguments(command: Command, words: readonly string[]): Arguments {
  if (words.includes('--help') || words.includes('-h')) return { help: true };
  const { options } = command;
  const kinds: Record<string, { type: 'string' | 'boolean' }> = {};
  for (const name of Object.keys(options)) kinds[name] = { type: options[name].takes ? 'string' : 'boolean' };
  const { tokens } = parseArgs({
    args: [...words],
    options: kinds,
    strict: false,
    allowPositionals: true,
    tokens: true,
  });

  const values: Record<string, unknown> = {};
  const operands: string[] = [];
  for (const token of tokens) {
    if (token.kind === 'positional') operands.push(token.value);
    if (token.kind !== 'option') continue;
    const option = Object.hasOwn(options, token.name) ? options[token.name] : null;
    if (!option) throw unknownOption(command, token.rawName, token.name);
    const said = `--${token.name}`;
    if (Object.hasOwn(values, token.name)) {
      throw new WrongUse('repeated-option', `${said} is given twice`);
    }
    if (option.takes && (token.value === undefined || (!token.inlineValue && isOption(token.value)))) {
      throw new WrongUse('missing-value', `${said} takes ${option.takes}; found nothing`);
    }
    if (!option.takes && token.value !== undefined) {
      throw new WrongUse('needless-value', `${said} takes no value; found "${token.value}"`);
    }
    const value = option.read(token.value ?? '');
    if (value === undefined) {
      throw new WrongUse('bad-value', `${said} takes ${option.takes}; found "${token.value}"`);
    }
    values[token.name] = value;
  }
  demand(command, values, operands);
  return { help: false, values, operands };
}

// Behind an option that takes a value, `-` is a stream and `-1` a number that the option itself refuses.
const isOption = (word: string): boolean => /^-(-|[a-z])/i.test(word);

function unknownOption(command: Command, raw: string, name: string): WrongUse {
  const names = Object.keys(command.options);
  const near = nearest(name, names);
  const meant = near ? `did you mean --${near}? ` : '';
  const all = names.map((each) => `--${each}`).join(' ');
  const no = `${raw} is no option of ${command.name}`;
  return new WrongUse('unknown-option', `${no}; ${meant}its options are ${all}`);
}

function demand(command: Command, values: Record<string, unknown>, operands: readonly string[]): void {
  const { options } = command;
  const wanted = command.operands;
  if (operands.length > wanted.length) {
    const takes = wanted.map(({ name }) => name).join(' ') || 'no arguments';
    throw new WrongUse(
      'extra-argument',
      `${command.name} takes ${takes}; found "${operands[wanted.length]}" as well`,
    );
  }
  const missing = wanted[operands.length];
  if (missing?.required) {
    throw new WrongUse('missing-argument', `${command.name} takes ${missing.name}; found nothing`);
  }
  if (operands.includes('')) throw new WrongUse('missing-argument', 'the name of a file is empty');
  for (const [name, option] of Object.entries(options)) {
    if (option.required && !Object.hasOwn(values, name)) {
      throw new WrongUse('missing-option', `--${name} is needed: ${option.takes}`);
    }
  }
}
