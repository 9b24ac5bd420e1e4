import type { CaseModel } from "../screening/model.js";
import { digestOf } from "./canonical.js";
import type { Fault } from "./faults.js";
import { modelOf } from "./model.js";
import { crossFaults } from "./rules.js";
import { type CaseDocument, type CaseFigures, caseSchema } from "./schema.js";
import { shapeFaults } from "./shapeFaults.js";

export type { Fault } from "./faults.js";

/** A case that was accepted, or everything that is wrong with it. */
export type ReadCase =
  | {
      readonly ok: true;
      readonly document: CaseDocument;
      readonly model: CaseModel;
      /** SHA-256 of the document in canonical JSON */
      readonly digest: string;
      /** the workings kept in the case and its slips, in SI */
      readonly figures: CaseFigures;
    }
  | {
      readonly ok: false;
      readonly faults: readonly Fault[];
      /** not JSON, too large, or a case that cannot be accepted */
      readonly kind: "json" | "size" | "case";
    };

/** Longest text of a case document: 256 KiB. */
export const largestCase = 256 * 1024;

/** More faults than anyone reads; the rest is counted. */
const mostFaults = 1000;

/**
 * Reads a case document. Never throws, whatever it is given: what is wrong comes back as faults, all of
 * them at once.
 *
 * @param document parsed JSON
 */
export function readCase(document: unknown): ReadCase {
  const parsed = caseSchema.safeParse(document);
  const shape = parsed.success ? [] : shapeFaults(parsed.error.issues, document);
  const pointers = new Set(shape.map((fault) => fault.pointer));
  const faults = [...shape, ...crossFaults(document).filter((fault) => !pointers.has(fault.pointer))];
  if (!parsed.success || !isSound(document, faults)) {
    return { ok: false, faults: limited(faults), kind: "case" };
  }
  const model = modelOf(parsed.data, document);
  return {
    ok: true,
    document,
    model,
    digest: digestOf(document),
    figures: parsed.data,
  };
}

/** A document that the schema and the rules found nothing wrong with is a case document. */
function isSound(document: unknown, faults: readonly Fault[]): document is CaseDocument {
  return document !== undefined && faults.length === 0;
}

function limited(faults: readonly Fault[]): readonly Fault[] {
  if (faults.length <= mostFaults) return faults;
  const rest = faults.length - mostFaults;
  return [...faults.slice(0, mostFaults), { pointer: "", message: `holds ${rest} more faults` }];
}

/** Reads the text of a case document, as it comes from a file or a request. */
export function readCaseText(text: string): ReadCase {
  const size = Buffer.byteLength(text, "utf8");
  if (size > largestCase) {
    return refused("size", `is ${size} bytes long; a case document has at most ${largestCase}`);
  }
  let document: unknown;
  try {
    document = JSON.parse(text.replace(/^\ufeff/, ""));
  } catch (error) {
    return refused("json", `is not JSON: ${error instanceof Error ? error.message : String(error)}`);
  }
  return readCase(document);
}

function refused(kind: "json" | "size", message: string): ReadCase {
  return { ok: false, faults: [{ pointer: "", message }], kind };
}
