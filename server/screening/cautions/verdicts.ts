import { durationText, numberText, percentText, powerText, temperatureText } from "../../words/numbers.js";
import type { Caution, Findings, WindowFindings } from "../findings.js";
import { criterionLabel } from "../labels.js";
import { caution } from "./catalogue.js";
import { listed } from "./inputs.js";

/** The findings that the verdicts below read. */
export type Judged = Pick<
  Findings,
  "temperatures" | "criticality" | "cooling" | "window" | "timeToMaximumRate"
>;

/** What the screening knows besides the findings themselves. */
export interface JudgedWith {
  readonly coolant_K: number;
  readonly decompositionKnown: boolean;
  /** a rate constant is there, but the isothermal balance could not be integrated */
  readonly dosingFailed: boolean;
  /** the decomposition's rate falls from the start, at the process temperature or at MTSR */
  readonly noAcceleration: boolean;
  /** TMRad from the process temperature with the hold's history over the fresh one; null without one */
  readonly historyRatio: number | null;
}

/**
 * Cautions that follow from the findings: limits, class, cooling, window, TMRad.
 *
 * @param judged findings
 * @param extra what they do not hold
 */
export function verdictCautions(judged: Judged, extra: JudgedWith): Caution[] {
  return [
    ...limitCautions(judged, extra),
    ...coolingCautions(judged, extra),
    ...windowCautions(judged.window),
    ...tmradCautions(judged, extra),
  ];
}

const classText = {
  CLASS_5:
    "Criticality class 5: after a cooling failure the decomposition is set off before the technical limit can stop it. Cooling, an emergency measure or another process are asked for; nothing must be left to evaporation alone.",
  CLASS_4:
    "Criticality class 4: after a cooling failure the technical limit is reached and the decomposition could be set off. The technical measure (evaporation, venting) must be shown to work.",
  CLASS_3:
    "Criticality class 3: after a cooling failure the technical limit is reached. The technical measure (evaporation, venting) or a backup of the cooling must be shown to work.",
} as const;

function limitCautions({ temperatures, criticality }: Judged, extra: JudgedWith): Caution[] {
  const cautions: Caution[] = [];
  const { process_K: process, mtt_K: mtt, td24_K: td24 } = temperatures;
  const limit = Math.min(mtt, td24 ?? Number.POSITIVE_INFINITY);
  if (process >= limit) {
    const name = limit === mtt ? "MTT" : "T_D24";
    cautions.push(
      caution(
        "PROCESS_ABOVE_LIMIT",
        "/reaction/temperature",
        `The process temperature ${temperatureText(process, "up")} is not below ${name}, ${temperatureText(limit, "down")}.`,
      ),
    );
  }
  const { class: found } = criticality;
  if (found === 3 || found === 4 || found === 5) {
    const code = `CLASS_${found}` as const;
    cautions.push(caution(code, "", classText[code]));
  }
  if (!extra.decompositionKnown) {
    cautions.push(
      caution(
        "NOT_ASSESSED",
        "/decomposition",
        "No decomposition data: criticality class, T_D24 and TMRad are not assessed. That none was seen is no proof that there is none.",
      ),
    );
  } else if (td24 === null) {
    cautions.push(
      caution(
        "NOT_COMPUTED",
        "/decomposition",
        "T_D24 lies outside −93 to 527 °C (180 to 800 K) or does not exist for these kinetics: it is not given, and no class either.",
      ),
    );
  }
  return cautions;
}

function coolingCautions({ cooling, temperatures }: Judged, extra: JudgedWith): Caution[] {
  if (extra.dosingFailed) {
    return [
      caution(
        "NOT_COMPUTED",
        "/reaction",
        "The balance of the dosing could not be integrated with these kinetics: accumulation, MTSR, cooling and window are not given. Check orders, amounts and the rate constant.",
      ),
    ];
  }
  if (cooling === null) return [];
  const cautions: Caution[] = [];
  if (extra.coolant_K > temperatures.process_K) {
    cautions.push(
      caution(
        "COOLANT_HEATS",
        "/vessel/coolant/temperature",
        `The coolant (${temperatureText(extra.coolant_K)}) is warmer than the contents (${temperatureText(temperatures.process_K)}): it heats.`,
      ),
    );
  }
  if (cooling.duty_W > cooling.capacity_W) {
    cautions.push(
      caution(
        "CANNOT_HOLD",
        "/reaction/temperature",
        `The cooling duty ${powerText(cooling.duty_W, "up")} exceeds the full capacity ${powerText(cooling.capacity_W, "down")}: the process temperature cannot be held.`,
      ),
    );
  }
  if (cooling.stabilityRatio >= 1) {
    cautions.push(
      caution(
        "UNSTABLE",
        "/vessel",
        `The stability ratio is ${numberText(cooling.stabilityRatio)}: with a constant coolant the vessel does not steady itself at the process temperature, it relies on its controller.`,
      ),
    );
  }
  return cautions;
}

function windowCautions(window: WindowFindings | null): Caution[] {
  if (window === null) return [];
  const cautions: Caution[] = [];
  if (window.lower_K === null || window.upper_K === null) {
    cautions.push(
      caution(
        "WINDOW_EMPTY",
        "",
        `No temperature meets every assessed criterion. ${window.conflict ?? ""}`.trim(),
      ),
    );
  } else if (!window.containsProcess) {
    const failing = window.criteria
      .filter((each) => each.binding && each.metAtProcess === false)
      .map((each) => `“${criterionLabel(each.key)}”`);
    const why = failing.length > 0 ? ` At the planned temperature ${listed(failing)} fails.` : "";
    cautions.push(
      caution(
        "OUTSIDE_WINDOW",
        "/reaction/temperature",
        `The planned temperature lies outside the window of ${temperatureText(window.lower_K, "up")} to ${temperatureText(window.upper_K, "down")}.${why}`,
      ),
    );
  }
  const open = window.criteria.filter((each) => each.binding && !each.assessed);
  if (open.length > 0) {
    const names = listed(open.map((each) => `“${criterionLabel(each.key)}”`));
    cautions.push(
      caution("NOT_ASSESSED", "", `Not assessed for want of data: ${names}. The window is incomplete.`),
    );
  }
  return cautions;
}

function tmradCautions({ timeToMaximumRate: tmrad }: Judged, extra: JudgedWith): Caution[] {
  if (tmrad === null) return [];
  const cautions: Caution[] = [];
  const { atProcess_s: numeric, zeroOrderAtProcess_s: closed } = tmrad;
  if (numeric !== null && closed !== null && closed > numeric * (1 + 1e-9)) {
    cautions.push(
      caution(
        "CLOSED_FORM_UNSAFE",
        "/decomposition/rateLaw",
        `The closed form gives ${durationText(closed)} at the process temperature, longer than the ${durationText(numeric)} of the full kinetics: it must not be used here.`,
      ),
    );
  }
  if (extra.noAcceleration) {
    cautions.push(
      caution(
        "NO_ACCELERATION",
        "/decomposition",
        "The adiabatic rate of the decomposition falls from the start: there is no maximum to run towards, and the closed form stands in for TMRad.",
      ),
    );
  }
  if (extra.historyRatio !== null && extra.historyRatio < 0.9) {
    cautions.push(
      caution(
        "HISTORY",
        "/limits/availableTime",
        `Held for the available time at the process temperature, the mixture's TMRad is ${percentText(1 - extra.historyRatio, "up")} shorter than that of fresh material: thermal history counts here.`,
      ),
    );
  }
  return cautions;
}
