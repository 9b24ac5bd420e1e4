import type { Findings } from "../screening/findings.js";
import { clip, drawLine, lineHeight, type TextStyle, wrap } from "./lines.js";
import { type Cursor, childElement, ink, ornament, readable, styles } from "./page.js";
import { stopSentence } from "./sentences.js";

/** The whole notice, set apart. */
export function writeNotice(cursor: Cursor, notice: string): void {
  const style: TextStyle = styles.strong;
  const lines = wrap(notice, cursor.width - 16, style);
  const height = lines.length * lineHeight(style) + 8;
  ornament(cursor, () => {
    cursor.pdf.rect(cursor.left, cursor.y, cursor.width, height).fill(ink.fill);
    cursor.pdf.rect(cursor.left, cursor.y, 3, height).fill(ink.text);
  });
  const element = childElement(cursor, "P");
  readable(cursor, element, "P", () => {
    lines.forEach((line, index) => {
      drawLine(cursor.pdf, line, cursor.left + 10, cursor.y + 4 + index * lineHeight(style), style);
    });
  });
  element.end();
  cursor.y += height + 6;
}

/** So many reasons leave room for the picture. */
const mostStops = 5;

/** The stops in a heavy frame with the word itself, white on black: it survives any copier. */
export function writeStop(cursor: Cursor, findings: Findings): void {
  const { pdf, left, width } = cursor;
  const stops = findings.cautions.filter((caution) => caution.level === "stop");
  if (stops.length === 0) return;
  const wordWidth = 78;
  const inner = width - wordWidth - 20;
  const more =
    stops.length > mostStops ? [`${stops.slice(mostStops).length} more stand among the cautions.`] : [];
  const texts = [
    `${stopSentence(findings)} The result must not be used as it is.`,
    ...stops.slice(0, mostStops).map((stop) => stop.text),
    ...more,
  ];
  const blocks = texts.map((text, index) => clip(text, inner, index === 0 ? styles.strong : styles.body, 4));
  const height = blocks.reduce((sum, lines) => sum + lines.length * lineHeight(styles.body) + 2, 8);
  ornament(cursor, () => {
    pdf.rect(left, cursor.y, wordWidth, height).fill("#000000");
    pdf
      .rect(left + 1, cursor.y + 1, width - 2, height - 2)
      .lineWidth(2)
      .stroke("#000000");
  });
  const word = childElement(cursor, "P");
  readable(cursor, word, "P", () => {
    const style: TextStyle = { size: 22, weight: "strong", colour: ink.white };
    drawLine(pdf, "STOP", left + 10, cursor.y + height / 2 - lineHeight(style) / 2, style);
  });
  word.end();
  let y = cursor.y + 5;
  blocks.forEach((lines, index) => {
    const style = index === 0 ? styles.strong : styles.body;
    const element = childElement(cursor, "P");
    readable(cursor, element, "P", () => {
      for (const line of lines) {
        drawLine(pdf, line, left + wordWidth + 10, y, style);
        y += lineHeight(style);
      }
    });
    element.end();
    y += 2;
  });
  cursor.y += height + 8;
}
