/** Exit statuses of the command line. */
export const DONE = 0;
export const WRONG_USE = 2;
export const FILE_TROUBLE = 3;
export const INTERRUPTED = 130;

/** The caller asked for something that cannot be; the message names the option or argument and what it takes. */
export class WrongUse extends Error {
  readonly code: Code;
  constructor(code: Code, message: string) {
    super(message);
    this.code = code;
  }
}

/** A file, stream or port could not be used; the message names it and what was expected. */
export class Trouble extends Error {
  readonly code: Code;
  constructor(code: Code, message: string) {
    super(message);
    this.code = code;
  }
}

interface Remedy {
  readonly status: number;
  readonly remedy: string;
}

/** Every code with its exit status and what helps, in the order of the README's table, which a test compares. */
export const CODES = {
  'unknown-command': { status: WRONG_USE, remedy: 'take one of the commands that the message lists' },
  'unknown-option': { status: WRONG_USE, remedy: 'take one of the options that the message lists' },
  'repeated-option': { status: WRONG_USE, remedy: 'give the option once' },
  'missing-option': { status: WRONG_USE, remedy: 'add the option that the message names' },
  'missing-value': {
    status: WRONG_USE,
    remedy: 'give the option a value of the kind that the message names',
  },
  'needless-value': { status: WRONG_USE, remedy: 'leave the value out: the option is a switch' },
  'bad-value': { status: WRONG_USE, remedy: 'give a value of the kind that the message names' },
  setting: {
    status: WRONG_USE,
    remedy: 'change the setting, or the one that it clashes with, as the message says',
  },
  'missing-argument': { status: WRONG_USE, remedy: 'name the file; `-` is standard input' },
  'extra-argument': { status: WRONG_USE, remedy: 'give only the arguments that the usage line shows' },
  'no-such-event': { status: WRONG_USE, remedy: 'ask for an event that the file holds; numbers start at 0' },
  'unknown-format': { status: WRONG_USE, remedy: 'name the format with `--from` or `--to`' },
  'binary-to-terminal': { status: WRONG_USE, remedy: 'send standard output to a file or a pipe' },
  'input-is-terminal': { status: WRONG_USE, remedy: 'pipe a file into standard input' },
  'port-taken': { status: WRONG_USE, remedy: 'leave `--port` out, or give one that is free' },
  'cannot-read': { status: FILE_TROUBLE, remedy: 'check the name of the file and the right to read it' },
  'cannot-write': { status: FILE_TROUBLE, remedy: 'check folder, space and the right to write' },
  'cannot-serve': { status: FILE_TROUBLE, remedy: 'check that this machine allows listening on 127.0.0.1' },
  'foreign-file': { status: FILE_TROUBLE, remedy: 'give a `.shower` file: this one is something else' },
  'newer-version': { status: FILE_TROUBLE, remedy: 'update Branchlight: a later one wrote the file' },
  'truncated-file': {
    status: FILE_TROUBLE,
    remedy: 'get the file anew, or save what is whole with `branchlight convert`',
  },
  'wrong-checksum': {
    status: FILE_TROUBLE,
    remedy: 'get the file anew, or save what is whole with `branchlight convert`',
  },
  'malformed-file': { status: FILE_TROUBLE, remedy: 'tell whoever wrote the program that wrote the file' },
  'beyond-format': { status: FILE_TROUBLE, remedy: 'split the sample: the format cannot hold so much' },
  'set-up-failed': { status: FILE_TROUBLE, remedy: 'read what npm or the build said above the message' },
  internal: { status: FILE_TROUBLE, remedy: 'report it, with the command: it is a fault of this program' },
  interrupted: {
    status: INTERRUPTED,
    remedy: 'none needed: what was finished is kept where the message says',
  },
} as const satisfies Record<string, Remedy>;

/** A code that an error of the command line carries. */
export type Code = keyof typeof CODES;

const isCode = (code: unknown): code is Code => typeof code === 'string' && Object.hasOwn(CODES, code);

/**
 * What to say about an error and the exit status that goes with it; never a stack trace.
 *
 * The errors of the layers below carry codes of the same list (`ShowerFileError`, `SettingError`); whatever carries none
 * is a fault of ours.
 */
export function explain(thrown: unknown): { message: string; code: Code; status: number } {
  const { message, code } = (thrown instanceof Error ? thrown : new Error(String(thrown))) as Error & {
    readonly code?: unknown;
  };
  const known = isCode(code) ? code : 'internal';
  return { message, code: known, status: CODES[known].status };
}

const WORDS: Readonly<Record<string, string>> = {
  ENOENT: 'no such file or folder',
  EACCES: 'permission denied',
  EPERM: 'not permitted',
  EISDIR: 'is a folder',
  ENOTDIR: 'a part of the path is no folder',
  ENOSPC: 'no space left',
  EDQUOT: 'no space left in the quota',
  EROFS: 'the file system is read-only',
  EIO: 'the device reports an input/output error',
  EMFILE: 'too many open files',
};

/** Turn what node:fs throws into a Trouble that names file, byte where known, and what was expected. */
export function fileTrouble(
  code: 'cannot-read' | 'cannot-write',
  file: string,
  expected: string,
  error: unknown,
): Trouble {
  const errno = (error as NodeJS.ErrnoException).code ?? '';
  return new Trouble(code, `${file}: ${WORDS[errno] ?? (errno || String(error))}; expected ${expected}`);
}
