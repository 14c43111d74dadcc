// Names of a font: copyright, family, style, unique, full, version, PostScript, licence, licence address.
const COPYRIGHT = 0;
const FAMILY = 1;
const STYLE = 2;
const FULL = 4;
const VERSION = 5;
const POSTSCRIPT = 6;
const LICENCE = 13;
const LICENCE_ADDRESS = 14;

function tables(font) {
  const count = font.readUInt16BE(4);
  return Array.from({ length: count }, (_, k) => {
    const at = 12 + 16 * k;
    const offset = font.readUInt32BE(at + 8);
    const length = font.readUInt32BE(at + 12);
    return { tag: font.toString('latin1', at, at + 4), data: font.subarray(offset, offset + length) };
  });
}

/** The Windows, English names of an sfnt font, by name number. */
export function readNames(font) {
  const { data } = tables(font).find(({ tag }) => tag === 'name');
  const strings = data.readUInt16BE(4);
  const names = {};
  for (let k = 0; k < data.readUInt16BE(2); k++) {
    const at = 6 + 12 * k;
    if (data.readUInt16BE(at) !== 3 || data.readUInt16BE(at + 4) !== 0x409) continue;
    const start = strings + data.readUInt16BE(at + 10);
    const text = Buffer.from(data.subarray(start, start + data.readUInt16BE(at + 8)));
    names[data.readUInt16BE(at + 6)] = text.swap16().toString('utf16le');
  }
  return names;
}

function nameTable(names) {
  const entries = Object.entries(names).map(([id, text]) => [
    Number(id),
    Buffer.from(text, 'utf16le').swap16(),
  ]);
  const head = Buffer.alloc(6 + 12 * entries.length);
  head.writeUInt16BE(entries.length, 2);
  head.writeUInt16BE(head.length, 4);
  let offset = 0;
  entries.forEach(([id, text], k) => {
    [3, 1, 0x409, id, text.length, offset].forEach((value, n) => {
      head.writeUInt16BE(value, 6 + 12 * k + 2 * n);
    });
    offset += text.length;
  });
  return Buffer.concat([head, ...entries.map(([, text]) => text)]);
}

function checksum(data) {
  let sum = 0;
  for (let at = 0; at < data.length; at += 4) sum = (sum + data.readUInt32BE(at)) >>> 0;
  return sum;
}

/**
 * The same sfnt font under another family name, its copyright and licence kept: the licence of a font with a reserved
 * name asks that of every subset.
 *
 * @param original Font to take copyright, version and licence from.
 */
export function renameFont(font, original, family, style) {
  const old = readNames(original);
  const names = {
    [COPYRIGHT]: old[COPYRIGHT],
    [FAMILY]: family,
    [STYLE]: style,
    [FULL]: `${family} ${style}`,
    [VERSION]: old[VERSION],
    [POSTSCRIPT]: `${family} ${style}`
      .replaceAll(' ', '')
      .replace(family.replaceAll(' ', ''), (name) => `${name}-`),
    [LICENCE]: old[LICENCE],
    [LICENCE_ADDRESS]: old[LICENCE_ADDRESS],
  };
  const parts = tables(font).map(({ tag, data }) => {
    const body = tag === 'name' ? nameTable(names) : Buffer.from(data);
    // The checksum of the whole font is taken with this field at zero and then written into it.
    if (tag === 'head') body.writeUInt32BE(0, 8);
    return { tag, length: body.length, body: Buffer.concat([body, Buffer.alloc(-body.length & 3)]) };
  });
  const directory = Buffer.alloc(12 + 16 * parts.length);
  font.copy(directory, 0, 0, 12);
  let offset = directory.length;
  parts.forEach(({ tag, length, body }, k) => {
    const at = 12 + 16 * k;
    directory.write(tag, at, 'latin1');
    directory.writeUInt32BE(checksum(body), at + 4);
    directory.writeUInt32BE(offset, at + 8);
    directory.writeUInt32BE(length, at + 12);
    offset += body.length;
  });
  const whole = Buffer.concat([directory, ...parts.map(({ body }) => body)]);
  let headAt = 0;
  for (let k = 0; k < parts.length; k++) {
    if (parts[k].tag === 'head') headAt = directory.readUInt32BE(12 + 16 * k + 8);
  }
  whole.writeUInt32BE((0xb1b0afba - checksum(whole)) >>> 0, headAt + 8);
  return whole;
}
