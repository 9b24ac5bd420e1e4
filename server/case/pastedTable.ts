import {
  type Comma,
  commaInside,
  isBetweenDigits,
  isOneNumber,
  numberCellOf,
  splitCells,
  withPoint,
} from "./pastedCells.js";
import { type Column, type FoundColumn, readHeading } from "./pastedColumns.js";
import { rowOf } from "./pastedRow.js";

/** Rows of a list of a case document, a question that only a person can answer, or what is wrong. */
export type PastedTable =
  | {
      readonly kind: "rows";
      readonly rows: readonly object[];
      /** headings whose columns nobody asked for */
      readonly passedOver: readonly string[];
    }
  | { readonly kind: "question"; readonly text: string }
  | { readonly kind: "fault"; readonly message: string };

/** Longest text that is read. */
const longest = 200_000;

/**
 * Reads rows pasted from a spreadsheet: columns parted by tabs, by semicolons or, where there are none of
 * these, by commas; a unit in the heading or in each cell. What a cell holds is not judged here: it comes
 * into the document as it was pasted, with its unit and a decimal point, and is read there as if typed.
 *
 * A comma that could be a decimal sign or part columns, or thousands, is asked about.
 *
 * @param columns fields of a row; without a heading the first two are taken in order
 * @param atMost rows that the list may have
 * @param answer to the question about the comma
 */
export function readPastedTable(
  text: string,
  columns: readonly Column[],
  atMost: number,
  answer: Comma | null = null,
): PastedTable {
  if (text.trim() === "") return fault("Paste rows first: one line for each, copied from a spreadsheet");
  if (text.length > longest)
    return fault(`The text is ${text.length} characters long; at most ${longest} are read`);
  const lines = text.replace(/\r\n?/g, "\n");
  const separator = lines.includes("\t") ? "\t" : lines.includes(";") ? ";" : null;
  const cells = separator === null ? partedByComma(lines, answer) : partedBy(lines, separator, answer);
  return Array.isArray(cells) ? tableOf(cells, columns, atMost) : cells;
}

type Cells = string[][];

function fault(message: string): PastedTable & { readonly kind: "fault" } {
  return { kind: "fault", message };
}

function partedBy(lines: string, separator: string, answer: Comma | null): Cells | PastedTable {
  const rows = splitCells(lines, (text, at) => text.charAt(at) === separator);
  const found = commaInside(rows);
  if (found === "mixed" && answer === null) {
    return fault(
      "The commas part thousands in one number and are decimal signs in another: write one of the two",
    );
  }
  if (found === "ask" && answer === null) {
    const sample = rows.flat().find((cell) => numberCellOf(cell)?.number.includes(",")) ?? "";
    return {
      kind: "question",
      text: `“${sample}” can be read as ${withPoint(sample, "decimal")} or as ${withPoint(sample, "separates")}. Which is it?`,
    };
  }
  const comma = answer ?? (found === "decimal" || found === "separates" ? found : null);
  return rows.map((row) => row.map((cell) => withPoint(cell, comma)));
}

/** Commas alone: each parts two columns, or those between two digits are decimal signs. */
function partedByComma(lines: string, answer: Comma | null): Cells | PastedTable {
  const parted = splitCells(lines, (text, at) => text.charAt(at) === ",");
  const decimal = splitCells(lines, (text, at) => text.charAt(at) === "," && !isBetweenDigits(text, at)).map(
    (row) => row.map((cell) => withPoint(cell, "decimal")),
  );
  if (answer !== null) return answer === "decimal" ? decimal : parted;
  const canPart = isEven(parted, 2);
  const canBeDecimal = isEven(decimal, 1) && lines.includes(",");
  if (canPart && canBeDecimal && JSON.stringify(parted) !== JSON.stringify(decimal)) {
    const at = parted.findIndex((row, i) => row.join() !== decimal[i]?.join());
    const quoted = (row: readonly string[] | undefined) =>
      (row ?? []).map((cell) => `“${cell}”`).join(" and ");
    return {
      kind: "question",
      text: `Line ${at + 1} can be read as ${quoted(parted[at])}, or with decimal commas as ${quoted(decimal[at])}. Which is it?`,
    };
  }
  if (!canPart && canBeDecimal) return decimal;
  if (parted.every((row) => row.length < 2)) {
    return fault(
      "No columns were found: part them by tabs, as a spreadsheet does, by semicolons or by commas",
    );
  }
  return parted;
}

