import type { InputNote } from "../screening/model.js";
import { type Cursor, heading, paragraph, styles, subheading } from "./page.js";
import { type Column, table } from "./table.js";

const columns: readonly Column[] = [
  { heading: "Quantity", share: 30 },
  { heading: "As typed", share: 22 },
  { heading: "Standard error", share: 15 },
  { heading: "Basis", share: 11 },
  { heading: "Source", share: 22 },
];

/** Parts of a case in the order in which its document has them. */
const parts: readonly (readonly [string, string])[] = [
  ["mixture", "Mixture"],
  ["reaction", "Reaction"],
  ["decomposition", "Decomposition"],
  ["vessel", "Vessel"],
  ["limits", "Limits"],
  ["failures", "Cooling failures"],
];

/** Every input in its author's own words and units, those that were only assumed before all others. */
export function writeInputs(cursor: Cursor, inputs: readonly InputNote[]): void {
  heading(cursor, "Inputs as typed");
  const assumed = inputs.filter((input) => input.basis === "assumed");
  subheading(cursor, `Assumed inputs (${assumed.length})`);
  if (assumed.length === 0) paragraph(cursor, "No input is marked as assumed.", styles.body);
  else table(cursor, columns, assumed.map(rowOf));
  const rest = inputs.filter((input) => input.basis !== "assumed");
  for (const [key, name] of parts) {
    const those = rest.filter((input) => input.pointer.split("/")[1] === key);
    if (those.length === 0) continue;
    subheading(cursor, name);
    table(cursor, columns, those.map(rowOf));
  }
  const others = rest.filter((input) => !parts.some(([key]) => input.pointer.split("/")[1] === key));
  if (others.length > 0) {
    subheading(cursor, "Other inputs");
    table(cursor, columns, others.map(rowOf));
  }
}

function rowOf(input: InputNote): string[] {
  return [
    input.label,
    input.text,
    input.standardErrorText ?? "not given",
    input.basis ?? "not said",
    input.source ?? "not given",
  ];
}
