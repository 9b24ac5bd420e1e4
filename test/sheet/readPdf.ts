import { getDocument, OPS, type PDFDocumentProxy } from "pdfjs-dist/legacy/build/pdf.mjs";

/** Opens a PDF with a reader that has nothing to do with what wrote it. */
export function openPdf(bytes: Uint8Array): Promise<PDFDocumentProxy> {
  return getDocument({ data: new Uint8Array(bytes), verbosity: 0 }).promise;
}

/** The text of each page, in the order in which it was drawn, lines joined by spaces. */
export async function pageTexts(bytes: Uint8Array): Promise<string[]> {
  const pdf = await openPdf(bytes);
  const texts: string[] = [];
  for (let number = 1; number <= pdf.numPages; number++) {
    const content = await (await pdf.getPage(number)).getTextContent();
    const parts = content.items.map((item) =>
      "str" in item ? (item.hasEOL ? `${item.str} ` : item.str) : "",
    );
    texts.push(parts.join("").replace(/\s+/g, " "));
  }
  await pdf.destroy();
  return texts;
}

/** Characters that were drawn with the glyph that a font shows where it has none, page by page. */
export async function missingGlyphs(bytes: Uint8Array): Promise<{ glyphs: number; missing: number }> {
  const pdf = await openPdf(bytes);
  let glyphs = 0;
  let missing = 0;
  for (let number = 1; number <= pdf.numPages; number++) {
    const operators = await (await pdf.getPage(number)).getOperatorList();
    operators.fnArray.forEach((operator, index) => {
      if (operator !== OPS.showText) return;
      const shown: unknown = operators.argsArray[index]?.[0];
      if (!Array.isArray(shown)) throw new Error("the reader's list of glyphs has another shape");
      for (const glyph of shown) {
        if (typeof glyph === "number") continue;
        glyphs++;
        if (glyph.originalCharCode === 0) missing++;
      }
    });
  }
  await pdf.destroy();
  return { glyphs, missing };
}
