import type { Estimate } from "../../numeric/estimate.js";
import { probabilitySentence } from "../../uncertainty/probabilitySentence.js";
import { temperatureText } from "../../words/numbers.js";
import type { Caution, UncertaintyFindings, WindowFindings } from "../findings.js";
import type { KnownRate, KnownRates } from "../known.js";
import type { CaseModel } from "../model.js";
import { realise } from "../realise.js";
import { caution } from "./catalogue.js";

/**
 * Cautions on the errors themselves: larger than their value, or given and not used.
 *
 * @param model parsed case
 * @param known fits and covariances of its rate constants
 */
export function errorCautions(model: CaseModel, known: KnownRates): Caution[] {
  return [
    ...largeErrors(model, known),
    ...unusedErrors("/reaction/rateConstant", "the desired reaction", known.reaction),
    ...unusedErrors("/decomposition/rateConstant", "the decomposition", known.decomposition),
  ];
}

function largeErrors(model: CaseModel, known: KnownRates): Caution[] {
  const pointers: string[] = [];
  const look = (pointer: string, { value, standardError }: Estimate): number => {
    if (value > 0 && (standardError ?? 0) > value) pointers.push(pointer);
    return value;
  };
  realise(model, known, { normal: look, logNormal: look, pair: () => [0, 0] });
  return pointers.map((pointer) => {
    const note = model.inputs.find((input) => input.pointer === pointer);
    const named =
      note === undefined
        ? `The standard error of ${pointer} is larger than its value`
        : `The standard error of the ${note.label}, ${note.standardErrorText}, is larger than its value, ${note.text}`;
    const text = `${named}: check both. Draws then spread it over orders of magnitude, and the cautious sides with it.`;
    return caution("LARGE_ERROR", pointer, text);
  });
}

function unusedErrors(pointer: string, of: string, known: KnownRate | null): Caution[] {
  if (known?.fit?.errorsUnused !== true) return [];
  const text = `Some rate constants of ${of} carry an error and others none: all weigh the same in the fit, and these errors are not used.`;
  return [caution("ERRORS_UNUSED", pointer, text)];
}

/**
 * The caution that the planned temperature lies in the window at the estimates but not on its cautious side.
 *
 * @param window with its cautious side
 * @param uncertainty the draws behind it; null without draws
 * @param process planned temperature, K
 */
export function cautiousSideCautions(
  window: WindowFindings | null,
  uncertainty: UncertaintyFindings | null,
  process: number,
): Caution[] {
  const cautious = window?.cautious ?? null;
  if (window === null || cautious === null || uncertainty === null || !window.containsProcess) return [];
  const { lower_K: lower, upper_K: upper } = cautious;
  if (lower !== null && upper !== null && lower <= process && process <= upper) return [];
  const side =
    lower === null || upper === null
      ? "no temperature meets all criteria in 95 of 100 draws"
      : `all criteria hold together in 95 of 100 draws only from ${temperatureText(lower, "up")} to ${temperatureText(upper, "down")}`;
  const failing = window.criteria.flatMap(({ binding, probability, label }) =>
    binding && probability !== null && probability < 1
      ? [` ${probabilitySentence(label, probability, uncertainty.draws, process)}`]
      : [],
  );
  return [
    caution(
      "OUTSIDE_CAUTIOUS_SIDE",
      "/reaction/temperature",
      `The planned temperature, ${temperatureText(process)}, is inside the window at the estimates but not on its cautious side: ${side}.${failing.join("")}`,
    ),
  ];
}
