import { inflateSync } from 'fflate';

/**
 * Bytes of a deflate stream whose inflated length is known.
 *
 * @throws Error where the stream is broken or its length differs; nothing larger than `length` + 1 is allocated.
 */
export function inflate(stream: Uint8Array, length: number): Uint8Array {
  // One byte more than expected shows a stream that goes on.
  const out = inflateSync(stream, { out: new Uint8Array(length + 1) });
  if (out.length !== length) {
    throw new Error(out.length > length ? `more than ${length} bytes` : `${out.length} bytes`);
  }
  return out;
}
