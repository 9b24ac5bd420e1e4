import { canonicalJson } from "../case/canonical.js";
import { recordFormat, recordName } from "./attach.js";
import { type Filing, readFiling } from "./filing.js";
import { type PdfObjects, readPdfObjects, unpackStream } from "./pdfObjects.js";

/** The parts of a record as they were found: nothing in them has been checked yet. */
export interface FoundRecord {
  readonly case: unknown;
  readonly findings: unknown;
  /** undefined: the sheet was printed without being filed */
  readonly filing: Filing | undefined;
}

export type Extraction =
  | { readonly ok: true; readonly record: FoundRecord }
  /** one plain sentence */
  | { readonly ok: false; readonly fault: string };

/** Larger than any sheet; a longer file is not read. */
export const largestSheet = 64 * 1024 * 1024;

/** Larger than any record. */
const largestRecord = 32 * 1024 * 1024;

/**
 * Gets the record back out of a sheet.
 *
 * @param pdf bytes from anywhere
 */
export function extractRecord(pdf: Buffer): Extraction {
  if (pdf.length > largestSheet) return refused("The file is larger than any sheet.");
  const read = readPdfObjects(pdf);
  if (!read.ok) return refused(read.fault);
  const found = attachmentIn(read);
  return typeof found === "string" ? refused(found) : parseRecord(found);
}

function refused(fault: string): Extraction {
  return { ok: false, fault };
}

/** The bytes of the attached record, or why there are none. */
function attachmentIn({ objects }: PdfObjects & { ok: true }): Buffer | string {
  const specifications = [...objects.values()].filter(
    ({ dictionary }) => dictionary.includes("/Type /Filespec") && dictionary.includes(`/UF (${recordName})`),
  );
  const [specification] = specifications;
  if (specification === undefined) return "The PDF holds no record of this program.";
  if (specifications.length > 1) return "The PDF holds more than one record.";
  const reference = /\/EF <<\n\/F (\d{1,6}) 0 R\n/u.exec(specification.dictionary)?.[1];
  const file = objects.get(Number(reference));
  const bytes = file === undefined ? null : unpackStream(file, largestRecord);
  return bytes ?? "The record in the PDF is broken.";
}

/** Reads a record from its JSON text, as it is attached or as it was saved on its own. */
export function parseRecord(bytes: Buffer): Extraction {
  let record: unknown;
  try {
    record = JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(bytes));
    // Two keys of one name or another spelling of a number would read differently elsewhere.
    if (canonicalJson(record) !== bytes.toString("utf8")) {
      return refused("The record is not written in its canonical form: it was changed.");
    }
  } catch {
    return refused("The record is broken: it is not JSON text.");
  }
  if (typeof record !== "object" || record === null || !("format" in record)) {
    return refused("The record does not say of which format it is.");
  }
  if (record.format !== recordFormat) {
    return refused(
      `The record is of another format (${shortly(record.format)}); this program reads ${recordFormat}.`,
    );
  }
  if (!("case" in record && "findings" in record))
    return refused("The record lacks its case or its findings.");
  const filing = "filing" in record ? readFiling(record.filing) : undefined;
  if (filing === null) return refused("The record's place in a register is broken.");
  return { ok: true, record: { case: record.case, findings: record.findings, filing } };
}

function shortly(value: unknown): string {
  return JSON.stringify(value)?.slice(0, 60) ?? "none";
}
