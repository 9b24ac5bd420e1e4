import { inflateSync } from "node:zlib";

const woffSignature = 0x774f4646;
const woffHeader = 44;
const woffEntry = 20;
const fontHeader = 12;
const fontEntry = 16;

/**
 * Unpacks a WOFF 1.0 file to the font it holds. The PDF writer could read the packed file itself, but
 * would inflate its tables again for each sheet, which takes longer than all the rest.
 *
 * @see W3C, WOFF File Format 1.0, sections 3 to 5
 * @throws RangeError where the bytes are not a WOFF file
 */
export function unpackWoff(woff: Buffer): Buffer {
  if (woff.length < woffHeader || woff.readUInt32BE(0) !== woffSignature) {
    throw new RangeError("not a WOFF 1.0 file");
  }
  const count = woff.readUInt16BE(12);
  const directory = Buffer.alloc(fontHeader + fontEntry * count);
  writeFontHeader(directory, woff.readUInt32BE(4), count);
  const tables: Buffer[] = [];
  let offset = directory.length;
  for (let index = 0; index < count; index++) {
    const entry = woffHeader + woffEntry * index;
    const start = woff.readUInt32BE(entry + 4);
    const packedLength = woff.readUInt32BE(entry + 8);
    const length = woff.readUInt32BE(entry + 12);
    const packed = woff.subarray(start, start + packedLength);
    const table = packedLength < length ? inflateSync(packed, { maxOutputLength: length }) : packed;
    const target = fontHeader + fontEntry * index;
    woff.copy(directory, target, entry, entry + 4);
    woff.copy(directory, target + 4, entry + 16, entry + 20);
    directory.writeUInt32BE(offset, target + 8);
    directory.writeUInt32BE(length, target + 12);
    const padding = -length & 3;
    tables.push(table, Buffer.alloc(padding));
    offset += length + padding;
  }
  return Buffer.concat([directory, ...tables]);
}

/** The search fields of the table directory: OpenType specification, "Organization of an OpenType Font". */
function writeFontHeader(target: Buffer, flavour: number, count: number): void {
  const exponent = Math.floor(Math.log2(count));
  target.writeUInt32BE(flavour, 0);
  target.writeUInt16BE(count, 4);
  target.writeUInt16BE(fontEntry * 2 ** exponent, 6);
  target.writeUInt16BE(exponent, 8);
  target.writeUInt16BE(fontEntry * count - fontEntry * 2 ** exponent, 10);
}
