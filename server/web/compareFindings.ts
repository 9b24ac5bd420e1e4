import { drawnWords } from "../charts/drawnWords.js";
import { failureSentence } from "../charts/failureSentence.js";
import { byTimeToAct, verdictWords } from "../charts/failuresWords.js";
import type { Caution, FailureFindings, Findings } from "../screening/findings.js";
import { criterionLabel } from "../screening/labels.js";
import { stopSentence } from "../sheet/sentences.js";
import { durationText, percentText, temperatureText } from "../words/numbers.js";
import { keyFigures } from "./keyFigures.js";

/** One finding of two cases, as both pages would show it. */
export interface FindingPair {
  readonly label: string;
  readonly first: string;
  readonly second: string;
}

/** Findings that are shown differently, and how many are shown the same. */
export interface FindingDifferences {
  readonly differing: readonly FindingPair[];
  readonly same: number;
}

export function findingDifferences(first: Findings, second: Findings): FindingDifferences {
  const others = new Map(shown(second));
  const pairs = shown(first).map(([label, text]) => ({
    label,
    first: text,
    second: others.get(label) ?? "",
  }));
  const differing = pairs.filter((pair) => pair.first !== pair.second);
  return { differing, same: pairs.length - differing.length };
}

const notAssessed = "not assessed";

/** The findings that are held against each other, each under its name; the same names for every case. */
function shown(findings: Findings): readonly (readonly [string, string])[] {
  const { window, criticality } = findings;
  const end = (value: number | null | undefined, rounding: "up" | "down") =>
    value == null ? "nothing is left" : temperatureText(value, rounding);
  const setBy = (key: string | null) => (key === null ? "" : ` (${criterionLabel(key)})`);
  const { cautious } = window ?? {};
  return [
    ["Stops", stopSentence(findings)],
    [
      "Window, lower end",
      window === null ? notAssessed : `${end(window.lower_K, "up")}${setBy(window.lowerSetBy)}`,
    ],
    [
      "Window, upper end",
      window === null ? notAssessed : `${end(window.upper_K, "down")}${setBy(window.upperSetBy)}`,
    ],
    ["Window on the cautious side, lower end", cautious == null ? notAssessed : end(cautious.lower_K, "up")],
    [
      "Window on the cautious side, upper end",
      cautious == null ? notAssessed : end(cautious.upper_K, "down"),
    ],
    [
      "Plan",
      window === null ? notAssessed : window.containsProcess ? "inside the window" : "OUTSIDE the window",
    ],
    ["Criticality class", criticality.class === null ? notAssessed : String(criticality.class)],
    ["Probability of that class", classProbability(findings)],
    ["Least time to act", leastTimeToAct(findings)],
    ...keyFigures(findings).flatMap(({ figures }) =>
      figures.map(({ term, meaning, value, note }): readonly [string, string] => [
        `${term} ${meaning}`,
        [value ?? notAssessed, note].filter((part) => part !== null).join(", "),
      ]),
    ),
  ];
}

function classProbability({ criticality }: Findings): string {
  if (criticality.class === null || criticality.probability === null) return "not drawn";
  return percentText(criticality.probability[`${criticality.class}`], "down");
}

function leastTimeToAct({ failures }: Findings): string {
  if (failures === null) return "not computed";
  const [worst] = byTimeToAct(failures);
  return worst === undefined ? "no failure given" : `${verdictWords(worst)} (“${worst.name}”)`;
}

/** A failure of either case, with what becomes of it in each. */
export interface FailurePair {
  readonly name: string;
  /** null where the case has no failure of that name */
  readonly first: FailureCell | null;
  readonly second: FailureCell | null;
  readonly difference: string;
}

export interface FailureCell {
  readonly verdict: FailureFindings["verdict"];
  readonly words: string;
  readonly sentence: string;
  /** what the draws say */
  readonly drawn: string;
}

/** The failures of two cases by their names, those that leave the least time in either first. */
export function failurePairs(first: Findings, second: Findings): readonly FailurePair[] {
  const [ones, others] = [first, second].map(({ failures }) => byName(failures ?? []));
  if (ones === undefined || others === undefined) return [];
  const worstFirst = byTimeToAct([...(first.failures ?? []), ...(second.failures ?? [])]);
  const order = [...ones.keys(), ...others.keys()];
  const place = (name: string) => {
    const both = [ones.get(name), others.get(name)];
    return Math.min(...both.flatMap((each) => (each === undefined ? [] : [worstFirst.indexOf(each)])));
  };
  return [...new Set(order)]
    .sort((a, b) => place(a) - place(b))
    .map((name) => {
      const [one, other] = [ones.get(name), others.get(name)];
      return {
        name,
        first: one === undefined ? null : cellOf(one, first),
        second: other === undefined ? null : cellOf(other, second),
        difference: differenceOf(one, other),
      };
    });
}

/** By name; the second of the same name is counted. */
function byName(failures: readonly FailureFindings[]): Map<string, FailureFindings> {
  const found = new Map<string, FailureFindings>();
  for (const failure of failures) {
    let name = failure.name;
    for (let count = 2; found.has(name); count += 1) name = `${failure.name}, ${count}`;
    found.set(name, failure);
  }
  return found;
}

function cellOf(failure: FailureFindings, { temperatures }: Findings): FailureCell {
  return {
    verdict: failure.verdict,
    words: verdictWords(failure),
    sentence: failureSentence(failure, temperatures.mtt_K),
    drawn: drawnWords(failure),
  };
}

const ranks = { lost: 0, act: 1, holds: 2 } as const;

function differenceOf(one: FailureFindings | undefined, other: FailureFindings | undefined): string {
  if (one === undefined || other === undefined)
    return `only in the ${one === undefined ? "second" : "first"}`;
  const better = ranks[other.verdict] - ranks[one.verdict];
  if (better !== 0) return `the second is ${better > 0 ? "better" : "worse"}`;
  const [a, b] = [one.timeToAct_s, other.timeToAct_s];
  if (one.verdict !== "act" || a === null || b === null) return "the same verdict";
  const more = b - a;
  // Times to act are known to half a second.
  if (Math.abs(more) < 1) return "the same time";
  return more > 0
    ? `${durationText(more)} more in the second`
    : `${durationText(-more, "up")} less in the second`;
}

/** Cautions that one of two cases raises and the other does not, by their codes and what they are about. */
export function cautionsApart(first: Findings, second: Findings): { first: Caution[]; second: Caution[] } {
  const missingIn = ({ cautions }: Findings, { cautions: others }: Findings) =>
    cautions.filter(({ code }) => !others.some((other) => other.code === code));
  return { first: missingIn(first, second), second: missingIn(second, first) };
}
