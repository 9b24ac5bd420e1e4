import type { Cursor } from "./page.js";
import { table } from "./table.js";

const unknown = "not assessed";

/** A figure in words, or that it was not assessed. */
export function shown(value: number | null | undefined, text: (value: number) => string): string {
  return value === null || value === undefined ? unknown : text(value);
}

/** Findings one below the other, each with its value and a remark. */
export function findingTable(cursor: Cursor, rows: readonly (readonly string[])[]): void {
  table(
    cursor,
    [
      { heading: "Finding", share: 44 },
      { heading: "Value", share: 22, align: "right" },
      { heading: "Remark", share: 50 },
    ],
    rows,
  );
}
