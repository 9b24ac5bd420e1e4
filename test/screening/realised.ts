import { readCase } from "../../server/case/read.js";
import { knownRates } from "../../server/screening/known.js";
import type { CaseModel } from "../../server/screening/model.js";
import { estimates, realise } from "../../server/screening/realise.js";
import type { Step } from "../../server/thermal/step.js";
import { checkedCases } from "../published/caseFigures.js";

/** A case document that a test may take apart. */
export type Document = Record<string, unknown>;

/** A fresh copy of a checked case by its name. */
export function documentOf(name: string): Document {
  const found = checkedCases().find((each) => each.name === name);
  if (found === undefined) throw new Error(`No case ${name}`);
  return JSON.parse(found.text);
}

/** Sets a value at a path of keys, making objects on the way; undefined removes it. */
export function changed(document: Document, path: string, value: unknown): Document {
  const copy: Document = structuredClone(document);
  const keys = path.split("/").slice(1);
  const last = keys.pop() ?? "";
  let at: Document = copy;
  for (const key of keys) {
    const next = at[key];
    if (typeof next === "object" && next !== null) at = next as Document;
    else {
      const made: Document = {};
      at[key] = made;
      at = made;
    }
  }
  if (value === undefined) delete at[last];
  else at[last] = value;
  return copy;
}

/** Parses a case that must be valid. */
export function modelOf(document: unknown): CaseModel {
  const read = readCase(document);
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  return read.model;
}

/** A case at its estimates. */
export function stepOf(document: unknown): Step {
  const model = modelOf(document);
  return realise(model, knownRates(model), estimates);
}
