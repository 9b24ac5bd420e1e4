import type { Caution } from "../findings.js";
import type { CaseModel } from "../model.js";
import { caution } from "./catalogue.js";

/** Inputs that a figure of the findings depends on enough to miss their errors. */
const thatMatter = [
  "/mixture/heatCapacity",
  "/reaction/heat",
  "/decomposition/heat",
  "/vessel/heatTransferCoefficient",
];

/**
 * Cautions on how the inputs are known: no standard error, assumed, an error larger than its value, no band.
 *
 * @param model parsed case
 */
export function inputCautions(model: CaseModel): Caution[] {
  const cautions: Caution[] = [];
  const missing = model.inputs
    .filter((input) => thatMatter.includes(input.pointer) && input.standardErrorText === null)
    .map((input) => input.label);
  missing.push(...pairsWithoutErrors(model));
  if (missing.length > 0) {
    const text = `No standard error is given for ${listed(missing)}: intervals, window and probabilities treat ${missing.length === 1 ? "it" : "them"} as exact.`;
    cautions.push(caution("NO_ERRORS", "", text));
  }
  const assumed = model.inputs.filter((input) => input.basis === "assumed").map((input) => input.label);
  if (assumed.length > 0) {
    cautions.push(caution("ASSUMED_INPUT", "", `Assumed, not measured: ${listed(assumed)}.`));
  }
  if (!model.limits.controlBandGiven) {
    cautions.push(
      caution(
        "NO_BAND",
        "/limits/controlBand",
        "No control band is given: the window holds for the set point alone, and what the controller lets swing about it is not covered.",
      ),
    );
  }
  if (model.mixture.thermalInertia.value > 1) {
    cautions.push(
      caution(
        "INERTIA",
        "/mixture/thermalInertia",
        "The thermal inertia is above 1. It slows the simulated failures only; adiabatic rises, MTSR and TMRad are for 1, the cautious side.",
      ),
    );
  }
  cautions.push(
    caution(
      "PRESSURE",
      "",
      "Gas release, vapour pressure and relief are not assessed; they can raise the severity.",
    ),
  );
  return cautions;
}

function pairsWithoutErrors(model: CaseModel): string[] {
  const rates = [
    { of: "the desired reaction", parameters: model.reaction.rateConstant },
    { of: "the decomposition", parameters: model.decomposition?.rateConstant ?? null },
  ];
  return rates.flatMap(({ of, parameters }) => {
    if (parameters === null || parameters.form === "table") return [];
    const barrier =
      parameters.form === "eyring" ? parameters.activationEnthalpy : parameters.activationEnergy;
    return barrier.standardError === null ? [`the activation parameters of ${of}`] : [];
  });
}

/** "a, b and c". */
export function listed(words: readonly string[]): string {
  if (words.length < 2) return words.join("");
  return `${words.slice(0, -1).join(", ")} and ${words[words.length - 1]}`;
}
