import type { CaseDocument } from "../case/schema.js";
import type { Findings } from "../screening/findings.js";
import type { SheetFacts } from "./registerEntry.js";

const longest = 300;

/** A case whose batch record is known: only such a one can be filed. */
export type FilableCase = CaseDocument & { readonly batch: { readonly record: string } };

/** Whether a case says to which batch record its sheet belongs. */
export function isFilable(document: CaseDocument): document is FilableCase {
  return (document.batch?.record ?? "").trim() !== "";
}

/** What the register tells of a sheet. The whole of long texts stands on the sheet itself. */
export function factsOf(
  document: FilableCase,
  findings: Pick<Findings, "criticality" | "cautions" | "program">,
): SheetFacts {
  const { record, step, vessel, preparedBy } = document.batch;
  return {
    record: onOneLine(record),
    step: optional(step),
    title: onOneLine(document.title),
    vessel: optional(vessel),
    preparedBy: optional(preparedBy),
    class: findings.criticality.class,
    stop: findings.cautions.some((caution) => caution.level === "stop"),
    program: findings.program,
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
