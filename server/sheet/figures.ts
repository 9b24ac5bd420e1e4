import type { Figure } from "../charts/figure.js";
import { drawPdf, type PdfFonts, pdfHeight } from "../charts/pdf.js";
import { facesOf } from "./fonts.js";
import { lineHeight, wrap } from "./lines.js";
import { type Cursor, childElement, ensure, paragraph, readable, styles, subheading } from "./page.js";

/** Draws a figure in one piece with its title and its sentence; the sentence is also what is read aloud. */
export function drawFigure(cursor: Cursor, figure: Figure, options: { titled: boolean }): void {
  const { pdf, left, width } = cursor;
  const height = pdfHeight(figure, width);
  const sentence = wrap(pdf, figure.sentence, width, styles.small).length * lineHeight(styles.small);
  if (options.titled) subheading(cursor, figure.title, height + sentence + 10);
  else ensure(cursor, height + sentence + 10);
  const element = childElement(cursor, "Figure", { alt: `${figure.title}. ${figure.sentence}` });
  readable(cursor, element, "Figure", () => {
    drawPdf(pdf, figure, { x: left, y: cursor.y, width }, chartFonts());
  });
  element.end();
  cursor.y += height + 2;
  paragraph(cursor, figure.sentence, styles.small, { tag: "Caption", after: 6 });
}

function chartFonts(): PdfFonts {
  const [regular, fallback] = facesOf("regular");
  const [bold] = facesOf("strong");
  const covers = (character: string) => {
    const point = character.codePointAt(0) ?? 0;
    return regular?.covers.has(point) === true && bold?.covers.has(point) === true;
  };
  return { regular: regular?.name ?? "", bold: bold?.name ?? "", fallback: fallback?.name ?? "", covers };
}
