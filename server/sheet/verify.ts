import { readCase } from "../case/read.js";
import { printDifference } from "../records/comparePages.js";
import { type Difference, differencesOf } from "../records/differences.js";
import { extractRecord, type FoundRecord, parseRecord } from "../records/extract.js";
import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { numberText } from "../words/numbers.js";
import { program } from "../words/program.js";
import { renderSheet, type SheetInput } from "./render.js";

/** One thing that was checked, in one plain sentence. */
interface Check {
  readonly name: "record" | "inputs" | "findings" | "pages";
  readonly passed: boolean;
  readonly sentence: string;
}

export interface Verification {
  /** every check passed, and none was left out */
  readonly verified: boolean;
  readonly checks: readonly Check[];
}

/** Computes the findings of a case in full; in a worker where one is at hand. */
export type Recompute = (model: CaseModel, digest: string) => Findings | Promise<Findings>;

/** Prints a sheet; in a worker where one is at hand. */
export type Print = (input: SheetInput) => Promise<Buffer>;

/**
 * Whether a sheet still follows from its own inputs: takes the record out, recomputes the findings from
 * the case, prints the sheet again, and compares. A record on its own, as JSON, is checked without pages.
 *
 * @param file a PDF or the JSON text of a record
 * @param print draws the sheet again, to be compared
 */
export async function verifySheet(
  file: Buffer,
  recompute: Recompute,
  print: Print = renderSheet,
): Promise<Verification> {
  const isRecord = file.subarray(0, 1).toString("latin1") === "{";
  const extracted = isRecord ? parseRecord(file) : extractRecord(file);
  if (!extracted.ok) return verdict([{ name: "record", passed: false, sentence: extracted.fault }]);
  const { record } = extracted;
  const checks: Check[] = [passed("record", "The record is there, whole and canonical.")];
  const read = readCase(record.case);
  if (!read.ok) {
    const sentence =
      "The case in the record is refused by this program: it was changed, or another version wrote it.";
    return verdict([...checks, failed("inputs", sentence)]);
  }
  const written = valueAt(record.findings, "digest");
  checks.push(
    written === read.digest
      ? passed("inputs", `The inputs are those of the digest ${read.digest}.`)
      : failed("inputs", "The inputs were changed: their digest is not the one in the findings."),
  );
  const findings = await recompute(read.model, read.digest);
  const again = findingsCheck(record, findings);
  checks.push(again);
  // The pages can only be judged against findings that are known to be right.
  if (isRecord || !again.passed) return verdict(checks);
  const stated: Findings = { ...findings, program: programOf(record) };
  const filing = record.filing === undefined ? {} : { filing: record.filing };
  const input = { document: read.document, model: read.model, findings: stated, ...filing };
  const difference = await pagesDifference(file, input, print);
  checks.push(
    difference === null
      ? passed("pages", "Every page is printed exactly as the program prints it.")
      : failed("pages", `${difference}${otherVersion(record)}`),
  );
  return verdict(checks);
}

function passed(name: Check["name"], sentence: string): Check {
  return { name, passed: true, sentence };
}

function failed(name: Check["name"], sentence: string): Check {
  return { name, passed: false, sentence };
}

function verdict(checks: readonly Check[]): Verification {
  return { verified: checks.every((check) => check.passed), checks };
}

function findingsCheck(record: FoundRecord, findings: Findings): Check {
  const differences = differencesOf(record.findings, findings).filter(
    ({ pointer }) => !pointer.startsWith("/program/"),
  );
  if (differences.length === 0) return passed("findings", "The findings are reproduced to the last digit.");
  return failed("findings", `${differencesText(differences)}${otherVersion(record)}`);
}

function differencesText(differences: readonly Difference[]): string {
  const [first] = differences;
  const places = differences.slice(0, 3).map((difference) => difference.pointer || "the whole");
  const more = differences.length > places.length ? ` and ${differences.length - places.length} more` : "";
  const largest = Math.max(...differences.map((difference) => difference.relative ?? 0));
  const size =
    first === undefined || largest === 0 ? "" : `; largest relative difference ${numberText(largest)}`;
  return `The findings are not reproduced: ${places.join(", ")}${more} differ${size}.`;
}

/** Why an honest sheet may differ. */
function otherVersion(record: FoundRecord): string {
  const { name, version } = programOf(record);
  return name === program.name && version === program.version
    ? ""
    : ` The sheet was written by ${name} ${version}, this is ${program.name} ${program.version}: it can only be verified as far as the two agree.`;
}

function programOf(record: FoundRecord): Findings["program"] {
  const text = (key: string) => {
    const value = valueAt(valueAt(record.findings, "program"), key);
    return typeof value === "string" ? value : "unknown";
  };
  return { name: text("name"), version: text("version") };
}

function valueAt(value: unknown, key: string): unknown {
  return typeof value === "object" && value !== null ? Reflect.get(value, key) : undefined;
}

async function pagesDifference(
  file: Buffer,
  input: Omit<SheetInput, "paper">,
  print: Print,
): Promise<string | null> {
  const paper = file.includes("/MediaBox [0 0 612 792]", 0, "latin1") ? "Letter" : "A4";
  return printDifference(file, await print({ ...input, paper }));
}
