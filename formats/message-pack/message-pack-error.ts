/** Bytes that are no MessagePack of standard types: where, what stands there, what should. */
export class MessagePackError extends Error {
  override readonly name = 'MessagePackError';
  /** Byte in the message. */
  readonly at: number;
  readonly found: string;
  readonly expected: string;

  constructor(at: number, found: string, expected: string) {
    super(`byte ${at} of a MessagePack message: expected ${expected}, found ${found}`);
    this.at = at;
    this.found = found;
    this.expected = expected;
  }
}
