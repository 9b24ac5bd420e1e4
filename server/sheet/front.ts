import type { Figure } from "../charts/figure.js";
import { type Filing, filingText } from "../records/filing.js";
import type { Findings, TmradFindings } from "../screening/findings.js";
import { differenceText, durationText, temperatureText } from "../words/numbers.js";
import { timeText } from "../words/timeText.js";
import { writeNotice, writeStop } from "./boxes.js";
import { drawPicture } from "./figures.js";
import { writeFrontCautions } from "./frontCautions.js";
import { clip, drawLine, lineHeight, shorten, wrap } from "./lines.js";
import { type Cursor, childElement, paragraph, readable, styles } from "./page.js";
import { actSentence, classSentence, severityText, windowSentence } from "./sentences.js";

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

/** What stands on page one. */
export interface Front {
  readonly document: TitleBlock;
  readonly findings: Findings;
  readonly filing: Filing | undefined;
  readonly picture: Figure | null;
}

/** Page one, which must be enough for someone who reads nothing else. */
export function writeFront(cursor: Cursor, { document, findings, filing, picture }: Front): void {
  writeTitle(cursor, document, findings, filing);
  writeNotice(cursor, findings.notice);
  writeStop(cursor, findings);
  if (picture !== null) drawPicture(cursor, picture, roomForPicture(cursor, findings));
  for (const sentence of [windowSentence(findings), classSentence(findings), actSentence(findings)]) {
    const lines = clip(sentence, cursor.width, styles.strong, mostLines);
    paragraph(cursor, lines.join(" "), styles.strong, { after: 2 });
  }
  cursor.y += 3;
  facts(cursor, keyFacts(findings), 4);
  writeFrontCautions(cursor, findings);
}

/** So long may a sentence be before it takes the room of another. */
const mostLines = 4;

/** What sentences, facts and the headings of the cautions need below the picture, and a line for a warning, pt. */
const belowPicture = { words: 208, warning: 12.2, mostWarnings: 8 };

function roomForPicture(cursor: Cursor, findings: Findings): number {
  const warnings = findings.cautions.filter((caution) => caution.level === "warn").length;
  const lines = Math.min(warnings, belowPicture.mostWarnings);
  return cursor.bottom - cursor.y - belowPicture.words - lines * belowPicture.warning;
}

function writeTitle(cursor: Cursor, block: TitleBlock, findings: Findings, filing: Filing | undefined): void {
  const { pdf } = cursor;
  pdf.outline.addItem("Summary");
  const shown = clip(block.title, cursor.width, styles.title, 2);
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
      ...(filing === undefined ? [] : filingFacts(filing)),
    ],
    3,
  );
}

function filingFacts(filing: Filing): Fact[] {
  return [
    { label: "Filed as", value: filingText(filing) },
    { label: "Supersedes", value: filing.supersedes === null ? "no sheet" : `No. ${filing.supersedes}` },
    { label: "Filed at", value: timeText(filing.filedAt) },
  ];
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
