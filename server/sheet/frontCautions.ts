import type { Caution, Findings } from "../screening/findings.js";
import { lineHeight, shorten, wrap } from "./lines.js";
import { type Cursor, paragraph, styles } from "./page.js";
import { levelMeanings, levelNames, stopSentence } from "./sentences.js";

const indent = 8;
const after = 2;

/**
 * Warnings in words where the page has the room, else the first line of each, at last only codes; notes by
 * code. All of them stand in words further on.
 */
export function writeFrontCautions(cursor: Cursor, findings: Findings): void {
  const { cautions } = findings;
  if (cautions.every((caution) => caution.level !== "stop")) {
    paragraph(cursor, stopSentence(findings), styles.strong, { after });
  }
  const warnings = cautions.filter((caution) => caution.level === "warn");
  const notes = cautions.filter((caution) => caution.level === "note");
  const noteText = notes.length === 0 ? "" : `${countText("note", notes)}: ${codesText(notes)}.`;
  const noteHeight = wrap(noteText, cursor.width, styles.small).length * lineHeight(styles.small);
  if (warnings.length > 0) writeWarnings(cursor, warnings, cursor.bottom - noteHeight);
  if (noteText !== "") paragraph(cursor, noteText, styles.small, { after: 0 });
}

function writeWarnings(cursor: Cursor, warnings: readonly Caution[], bottom: number): void {
  const heading = `${countText("warn", warnings)}: ${levelMeanings.warn}; in full further on`;
  paragraph(cursor, heading, styles.strong, { after: 1 });
  const width = cursor.width - indent;
  const whole = warnings.map((warning) => `${warning.code}: ${warning.text}`);
  const height = (text: string) => wrap(text, width, styles.small).length * lineHeight(styles.small) + after;
  const fits = whole.reduce((sum, text) => sum + height(text), cursor.y) <= bottom;
  const texts = fits ? whole : whole.map((text) => shorten(text, width, styles.small));
  const room = Math.floor((bottom - cursor.y) / (lineHeight(styles.small) + after));
  // The last lines are kept for the codes of what has no line of its own.
  const count = fits || texts.length <= room ? texts.length : Math.max(0, room - 2);
  for (const text of texts.slice(0, count)) paragraph(cursor, text, styles.small, { indent, after });
  const rest = warnings.slice(count);
  if (rest.length === 0) return;
  const more = `${count === 0 ? "" : `and ${rest.length} more: `}${codesText(rest)}.`;
  paragraph(cursor, more, styles.small, { indent, after });
}

function countText(level: "warn" | "note", cautions: readonly Caution[]): string {
  return `${levelNames[level]}${cautions.length === 1 ? "" : "s"} (${cautions.length})`;
}

/** Each code once, with how often it was raised. */
function codesText(cautions: readonly Caution[]): string {
  const counts = new Map<string, number>();
  for (const { code } of cautions) counts.set(code, (counts.get(code) ?? 0) + 1);
  return [...counts].map(([code, count]) => (count === 1 ? code : `${code} (${count})`)).join(", ");
}
