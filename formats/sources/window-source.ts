import type { ByteSource } from './byte-source.ts';

const WINDOW = 1 << 20;

/** A source read from front to back in large pieces, whatever the size of what is asked for. */
export class WindowSource implements ByteSource {
  readonly name: string;
  readonly #source: ByteSource;
  #start = 0;
  #bytes: Uint8Array = new Uint8Array(0);

  constructor(source: ByteSource) {
    this.name = source.name;
    this.#source = source;
  }

  size(): Promise<number> {
    return this.#source.size();
  }

  async read(start: number, length: number): Promise<Uint8Array> {
    const from = start - this.#start;
    if (from < 0 || from + length > this.#bytes.length) {
      this.#bytes = await this.#source.read(start, Math.max(length, WINDOW));
      this.#start = start;
      return this.#bytes.subarray(0, length);
    }
    return this.#bytes.subarray(from, from + length);
  }
}
