import type { Findings, Spans, WindowFindings } from "../screening/findings.js";
import { differenceText, percentText, temperatureNumber, temperatureText } from "../words/numbers.js";

/** What a criterion asks for, in a few words more than its label; one without an entry has its label alone. */
export const meanings: Readonly<Record<string, string | undefined>> = {
  completion: "target conversion in the available time",
  cooling: "duty within what may be used of it",
  stability: "advisory, at constant coolant",
  "mtsr-mtt": "after a cooling failure",
  "mtsr-tmr": "long enough after a cooling failure",
  hold: "long enough from the batch itself",
};

/** What goes wrong beyond an end of the window that a criterion sets. */
const beyond: Readonly<Record<string, { readonly below: string; readonly above: string } | undefined>> = {
  completion: {
    below: "the reaction is not done in the available time",
    above: "the reaction is not done in the available time",
  },
  cooling: {
    below: "the duty exceeds what the cooling may give",
    above: "the duty exceeds what the cooling may give",
  },
  stability: {
    below: "the vessel does not steady itself",
    above: "the vessel does not steady itself",
  },
  "mtsr-mtt": {
    below: "accumulation lifts MTSR over MTT",
    above: "MTSR passes MTT",
  },
  "mtsr-tmr": {
    below: "accumulation shortens TMRad from MTSR too far",
    above: "TMRad from MTSR is too short",
  },
  hold: {
    below: "TMRad from the batch itself is too short",
    above: "TMRad from the batch itself is too short",
  },
};

/** What a criterion says about the planned temperature. */
export function verdictOf(criterion: WindowFindings["criteria"][number]): string {
  if (!criterion.assessed) return "not assessed";
  if (criterion.metAtProcess === null) return "not known";
  return criterion.metAtProcess ? "holds at Tp" : "fails at Tp";
}

/** A span of temperatures, its ends rounded inwards. */
export function spanText([low, high]: readonly [number, number]): string {
  return `${temperatureNumber(low, "up")} to ${temperatureText(high, "down")}`;
}

function spansText(spans: Spans): string {
  return spans.length === 0 ? "nowhere" : spans.map(spanText).join(" and ");
}

function endsSentence(window: WindowFindings): string {
  const { lower_K, upper_K, lowerSetBy, upperSetBy, lowest_K, highest_K } = window;
  if (lower_K === null || upper_K === null)
    return `Nothing is left between ${temperatureNumber(lowest_K)} and ${temperatureText(highest_K)}. ${window.conflict ?? ""}`.trim();
  const fails = (key: string) =>
    `“${window.criteria.find((each) => each.key === key)?.label ?? key}” does not hold`;
  const below =
    lowerSetBy === null || lowerSetBy === "lowest"
      ? "below was not studied"
      : `below, ${beyond[lowerSetBy]?.below ?? fails(lowerSetBy)}`;
  const above =
    upperSetBy === null || upperSetBy === "highest"
      ? "above was not studied"
      : `above, ${beyond[upperSetBy]?.above ?? fails(upperSetBy)}`;
  return `Between ${temperatureNumber(lower_K, "up")} and ${temperatureText(upper_K, "down")} every assessed criterion holds; ${below}; ${above}.`;
}

/** What the window is, what lies beyond its ends, and where the plan stands, in plain sentences. */
export function windowSentence({ temperatures }: Findings, window: WindowFindings): string {
  const band = window.controlBand_K > 0 ? ` ± ${differenceText(window.controlBand_K)}` : "";
  const plan = `The planned ${temperatureText(temperatures.process_K)}${band} is ${window.containsProcess ? "inside" : "OUTSIDE"}.`;
  const { cautious } = window;
  const careful =
    cautious === null
      ? ""
      : cautious.lower_K === null || cautious.upper_K === null
        ? " On the cautious side nothing is left."
        : ` On the cautious side ${spanText([cautious.lower_K, cautious.upper_K])} is left.`;
  const missing = window.criteria.filter((each) => each.binding && !each.assessed).map(({ label }) => label);
  const incomplete =
    missing.length === 0
      ? ""
      : ` Not assessed for want of data: ${missing.join(", ")}; the window is incomplete.`;
  return `${endsSentence(window)} ${plan}${careful}${incomplete}`;
}

/** The criteria and what they leave, as rows of a table. */
export function criteriaRows(window: WindowFindings): string[][] {
  const rows = window.criteria.map((each) => [
    meanings[each.key] === undefined ? each.label : `${each.label}: ${meanings[each.key]}`,
    each.assessed ? spansText(each.allowed) : "not assessed",
    each.cautious === null ? "not drawn" : spansText(each.cautious),
    `${verdictOf(each)}${each.probability === null ? "" : `, in ${percentText(each.probability, "down")} of the draws`}`,
  ]);
  const { lower_K, upper_K, cautious } = window;
  const nothing = "nothing";
  return [
    ...rows,
    [
      "what all of them leave",
      lower_K === null || upper_K === null ? nothing : spanText([lower_K, upper_K]),
      cautious === null
        ? "not drawn"
        : cautious.lower_K === null || cautious.upper_K === null
          ? nothing
          : spanText([cautious.lower_K, cautious.upper_K]),
      window.containsProcess ? "Tp inside" : "Tp OUTSIDE",
    ],
  ];
}
