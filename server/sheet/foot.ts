import { type Filing, filingText } from "../records/filing.js";
import { noticeFirstSentence } from "../screening/notice.js";
import { drawLine, lineHeight, shorten, widthOf } from "./lines.js";
import { type Cursor, ink, rule, styles } from "./page.js";

export interface Running {
  readonly title: string;
  readonly record: string | null;
  readonly program: string;
  readonly digest: string;
  readonly filing: Filing | undefined;
}

/** Puts head and foot on every page, once the number of pages is known. */
export function writeRunning(cursor: Cursor, running: Running): void {
  const { pdf } = cursor;
  const { start, count } = pdf.bufferedPageRange();
  for (let page = 0; page < count; page++) {
    pdf.switchToPage(start + page);
    pdf.markContent("Artifact", { type: "Pagination" });
    head(cursor, running);
    foot(cursor, running, `page ${page + 1} of ${count}`);
    pdf.endMarkedContent();
  }
}

function head(cursor: Cursor, running: Running): void {
  const { pdf, left, width } = cursor;
  const style = styles.label;
  const record = shorten(`Batch record: ${running.record ?? "not given"}`, 0.35 * width, style);
  const recordWidth = widthOf(record, style);
  const y = cursor.top - 28;
  drawLine(pdf, shorten(running.title, width - recordWidth - 16, style), left, y, style);
  drawLine(pdf, record, left + width - recordWidth, y, style);
  rule(cursor, y + lineHeight(style) + 3, 0.5, ink.rule);
}

function foot(cursor: Cursor, running: Running, pages: string): void {
  const { pdf, left, width } = cursor;
  const y = cursor.bottom + 12;
  rule(cursor, y, 0.5, ink.rule);
  drawLine(pdf, noticeFirstSentence, left, y + 4, {
    ...styles.small,
    weight: "strong",
  });
  const below = y + 4 + lineHeight(styles.small);
  const filed = running.filing === undefined ? "" : `${filingText(running.filing)} · `;
  const origin = `${filed}${running.program} · case ${running.digest.slice(0, 12)}`;
  drawLine(pdf, origin, left, below, styles.label);
  drawLine(pdf, pages, left + width - widthOf(pages, styles.label), below, styles.label);
}
