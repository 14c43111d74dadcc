import { readArguments } from './arguments.ts';
import type { Place } from './command.ts';
import { COMMANDS } from './commands.ts';
import { DONE, explain, WrongUse } from './errors.ts';
import { commandHelp, overview } from './help.ts';
import { watchInterruptions } from './interruption.ts';
import { nearest } from './nearest.ts';
import { endWithReader, print } from './streams.ts';

/**
 * The whole command line.
 *
 * @param words what stands behind `branchlight`.
 * @returns the exit status.
 */
export async function run(words: readonly string[], place: Place): Promise<number> {
  endWithReader();
  watchInterruptions();
  const [first, ...rest] = words;
  try {
    return await dispatch(first, rest, place);
  } catch (error) {
    const { message, code, status } = explain(error);
    const command = COMMANDS.find(({ name }) => name === first)?.name;
    const mends = command !== 'convert' && (code === 'truncated-file' || code === 'wrong-checksum');
    const hint = mends ? '; `branchlight convert` saves what is whole' : '';
    process.stderr.write(`branchlight${command ? ` ${command}` : ''}: ${message}${hint} (${code})\n`);
    return status;
  }
}

async function dispatch(first: string | undefined, rest: readonly string[], place: Place): Promise<number> {
  if (first === '--help' || first === '-h') {
    await print(overview(COMMANDS));
    return DONE;
  }
  if (first === '--version') {
    const { VERSION } = await import('../../engine/index.ts');
    await print(`branchlight ${VERSION}\n`);
    return DONE;
  }
  const entry = COMMANDS.find(({ name }) => name === first);
  if (!entry) throw noCommand(first);
  const command = await entry.load();
  const said = readArguments(command, rest);
  if (said.help) {
    await print(commandHelp(command));
    return DONE;
  }
  return command.run(said.values, said.operands, place);
}

function noCommand(first: string | undefined): WrongUse {
  const names = COMMANDS.map(({ name }) => name);
  const takes = `the commands are ${names.join(', ')}`;
  if (first === undefined) return new WrongUse('unknown-command', `a command is needed; ${takes}`);
  const near = nearest(first, names);
  const meant = near ? `did you mean ${near}? ` : '';
  return new WrongUse('unknown-command', `there is no command ${first}; ${meant}${takes}`);
}
