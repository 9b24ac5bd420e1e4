import { drawnWords } from "../charts/drawnWords.js";
import type { Caution, Findings } from "../screening/findings.js";
import type { TitleBlock } from "../sheet/front.js";
import {
  actSentence,
  classSentence,
  failuresByUrgency,
  levelMeanings,
  levelNames,
  severityText,
  stopSentence,
  verdictText,
  windowSentence,
} from "../sheet/sentences.js";
import { differenceText, durationText, percentText, powerText, temperatureText } from "../words/numbers.js";
import { forTerminal, onOneLine } from "./output.js";

const lineWidth = 96;

/**
 * The findings on half a screen: the notice, what stops, the verdicts with their units, the failures
 * with the most pressing first, the cautions by level.
 */
export function summaryOf(document: TitleBlock, findings: Findings): string {
  const sections = [
    titleLines(document),
    paragraph(findings.notice),
    cautionLines(findings, ["stop"]),
    temperatureLines(findings),
    [windowSentence(findings), classSentence(findings)].flatMap((text) => paragraph(text)),
    failureLines(findings),
    cautionLines(findings, ["warn", "note"]),
    [`${findings.program.name} ${findings.program.version}, case ${findings.digest}`],
  ];
  return `${sections
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join("\n"))
    .join("\n\n")}\n`;
}

function titleLines(document: TitleBlock): string[] {
  const { record, step, vessel, preparedBy } = document.batch ?? {};
  const parts = [record, step, vessel, preparedBy === undefined ? undefined : `prepared by ${preparedBy}`];
  const known = parts.filter((part) => part !== undefined).map((part) => onOneLine(part));
  return [
    ...paragraph(onOneLine(document.title)),
    ...(known.length === 0 ? [] : paragraph(known.join(", "))),
  ];
}

function temperatureLines(findings: Findings): string[] {
  const { temperatures, heat, timeToMaximumRate: tmrad, cooling } = findings;
  const rows: [string, string, string][] = [
    ["Process temperature", temperatureText(temperatures.process_K), ""],
    [
      "MTSR",
      known(temperatures.mtsr_K, (kelvin) => temperatureText(kelvin, "up")),
      "after a loss of cooling",
    ],
    ["MTT", temperatureText(temperatures.mtt_K, "down"), "maximum technical temperature"],
    [
      "T_D24",
      known(temperatures.td24_K, (kelvin) => temperatureText(kelvin, "down")),
      "TMRad 24 h from here",
    ],
    [
      "Adiabatic rise",
      differenceText(heat.adiabaticRise_K, "up"),
      `reaction, ${severityText(heat.severity)}`,
    ],
    [
      "",
      known(heat.decompositionRise_K, (kelvin) => differenceText(kelvin, "up")),
      `decomposition, ${severityText(heat.decompositionSeverity)}`,
    ],
    ["TMRad", known(tmrad?.atProcess_s, durationText), "from the process temperature"],
    [
      "",
      known(tmrad?.atMtsr_s, durationText),
      `from MTSR, likelihood ${tmrad?.likelihood ?? "not assessed"}`,
    ],
  ];
  if (cooling !== null) {
    const use = cooling.use === null ? "no capacity" : `${percentText(cooling.use, "up")} of the capacity`;
    rows.push(["Cooling duty", powerText(cooling.duty_W, "up"), use]);
  }
  const widest = Math.max(...rows.map(([, value]) => value.length));
  return rows.map(([name, value, remark]) =>
    `  ${name.padEnd(20)} ${value.padStart(widest)}   ${remark}`.trimEnd(),
  );
}

function known(value: number | null | undefined, text: (value: number) => string): string {
  return value === null || value === undefined ? "not assessed" : text(value);
}

function failureLines(findings: Findings): string[] {
  const failures = failuresByUrgency(findings.failures ?? []);
  const verdicts = failures.map(verdictText);
  const widest = Math.max(0, ...verdicts.map((verdict) => verdict.length));
  return [
    ...paragraph(actSentence(findings)),
    ...failures.flatMap((failure, index) => [
      ...hanging(`  ${(verdicts[index] ?? "").padEnd(widest)}   `, failure.name),
      ...((failure.drawn ?? null) === null ? [] : hanging(" ".repeat(widest + 5), drawnWords(failure))),
    ]),
  ];
}

function cautionLines(findings: Findings, levels: readonly Caution["level"][]): string[] {
  if (levels.includes("stop") && findings.cautions.every((caution) => caution.level !== "stop")) {
    return [stopSentence(findings)];
  }
  return levels.flatMap((level) => {
    const those = findings.cautions.filter((caution) => caution.level === level);
    if (those.length === 0) return [];
    return [
      `${levelNames[level]}: ${levelMeanings[level]} (${those.length})`,
      ...those.flatMap((caution) => hanging(`  ${caution.code}  `, caution.text, 4)),
    ];
  });
}

function paragraph(text: string): string[] {
  return hanging("", text);
}

/** Text broken at spaces after a first part, further lines set in below it. */
function hanging(first: string, text: string, indent = first.length): string[] {
  const lines: string[] = [];
  let line = first;
  let fresh = true;
  for (const word of onOneLine(text).split(" ")) {
    if (!fresh && line.length + 1 + word.length > lineWidth) {
      lines.push(line);
      line = " ".repeat(indent);
      fresh = true;
    }
    line += fresh ? word : ` ${word}`;
    fresh = false;
  }
  return [...lines, line].map((each) => forTerminal(each));
}
