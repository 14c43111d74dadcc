import { ShowerFileError } from '../shower-file-error.ts';
import type { ByteSource } from './byte-source.ts';

/**
 * A file behind an address as a source, by HTTP range requests.
 *
 * A server that knows no ranges sends the whole file at the first request; it is then kept in memory.
 *
 * @throws ShowerFileError `cannot-read`, from `size` and `read`, where the server does not answer as it should, or the
 * file changes its size between two requests.
 */
export function urlSource(url: string | URL, name: string): ByteSource {
  return new UrlSource(url, name);
}

const RANGE = /^bytes (\d+)-(\d+)\/(\d+)$/;

class UrlSource implements ByteSource {
  readonly name: string;
  readonly #url: string | URL;
  #size: number | null = null;
  #whole: Uint8Array | null = null;

  constructor(url: string | URL, name: string) {
    this.#url = url;
    this.name = name;
  }

  async size(): Promise<number> {
    if (this.#size === null) await this.#fetch(0, 1);
    return this.#size as number;
  }

  async read(start: number, length: number): Promise<Uint8Array> {
    const end = Math.min(start + length, await this.size());
    if (end <= start) return new Uint8Array(0);
    if (this.#whole) return this.#whole.subarray(start, end);
    return this.#fetch(start, end - start);
  }

  async #fetch(start: number, length: number): Promise<Uint8Array> {
    const range = `bytes=${start}-${start + length - 1}`;
    const response = await fetch(this.#url, { headers: { Range: range } }).catch((error: unknown) => {
      throw this.#trouble(start, 'an answer', error instanceof Error ? error.message : String(error));
    });
    const bytes = new Uint8Array(await response.arrayBuffer());
    // A range that begins behind the last byte: the file is empty.
    if (response.status === 416) this.#setSize(0, start);
    else if (response.status === 200) {
      this.#setSize(bytes.length, start);
      this.#whole = bytes;
      return bytes.subarray(start, start + length);
    } else if (response.status !== 206) {
      throw this.#trouble(start, 'status 206 (partial content)', `status ${response.status}`);
    } else {
      const header = response.headers.get('Content-Range') ?? 'none';
      const match = RANGE.exec(header);
      if (!match || Number(match[1]) !== start || bytes.length !== Number(match[2]) - start + 1) {
        throw this.#trouble(start, `a Content-Range for ${range}`, header);
      }
      this.#setSize(Number(match[3]), start);
    }
    return bytes;
  }

  #setSize(size: number, start: number): void {
    if (this.#size !== null && this.#size !== size) {
      throw this.#trouble(start, `a file of ${this.#size} bytes, as before`, `one of ${size} bytes`);
    }
    this.#size = size;
  }

  #trouble(byte: number, expected: string, found: string): ShowerFileError {
    return new ShowerFileError('cannot-read', this.name, byte, found, expected);
  }
}
