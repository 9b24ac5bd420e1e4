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
 * Reads the objects of a PDF in the form in which this program writes one: one cross-reference table, no
 * object streams. That is all that is needed to get a record back or to compare two sheets, and a file
 * that was made to be hard to read cannot take more time or memory than its own size.
 *
 * @see ISO 32000-1, 7.5 (file structure)
 */
export function readPdfObjects(pdf: Buffer): PdfObjects {
  if (pdf.toString("latin1", 0, 5) !== "%PDF-") return refused("This is not a PDF.");
  const tail = /startxref\n(\d{1,10})\n%%EOF\n?$/u.exec(pdf.toString("latin1", pdf.length - longestTail));
  if (tail === null) return refused("The end of the PDF is missing, or another program has written it.");
  const start = Number(tail[1]);
  const head = /^xref\n0 (\d{1,6})\n/u.exec(pdf.toString("latin1", start, start + 24));
  const count = Number(head?.[1] ?? 0);
  if (head === null || count < 2 || count > mostObjects) return rewritten();
  const first = start + head[0].length;
  const trailer = pdf.toString("latin1", first + count * entryLength, pdf.length);
  if (!trailer.startsWith("trailer\n")) return rewritten();
  if (trailer.includes("/Encrypt")) return refused("The PDF is encrypted.");
  if (trailer.includes("/Prev")) return refused("Something was added to the PDF after it was written.");
  const objects = new Map<number, PdfObject>();
  let used = 0;
  for (let id = 1; id < count; id++) {
    const entry = pdf.toString("latin1", first + id * entryLength, first + (id + 1) * entryLength);
    const offset = /^(\d{10}) 00000 n /u.exec(entry)?.[1];
    const object = offset === undefined ? null : readObject(pdf, id, Number(offset));
    if (object === null) return rewritten();
    // Objects that overlap could be made to be read over and over.
    used += object.end - Number(offset);
    if (used > pdf.length) return rewritten();
    objects.set(id, object);
  }
  return { ok: true, objects, trailer };
}

function refused(fault: string): PdfObjects {
  return { ok: false, fault };
}

function rewritten(): PdfObjects {
  return refused("The PDF is damaged, or another program has written it.");
}

const streamMark = "\nstream\n";
const streamEnd = "\nendstream\nendobj";
const objectEnd = "\nendobj";

/** @returns null where the object is not written as this program writes one */
function readObject(pdf: Buffer, id: number, offset: number): (PdfObject & { readonly end: number }) | null {
  const opening = `${id} 0 obj\n`;
  if (textAt(pdf, offset, opening.length) !== opening) return null;
  const from = offset + opening.length;
  const end = pdf.indexOf(objectEnd, from, "latin1");
  if (end < 0) return null;
  const plain = pdf.subarray(from, end);
  const streamAt = plain.indexOf(streamMark, 0, "latin1");
  if (streamAt < 0) return { dictionary: plain.toString("latin1"), stream: null, end };
  const dictionary = plain.toString("latin1", 0, streamAt);
  const length = Number(/\/Length (\d{1,10})\n/u.exec(dictionary)?.[1]);
  const body = from + streamAt + streamMark.length;
  if (textAt(pdf, body + length, streamEnd.length) !== streamEnd) return null;
  return { dictionary, stream: pdf.subarray(body, body + length), end: body + length };
}

function textAt(pdf: Buffer, offset: number, length: number): string {
  return pdf.toString("latin1", offset, offset + length);
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
