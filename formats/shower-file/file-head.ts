import { crc32 } from '../checksum/index.ts';
import { ShowerFileError } from '../shower-file-error.ts';
import { FILE_HEAD_BYTES, MAGIC, MAJOR, MINOR } from './layout.ts';

const UINT_16 = 0xcd;
const UINT_32 = 0xce;
const CHECKED_BYTES = 14;

/** The first bytes of a file: magic, major and minor version, checksum of these. */
export function encodeFileHead(): Uint8Array {
  const bytes = new Uint8Array(FILE_HEAD_BYTES);
  const view = new DataView(bytes.buffer);
  bytes.set(MAGIC);
  bytes[8] = UINT_16;
  view.setUint16(9, MAJOR);
  bytes[11] = UINT_16;
  view.setUint16(12, MINOR);
  bytes[14] = UINT_32;
  view.setUint32(15, crc32(bytes, 0, CHECKED_BYTES));
  return bytes;
}

/**
 * Hold the first bytes of a file against what they must be.
 *
 * @param bytes The first FILE_HEAD_BYTES or more, fewer where the file is shorter.
 * @throws ShowerFileError `foreign-file`, `truncated-file`, `wrong-checksum`, `newer-version`.
 */
export function checkFileHead(bytes: Uint8Array, file: string): void {
  const fault = (
    code: 'foreign-file' | 'truncated-file' | 'wrong-checksum' | 'newer-version',
    byte: number,
    found: string,
    expected: string,
  ) => new ShowerFileError(code, file, byte, found, expected);

  const known = matchingMagic(bytes);
  if (bytes.length === 0 || known < Math.min(MAGIC.length, bytes.length)) {
    // One changed byte does not make a stranger of a file.
    if (known >= MAGIC.length - 1)
      throw fault('wrong-checksum', 0, 'a changed byte', 'the mark of a .shower file');
    throw fault('foreign-file', 0, describeForeign(bytes), 'the mark of a .shower file');
  }
  if (bytes.length < FILE_HEAD_BYTES) {
    throw fault(
      'truncated-file',
      bytes.length,
      'the end of the file',
      `${FILE_HEAD_BYTES} bytes of file head`,
    );
  }
  const view = new DataView(bytes.buffer, bytes.byteOffset, FILE_HEAD_BYTES);
  const marks = bytes[8] === UINT_16 && bytes[11] === UINT_16 && bytes[14] === UINT_32;
  if (!marks || view.getUint32(15) !== crc32(bytes, 0, CHECKED_BYTES)) {
    throw fault('wrong-checksum', 14, 'another one', 'the checksum of the 14 bytes before');
  }
  const major = view.getUint16(9);
  const minor = view.getUint16(12);
  if (major > MAJOR) {
    throw fault('newer-version', 8, `version ${major}.${minor}`, `version ${MAJOR}.x, the newest known here`);
  }
}

/** How many bytes of the magic are in their place. */
export function matchingMagic(bytes: Uint8Array): number {
  let matching = 0;
  for (let k = 0; k < MAGIC.length; k++) if (bytes[k] === MAGIC[k]) matching++;
  return matching;
}

const SIGNATURES: readonly (readonly [string, readonly number[]])[] = [
  ['a PNG image', [0x89, 0x50, 0x4e, 0x47]],
  ['a JPEG image', [0xff, 0xd8, 0xff]],
  ['a zip archive', [0x50, 0x4b]],
  ['a gzip file', [0x1f, 0x8b]],
  ['a zstd file', [0x28, 0xb5, 0x2f, 0xfd]],
  ['a PDF document', [0x25, 0x50, 0x44, 0x46]],
  ['a Parquet file', [0x50, 0x41, 0x52, 0x31]],
  ['an HDF5 file', [0x89, 0x48, 0x44, 0x46]],
];

function describeForeign(bytes: Uint8Array): string {
  if (bytes.length === 0) return 'an empty file';
  for (const [name, signature] of SIGNATURES) {
    if (signature.every((byte, k) => bytes[k] === byte)) return name;
  }
  const first = bytes.subarray(0, FILE_HEAD_BYTES);
  if (first.every((byte) => byte === 0)) return 'zeros';
  const isText = first.every(
    (byte) => byte === 9 || byte === 10 || byte === 13 || (byte >= 32 && byte < 127),
  );
  if (isText) return `text, ${JSON.stringify(String.fromCharCode(...first))}`;
  return `bytes ${[...first.subarray(0, MAGIC.length)].map((byte) => byte.toString(16).padStart(2, '0')).join(' ')}`;
}
