/**
 * One option of a command.
 *
 * `read` gives the value that a text stands for, or undefined where the text is not what the option takes.
 */
export interface Option<T> {
  /** What it takes, as help and errors show it; empty for a switch. */
  readonly takes: string;
  readonly purpose: string;
  /** What holds when it is not given, in words; empty where nothing does. */
  readonly otherwise: string;
  readonly required: boolean;
  read(text: string): T | undefined;
}

// biome-ignore lint/suspicious/noExplicitAny: options of one command take values of any kinds
export type Options = Readonly<Record<string, Option<any>>>;

/** Values by option name; undefined where the option was not given. */
export type Values<O extends Options> = {
  readonly [K in keyof O]: O[K] extends Option<infer T> ? T | undefined : never;
};

interface About {
  readonly purpose: string;
  readonly otherwise?: string | number;
  readonly required?: boolean;
}

function option<T>(takes: string, about: About, read: (text: string) => T | undefined): Option<T> {
  const { purpose, otherwise = '', required = false } = about;
  return { takes, purpose, otherwise: String(otherwise), required, read };
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** A decimal number, undefined for anything else (no hexadecimal, no Infinity, no blanks). */
export function readNumber(text: string): number | undefined {
  const value = NUMBER.test(text) ? Number(text) : NaN;
  return Number.isFinite(value) ? value : undefined;
}

/** Decimal digits for an integer below 2^53, undefined for anything else. */
export function readInteger(text: string): number | undefined {
  const value = /^\d+$/.test(text) ? Number(text) : NaN;
  return Number.isSafeInteger(value) ? value : undefined;
}

/** A switch: there or not. */
export const flag = (purpose: string): Option<boolean> => option('', { purpose }, () => true);

/** One of some words. */
export function oneOf<const W extends string>(words: readonly W[], about: About): Option<W> {
  return option(words.join(' | '), about, (text) => words.find((word) => word === text));
}

/** A finite decimal number; its range is for whoever uses it to judge. */
export const number = (unit: string, about: About): Option<number> =>
  option(unit ? `a number [${unit}]` : 'a number', about, readNumber);

/** An integer from `least` to `most`, written in decimal digits. */
export function integer(least: number, most: number, about: About): Option<number> {
  const range = most === Number.MAX_SAFE_INTEGER ? `${least} to 2^53 - 1` : `${least} to ${most}`;
  return option(`an integer, ${range}`, about, (text) => {
    const value = readInteger(text);
    return value !== undefined && value >= least && value <= most ? value : undefined;
  });
}

/** Any text but the empty one, as the name of a file. */
export const file = (takes: string, about: About): Option<string> =>
  option(takes, about, (text) => (text === '' ? undefined : text));

/** An option with a reading of its own. */
export const custom = <T>(takes: string, about: About, read: (text: string) => T | undefined): Option<T> =>
  option(takes, about, read);
