import { numberCellOf } from "./pastedCells.js";
import { exampleHeading, type FoundColumn } from "./pastedColumns.js";

/**
 * One pasted row as an entry of the document's list.
 *
 * @param found the column of each cell; null for one that is passed over
 * @returns the entry, or in words what is missing and cannot be guessed
 */
export function rowOf(cells: readonly string[], found: readonly (FoundColumn | null)[]): object | string {
  const row: Record<string, unknown> = {};
  const errors: [string, string][] = [];
  for (const [at, cell] of cells.entries()) {
    const column = found[at] ?? null;
    if (column === null || cell === "") continue;
    const { key, leaf } = column.column;
    const value = fieldValue(cell, column);
    if (value === null) {
      return `“${cell}” has no unit (${leaf.label.toLowerCase()}); write it into the heading, as in “${exampleHeading(column.column)}”, or behind each number`;
    }
    if (column.isError) errors.push([key, String(value)]);
    else if (value !== "") row[key] = value;
  }
  for (const [key, standardError] of errors) {
    row[key] = row[key] === undefined ? { standardError } : { value: row[key], standardError };
  }
  return row;
}

/** What a cell becomes in the document; null where a quantity has no unit. */
function fieldValue(cell: string, { column: { leaf }, unit }: FoundColumn): string | number | null {
  const read = numberCellOf(cell);
  if (leaf.kind === "number") return plainNumber(cell, unit);
  if (leaf.kind === "text") return saysNo(cell) ? "" : cell;
  if (read === null || read.unit !== "") return cell;
  if (unit === "") return null;
  // "k [10^-5 1/s]": the power of ten belongs to every number below.
  return /^10 ?\^/.test(unit) ? `${cell}*${unit}` : `${cell} ${unit}`;
}

/** A number without dimension; parts of a hundred where its unit says so. */
function plainNumber(cell: string, unit: string): string | number {
  const read = numberCellOf(cell);
  const value = Number(`${read?.number ?? ""}`.replace(/ /g, ""));
  if (read === null || read.scale !== "" || read.number === "" || !Number.isFinite(value)) return cell;
  const of = read.unit === "" ? unit : read.unit;
  if (of === "") return value;
  return of === "%" ? Number((value / 100).toPrecision(15)) : `${cell}${read.unit === "" ? ` ${unit}` : ""}`;
}

/** In a column that says which rows are left out, these say that one is not. */
function saysNo(cell: string): boolean {
  return /^(?:no|n|0|false|[-–—])$/i.test(cell);
}
