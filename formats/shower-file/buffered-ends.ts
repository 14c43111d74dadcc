import type { ByteSource } from '../sources/index.ts';

const FRONT = 8192;
const BACK = 4096;

/** A source of which the first and last few thousand bytes are read once, so that opening a file takes two reads. */
export class BufferedEnds implements ByteSource {
  readonly name: string;
  private readonly source: ByteSource;
  private readonly total: number;
  private front: Promise<Uint8Array> | null = null;
  private back: Promise<Uint8Array> | null = null;

  constructor(source: ByteSource, total: number) {
    this.name = source.name;
    this.source = source;
    this.total = total;
  }

  async size(): Promise<number> {
    return this.total;
  }

  async read(start: number, length: number): Promise<Uint8Array> {
    if (start + length <= FRONT) {
      this.front ??= this.source.read(0, FRONT);
      return (await this.front).subarray(start, start + length);
    }
    const backStart = Math.max(0, this.total - BACK);
    if (start < backStart) return this.source.read(start, length);
    this.back ??= this.source.read(backStart, this.total - backStart);
    return (await this.back).subarray(start - backStart, start - backStart + length);
  }
}
