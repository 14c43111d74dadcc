import { crc32 } from 'node:zlib';
import { Packr, Unpackr } from 'msgpackr';

// Files put together by hand, with right checksums whatever they hold; apart from the code under test.

const packr = new Packr({ useRecords: false, variableMapSize: true });
const unpackr = new Unpackr({ useRecords: false, mapsAsObjects: true });

/** A block as FORMATS.md has it. */
export function craftBlock(tag: string, payload: Uint8Array, length = payload.length): Buffer {
  const head = Buffer.alloc(26);
  head[0] = 0x95;
  head.write(`\xa4${tag}`, 1, 'latin1');
  head[6] = 0xce;
  head.writeUInt32BE(length, 7);
  head[11] = 0xce;
  head.writeUInt32BE(crc32(payload), 12);
  head[16] = 0xce;
  head.writeUInt32BE(crc32(head.subarray(0, 16)), 17);
  head[21] = 0xc6;
  head.writeUInt32BE(length, 22);
  return Buffer.concat([head, payload]);
}

export interface CraftedBlock {
  tag: string;
  payload: Uint8Array;
}

/** Blocks of a file, behind its first 19 bytes. */
export function blocksOf(file: Uint8Array): CraftedBlock[] {
  const bytes = Buffer.from(file);
  const blocks: CraftedBlock[] = [];
  for (let at = 19; at < bytes.length; ) {
    const length = bytes.readUInt32BE(at + 7);
    blocks.push({
      tag: bytes.toString('latin1', at + 2, at + 6),
      payload: bytes.subarray(at + 26, at + 26 + length),
    });
    at += 26 + length;
  }
  return blocks;
}

/** The file with the map of its first block of that tag changed, and everything behind that block left out. */
export function withChanged(
  file: Uint8Array,
  tag: string,
  change: (map: Record<string, never>) => void,
): Uint8Array {
  const parts: Uint8Array[] = [file.subarray(0, 19)];
  for (const block of blocksOf(file)) {
    if (block.tag !== tag) {
      parts.push(craftBlock(block.tag, block.payload));
      continue;
    }
    const map = unpackr.unpack(block.payload) as Record<string, never>;
    change(map);
    parts.push(craftBlock(tag, packr.pack(map)));
    return Buffer.concat(parts);
  }
  throw new Error(`no block ${tag}`);
}

/** The payload of a foot. */
export function craftFoot(start: number, bytes: number): Uint8Array {
  const foot = Buffer.alloc(15);
  foot[0] = 0x92;
  foot[1] = 0xcf;
  foot.writeBigUInt64BE(BigInt(start), 2);
  foot[10] = 0xce;
  foot.writeUInt32BE(bytes, 11);
  return foot;
}
