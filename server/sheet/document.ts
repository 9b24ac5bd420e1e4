import PDFDocument from "pdfkit";
import { registerFaces } from "./fonts.js";

export type Paper = "A4" | "Letter";

export interface DocumentFacts {
  readonly title: string;
  readonly subject: string;
  /** what wrote it */
  readonly producer: string;
  readonly keywords: string;
}

/**
 * An empty tagged PDF with the sheet's fonts. It carries no date and nothing random, so that the same
 * content gives the same bytes: when a sheet was made is for the register to say.
 */
export function openDocument(paper: Paper, facts: DocumentFacts): PDFKit.PDFDocument {
  const pdf = new PDFDocument({
    size: paper === "A4" ? "A4" : "LETTER",
    margin: 0,
    autoFirstPage: false,
    bufferPages: true,
    pdfVersion: "1.7",
    tagged: true,
    lang: "en-GB",
    displayTitle: true,
    info: {
      Title: facts.title,
      Subject: facts.subject,
      Keywords: facts.keywords,
      Producer: facts.producer,
      Creator: facts.producer,
      CreationDate: new Date(0),
    },
  });
  // The file identifier is computed by now; hidden, the date that it needed is not written.
  Object.defineProperty(pdf.info, "CreationDate", { enumerable: false });
  writeMetadata(pdf, facts);
  registerFaces(pdf);
  return pdf;
}

/** The writer's own metadata hold a date and do not escape what was typed, so ours take their place. */
function writeMetadata(pdf: PDFKit.PDFDocument, facts: DocumentFacts): void {
  pdf.appendXML(`<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/"
 xmlns:pdf="http://ns.adobe.com/pdf/1.3/" xmlns:xmp="http://ns.adobe.com/xap/1.0/">
<dc:title><rdf:Alt><rdf:li xml:lang="x-default">${escapeXml(facts.title)}</rdf:li></rdf:Alt></dc:title>
<dc:description><rdf:Alt><rdf:li xml:lang="x-default">${escapeXml(facts.subject)}</rdf:li></rdf:Alt></dc:description>
<dc:language><rdf:Bag><rdf:li>en-GB</rdf:li></rdf:Bag></dc:language>
<pdf:Keywords>${escapeXml(facts.keywords)}</pdf:Keywords>
<pdf:Producer>${escapeXml(facts.producer)}</pdf:Producer>
<xmp:CreatorTool>${escapeXml(facts.producer)}</xmp:CreatorTool>
</rdf:Description>`);
  pdf.appendXML = () => {};
}

const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
};

/** Text for XML 1.0: what it cannot hold at all becomes the replacement character. */
function escapeXml(text: string): string {
  return text
    .replace(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu, "\ufffd")
    .replace(/[&<>]/g, (character) => entities[character] ?? character);
}

/** Ends the document and gathers its bytes. */
export function closeDocument(pdf: PDFKit.PDFDocument): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    pdf.on("data", (chunk: Buffer) => chunks.push(chunk));
    pdf.on("end", () => resolve(Buffer.concat(chunks)));
    pdf.on("error", reject);
    pdf.end();
  });
}
