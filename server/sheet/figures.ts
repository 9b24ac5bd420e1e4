import type { Figure } from "../charts/figure.js";
import { figuresOf } from "../charts/figures.js";
import { drawPdf, type PdfFonts, pdfHeight } from "../charts/pdf.js";
import type { Findings } from "../screening/findings.js";
import { facesOf } from "./fonts.js";
import { lineHeight, wrap } from "./lines.js";
import { type Cursor, childElement, paragraph, readable, styles, subheading } from "./page.js";
import { drawable } from "./runs.js";

/** The figures of some findings, with names as the sheet's fonts can draw them. */
export function drawableFigures(findings: Findings): Figure[] {
  const failures =
    findings.failures?.map((failure) => ({ ...failure, name: drawable(failure.name) })) ?? null;
  return figuresOf({ ...findings, failures });
}

/** Room that a figure takes under its title, with its sentence. */
export function figureRoom({ width }: Cursor, figure: Figure): number {
  const sentence = wrap(figure.sentence, width, styles.small).length * lineHeight(styles.small);
  return pdfHeight(figure, width) + sentence + 10;
}

/** Draws a figure in one piece with its title and its sentence. */
export function drawFigure(cursor: Cursor, figure: Figure): void {
  const { width } = cursor;
  subheading(cursor, figure.title, figureRoom(cursor, figure));
  drawMarks(cursor, figure, width);
  paragraph(cursor, figure.sentence, styles.small, {
    tag: "Caption",
    after: 6,
  });
}

/** Below this part of the full width a figure's words would be too small to read on paper. */
const leastScale = 0.84;

/** Draws a figure without words of its own, smaller where there is not the room for its full width. */
export function drawPicture(cursor: Cursor, figure: Figure, room: number): void {
  const scale = Math.min(1, room / pdfHeight(figure, cursor.width));
  drawMarks(cursor, figure, cursor.width * Math.max(scale, leastScale));
}

/** What the figure shows is read aloud in its place. */
function drawMarks(cursor: Cursor, figure: Figure, width: number): void {
  const element = childElement(cursor, "Figure", {
    alt: `${figure.title}. ${figure.sentence}`,
  });
  readable(cursor, element, "Figure", () => {
    const x = cursor.left + (cursor.width - width) / 2;
    cursor.y += drawPdf(cursor.pdf, figure, { x, y: cursor.y, width }, chartFonts()) + 2;
  });
  element.end();
}

function chartFonts(): PdfFonts {
  const [regular, fallback] = facesOf("regular");
  const [bold] = facesOf("strong");
  const covers = (character: string) => {
    const point = character.codePointAt(0) ?? 0;
    return regular?.covers.has(point) === true && bold?.covers.has(point) === true;
  };
  return {
    regular: regular?.name ?? "",
    bold: bold?.name ?? "",
    fallback: fallback?.name ?? "",
    covers,
  };
}
