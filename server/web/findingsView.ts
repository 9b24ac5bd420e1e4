import type { Figure } from "../charts/figure.js";
import { figuresOf } from "../charts/figures.js";
import { drawSvg } from "../charts/svg.js";
import type { Caution, CautionLevel, Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import {
  actSentence,
  classSentence,
  levelMeanings,
  levelNames,
  stopSentence,
  windowSentence,
} from "../sheet/sentences.js";
import type { Term } from "../words/glossary.js";
import { type FailureLine, failureLines } from "./failuresView.js";
import { figureTerms } from "./figureTerms.js";
import { type KeyFigureGroup, keyFigures } from "./keyFigures.js";
import { type MethodView, methodsView } from "./methodsView.js";

/** Findings as the page shows them: words, and drawings ready to stand in it. */
export interface FindingsView {
  readonly notice: string;
  readonly digest: string;
  /** false: failures and draws are still to be computed */
  readonly full: boolean;
  readonly verdict: {
    readonly level: CautionLevel;
    readonly sentence: string;
    readonly stops: readonly Caution[];
  };
  readonly sentences: readonly string[];
  readonly keyFigures: readonly KeyFigureGroup[];
  readonly figures: readonly (Pick<Figure, "id" | "title" | "sentence" | "table" | "readings"> & {
    readonly svg: string;
    readonly terms: readonly Term[];
  })[];
  readonly failures: readonly FailureLine[];
  readonly cautions: readonly CautionGroup[];
  /** how many there are: "2 warnings, 3 notes" */
  readonly counted: string;
  readonly methods: readonly MethodView[];
}

export interface CautionGroup {
  readonly level: CautionLevel;
  readonly name: string;
  readonly meaning: string;
  readonly cautions: readonly Caution[];
}

const levels: readonly CautionLevel[] = ["stop", "warn", "note"];

export function findingsView(findings: Findings, model: CaseModel): FindingsView {
  const cautions = levels
    .map((level) => ({
      level,
      name: levelNames[level],
      meaning: levelMeanings[level],
      cautions: findings.cautions.filter((caution) => caution.level === level),
    }))
    .filter((group) => group.cautions.length > 0);
  return {
    notice: findings.notice,
    digest: findings.digest,
    full: findings.uncertainty !== null,
    verdict: {
      level: cautions[0]?.level ?? "note",
      sentence: verdictSentence(findings),
      stops: findings.cautions.filter((caution) => caution.level === "stop"),
    },
    sentences: sentencesOf(findings),
    keyFigures: keyFigures(findings),
    figures: figuresOf(findings).map((figure) => ({
      id: figure.id,
      title: figure.title,
      sentence: figure.sentence,
      table: figure.table,
      readings: figure.readings ?? [],
      svg: drawSvg(figure),
      terms: figureTerms(figure.id, findings),
    })),
    failures: failureLines(findings),
    cautions,
    counted: cautions.map((group) => count(group.cautions.length, group.name)).join(", "),
    methods: methodsView(model, findings),
  };
}

/** Failures can still raise a stop, so a quick screening must not say that there is none. */
function verdictSentence(findings: Findings): string {
  const stopped = findings.cautions.some((caution) => caution.level === "stop");
  if (findings.uncertainty !== null || stopped) return stopSentence(findings);
  return "No stop so far. Cooling failures, which can raise one, are still to be computed.";
}

/** "1 stop", "2 warnings" */
function count(number: number, name: string): string {
  return `${number} ${name.toLowerCase()}${number === 1 ? "" : "s"}`;
}

/** The answers in words; that nothing is left of the window is already said where it is a stop. */
function sentencesOf(findings: Findings): readonly string[] {
  const empty = findings.cautions.some((caution) => caution.code === "WINDOW_EMPTY");
  const window = empty ? [] : [windowSentence(findings)];
  return [...window, classSentence(findings), actSentence(findings)];
}
