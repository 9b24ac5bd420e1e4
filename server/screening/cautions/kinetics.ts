import { diffusionLimit, extrapolation, formsApart, viscosityOfWater } from "../../kinetics/plausibility.js";
import { arrheniusAt, lnRateConstant, type ModifiedArrhenius } from "../../kinetics/rateConstant.js";
import { differenceText, numberText, percentText, temperatureText } from "../../words/numbers.js";
import type { Caution } from "../findings.js";
import type { KnownRate } from "../known.js";
import type { CaseModel } from "../model.js";
import { caution } from "./catalogue.js";

/** A rate constant of the case and how it is used. */
export interface UsedRate {
  readonly pointer: string;
  /** "the desired reaction" or "the decomposition" */
  readonly of: string;
  readonly parameters: NonNullable<CaseModel["decomposition"]>["rateConstant"];
  readonly known: KnownRate;
  readonly rate: ModifiedArrhenius;
  /** overall order */
  readonly order: number;
  /** two different reactants meet in the rate law */
  readonly twoReactants: boolean;
  /** named temperatures at which it is used, K */
  readonly usedAt: readonly { readonly name: string; readonly temperature: number }[];
}

/**
 * Cautions on one rate constant: plausibility, extrapolation, errors that cannot be used.
 *
 * @param used rate constant
 * @param process planned temperature, K
 */
export function kineticsCautions(used: UsedRate, process: number): Caution[] {
  return [
    ...barrierCautions(used),
    ...entropyCautions(used, process),
    ...diffusionCautions(used, process),
    ...rangeCautions(used, process),
    ...errorCautions(used),
  ];
}

function barrierCautions({ pointer, of, rate }: UsedRate): Caution[] {
  const odd = rate.temperaturePower === 0 ? rate.activationEnergy < 0 : rate.activationEnergy <= 0;
  if (!odd) return [];
  const what = rate.temperaturePower === 0 ? "activation energy" : "activation enthalpy";
  const text = `The ${what} of ${of} is ${numberText(rate.activationEnergy / 1000)} kJ/mol. It is usually positive: check its sign and unit.`;
  return [caution("BARRIER_ODD", pointer, text)];
}

function entropyCautions(
  { pointer, of, parameters, rate, order, twoReactants }: UsedRate,
  process: number,
): Caution[] {
  const cautions: Caution[] = [];
  const entropy = entropyOf(parameters, rate, order, process);
  if (twoReactants && order > 1 && entropy !== null && entropy > 0) {
    cautions.push(
      caution(
        "ENTROPY_ODD",
        pointer,
        `The activation entropy of ${of} is ${numberText(entropy)} J/(mol K). Where two reactants meet in one complex it is usually negative: check the standard concentration.`,
      ),
    );
  }
  if (order === 1) {
    const decades = arrheniusAt(rate, process).lnPreExponential / Math.LN10;
    if (decades < 10 || decades > 16) {
      cautions.push(
        caution(
          "ENTROPY_ODD",
          pointer,
          `The first-order pre-exponential factor of ${of} is 10^${decades.toFixed(1)} 1/s; 10^10 to 10^16 1/s is usual.`,
        ),
      );
    }
  }
  return cautions;
}

/** For the typed or fitted standard concentration; other forms are compared at 1 mol/L. */
function entropyOf(
  parameters: UsedRate["parameters"],
  rate: ModifiedArrhenius,
  order: number,
  process: number,
): number | null {
  if (parameters.form === "eyring") return parameters.activationEntropy.value;
  const arrhenius = arrheniusAt(rate, process);
  const gas = 8.31446261815324;
  const bare = Math.log((1.380649e-23 * process) / 6.62607015e-34) + (1 - order) * Math.log(1000);
  return gas * (arrhenius.lnPreExponential - 1 - bare);
}

function diffusionCautions({ pointer, of, parameters, rate, order }: UsedRate, process: number): Caution[] {
  if (order !== 2) return [];
  const typed = "viscosity" in parameters ? parameters.viscosity : null;
  const viscosity = typed ?? viscosityOfWater(process);
  const limit = diffusionLimit(process, viscosity);
  if (lnRateConstant(rate, process) <= Math.log(limit)) return [];
  const medium = typed === null ? "in water" : "at the viscosity given";
  return [
    caution(
      "DIFFUSION_LIMIT",
      pointer,
      `The second-order rate constant of ${of} at the process temperature is above ${numberText(limit * 1000)} L/(mol s), the fastest that two species can meet ${medium}.`,
    ),
  ];
}

