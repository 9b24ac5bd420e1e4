import { drawLine, lineHeight, type TextStyle, widthOf, wrap } from "./lines.js";
import {
  type Cursor,
  childElement,
  type Element,
  type ElementOptions,
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

/** The columns as they stand on the page. */
interface Grid {
  readonly columns: readonly Column[];
  /** pt */
  readonly widths: readonly number[];
}

interface Row {
  readonly isHead: boolean;
  /** the lines of each cell */
  readonly cells: readonly (readonly string[])[];
  /** pt */
  readonly height: number;
}

const gap = 8;
const padding = 2.2;
const bodyStyle: TextStyle = styles.small;
const headStyle: TextStyle = { ...styles.small, weight: "strong" };

/**
 * A table that goes over pages: its heading comes again on each, no row stands alone below a heading
 * or at the top of the last page, and a row higher than a page is parted. The first cell of a row names it.
 */
export function table(
  cursor: Cursor,
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
): void {
  const shares = columns.reduce((sum, column) => sum + column.share, 0);
  const widths = columns.map((column) => (column.share / shares) * (cursor.width + gap) - gap);
  const grid: Grid = { columns, widths };
  const head = layRow(
    grid,
    columns.map((column) => column.heading),
    true,
  );
  const highest = cursor.bottom - cursor.top - head.height;
  const laid = rows.flatMap((row) => partRow(layRow(grid, row, false), highest));
  const element = childElement(cursor, "Table");
  let next = 0;
  do {
    const count = rowsThatFit(cursor, head.height, laid, next);
    if (count > 0) {
      drawHead(cursor, grid, head, next === 0 ? element : null);
      for (const row of laid.slice(next, next + count)) drawRow(cursor, grid, row, element);
      next += count;
    }
    if (next < laid.length) newPage(cursor);
  } while (next < laid.length);
  element.end();
  cursor.y += 8;
}

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
function layRow({ widths }: Grid, texts: readonly string[], isHead: boolean): Row {
  const style = isHead ? headStyle : bodyStyle;
  const last = texts.findLastIndex((text) => text !== "");
  const room = widths.slice(last).reduce((sum, width) => sum + width + gap, -gap);
  const cells = widths.map((width, column) =>
    wrap(texts[column] ?? "", column === last ? room : width, style),
  );
  return { isHead, cells, height: rowHeight(cells) };
}

function rowHeight(cells: readonly (readonly string[])[]): number {
  return Math.max(...cells.map((lines) => lines.length)) * lineHeight(bodyStyle) + 2 * padding;
}

function partRow(row: Row, highest: number): Row[] {
  if (row.height <= highest) return [row];
  const most = Math.max(1, Math.floor((highest - 2 * padding) / lineHeight(bodyStyle)));
  const longest = Math.max(...row.cells.map((lines) => lines.length));
  return Array.from({ length: Math.ceil(longest / most) }, (_, part) => {
    const cells = row.cells.map((lines) => lines.slice(part * most, (part + 1) * most));
    return { isHead: row.isHead, cells, height: rowHeight(cells) };
  });
}

/** @param parent null where the heading is repeated, which a screen reader leaves out */
function drawHead(cursor: Cursor, grid: Grid, head: Row, parent: Element | null): void {
  ornament(cursor, () => cursor.pdf.rect(cursor.left, cursor.y, cursor.width, head.height).fill(ink.fill));
  if (parent === null) ornament(cursor, () => drawCells(cursor, grid, head, (_column, draw) => draw()));
  else drawTagged(cursor, grid, head, parent);
  cursor.y += head.height;
  ornament(cursor, () => rule(cursor, cursor.y, 0.8, ink.text));
}

function drawRow(cursor: Cursor, grid: Grid, row: Row, parent: Element): void {
  drawTagged(cursor, grid, row, parent);
  cursor.y += row.height;
  ornament(cursor, () => rule(cursor, cursor.y, 0.3, ink.rule));
}

function drawTagged(cursor: Cursor, grid: Grid, row: Row, parent: Element): void {
  const element = cursor.pdf.struct("TR");
  parent.add(element);
  drawCells(cursor, grid, row, (column, draw) => {
    const tag = row.isHead || column === 0 ? "TH" : "TD";
    const options: ElementOptions = tag === "TH" ? { scope: row.isHead ? "Column" : "Row" } : {};
    const cell = cursor.pdf.struct(tag, options);
    element.add(cell);
    readable(cursor, cell, tag, draw);
    cell.end();
  });
  element.end();
}

function drawCells(
  cursor: Cursor,
  { columns, widths }: Grid,
  row: Row,
  place: (column: number, draw: () => void) => void,
): void {
  let x = cursor.left;
  row.cells.forEach((lines, column) => {
    const left = x;
    const width = widths[column] ?? 0;
    place(column, () =>
      drawCell(cursor, lines, left, columns[column]?.align === "right" ? width : null, row),
    );
    x += width + gap;
  });
}

/** What is missing stands back behind what was given. */
const absent = /^(?:not (?:given|said|assessed|reached)|–)$/u;

/** @param alignedTo width at whose end the lines end; null: they begin at `x` */
function drawCell(
  cursor: Cursor,
  lines: readonly string[],
  x: number,
  alignedTo: number | null,
  { isHead }: Row,
): void {
  const style = isHead ? headStyle : bodyStyle;
  const shown = absent.test(lines.join(" ")) ? { ...style, colour: ink.quiet } : style;
  lines.forEach((line, index) => {
    const indent = alignedTo === null ? 0 : alignedTo - widthOf(line, style);
    drawLine(cursor.pdf, line, x + indent, cursor.y + padding + index * lineHeight(style), shown);
  });
}
