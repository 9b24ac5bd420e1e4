import { canonicalJson } from "../case/canonical.js";
import type { Findings } from "../screening/findings.js";
import type { Filing } from "./filing.js";

/** What travels inside a sheet: the inputs as typed, and everything that was computed from them. */
interface SheetRecord {
  readonly format: typeof recordFormat;
  readonly case: unknown;
  readonly findings: Findings;
  /** left out of a sheet that was only printed */
  readonly filing?: Filing;
}

export const recordFormat = "thermal-window/record-1";

/** Name of the attachment inside the PDF. */
export const recordName = "thermal-window-record.json";

/** The record as bytes: one canonical JSON text (RFC 8785), so that the same content has one digest. */
export function recordBytes(document: unknown, findings: Findings, filing?: Filing): Buffer {
  const record: SheetRecord = {
    format: recordFormat,
    case: document,
    findings,
    ...(filing === undefined ? {} : { filing }),
  };
  return Buffer.from(canonicalJson(record), "utf8");
}

/** Puts the record into a PDF. The attachment bears no date: the same record gives the same bytes. */
export function attachRecord(pdf: PDFKit.PDFDocument, record: Buffer): void {
  const options = {
    name: recordName,
    type: "application/json",
    description: "The case as typed and the findings, from which this sheet can be recomputed",
    relationship: "Source",
  };
  pdf.file(record, options);
}
