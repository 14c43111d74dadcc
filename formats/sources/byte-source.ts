/** Something that can be read at any place: a file, a blob, an address. */
export interface ByteSource {
  /** What to call it in messages. */
  readonly name: string;
  /** Bytes in all. */
  size(): Promise<number>;
  /** Bytes `start` to `start + length`; fewer only where it ends earlier. */
  read(start: number, length: number): Promise<Uint8Array>;
  close?(): Promise<void>;
}

/** Something that takes bytes one after the other. The bytes stay as they are, so they need not be copied. */
export interface ByteSink {
  write(bytes: Uint8Array): Promise<void> | void;
}

/** Bytes in memory as a source. What it gives are views of them. */
export function bytesSource(bytes: Uint8Array, name: string): ByteSource {
  return {
    name,
    size: async () => bytes.length,
    read: async (start, length) => bytes.subarray(start, start + length),
  };
}

/** A file of the browser, or any blob, as a source; nothing is read before it is asked for. */
export function blobSource(blob: Blob, name: string): ByteSource {
  return {
    name,
    size: async () => blob.size,
    read: async (start, length) => new Uint8Array(await blob.slice(start, start + length).arrayBuffer()),
  };
}
