import PDFDocument from "pdfkit";
import { registerFaces } from "./fonts.js";

/**
 * A document that is never written: text is measured with its fonts, so that measuring leaves no trace in
 * a sheet, and what was measured once need not be measured for the next one.
 */
let ruler: PDFKit.PDFDocument | null = null;

/** Widths at size 1: most words of a sheet stand on it many times, and on the next one. */
const known = new Map<string, number>();
const mostKnown = 20_000;

/**
 * Width of a text that one face draws.
 *
 * @param face name of the face
 * @returns ems
 */
export function textWidth(face: string, text: string): number {
  const key = `${face}\n${text}`;
  const before = known.get(key);
  if (before !== undefined) return before;
  if (known.size >= mostKnown) known.clear();
  ruler ??= openRuler();
  const width = ruler.font(face).widthOfString(text);
  known.set(key, width);
  return width;
}

function openRuler(): PDFKit.PDFDocument {
  const pdf = new PDFDocument({ autoFirstPage: false, fontLayoutCache: false });
  registerFaces(pdf);
  return pdf.fontSize(1);
}
