import { extractRecord, parseRecord } from "../records/extract.js";
import { filingText } from "../records/filing.js";
import { timeText } from "../words/timeText.js";
import type { Register } from "./register.js";
import { digestOfFile, type ReviewEntry } from "./registerEntry.js";
import type { FiledSheet } from "./registerIndex.js";

/** What a register says of a file, in plain sentences. */
export interface SheetStanding {
  /** in: filed here; out: not filed here; against: it says that it was, and the register does not bear it out */
  readonly state: "in" | "out" | "against";
  readonly sentence: string;
  /** the sheet as it was filed; null unless `state` is "in" */
  readonly filed: FiledSheet | null;
  /** what is wrong with the register up to where this sheet stands or says it stands, or with its own copy of it */
  readonly faults: readonly string[];
}

/**
 * Whether a sheet, or the record of one, was filed in this register.
 *
 * @param file a PDF or the JSON text of a record
 */
export async function standingOf(register: Register, file: Buffer): Promise<SheetStanding> {
  const index = await register.fresh();
  const entry = index.withDigest(digestOfFile(file));
  const filed = entry === null ? null : index.sheet(entry.number);
  if (filed !== null) {
    const { faults } = await register.check({ upTo: filed.sheet.number, sheet: filed.sheet.number });
    return { state: "in", sentence: inSentence(filed), filed, faults };
  }
  const isRecord = file.subarray(0, 1).toString("latin1") === "{";
  const extracted = isRecord ? parseRecord(file) : extractRecord(file);
  const filing = extracted.ok ? extracted.record.filing : undefined;
  const none = { filed: null, faults: [] };
  if (!extracted.ok) return { state: "out", sentence: "This file is not in this register.", ...none };
  if (filing === undefined) {
    const sentence = "Not in this register: the sheet says itself that it was printed without being filed.";
    return { state: "out", sentence, ...none };
  }
  const said = `The sheet says that it was filed as ${filingText(filing)}.`;
  const sentence =
    index.sheet(filing.number) === null
      ? `${said} This register holds no sheet of that number: its entry was removed, or the sheet belongs to another register.`
      : `${said} The sheet of that number in this register is another file: this one was changed, or belongs to another register.`;
  const { faults } = await register.check({ upTo: filing.number });
  return { state: "against", sentence, filed: null, faults };
}

function inSentence({ sheet, supersededBy, reviews }: FiledSheet): string {
  const stands =
    supersededBy === null
      ? "It stands: no later sheet supersedes it."
      : `It was superseded by No. ${supersededBy}.`;
  return `In this register as ${filingText(sheet)}, filed at ${timeText(sheet.time)}. ${stands} ${reviewText(reviews)}.`;
}

/** Whether a sheet was reviewed, and with what conclusion. Names are as typed; nobody verified them. */
export function reviewText(reviews: readonly ReviewEntry[]): string {
  const last = reviews.at(-1);
  if (last === undefined) return "Unreviewed";
  const conclusions = new Set(reviews.map((review) => review.conclusion));
  return conclusions.size === 1 ? `Reviewed, ${last.conclusion}` : "Reviewed, opinions differ";
}
