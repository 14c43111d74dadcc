/**
 * What can be wrong with a native file.
 *
 * - `foreign-file`: it is something else, as its first bytes show;
 * - `newer-version`: its major version is newer than ours;
 * - `truncated-file`: it ends too early;
 * - `wrong-checksum`: bytes were changed after it was written;
 * - `malformed-file`: its checksums are right, but what they cover cannot be decoded;
 * - `cannot-read`: the source did not give the bytes;
 * - `beyond-format`: a history has more than the format can hold (writing).
 */
export type ShowerFileCode =
  | 'foreign-file'
  | 'newer-version'
  | 'truncated-file'
  | 'wrong-checksum'
  | 'malformed-file'
  | 'cannot-read'
  | 'beyond-format';

/** A native file that cannot be read or written: which, at which byte, what was found and what was expected. */
export class ShowerFileError extends Error {
  override readonly name = 'ShowerFileError';
  readonly code: ShowerFileCode;
  /** Name of the source. */
  readonly file: string;
  /** Byte of the file, from 0. */
  readonly byte: number;
  readonly found: string;
  readonly expected: string;

  constructor(code: ShowerFileCode, file: string, byte: number, found: string, expected: string) {
    super(`${file}, byte ${byte}: expected ${expected}, found ${found}`);
    this.code = code;
    this.file = file;
    this.byte = byte;
    this.found = found;
    this.expected = expected;
  }
}
