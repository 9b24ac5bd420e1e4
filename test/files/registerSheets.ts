import { canonicalJson } from "../../server/case/canonical.js";
import type { SheetToFile } from "../../server/files/register.js";
import type { SheetFacts } from "../../server/files/registerEntry.js";

/** What a sheet of no substance tells of itself; all of it invented. */
export const someFacts: SheetFacts = {
  record: "B-0001",
  step: "Step 2, coupling",
  title: "Coupling in the large vessel",
  vessel: "V-7",
  preparedBy: "A. Example",
  class: 2,
  stop: false,
  program: { name: "thermal-window", version: "0.0.0" },
};

/** A sheet whose bytes are cheap: they hold its place, as a real one's do, and nothing else. */
export function plainSheet(facts: Partial<SheetFacts> = {}, supersedes: number | null = null): SheetToFile {
  const findings = { invented: true, ...facts };
  return {
    facts: { ...someFacts, ...facts },
    caseDigest: "c".repeat(64),
    findings,
    supersedes,
    draw: async (place) => {
      const text = canonicalJson({ place, findings });
      return { pdf: Buffer.from(`%PDF ${text}`), record: Buffer.from(text) };
    },
  };
}

/** A clock that moves one minute at each look. */
export function ticking(): () => Date {
  let minutes = 0;
  return () => new Date(Date.UTC(2026, 0, 1) + 60_000 * minutes++);
}
