import { plainCharacters } from "./pasted.js";

/** What a comma between two digits means. */
export type Comma = "decimal" | "separates";

/**
 * Pasted text as rows of cells. A cell in quotation marks may hold the separator and line breaks; a mark
 * inside it is doubled (RFC 4180, section 2).
 *
 * @param isSeparator of the character at a place of the text
 */
export function splitCells(text: string, isSeparator: (text: string, at: number) => boolean): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let cell = "";
  let quoted = false;
  const endCell = () => {
    row.push(cell.trim());
    cell = "";
  };
  const endRow = () => {
    endCell();
    rows.push(row);
    row = [];
  };
  for (let at = 0; at < text.length; at += 1) {
    const character = text.charAt(at);
    if (quoted) {
      if (character !== '"') cell += character;
      else if (text.charAt(at + 1) === '"') {
        cell += character;
        at += 1;
      } else quoted = false;
    } else if (character === '"' && cell.trim() === "" && text.indexOf('"', at + 1) > 0) quoted = true;
    else if (character === "\n") endRow();
    else if (isSeparator(text, at)) endCell();
    else cell += character;
  }
  endRow();
  return rows.map(withoutBlankEnd).filter((cells) => cells.length > 0);
}

function withoutBlankEnd(cells: readonly string[]): string[] {
  const last = cells.findLastIndex((cell) => cell !== "");
  return cells.slice(0, last + 1);
}

/** Whether the comma at a place stands between two digits, and so may be a decimal sign. */
export function isBetweenDigits(text: string, at: number): boolean {
  return /\d/.test(text.charAt(at - 1)) && /\d/.test(text.charAt(at + 1));
}

/** A cell that begins with a number: the number as typed, what multiplies it by a power of ten, and the rest. */
export interface NumberCell {
  readonly number: string;
  readonly scale: string;
  readonly unit: string;
}

const numberCell = /^([+-]? ?(?:\d[\d.,]*|[.,]\d+)(?:e[+-]?\d+)?)((?: ?[*x] ?10 ?\^ ?[+-]?\d+)?) ?(.*)$/is;

/** Null where a cell does not begin with a number; `1/s` is a unit. */
export function numberCellOf(cell: string): NumberCell | null {
  const plain = plainCharacters(cell);
  if (/^1 ?\/ ?[A-Za-z(]/.test(plain)) return null;
  const match = numberCell.exec(plain);
  if (match === null) return null;
  const [, number = "", scale = "", unit = ""] = match;
  return { number, scale, unit: unit.trim() };
}

const oneMark = /^[+-]? ?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:e[+-]?\d+)?$/i;

/** Whether a cell is one number with at most one decimal sign, and perhaps a unit. */
export function isOneNumber(cell: string): boolean {
  const read = numberCellOf(cell);
  return read !== null && oneMark.test(read.number) && !/^[\d.,+-]/.test(read.unit.replace(/^1 ?\//, ""));
}

/**
 * What the commas inside the numbers of a table are, where something else parts its columns: proven by a
 * number that can be read one way only, asked about where each could be either, or both at once.
 */
export function commaInside(rows: readonly (readonly string[])[]): Comma | "ask" | "mixed" | null {
  const numbers = rows.flat().flatMap((cell) => {
    const digits = numberCellOf(cell)?.number.replace(/^[+-] ?|e.*$|[.,]+$/gi, "") ?? "";
    return digits.includes(",") ? [digits] : [];
  });
  if (numbers.length === 0) return null;
  const grouped = (number: string) => /^[1-9]\d{0,2}(?:,\d{3})+(?:\.\d*)?$/.test(number);
  const decimal = numbers.some((number) => !grouped(number));
  const separates = numbers.some((number) => grouped(number) && /,.*[,.]/.test(number));
  if (decimal && separates) return "mixed";
  return decimal ? "decimal" : separates ? "separates" : "ask";
}

/** A cell with its commas as the case document wants them: a decimal point, and no marks between thousands. */
export function withPoint(cell: string, comma: Comma | null): string {
  if (comma === null || numberCellOf(cell) === null) return cell;
  if (comma === "decimal") return cell.replace(/^([+\-−]?\s*\d*),(?=\d)/, "$1.");
  return cell.replace(/^[+\-−]?\s*\d{1,3}(?:,\d{3})+(?!\d)/, (number) => number.replaceAll(",", ""));
}
