import type { Caution } from "../screening/findings.js";
import { lineHeight, wrap } from "./lines.js";
import { type Cursor, paragraph, styles } from "./page.js";
import { levelMeanings, levelNames } from "./sentences.js";

/** Warnings in words as far as the page goes, the rest by code; all stand in words further on. */
export function writeFrontCautions(cursor: Cursor, cautions: readonly Caution[]): void {
  if (cautions.every((caution) => caution.level !== "stop")) {
    paragraph(cursor, "No stop was raised. That does not make the step safe.", styles.strong, { after: 2 });
  }
  const [warnings, notes] = (["warn", "note"] as const).map((level) =>
    cautions.filter((caution) => caution.level === level),
  );
  if (warnings !== undefined && warnings.length > 0) writeWarnings(cursor, warnings);
  if (notes !== undefined && notes.length > 0) {
    paragraph(cursor, `${countText("note", notes)}: ${codesText(notes)}.`, styles.small, { after: 0 });
  }
}

/** Height that the codes of what is not written out may take, pt. */
const roomForCodes = 34;

function writeWarnings(cursor: Cursor, warnings: readonly Caution[]): void {
  paragraph(cursor, `${countText("warn", warnings)}: ${levelMeanings.warn}`, styles.strong, { after: 1 });
  let written = 0;
  for (const warning of warnings) {
    const text = `${warning.code}: ${warning.text}`;
    const height = wrap(text, cursor.width - 8, styles.small).length * lineHeight(styles.small) + 2;
    if (cursor.y + height > cursor.bottom - roomForCodes) break;
    paragraph(cursor, text, styles.small, { indent: 8, after: 2 });
    written++;
  }
  const rest = warnings.slice(written);
  if (rest.length > 0) {
    const more = written === 0 ? "" : `and ${rest.length} more: `;
    paragraph(cursor, `${more}${codesText(rest)} (in words further on).`, styles.small, {
      indent: 8,
      after: 2,
    });
  }
}

function countText(level: "warn" | "note", cautions: readonly Caution[]): string {
  return `${levelNames[level]}${cautions.length === 1 ? "" : "s"} (${cautions.length})`;
}

function codesText(cautions: readonly Caution[]): string {
  return [...new Set(cautions.map((caution) => caution.code))].join(", ");
}
