import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  decodeMessagePack,
  encodeMessagePack,
  MessagePackError,
  type Packable,
  withoutUndefined,
} from '../../formats/message-pack/index.ts';

const bytes = (...values: number[]) => Uint8Array.from(values);

describe('MessagePack', () => {
  it('gives back plain values, integers up to 2^53 - 1 among them', () => {
    const value = fc.letrec((tie) => ({
      any: fc.oneof(
        { depthSize: 'small' },
        fc.integer(),
        fc.maxSafeInteger(),
        fc.double().filter((x) => !Object.is(x, -0)),
        fc.string({ unit: 'grapheme' }),
        fc.boolean(),
        fc.constant(null),
        fc.uint8Array(),
        fc.array(tie('any')),
        fc.dictionary(fc.string(), tie('any')).filter((map) => !Object.hasOwn(map, '__proto__')),
      ),
    })).any as fc.Arbitrary<Packable>;
    fc.assert(
      fc.property(value, (original) => {
        expect(decodeMessagePack(encodeMessagePack(original))).toEqual(original);
      }),
      { seed: 5, numRuns: 300 },
    );
  });

  it('takes 64-bit integers of other writers as numbers where they are safe', () => {
    expect(decodeMessagePack(bytes(0xcf, 0, 0x1f, 255, 255, 255, 255, 255, 255))).toBe(2 ** 53 - 1);
    expect(decodeMessagePack(bytes(0xd3, 255, 255, 255, 255, 255, 255, 255, 254))).toBe(-2);
    expect(decodeMessagePack(bytes(0xcf, 255, 255, 255, 255, 255, 255, 255, 255))).toBe(2n ** 64n - 1n);
  });

  it('refuses to write what has no standard form', () => {
    for (const value of [new Date(0), undefined, [undefined], Symbol('x'), () => 1]) {
      expect(() => encodeMessagePack({ value } as unknown as Packable)).toThrow(TypeError);
    }
    expect(
      decodeMessagePack(encodeMessagePack(withoutUndefined({ a: undefined, b: { c: undefined } }))),
    ).toEqual({ b: {} });
  });

  it('refuses to read what is cut off, goes on, or is no standard type', () => {
    const broken: [Uint8Array, number][] = [
      [bytes(), 0],
      [bytes(0xc0, 0xc0), 1],
      [bytes(0xc1), 0],
      [bytes(0xd4, 0x72, 0x40), 0],
      [bytes(0xc7, 1, 5, 0), 0],
      [bytes(0xdd, 255, 255, 255, 255), 5],
      [bytes(0xdf, 255, 255, 255, 255), 5],
      [bytes(0xc6, 255, 255, 255, 255, 1), 5],
      [bytes(0xdb, 0, 0), 1],
      [bytes(0x81, 1, 1), 1],
      [Uint8Array.from({ length: 10_000 }, () => 0x91), 65],
    ];
    for (const [message, at] of broken) {
      expect(() => decodeMessagePack(message)).toThrow(
        expect.objectContaining({ name: 'MessagePackError', at }),
      );
    }
  });

  it('never throws anything else, whatever the bytes', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 60 }), (message) => {
        try {
          decodeMessagePack(message);
        } catch (error) {
          expect(error).toBeInstanceOf(MessagePackError);
        }
      }),
      { seed: 6, numRuns: 3000 },
    );
  });
});
