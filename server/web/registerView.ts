import type { ReviewEntry, SheetEntry } from "../files/registerEntry.js";
import type { FiledSheet, RegisterIndex } from "../files/registerIndex.js";
import { reviewText } from "../files/registerStanding.js";
import { filingText } from "../records/filing.js";
import { timeText } from "../words/timeText.js";

/** A filed sheet as a line of the list shows it. */
export interface RegisterRow {
  readonly number: number;
  readonly address: string;
  readonly record: string;
  readonly step: string | null;
  readonly title: string;
  readonly vessel: string;
  readonly class: string;
  readonly stop: boolean;
  readonly time: string;
  readonly filed: string;
  readonly revision: number;
  readonly supersededBy: number | null;
  readonly review: string;
}

export function rowOf({ sheet, supersededBy, reviews }: FiledSheet): RegisterRow {
  return {
    number: sheet.number,
    address: addressOfSheet(sheet.number),
    record: sheet.record,
    step: sheet.step,
    title: sheet.title,
    vessel: sheet.vessel ?? "not given",
    class: classText(sheet.class),
    stop: sheet.stop,
    time: sheet.time,
    filed: timeText(sheet.time),
    revision: sheet.revision,
    supersededBy,
    review: reviewText(reviews),
  };
}

export function addressOfSheet(number: number): string {
  return `/register/${number}`;
}

function classText(found: SheetEntry["class"]): string {
  return found === null ? "not assessed" : String(found);
}

/** A number as it stands in an address; null for anything else. */
export function numberIn(text: unknown): number | null {
  return typeof text === "string" && /^[1-9]\d{0,8}$/.test(text) ? Number(text) : null;
}

/** What someone who opens the register has to know about it before anything else, one sentence each. */
export function gapsOf(index: RegisterIndex): readonly string[] {
  const { missing, unreadable } = index.gaps();
  return [
    ...shortList(missing).map((number) => `Entry ${number} is missing.`),
    ...shortList(unreadable).map((number) => `Entry ${number} cannot be read, or belongs in another place.`),
    ...index
      .voids()
      .map(
        ({ number, time }) =>
          `No. ${number} is void: its entry was found torn at ${timeText(time)} and set aside.`,
      ),
  ];
}

const mostNamed = 20;

function shortList(numbers: readonly number[]): readonly (number | string)[] {
  if (numbers.length <= mostNamed) return numbers;
  return [...numbers.slice(0, mostNamed), `and ${numbers.length - mostNamed} more`];
}

/** A filed sheet as its own page shows it. */
export interface SheetView {
  readonly row: RegisterRow;
  readonly name: string;
  readonly facts: readonly (readonly [string, string])[];
  readonly digests: readonly (readonly [string, string])[];
  readonly reviews: readonly ReviewView[];
  readonly revisions: readonly {
    readonly number: number;
    readonly revision: number;
    readonly filed: string;
  }[];
}

interface ReviewView {
  readonly number: number;
  readonly conclusion: string;
  readonly reviewer: string;
  readonly reviewedOn: string;
  readonly entered: string;
  readonly remark: string | null;
}

export function sheetView(filed: FiledSheet, index: RegisterIndex): SheetView {
  const { sheet, reviews } = filed;
  const row = rowOf(filed);
  return {
    row,
    name: filingText(sheet),
    facts: [
      ["Batch record", sheet.record],
      ["Step", sheet.step ?? "not given"],
      ["Vessel", row.vessel],
      ["Prepared by (as typed, not verified)", sheet.preparedBy ?? "not given"],
      ["Filed at", row.filed],
      ["Supersedes", sheet.supersedes === null ? "no sheet" : `No. ${sheet.supersedes}`],
      ["Criticality class", row.class],
      ["Program", `${sheet.program.name} ${sheet.program.version}`],
    ],
    digests: [
      ["Case", sheet.digests.case],
      ["Findings", sheet.digests.findings],
      ["Record", sheet.digests.record],
      ["PDF", sheet.digests.pdf],
      ["Entry before", sheet.previous],
    ],
    reviews: reviews.map(reviewView),
    revisions: index
      .revisions(sheet)
      .map(({ number, revision, time }) => ({ number, revision, filed: timeText(time) })),
  };
}

function reviewView({ number, conclusion, reviewer, reviewedOn, time, remark }: ReviewEntry): ReviewView {
  return {
    number,
    conclusion: conclusion === "objection" ? "Objection" : "No objection",
    reviewer,
    reviewedOn,
    entered: timeText(time),
    remark,
  };
}
