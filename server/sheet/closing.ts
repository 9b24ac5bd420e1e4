import { type Filing, filingText } from "../records/filing.js";
import { checksLine } from "../screening/checks/all.js";
import type { Caution, Findings } from "../screening/findings.js";
import { timeText } from "../words/timeText.js";
import { drawLine, lineHeight } from "./lines.js";
import {
  type Cursor,
  childElement,
  ensure,
  heading,
  ink,
  ornament,
  paragraph,
  readable,
  styles,
  subheading,
} from "./page.js";
import { levelMeanings, levelNames, stopSentence } from "./sentences.js";
import { table } from "./table.js";

/** All cautions in words, by level. */
export function writeCautions(cursor: Cursor, cautions: readonly Caution[], findings: Findings): void {
  heading(cursor, "Cautions in words");
  paragraph(cursor, stopSentence(findings), styles.strong);
  for (const level of ["stop", "warn", "note"] as const) {
    const those = cautions.filter((caution) => caution.level === level);
    if (those.length === 0) continue;
    subheading(cursor, `${levelNames[level]}: ${levelMeanings[level]} (${those.length})`);
    table(
      cursor,
      [
        { heading: "Code", share: 24 },
        { heading: "Caution", share: 62 },
        { heading: "About", share: 26 },
      ],
      those.map((caution) => [
        caution.code,
        caution.text,
        caution.about === "" ? "the whole case" : caution.about,
      ]),
    );
  }
}

/** Space for two people to put their names to what they have read. */
export function writeSignatures(
  cursor: Cursor,
  preparedBy: string | null,
  digest: string,
  filing: Filing | undefined,
): void {
  heading(cursor, "Preparation and review", 210);
  signatureBlock(cursor, "Prepared by", `Name as typed, not verified: ${preparedBy ?? "not given"}`, [
    "Name",
    "Date",
    "Signature",
  ]);
  signatureBlock(
    cursor,
    "Reviewed by a qualified process-safety professional",
    "Not reviewed until signed here.",
    ["Name and qualification", "Date", "Signature"],
  );
  signatureBlock(cursor, "Decision of the reviewer, and conditions", "", ["", ""]);
  subheading(cursor, "Digest of the case");
  paragraph(
    cursor,
    "SHA-256 of the case in its canonical form (RFC 8785). The case and the findings are attached to this file as one record; the program recomputes the findings from it and compares.",
    styles.small,
  );
  paragraph(cursor, digest, styles.body);
  if (filing !== undefined) writeFiling(cursor, filing);
  subheading(cursor, "Checks of the program");
  paragraph(cursor, `${checksLine()} The program's page of checks names each with its source.`, styles.body);
}

/** Who holds this paper can tell whether the register it names was rewritten since. */
function writeFiling(cursor: Cursor, filing: Filing): void {
  const { number, supersedes } = filing;
  subheading(cursor, "Place in the register");
  const place = `Filed as ${filingText(filing)}, at ${timeText(filing.filedAt)}. It supersedes ${supersedes === null ? "no sheet" : `No. ${supersedes}`}.`;
  paragraph(cursor, place, styles.body);
  const before =
    number === 1
      ? "No entry stands before it; zeros stand for its digest"
      : `SHA-256 of the entry before it, No. ${number - 1}`;
  paragraph(cursor, `${before}:`, styles.small, { after: 0 });
  paragraph(cursor, filing.previousDigest, styles.body);
}

function signatureBlock(cursor: Cursor, title: string, remark: string, lines: readonly string[]): void {
  const { pdf, left, width } = cursor;
  ensure(cursor, 34 + lines.length * 20);
  paragraph(cursor, title, styles.subheading, { tag: "H3", after: 0 });
  if (remark !== "") paragraph(cursor, remark, styles.small, { after: 0 });
  for (const label of lines) {
    const y = cursor.y + 18;
    if (label !== "") {
      const element = childElement(cursor, "P");
      readable(cursor, element, "P", () =>
        drawLine(pdf, label, left, y - lineHeight(styles.label), styles.label),
      );
      element.end();
    }
    ornament(cursor, () =>
      pdf
        .moveTo(left + (label === "" ? 0 : 110), y)
        .lineTo(left + width, y)
        .lineWidth(0.6)
        .strokeColor(ink.text)
        .stroke(),
    );
    cursor.y = y + 2;
  }
  cursor.y += 10;
}
