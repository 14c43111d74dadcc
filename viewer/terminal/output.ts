import { type FileHandle, open, realpath, rename, stat } from 'node:fs/promises';
import type { ByteSink } from '../../formats/index.ts';
import { fileTrouble, WrongUse } from './errors.ts';
import { print } from './streams.ts';

/** Where a command writes its file. */
export interface Output extends ByteSink {
  /** As the user named it. */
  readonly name: string;
  readonly bytes: number;
  write(bytes: Uint8Array): Promise<void>;
  /** The file is whole: put it in its place. */
  finish(): Promise<void>;
  /**
   * The file holds only what was done until an interruption: leave an older file of that name as it was.
   *
   * @returns the name of the file that holds what was done.
   */
  keep(): Promise<string>;
}

class FileOutput implements Output {
  readonly name: string;
  bytes = 0;
  readonly #handle: FileHandle;
  /** File being written, and the one that it replaces when it is whole; the same when nothing stood there. */
  readonly #path: string;
  readonly #target: string;

  constructor(name: string, handle: FileHandle, path: string, target: string) {
    this.name = name;
    this.#handle = handle;
    this.#path = path;
    this.#target = target;
  }

  async write(bytes: Uint8Array): Promise<void> {
    // `writeFile` of a handle writes on from where it stands, and all of it.
    await this.#guard(this.#handle.writeFile(bytes));
    this.bytes += bytes.length;
  }

  async finish(): Promise<void> {
    await this.#guard(this.#handle.close());
    if (this.#path !== this.#target) await this.#guard(rename(this.#path, this.#target));
  }

  async keep(): Promise<string> {
    await this.#guard(this.#handle.close());
    return this.#path;
  }

  async #guard<T>(work: Promise<T>): Promise<T> {
    try {
      return await work;
    } catch (error) {
      const expected = `to write behind byte ${this.bytes}`;
      throw fileTrouble('cannot-write', this.#path, expected, error);
    }
  }
}

class StandardOutput implements Output {
  readonly name = 'standard output';
  bytes = 0;

  async write(bytes: Uint8Array): Promise<void> {
    await print(bytes);
    this.bytes += bytes.length;
  }

  async finish(): Promise<void> {}

  async keep(): Promise<string> {
    return this.name;
  }
}

/**
 * Open a file for writing; `-` is standard output.
 *
 * A new file is written in place, so that it can be watched growing. An existing one is replaced when the new one is
 * whole: until then that is NAME.part, which stays if the writer dies. A device or pipe is written to as it is.
 *
 * @throws Trouble where it cannot be written, WrongUse where standard output is a terminal.
 */
export async function openOutput(name: string): Promise<Output> {
  if (name === '-') {
    if (process.stdout.isTTY) {
      throw new WrongUse('binary-to-terminal', 'standard output is a terminal; expected a file or a pipe');
    }
    return new StandardOutput();
  }
  try {
    const existing = await stat(name).catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOENT') return null;
      throw error;
    });
    if (!existing) return new FileOutput(name, await open(name, 'w'), name, name);
    if (existing.isDirectory()) throw Object.assign(new Error(), { code: 'EISDIR' });
    // Behind a link the file is replaced, not the link.
    const target = await realpath(name);
    const path = existing.isFile() ? `${target}.part` : target;
    return new FileOutput(name, await open(path, 'w'), path, target);
  } catch (error) {
    throw fileTrouble('cannot-write', name, 'a file that can be written', error);
  }
}
