import type { Figure, Tone } from "./figure.js";
import { layout, type Width } from "./layout.js";
import { dashes, paper, paperTints, paperTones, textSizes, weights } from "./palette.js";
import type { Paint, Primitive, Stroke, Text } from "./primitive.js";

declare global {
  namespace PDFKit.Mixins {
    interface PDFVector {
      /** pdfkit takes a whole pattern as well; its published types know one length only */
      dash(lengths: readonly number[]): this;
    }
  }
}

/** Fonts by the names under which the document knows them. */
export interface PdfFonts {
  readonly regular: string;
  readonly bold: string;
  /** for characters that the others lack */
  readonly fallback: string;
  /** whether `regular` and `bold` have the character */
  readonly covers: (character: string) => boolean;
}

export interface PdfBox {
  readonly x: number;
  readonly y: number;
  /** points */
  readonly width: number;
}

/** A figure in a narrower box is laid out as for a narrow window, so that its words can be read. */
function widthFor(box: { readonly width: number }): Width {
  return box.width < 330 ? "narrow" : "wide";
}

/** Height that `drawPdf` will use in a box of that width, points. */
export function pdfHeight(figure: Figure, width: number): number {
  const { width: across, height } = layout(figure, widthFor({ width }));
  return height * (width / across);
}

/**
 * Draws a figure as vectors: the marks of the page, from the same layout. Leaves the document's own state as it
 * was.
 *
 * @param box upper left corner and width on the page, points
 * @returns the height used, points
 */
export function drawPdf(pdf: PDFKit.PDFDocument, figure: Figure, box: PdfBox, fonts: PdfFonts): number {
  const { width, height, primitives } = layout(figure, widthFor(box));
  const scale = box.width / width;
  const { x, y } = pdf;
  pdf.save();
  pdf.translate(box.x, box.y).scale(scale);
  for (const primitive of primitives) drawPrimitive(pdf, primitive, fonts);
  pdf.restore();
  pdf.x = x;
  pdf.y = y;
  return height * scale;
}

function fillColour(fill: Paint, tone: Tone): { readonly colour: string; readonly opacity: number } | null {
  switch (fill) {
    case "none":
      return null;
    case "paper":
      return { colour: paper, opacity: 1 };
    case "tone":
      return { colour: paperTones[tone], opacity: 1 };
    case "tint":
      return { colour: paperTints[tone], opacity: 1 };
    case "pale":
      return { colour: paperTints[tone], opacity: 0.45 };
  }
}

function drawPrimitive(pdf: PDFKit.PDFDocument, primitive: Primitive, fonts: PdfFonts): void {
  if (primitive.kind === "text") {
    drawText(pdf, primitive, fonts);
    return;
  }
  const shape = () =>
    primitive.kind === "rect"
      ? pdf.rect(primitive.x, primitive.y, primitive.width, primitive.height)
      : pdf.path(primitive.d);
  const fill = fillColour(primitive.fill, primitive.tone);
  if (fill !== null) {
    pdf.fillOpacity(fill.opacity);
    shape().fill(fill.colour);
    pdf.fillOpacity(1);
  }
  if (primitive.stroke !== null) {
    setStroke(pdf, primitive.stroke);
    shape().stroke(paperTones[primitive.tone]);
    pdf.undash();
  }
}

function setStroke(pdf: PDFKit.PDFDocument, { dash, weight }: Stroke): void {
  pdf.lineWidth(weights[weight]).lineJoin("round").lineCap("butt");
  const lengths = dashes[dash];
  if (lengths.length === 0) pdf.undash();
  else pdf.dash(lengths);
}

/** Text split where the font has to change. */
function runs(text: string, covers: (character: string) => boolean): { text: string; covered: boolean }[] {
  const parts: { text: string; covered: boolean }[] = [];
  for (const character of text) {
    const covered = covers(character);
    const last = parts.at(-1);
    if (last !== undefined && last.covered === covered) last.text += character;
    else parts.push({ text: character, covered });
  }
  return parts;
}

function drawText(pdf: PDFKit.PDFDocument, text: Text, fonts: PdfFonts): void {
  const size = textSizes[text.size];
  const font = text.bold ? fonts.bold : fonts.regular;
  const parts = runs(text.text, fonts.covers).map((part) => {
    const named = part.covered ? font : fonts.fallback;
    return {
      text: part.text,
      font: named,
      width: pdf.font(named, size).widthOfString(part.text),
    };
  });
  const whole = parts.reduce((sum, part) => sum + part.width, 0);
  let x = text.x - (text.anchor === "end" ? whole : text.anchor === "middle" ? whole / 2 : 0);
  pdf.save();
  if (text.upright) pdf.rotate(-90, { origin: [text.x, text.y] });
  for (const part of parts) {
    pdf
      .font(part.font, size)
      .fillColor(paperTones[text.tone])
      .text(part.text, x, text.y, { lineBreak: false, baseline: "alphabetic" });
    x += part.width;
  }
  pdf.restore();
}
