import { paperTones } from "../charts/palette.js";
import { drawLine, lineHeight, type TextStyle, wrap } from "./lines.js";

export const ink = {
  text: paperTones.ink,
  quiet: "#4b565e",
  rule: "#9aa3a9",
  fill: "#ebeef0",
  white: "#ffffff",
} as const;

export const styles = {
  title: { size: 16, weight: "strong" },
  heading: { size: 11.5, weight: "strong" },
  subheading: { size: 9.5, weight: "strong" },
  body: { size: 9, weight: "regular" },
  strong: { size: 9, weight: "strong" },
  formula: { size: 9, weight: "regular", formula: true },
  small: { size: 7.5, weight: "regular" },
  label: { size: 7.5, weight: "regular", colour: ink.quiet },
} as const satisfies Record<string, TextStyle>;

export type Element = PDFKit.PDFStructureElement;

/** What a structure element says beside its content. */
export interface ElementOptions {
  /** words in the place of a picture */
  readonly alt?: string;
  /** what the heading cell of a table names: "Column" or "Row" */
  readonly scope?: string;
}

/** Where the writing stands: everything that is drawn moves `y` down, or goes on on a new page. */
export interface Cursor {
  readonly pdf: PDFKit.PDFDocument;
  readonly left: number;
  readonly width: number;
  readonly top: number;
  readonly bottom: number;
  y: number;
  /** the structure element that takes what is drawn next */
  parent: Element;
  /** the bookmark of the section, under which its parts get theirs */
  bookmark: PDFKit.PDFOutline;
}

const margins = { left: 50, right: 50, top: 60, bottom: 66 };

/** Starts the first page under a structure root that holds the whole document. */
export function startPages(pdf: PDFKit.PDFDocument): Cursor {
  const root = pdf.struct("Document");
  pdf.addStructure(root);
  pdf.addPage();
  return {
    pdf,
    left: margins.left,
    width: pdf.page.width - margins.left - margins.right,
    top: margins.top,
    bottom: pdf.page.height - margins.bottom,
    y: margins.top,
    parent: root,
    bookmark: pdf.outline,
  };
}

export function newPage(cursor: Cursor): void {
  cursor.pdf.addPage();
  cursor.y = cursor.top;
}

/** Starts a new page unless so much height is left on this one. */
export function ensure(cursor: Cursor, height: number): void {
  if (cursor.y + height > cursor.bottom && cursor.y > cursor.top) newPage(cursor);
}

/** Draws something that a screen reader reads, as content of `element`. */
export function readable(cursor: Cursor, element: Element, tag: string, draw: () => void): void {
  const content = cursor.pdf.markStructureContent(tag);
  draw();
  cursor.pdf.endMarkedContent();
  element.add(content);
}

/** Draws something that a screen reader leaves out: rules, fills, repeated headings. */
export function ornament(cursor: Cursor, draw: () => void): void {
  cursor.pdf.markContent("Artifact", { type: "Layout" });
  draw();
  cursor.pdf.endMarkedContent();
}

/** A new structure element below the present parent. */
export function childElement(cursor: Cursor, tag: string, options: ElementOptions = {}): Element {
  const element = cursor.pdf.struct(tag, options);
  cursor.parent.add(element);
  return element;
}

/** Lets everything that `write` draws belong to a new structure element. */
export function within(cursor: Cursor, tag: string, write: () => void): void {
  const outer = cursor.parent;
  cursor.parent = childElement(cursor, tag);
  write();
  cursor.parent.end();
  cursor.parent = outer;
}

export interface ParagraphOptions {
  readonly tag?: string;
  readonly indent?: number;
  readonly after?: number;
}

/** Running text, over as many pages as it takes; never a single line alone at the end of a page. */
export function paragraph(
  cursor: Cursor,
  text: string,
  style: TextStyle,
  options: ParagraphOptions = {},
): void {
  const { tag = "P", indent = 0, after = 4 } = options;
  const lines = wrap(text, cursor.width - indent, style);
  const element = childElement(cursor, tag);
  const height = lineHeight(style);
  ensure(cursor, Math.min(lines.length, 2) * height);
  let rest: readonly string[] = lines;
  while (rest.length > 0) {
    const room = Math.max(1, Math.floor((cursor.bottom - cursor.y + 1e-6) / height));
    const count = rest.length - room === 1 && room > 2 ? room - 1 : room;
    const now = rest.slice(0, count);
    rest = rest.slice(count);
    readable(cursor, element, tag, () => {
      for (const line of now) {
        drawLine(cursor.pdf, line, cursor.left + indent, cursor.y, style);
        cursor.y += height;
      }
    });
    if (rest.length > 0) newPage(cursor);
  }
  element.end();
  cursor.y += after;
}

/**
 * A heading with its bookmark; it stays on the page of what follows.
 *
 * @param keep height that must fit below it, pt
 */
export function heading(cursor: Cursor, text: string, keep = 100): void {
  cursor.y += cursor.y > cursor.top ? 10 : 0;
  ensure(cursor, lineHeight(styles.heading) + 6 + keep);
  cursor.bookmark = cursor.pdf.outline.addItem(text);
  paragraph(cursor, text, styles.heading, { tag: "H2", after: 1 });
  ornament(cursor, () => rule(cursor, cursor.y, 0.8, ink.text));
  cursor.y += 6;
}

/** A heading of a part of a section. */
export function subheading(cursor: Cursor, text: string, keep = 70): void {
  cursor.y += cursor.y > cursor.top ? 4 : 0;
  ensure(cursor, lineHeight(styles.subheading) + keep);
  cursor.bookmark.addItem(text);
  paragraph(cursor, text, styles.subheading, { tag: "H3", after: 2 });
}

export function rule(cursor: Cursor, y: number, width: number, colour: string): void {
  cursor.pdf
    .moveTo(cursor.left, y)
    .lineTo(cursor.left + cursor.width, y)
    .lineWidth(width)
    .strokeColor(colour)
    .stroke();
}
