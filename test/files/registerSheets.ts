import { canonicalJson, digestOf } from "../../server/case/canonical.js";
import type { SheetToFile } from "../../server/files/register.js";
import type { SheetFacts } from "../../server/files/registerEntry.js";
import { factsOf } from "../../server/files/registerFacts.js";
import { recordFormat } from "../../server/records/attach.js";

/** What a sheet of no substance may tell of itself. */
export interface Told {
  readonly record?: string;
  readonly step?: string;
  readonly title?: string;
  readonly vessel?: string;
  readonly class?: SheetFacts["class"];
  readonly stop?: boolean;
}

/**
 * A sheet of no substance, invented and cheap: its record holds what the register looks at, and its PDF only
 * the record.
 */
export function plainSheet(told: Told = {}, supersedes: number | null = null): SheetToFile {
  const document = {
    title: told.title ?? "Coupling in the large vessel",
    batch: {
      record: told.record ?? "B-0001",
      step: told.step ?? "Step 2, coupling",
      vessel: told.vessel ?? "V-7",
      preparedBy: "A. Example",
    },
  };
  const findings = {
    criticality: { class: told.class === undefined ? (2 as const) : told.class },
    cautions: told.stop ? [{ level: "stop" }] : [],
    program: { name: "thermal-window", version: "0.0.0" },
  };
  return {
    facts: factsOf(document, findings),
    caseDigest: digestOf(document),
    findings,
    supersedes,
    draw: async (filing) => {
      const text = canonicalJson({ format: recordFormat, case: document, findings, filing });
      return { pdf: Buffer.from(`%PDF ${text}`), record: Buffer.from(text) };
    },
  };
}

/** A clock that moves one minute at each look. */
export function ticking(): () => Date {
  let minutes = 0;
  return () => new Date(Date.UTC(2026, 0, 1) + 60_000 * minutes++);
}