/** Whether every line has as many cells as the heading or the first line, with numbers where they belong. */
function isEven(rows: Cells, atLeast: number): boolean {
  const body = rows.slice(headingsOf(rows).length);
  const width = rows[0]?.length ?? 0;
  return (
    body.length > 0 &&
    width >= atLeast &&
    body.every((row) => row.length <= width && row.length >= Math.min(2, width)) &&
    body.every((row) => row.slice(0, 2).every(isOneNumber))
  );
}

/** Lines above the first one with numbers: names of the columns, and perhaps their units. */
function headingsOf(rows: Cells): Cells {
  const enough = Math.min(2, Math.max(...rows.map((row) => row.length)));
  const first = rows.findIndex((row) => row.filter((cell) => numberCellOf(cell) !== null).length >= enough);
  return rows.slice(0, first < 0 ? rows.length : first);
}

function tableOf(rows: Cells, columns: readonly Column[], atMost: number): PastedTable {
  const headings = headingsOf(rows);
  const body = rows.slice(headings.length);
  if (body.length === 0) return fault("No line holds the numbers of a row");
  if (headings.length > 2) {
    return fault("More than two lines stand above the numbers: paste the table from its headings on");
  }
  if (body.length > atMost) {
    return fault(`${body.length} rows were pasted; the table holds at most ${atMost}`);
  }
  const width = Math.max(...body.map((row) => row.length));
  const named = headings.length === 0 ? unnamed(columns, width) : readHeadings(headings, columns);
  if ("kind" in named) return named;
  const beyond = body.findIndex((row) => row.length > named.found.length);
  if (beyond >= 0) {
    return fault(
      `Line ${headings.length + beyond + 1} has more cells than there are headings (${named.found.length})`,
    );
  }
  const read: object[] = [];
  for (const [at, row] of body.entries()) {
    const entry = rowOf(row, named.found);
    if (typeof entry === "string") return fault(`Line ${headings.length + at + 1}: ${entry}`);
    if (Object.keys(entry).length > 0) read.push(entry);
  }
  return { kind: "rows", rows: read, passedOver: named.passedOver };
}

interface Named {
  /** null for a column that is passed over */
  readonly found: readonly (FoundColumn | null)[];
  readonly passedOver: readonly string[];
}

function unnamed(columns: readonly Column[], width: number): Named | PastedTable {
  const needed = columns.filter(({ required }) => required);
  if (width > needed.length) {
    return fault(
      `Paste the headings as well: without them only ${needed.length} columns are understood (${labels(needed)}), and ${width} came`,
    );
  }
  return { found: needed.map((column) => ({ column, isError: false, unit: "" })), passedOver: [] };
}

/** Names of columns with their units, in one line or in two; a line above them may be a title. */
function readHeadings(headings: Cells, columns: readonly Column[]): Named | PastedTable {
  const [above = [], below] = headings;
  const whole = namedBy(above, below ?? [], columns);
  if (below === undefined || !("kind" in whole)) return whole;
  return namedBy(below, [], columns);
}

function namedBy(
  names: readonly string[],
  units: readonly string[],
  columns: readonly Column[],
): Named | PastedTable {
  const found: (FoundColumn | null)[] = [];
  const passedOver: string[] = [];
  for (const [at, name] of names.entries()) {
    const below = (units[at] ?? "").replace(/^[[(](.*)[\])]$/, "$1");
    const heading = readHeading(below === "" ? name : `${name} [${below}]`, columns);
    if (heading.kind === "fault") return fault(heading.message);
    if (heading.kind === "unknown" && name !== "") passedOver.push(name);
    found.push(heading.kind === "column" ? heading.found : null);
  }
  const keys = found.map((each) => (each === null ? "" : `${each.column.key} ${each.isError}`));
  const twice = keys.findIndex((key, at) => key !== "" && keys.indexOf(key) < at);
  if (twice >= 0) return fault(`The heading “${names[twice]}” names a column that is there already`);
  const missing = columns.filter(({ key, required }) => required && !keys.includes(`${key} false`));
  if (missing.length > 0) {
    return fault(
      `No heading names the column for ${labels(missing)}; the headings are ${names.map((name) => `“${name}”`).join(", ")}`,
    );
  }
  return { found, passedOver };
}

function labels(columns: readonly Column[]): string {
  return columns.map(({ leaf }) => leaf.label.toLowerCase()).join(" and ");
}
