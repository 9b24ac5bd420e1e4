import type { Figure } from "../charts/figure.js";
import type { Caution, Findings, TmradFindings } from "../screening/findings.js";
import { differenceText, durationText, temperatureText } from "../words/numbers.js";
import { drawPicture } from "./figures.js";
import { drawLine, lineHeight, shorten, type TextStyle, wrap } from "./lines.js";
import { type Cursor, childElement, ink, ornament, paragraph, readable, styles } from "./page.js";
import {
  actSentence,
  classSentence,
  levelMeanings,
  levelNames,
  severityText,
  stopSentence,
  windowSentence,
} from "./sentences.js";

/** What the title block takes from the case document. */
export interface TitleBlock {
  readonly title: string;
  readonly batch?:
    | {
        readonly record?: string | undefined;
        readonly step?: string | undefined;
        readonly vessel?: string | undefined;
        readonly preparedBy?: string | undefined;
      }
    | undefined;
}

/** Page one, which must be enough for someone who reads nothing else. */
export function writeFront(
  cursor: Cursor,
  block: TitleBlock,
  findings: Findings,
  picture: Figure | null,
): void {
  writeTitle(cursor, block, findings);
  noticeBox(cursor, findings.notice);
  stopBox(cursor, findings);
  if (picture !== null) drawPicture(cursor, picture, roomForPicture(cursor));
  for (const sentence of [windowSentence(findings), classSentence(findings), actSentence(findings)]) {
    paragraph(cursor, sentence, styles.strong, { after: 2 });
  }
  cursor.y += 3;
  facts(cursor, keyFacts(findings), 4);
  frontCautions(cursor, findings.cautions);
}

/** What the sentences, the facts and the first cautions need below the picture, pt. */
const belowPicture = 245;

function roomForPicture(cursor: Cursor): number {
  return cursor.bottom - cursor.y - belowPicture;
}

function writeTitle(cursor: Cursor, block: TitleBlock, findings: Findings): void {
  const { pdf } = cursor;
  pdf.outline.addItem("Summary");
  const lines = wrap(block.title, cursor.width, styles.title);
  const shown = lines.slice(0, 2);
  if (lines.length > 2) shown[1] = shorten(lines.slice(1).join(" "), cursor.width, styles.title);
  const element = childElement(cursor, "H1");
  readable(cursor, element, "H1", () => {
    for (const line of shown) {
      drawLine(pdf, line, cursor.left, cursor.y, styles.title);
      cursor.y += lineHeight(styles.title);
    }
  });
  element.end();
  cursor.y += 3;
  const batch = block.batch ?? {};
  facts(
    cursor,
    [
      { label: "Batch record", value: batch.record ?? "not given" },
      { label: "Step", value: batch.step ?? "not given" },
      { label: "Vessel", value: batch.vessel ?? "not given" },
      {
        label: "Prepared by (as typed, not verified)",
        value: batch.preparedBy ?? "not given",
      },
      {
        label: "Program",
        value: `${findings.program.name} ${findings.program.version}`,
      },
      {
        label: "Digest of the case, SHA-256, first 12 of 64",
        value: findings.digest.slice(0, 12),
      },
    ],
    3,
  );
}

interface Fact {
  readonly label: string;
  readonly value: string;
  readonly detail?: string;
}

/** Labelled values in columns; what does not fit its cell is cut here and whole among the inputs. */
function facts(cursor: Cursor, cells: readonly Fact[], columns: number): void {
  const { pdf, left } = cursor;
  const width = (cursor.width + 12) / columns;
  for (let first = 0; first < cells.length; first += columns) {
    const row = cells.slice(first, first + columns);
    const details = row.map((cell) => wrap(cell.detail ?? "", width - 12, styles.label).slice(0, 2));
    const detailLines = Math.max(
      ...row.map((cell, index) => (cell.detail ? (details[index]?.length ?? 0) : 0)),
    );
    row.forEach((cell, index) => {
      const x = left + index * width;
      const element = childElement(cursor, "P");
      readable(cursor, element, "P", () => {
        drawLine(pdf, shorten(cell.label, width - 12, styles.label), x, cursor.y, styles.label);
        const y = cursor.y + lineHeight(styles.label);
        drawLine(pdf, shorten(cell.value, width - 12, styles.strong), x, y, styles.strong);
        details[index]?.forEach((line, number) => {
          const below = y + lineHeight(styles.strong) + number * lineHeight(styles.label);
          drawLine(pdf, line, x, below, styles.label);
        });
      });
      element.end();
    });
    cursor.y += lineHeight(styles.label) * (1 + detailLines) + lineHeight(styles.strong) + 3;
  }
  cursor.y += 2;
}

function noticeBox(cursor: Cursor, notice: string): void {
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

/** The stops in a heavy frame with the word itself, white on black: it survives any copier. */
function stopBox(cursor: Cursor, findings: Findings): void {
  const { pdf, left, width } = cursor;
  const stops = findings.cautions.filter((caution) => caution.level === "stop");
  if (stops.length === 0) return;
  const wordWidth = 78;
  const inner = width - wordWidth - 20;
  const texts = [
    `${stopSentence(findings)} The result must not be used as it is.`,
    ...stops.map((stop) => stop.text),
  ];
  const blocks = texts.map((text, index) => wrap(text, inner, index === 0 ? styles.strong : styles.body));
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

function keyFacts(findings: Findings): Fact[] {
  const { temperatures, heat, uncertainty } = findings;
  const tmrad = findings.timeToMaximumRate;
  const optional = (value: number | null, text: (value: number) => string) =>
    value === null ? "not assessed" : text(value);
  const high = uncertainty?.mtsr_K?.p95 ?? null;
  const low = uncertainty?.td24_K?.p05 ?? null;
  return [
    {
      label: "Process temperature",
      value: temperatureText(temperatures.process_K),
    },
    {
      label: "MTSR",
      value: optional(temperatures.mtsr_K, (kelvin) => temperatureText(kelvin, "up")),
      ...(high === null ? {} : { detail: `95th percentile ${temperatureText(high, "up")}` }),
    },
    { label: "MTT", value: temperatureText(temperatures.mtt_K, "down") },
    {
      label: "T_D24",
      value: optional(temperatures.td24_K, (kelvin) => temperatureText(kelvin, "down")),
      ...(low === null ? {} : { detail: `5th percentile ${temperatureText(low, "down")}` }),
    },
    {
      label: "Adiabatic rise of the reaction",
      value: differenceText(heat.adiabaticRise_K, "up"),
      detail: severityText(heat.severity),
    },
    {
      label: "Rise of the decomposition",
      value: optional(heat.decompositionRise_K, (kelvin) => differenceText(kelvin, "up")),
      detail: severityText(heat.decompositionSeverity),
    },
    {
      label: "TMRad from process temperature",
      value: tmradText(tmrad, "atProcess_s"),
    },
    {
      label: "TMRad from MTSR",
      value: tmradText(tmrad, "atMtsr_s"),
      ...(tmrad?.likelihood ? { detail: `likelihood ${tmrad.likelihood}` } : {}),
    },
  ];
}

function tmradText(tmrad: TmradFindings | null, key: "atProcess_s" | "atMtsr_s"): string {
  const seconds = tmrad?.[key] ?? null;
  return seconds === null ? "not assessed" : durationText(seconds);
}

/** Warnings in words as far as the page goes, the rest by code; all stand in words further on. */
function frontCautions(cursor: Cursor, cautions: readonly Caution[]): void {
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
