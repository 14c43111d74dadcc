import type { Options, Values } from './option.ts';

/** An argument by position. */
export interface Operand {
  readonly name: string;
  readonly required: boolean;
}

/** What the program that started the command line hands to it. */
export interface Place {
  /** Folder of the built viewer page. */
  readonly page: string;
}

/** One command: its help, what it takes, and what it does. */
export interface Command<O extends Options = Options> {
  readonly name: string;
  readonly purpose: string;
  /** Further paragraphs of the help text. */
  readonly details: readonly string[];
  readonly operands: readonly Operand[];
  readonly options: O;
  /** @returns the exit status. */
  run(values: Values<O>, operands: readonly string[], place: Place): Promise<number>;
}

/** A command whose `run` knows the types of its options. */
export function defineCommand<O extends Options>(command: Command<O>): Command {
  return command as unknown as Command;
}