function rangeCautions(
  { pointer, of, parameters, known, rate, usedAt }: UsedRate,
  process: number,
): Caution[] {
  const range = known.fittedRange;
  if (range === null) {
    if (parameters.form === "heatRate" || parameters.form === "td24") {
      return [
        caution(
          "NO_RANGE",
          pointer,
          `The kinetics of ${of} rest on one point and an activation energy: no range of temperature is known in which they were seen to hold.`,
        ),
      ];
    }
    return [
      caution("NO_RANGE", pointer, `No fitted range is given for ${of}: extrapolation cannot be judged.`),
    ];
  }
  const cautions: Caution[] = [];
  for (const side of [-1, 1]) {
    const worst = usedAt
      .map((use) => ({ ...use, beyond: extrapolation(use.temperature, range) * side }))
      .filter((use) => use.beyond > 0)
      .sort((a, b) => b.beyond - a.beyond)[0];
    if (worst === undefined) continue;
    const where = side < 0 ? "below" : "above";
    const measured = `${temperatureText(range[0])} to ${temperatureText(range[1])}`;
    const plain =
      worst.beyond >= 40
        ? " Nothing measured says that the same rate law holds so far out; measure nearer to it."
        : "";
    cautions.push(
      caution(
        "EXTRAPOLATED",
        pointer,
        `The kinetics of ${of}, fitted from ${measured}, are used at ${worst.name} (${temperatureText(worst.temperature)}), ${differenceText(worst.beyond, "up", 0)} ${where} that range.${plain}`,
        worst.beyond < 10 ? "note" : "warn",
      ),
    );
  }
  const apart = formsApart(rate, (range[0] + range[1]) / 2, process);
  if (Math.abs(Math.expm1(apart)) > 0.1) {
    cautions.push(
      caution(
        "FORMS_PART",
        pointer,
        `At the process temperature Eyring's and Arrhenius' equations through the same data for ${of} differ by ${percentText(Math.abs(Math.expm1(apart)), "up")}: the data do not say which holds.`,
      ),
    );
  }
  return cautions;
}

function errorCautions({ pointer, of, known }: UsedRate): Caution[] {
  const cautions: Caution[] = [];
  const { pair, fit, fittedRange } = known;
  if (fit !== null) {
    const { curvatureP } = fit[fit.fitAs];
    if (curvatureP !== null && curvatureP < 0.05) {
      cautions.push(
        caution(
          "CURVED_FIT",
          pointer,
          `The rate constants of ${of} bend against the fitted line (p = ${numberText(curvatureP, 2)}): one rate law does not hold over their whole range.`,
        ),
      );
    }
  }
  if (pair === null || !pair.errorsTyped) return cautions;
  if (pair.basis === "none") {
    cautions.push(
      caution(
        "CORRELATION_DOUBTFUL",
        pointer,
        `Standard errors are given for ${of}, but neither the correlation of the two parameters nor the fitted range and the number of points to rebuild it: no interval can be given, and the draws leave these errors out.`,
      ),
    );
  }
  if (pair.basis === "typed" && fittedRange !== null) {
    const least = pair.leastAt;
    if (least === null || least < fittedRange[0] || least > fittedRange[1]) {
      const where = least === null ? "at no temperature" : `at ${temperatureText(least)}`;
      cautions.push(
        caution(
          "CORRELATION_DOUBTFUL",
          pointer,
          `The errors and the correlation of ${of} make k most certain ${where}, outside the fitted range: the three numbers were rounded or do not belong together.`,
        ),
      );
    }
  }
  if (pair.interceptRatio !== null && (pair.interceptRatio > 1.5 || pair.interceptRatio < 1 / 1.5)) {
    cautions.push(
      caution(
        "CORRELATION_DOUBTFUL",
        pointer,
        `The two standard errors of ${of} do not fit its range and number of points: the one of the intercept should be ${numberText(pair.interceptRatio, 2)} times what is given.`,
      ),
    );
  }
  return cautions;
}
