import { inflateSync } from "node:zlib";

/** One object of a PDF: its dictionary as text, and the bytes of its stream where it has one. */
export interface PdfObject {
  readonly dictionary: string;
  readonly stream: Buffer | null;
}

export type PdfObjects =
  | { readonly ok: true; readonly objects: ReadonlyMap<number, PdfObject>; readonly trailer: string }
  | { readonly ok: false; readonly fault: string };

const longestTail = 64;
const mostObjects = 100_000;
const entryLength = 20;

/**
 * Reads the objects of a PDF in the form in which this program writes one: header, objects, one
 * cross-reference table, trailer, and not a byte between them. That is all that is needed to get a record
 * back or to compare two sheets, and a file that was made to be hard to read takes no more time or memory
 * than its own size.
 *
 * @see ISO 32000-1, 7.5 (file structure)
 */
export function readPdfObjects(pdf: Buffer): PdfObjects {
  if (textAt(pdf, 0, 5) !== "%PDF-") return refused("This is not a PDF.");
  const tail = /startxref\n(\d{1,10})\n%%EOF\n$/u.exec(textAt(pdf, pdf.length - longestTail, longestTail));
  if (tail === null) {
    return refused(
      "The end of the PDF is missing, or something was added to it, or another program wrote it.",
    );
  }
  const table = Number(tail[1]);
  const head = /^xref\n0 (\d{1,6})\n0000000000 65535 f \n/u.exec(textAt(pdf, table, 48));
  const count = Number(head?.[1] ?? 0);
  if (head === null || count < 2 || count > mostObjects) return rewritten();
  const first = table + head[0].length;
  const trailer = textAt(pdf, first + (count - 1) * entryLength, pdf.length);
  if (trailer.includes("/Encrypt")) return refused("The PDF is encrypted.");
  const offsets = offsetsIn(textAt(pdf, first, (count - 1) * entryLength), count);
  if (offsets === null || !trailer.startsWith("trailer\n")) return rewritten();
  const sorted = [...offsets.entries()].sort(([, one], [, other]) => one - other);
  if (textAt(pdf, 0, sorted[0]?.[1] ?? 0) !== header) return rewritten();
  const objects = new Map<number, PdfObject>();
  for (const [index, [id, offset]] of sorted.entries()) {
    const object = readObject(pdf.subarray(offset, sorted[index + 1]?.[1] ?? table), id);
    if (object === null) return rewritten();
    objects.set(id, object);
  }
  return { ok: true, objects, trailer };
}

const header = "%PDF-1.7\n%\xff\xff\xff\xff\n";

function refused(fault: string): PdfObjects {
  return { ok: false, fault };
}

function rewritten(): PdfObjects {
  return refused("The PDF is damaged, or another program has written it.");
}

/** Where each object begins, by its number; null where an entry has another form. */
function offsetsIn(table: string, count: number): ReadonlyMap<number, number> | null {
  const offsets = new Map<number, number>();
  for (let id = 1; id < count; id++) {
    const entry = table.slice((id - 1) * entryLength, id * entryLength);
    const offset = /^(\d{10}) 00000 n \n$/u.exec(entry)?.[1];
    if (offset === undefined) return null;
    offsets.set(id, Number(offset));
  }
  return offsets;
}

const streamMark = "\nstream\n";
const streamEnd = "\nendstream";
const objectEnd = "\nendobj\n";

/**
 * @param bytes from the object's beginning to that of the next one
 * @returns null where it is not written as this program writes one
 */
function readObject(bytes: Buffer, id: number): PdfObject | null {
  const opening = `${id} 0 obj\n`;
  const end = bytes.length - objectEnd.length;
  if (textAt(bytes, 0, opening.length) !== opening || textAt(bytes, end, objectEnd.length) !== objectEnd)
    return null;
  const streamAt = bytes.indexOf(streamMark, 0, "latin1");
  if (streamAt < 0) return { dictionary: bytes.toString("latin1", opening.length, end), stream: null };
  const dictionary = bytes.toString("latin1", opening.length, streamAt);
  const length = Number(/\/Length (\d{1,10})\n/u.exec(dictionary)?.[1]);
  const body = streamAt + streamMark.length;
  if (
    body + length + streamEnd.length !== end ||
    textAt(bytes, body + length, streamEnd.length) !== streamEnd
  ) {
    return null;
  }
  return { dictionary, stream: bytes.subarray(body, body + length) };
}

function textAt(bytes: Buffer, offset: number, length: number): string {
  return offset < 0 ? "" : bytes.toString("latin1", offset, Math.min(offset + length, bytes.length));
}

/**
 * The content of a stream, unpacked.
 *
 * @param limit bytes; what would unpack to more is not unpacked
 * @returns null where it is broken or too long
 */
export function unpackStream(object: PdfObject, limit: number): Buffer | null {
  if (object.stream === null) return null;
  if (!object.dictionary.includes("/Filter /FlateDecode"))
    return object.stream.length <= limit ? object.stream : null;
  try {
    return inflateSync(object.stream, { maxOutputLength: limit });
  } catch {
    return null;
  }
}
