import { drawLine, lineHeight, type TextStyle, widthOf, wrap } from "./lines.js";
import {
  type Cursor,
  childElement,
  type Element,
  ink,
  newPage,
  ornament,
  readable,
  rule,
  styles,
} from "./page.js";

export interface Column {
  readonly heading: string;
  /** part of the table's width */
  readonly share: number;
  readonly align?: "left" | "right";
}

export interface TableOptions {
  /** columns whose cells name their row */
  readonly rowHeadings?: number;
  readonly strong?: (row: number) => boolean;
}

interface Row {
  readonly cells: readonly (readonly string[])[];
  readonly height: number;
  readonly style: TextStyle;
}

const gap = 8;
const padding = 2.2;
const cellStyle = styles.small;
const headStyle: TextStyle = { ...styles.small, weight: "strong" };

/**
 * A table that goes over pages: its heading comes again on each, no row stands alone below a heading
 * or at the top of the last page, and a row higher than a page is parted.
 */
export function table(
  cursor: Cursor,
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
  options: TableOptions = {},
): void {
  const shares = columns.reduce((sum, column) => sum + column.share, 0);
  const widths = columns.map((column) => (column.share / shares) * (cursor.width + gap) - gap);
  const head = layRow(
    widths,
    columns.map((column) => column.heading),
    headStyle,
  );
  const highest = cursor.bottom - cursor.top - head.height;
  const laid = rows.flatMap((row, index) =>
    partRow(layRow(widths, row, options.strong?.(index) === true ? headStyle : cellStyle), highest),
  );
  const element = childElement(cursor, "Table");
  const draw = (row: Row, parent: Element | null, tagOf: (column: number) => string) =>
    drawRow(cursor, columns, widths, row, parent, tagOf);
  let next = 0;
  do {
    const count = rowsThatFit(cursor, head.height, laid, next);
    if (count === 0) {
      newPage(cursor);
      continue;
    }
    drawHead(cursor, head, next === 0 ? rowElement(cursor, element) : null, draw);
    for (const row of laid.slice(next, next + count)) {
      draw(row, rowElement(cursor, element), (column) => (column < (options.rowHeadings ?? 1) ? "TH" : "TD"));
      ornament(cursor, () => rule(cursor, cursor.y, 0.3, ink.rule));
    }
    next += count;
    if (next < laid.length) newPage(cursor);
  } while (next < laid.length);
  element.end();
  cursor.y += 8;
}

/** What is missing stands back behind what was given. */
const absent = /^(?:not (?:given|said|assessed|reached)|–)$/u;

/** How many rows go on this page: 0 where it is better to begin on the next one. */
function rowsThatFit(cursor: Cursor, headHeight: number, rows: readonly Row[], from: number): number {
  let room = cursor.bottom - cursor.y - headHeight;
  let count = 0;
  for (const row of rows.slice(from)) {
    if (row.height > room) break;
    room -= row.height;
    count++;
  }
  const left = rows.length - from - count;
  const fresh = cursor.y <= cursor.top;
  if (left === 1 && count > 2) return count - 1;
  if (!fresh && left > 0 && count < 2) return 0;
  return fresh ? Math.max(count, 1) : count;
}

/** Text whose cell has nothing to its right may use the room that is left there. */
function layRow(widths: readonly number[], texts: readonly string[], style: TextStyle): Row {
  const last = texts.findLastIndex((text) => text !== "");
  const room = widths.slice(last).reduce((sum, width) => sum + width + gap, -gap);
  const cells = widths.map((width, column) =>
    wrap(texts[column] ?? "", column === last ? room : width, style),
  );
  return { cells, style, height: rowHeight(cells, style) };
}

function rowHeight(cells: readonly (readonly string[])[], style: TextStyle): number {
  return Math.max(...cells.map((lines) => lines.length)) * lineHeight(style) + 2 * padding;
}

function partRow(row: Row, highest: number): Row[] {
  if (row.height <= highest) return [row];
  const most = Math.max(1, Math.floor((highest - 2 * padding) / lineHeight(row.style)));
  const parts: Row[] = [];
  const longest = Math.max(...row.cells.map((lines) => lines.length));
  for (let from = 0; from < longest; from += most) {
    const cells = row.cells.map((lines) => lines.slice(from, from + most));
    parts.push({
      cells,
      style: row.style,
      height: rowHeight(cells, row.style),
    });
  }
  return parts;
}

function rowElement(cursor: Cursor, parent: Element): Element {
  const element = cursor.pdf.struct("TR");
  parent.add(element);
  return element;
}

function drawHead(
  cursor: Cursor,
  head: Row,
  element: Element | null,
  draw: (row: Row, parent: Element | null, tagOf: (column: number) => string) => void,
): void {
  ornament(cursor, () => cursor.pdf.rect(cursor.left, cursor.y, cursor.width, head.height).fill(ink.fill));
  draw(head, element, () => "TH");
  ornament(cursor, () => rule(cursor, cursor.y, 0.8, ink.text));
}

function drawRow(
  cursor: Cursor,
  columns: readonly Column[],
  widths: readonly number[],
  row: Row,
  parent: Element | null,
  tagOf: (column: number) => string,
): void {
  let x = cursor.left;
  row.cells.forEach((lines, column) => {
    const width = widths[column] ?? 0;
    const at = x;
    const write = () => drawCell(cursor, lines, at, width, columns[column]?.align ?? "left", row.style);
    if (parent === null) ornament(cursor, write);
    else {
      const tag = tagOf(column);
      const cell = cursor.pdf.struct(tag);
      parent.add(cell);
      readable(cursor, cell, tag, write);
      cell.end();
    }
    x += width + gap;
  });
  cursor.y += row.height;
  parent?.end();
}

function drawCell(
  cursor: Cursor,
  lines: readonly string[],
  x: number,
  width: number,
  align: "left" | "right",
  style: TextStyle,
): void {
  const shown = absent.test(lines.join(" ")) ? { ...style, colour: ink.quiet } : style;
  lines.forEach((line, index) => {
    const indent = align === "right" ? width - widthOf(line, style) : 0;
    drawLine(cursor.pdf, line, x + indent, cursor.y + padding + index * lineHeight(style), shown);
  });
}
