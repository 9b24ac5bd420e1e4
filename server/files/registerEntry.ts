import { createHash, randomBytes } from "node:crypto";
import { z } from "zod";
import { canonicalJson } from "../case/canonical.js";

const format = "thermal-window/entry-1";
const digest = z.string().regex(/^[0-9a-f]{64}$/);
const number = z.int().positive();
const line = z.string();

/** Of the case that was screened, as its findings tell it. */
export const criticalityClass = z.literal([1, 2, 3, 4, 5, "none"]).nullable();

const common = {
  format: z.literal(format),
  number,
  /** when it was filed: ISO 8601, UTC */
  time: z.iso.datetime(),
  /** SHA-256 of the entry before, as its file holds it */
  previous: digest,
};

const facts = {
  record: line,
  step: line.nullable(),
  title: line,
  vessel: line.nullable(),
  preparedBy: line.nullable(),
  /** criticality class; null: not assessed */
  class: criticalityClass,
  stop: z.boolean(),
  program: z.strictObject({ name: line, version: line }),
};

const sheetEntry = z.strictObject({
  ...common,
  kind: z.literal("sheet"),
  ...facts,
  /** counts the sheets of one batch record and step, from 1 */
  revision: number,
  /** number of the sheet that this one takes the place of */
  supersedes: number.nullable(),
  /** a review is an entry of its own, and comes later */
  review: z.literal("unreviewed"),
  digests: z.strictObject({ case: digest, findings: digest, record: digest, pdf: digest }),
  /** name of its two files, without the ending */
  files: z.string().regex(/^\d{6,9}-[0-9a-f]{16}$/),
});

const reviewEntry = z.strictObject({
  ...common,
  kind: z.literal("review"),
  /** number of the sheet, and the digest of the PDF that was reviewed */
  sheet: number,
  pdf: digest,
  /** as typed, not verified */
  reviewer: line,
  /** as typed: the day of the review, YYYY-MM-DD */
  reviewedOn: z.iso.date(),
  conclusion: z.literal(["no objection", "objection"]),
  remark: line.nullable(),
});

const voidEntry = z.strictObject({
  ...common,
  kind: z.literal("void"),
  /** SHA-256 of what was found in the place of this entry and set aside */
  torn: digest,
});

const entry = z.discriminatedUnion("kind", [sheetEntry, reviewEntry, voidEntry]);

/** A sheet that was filed. */
export type SheetEntry = Readonly<z.output<typeof sheetEntry>>;
/** A review of a sheet by a person. */
export type ReviewEntry = Readonly<z.output<typeof reviewEntry>>;
/** A number whose entry was found torn: it is never given again. */
export type VoidEntry = Readonly<z.output<typeof voidEntry>>;
/** One entry of the register, which is one small file that never changes. */
export type RegisterEntry = SheetEntry | ReviewEntry | VoidEntry;

/** What an entry tells of its sheet, taken from the case and its findings. */
export type SheetFacts = Pick<SheetEntry, keyof typeof facts>;

/** What stands for the entry before the first one. */
export const noEntry = "0".repeat(64);

/** An entry as its file holds it: canonical JSON (RFC 8785), so that the file's own SHA-256 is the entry's digest. */
export function entryText(made: RegisterEntry): string {
  return canonicalJson(made);
}

/** Puts the format to what an entry holds. */
export function entryOf<Kind extends RegisterEntry>(
  content: Omit<Kind, "format">,
): Omit<Kind, "format"> & { format: typeof format } {
  return { format, ...content };
}

export type ReadEntry =
  | { readonly state: "whole"; readonly entry: RegisterEntry }
  /** cut off or overwritten: no JSON text */
  | { readonly state: "torn" }
  /** JSON, but no entry that this program knows */
  | { readonly state: "strange" };

/** Reads the text of an entry's file. */
export function readEntry(text: string): ReadEntry {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return { state: "torn" };
  }
  const parsed = entry.safeParse(value);
  return parsed.success ? { state: "whole", entry: parsed.data } : { state: "strange" };
}

/** SHA-256 of a file's content, 64 hexadecimal digits. */
export function digestOfFile(content: string | Uint8Array): string {
  return createHash("sha256").update(content).digest("hex");
}

/** The files of the register, below the storage's folder. */
export const places = {
  entries: "register/entries",
  sheets: "register/sheets",
  aside: "register/aside",
  entry: (of: number): string => `register/entries/${numberName(of)}.json`,
  pdf: (sheet: Pick<SheetEntry, "files">): string => `register/sheets/${sheet.files}.pdf`,
  record: (sheet: Pick<SheetEntry, "files">): string => `register/sheets/${sheet.files}.json`,
  torn: (of: number, torn: string): string => `register/aside/${numberName(of)}-${torn.slice(0, 16)}.torn`,
} as const;

/** A name for the files of a sheet that nobody else has: others may be trying for the same number. */
export function ownFiles(of: number): string {
  return `${numberName(of)}-${randomBytes(8).toString("hex")}`;
}

const entryName = /^(\d{6,9})\.json$/;

/** The number in the name of an entry's file; null for a name that the program does not give. */
export function numberInName(name: string): number | null {
  const found = Number(entryName.exec(name)?.[1] ?? 0);
  return found > 0 && name === `${numberName(found)}.json` ? found : null;
}

function numberName(of: number): string {
  return String(of).padStart(6, "0");
}
