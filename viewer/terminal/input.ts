import { type FileHandle, mkdtemp, open, rmdir, unlink } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import type { ByteSource } from '../../formats/index.ts';
import { fileTrouble, WrongUse } from './errors.ts';

/** A file of this machine as a source of bytes, opened once: replacing it by another does not change what is read. */
export class FileSource implements ByteSource {
  readonly name: string;
  readonly #handle: FileHandle;
  readonly #bytes: number;

  constructor(name: string, handle: FileHandle, bytes: number) {
    this.name = name;
    this.#handle = handle;
    this.#bytes = bytes;
  }

  async size(): Promise<number> {
    return this.#bytes;
  }

  /** Bytes `start` to `start + length`, fewer at the end of the file. */
  async read(start: number, length: number): Promise<Uint8Array> {
    const bytes = new Uint8Array(Math.max(0, Math.min(length, this.#bytes - start)));
    let filled = 0;
    while (filled < bytes.length) {
      const { bytesRead } = await this.#handle
        .read(bytes, filled, bytes.length - filled, start + filled)
        .catch((error: unknown) => {
          throw fileTrouble(
            'cannot-read',
            `${this.name}, byte ${start + filled}`,
            'bytes of the file',
            error,
          );
        });
      if (bytesRead === 0) return bytes.subarray(0, filled);
      filled += bytesRead;
    }
    return bytes;
  }

  async close(): Promise<void> {
    await this.#handle.close();
  }
}

/**
 * Open a file for reading at any place; `-` is standard input.
 *
 * What cannot be read at any place (a pipe) is first copied to a file without a name, which the system removes when the
 * program ends, however it ends.
 *
 * @throws Trouble where it cannot be read, WrongUse where standard input is a terminal.
 */
export async function openInput(name: string): Promise<FileSource> {
  if (name === '-') {
    if (process.stdin.isTTY) throw new WrongUse('input-is-terminal', 'standard input is a terminal');
    return spool(process.stdin, 'standard input');
  }
  const expected = 'a file that can be read';
  try {
    const handle = await open(name, 'r');
    const stat = await handle.stat();
    if (stat.isFile()) return new FileSource(name, handle, stat.size);
    if (stat.isDirectory()) throw Object.assign(new Error(), { code: 'EISDIR' });
    return await spool(handle.createReadStream(), name);
  } catch (error) {
    throw fileTrouble('cannot-read', name, expected, error);
  }
}

async function spool(stream: Readable, name: string): Promise<FileSource> {
  try {
    const folder = await mkdtemp(join(tmpdir(), 'branchlight-'));
    const path = join(folder, 'input');
    const handle = await open(path, 'wx+', 0o600);
    await unlink(path);
    await rmdir(folder);
    let bytes = 0;
    for await (const piece of stream) {
      await handle.writeFile(piece as Uint8Array);
      bytes += (piece as Uint8Array).length;
    }
    return new FileSource(name, handle, bytes);
  } catch (error) {
    throw fileTrouble('cannot-read', name, 'bytes up to its end', error);
  }
}
