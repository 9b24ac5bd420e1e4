import { z } from "zod";
import { digestOf } from "../case/canonical.js";
import type { CaseDocument } from "../case/schema.js";
import { parseRecord } from "../records/extract.js";
import { criticalityClass, type SheetEntry, type SheetFacts } from "./registerEntry.js";

const longest = 300;

/** A case whose batch record is known: only such a one can be filed. */
export type FilableCase = CaseDocument & { readonly batch: { readonly record: string } };

/** Whether a case says to which batch record its sheet belongs. */
export function isFilable(document: CaseDocument): document is FilableCase {
  return (document.batch?.record ?? "").trim() !== "";
}

/** What is taken from a case and its findings, of this version of the program or of another. */
const source = z.object({
  case: z.object({
    title: z.string(),
    batch: z.object({
      record: z.string(),
      step: z.string().optional(),
      vessel: z.string().optional(),
      preparedBy: z.string().optional(),
    }),
  }),
  findings: z.object({
    criticality: z.object({ class: criticalityClass }),
    cautions: z.array(z.object({ level: z.string() })).readonly(),
    program: z.object({ name: z.string(), version: z.string() }),
  }),
});

type Source = z.output<typeof source>;

/** What the register tells of a sheet. The whole of long texts stands on the sheet itself. */
export function factsOf(document: Source["case"], findings: Readonly<Source["findings"]>): SheetFacts {
  const { record, step, vessel, preparedBy } = document.batch;
  const { name, version } = findings.program;
  return {
    record: onOneLine(record),
    step: optional(step),
    title: onOneLine(document.title),
    vessel: optional(vessel),
    preparedBy: optional(preparedBy),
    class: findings.criticality.class,
    stop: findings.cautions.some((caution) => caution.level === "stop"),
    program: { name, version },
  };
}

function optional(text: string | undefined): string | null {
  const shown = onOneLine(text ?? "");
  return shown === "" ? null : shown;
}

function onOneLine(text: string): string {
  const characters = [...text.replace(/\s+/gu, " ").trim()];
  return characters.length <= longest ? characters.join("") : `${characters.slice(0, longest - 1).join("")}…`;
}

/**
 * What an entry tells otherwise than the record of its sheet, by the entry's own keys. The last entry of a
 * register has none after it that would vouch for it; its sheet does.
 *
 * @param record bytes of the record, known by their digest
 */
export function contradictions(entry: SheetEntry, record: Buffer): readonly string[] {
  const read = parseRecord(record);
  const parsed = source.safeParse(read.ok ? read.record : null);
  if (!read.ok || !parsed.success || read.record.filing === undefined) return ["record"];
  const { filing } = read.record;
  const told: Partial<SheetEntry> = {
    number: filing.number,
    revision: filing.revision,
    supersedes: filing.supersedes,
    time: filing.filedAt,
    previous: filing.previousDigest,
    ...factsOf(parsed.data.case, parsed.data.findings),
    digests: {
      ...entry.digests,
      case: digestOf(read.record.case),
      findings: digestOf(read.record.findings),
    },
  };
  return Object.entries(told).flatMap(([key, value]) =>
    digestOf(value) === digestOf(Reflect.get(entry, key)) ? [] : [key],
  );
}
