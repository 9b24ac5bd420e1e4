import type { DecompositionRate } from "../kinetics/parameters.js";
import { largestLawValue } from "../kinetics/rateLaw.js";
import { gasConstant } from "../numeric/constants.js";
import type { Findings, RateFindings } from "../screening/findings.js";
import type { CaseModel, DecompositionModel } from "../screening/model.js";
import { numberText, temperatureText } from "../words/numbers.js";
import { shortNumber } from "./shortNumber.js";
import { worked } from "./worked.js";
import type { Method } from "./working.js";

/** Rate constants of the reaction and of the decomposition at the process temperature. */
export function rateMethods(model: CaseModel, findings: Findings): Method[] {
  const methods: Method[] = [];
  if (model.reaction.rateConstant !== null && findings.rate !== null) {
    methods.push(rateMethod("Rate constant of the reaction", model.reaction.rateConstant, findings.rate));
  }
  if (model.decomposition !== null && findings.decompositionRate !== null) {
    const { rateConstant } = model.decomposition;
    const method = rateMethod("Rate constant of the decomposition", rateConstant, findings.decompositionRate);
    methods.push({ ...method, worked: [...referenceLine(model.decomposition), ...(method.worked ?? [])] });
  }
  return methods;
}

const eyring = {
  equation: "k = κ (k_{B} T/h) c_{0}^{1−n} exp(ΔS‡/R) exp(−ΔH‡/(R T))",
  reference: "Eyring 1935, J. Chem. Phys. 3:107; Laidler & King 1983, J. Phys. Chem. 87:2657",
};
const arrhenius = {
  equation: "k = A exp(−E_{a}/(R T))",
  reference: "Arrhenius 1889, Z. Phys. Chem. 4:226; IUPAC Gold Book, “Arrhenius equation”",
};
const reference = {
  equation: "k = k_{ref} exp(−E_{a}/R (1/T − 1/T_{ref}))",
  reference: "Arrhenius 1889, Z. Phys. Chem. 4:226, re-centred",
};

function rateMethod(title: string, rate: DecompositionRate, found: RateFindings): Method {
  const { equation, reference: source } = sourceOf(rate);
  const { atProcess } = found;
  const k =
    atProcess.k === null ? "beyond the range of numbers" : `${numberText(atProcess.k)} ${atProcess.unit}`;
  const at = `T = ${numberText(atProcess.temperature_K, 5)} K`;
  return {
    title,
    equation,
    numbers: `${parametersText(rate, found)}; ${at}: k = ${k}`,
    worked: atProcess.k === null ? [] : [workedRate(rate, found, k)],
    reference: source,
  };
}

/** Every form comes down to one of three equations. */
function workedRate(rate: DecompositionRate, found: RateFindings, result: string): string {
  const T = found.atProcess.temperature_K;
  const form = rate.form === "table" ? rate.fitAs : rate.form;
  if (form === "eyring") {
    const pair = found.eyring;
    const values = {
      κ: pair.transmissionCoefficient,
      "c_{0}": pair.standardConcentration_mol_m3,
      n: "order" in rate ? rate.order : 1,
      "ΔS‡": pair.activationEntropy_J_molK,
      "ΔH‡": pair.activationEnthalpy_J_mol,
      T,
    };
    return worked(eyring.equation, values, result);
  }
  const { lnPreExponential, activationEnergy_J_mol: Ea } = found.arrhenius;
  if (form === "arrhenius") {
    // Written with ln A, because A itself may be beyond the range of numbers.
    return worked("k = exp(ln A − E_{a}/(R T))", { "ln A": lnPreExponential, "E_{a}": Ea, T }, result);
  }
  const at = rate.form === "td24" ? rate.temperature.value : "at" in rate ? rate.at.value : T;
  const kRef = Math.exp(lnPreExponential - Ea / (gasConstant * at));
  return worked(reference.equation, { "k_{ref}": kRef, "E_{a}": Ea, T, "T_{ref}": at }, result);
}

/** k_ref from a heat release rate, where that was given. */
function referenceLine({ heat, rateLaw, rateConstant }: DecompositionModel): string[] {
  if (rateConstant.form !== "heatRate") return [];
  const f = largestLawValue({
    autocatalytic: rateLaw.model === "autocatalytic",
    order: rateLaw.order.value,
    productOrder: rateLaw.productOrder.value,
    initiation: rateLaw.initiation.value,
  });
  const q = rateConstant.heatReleaseRate.value;
  const result = `${numberText(q / (heat.value * f), 4)} s⁻¹`;
  return [worked("k_{ref} = q′/(Q f_{ref})", { "q′": q, Q: heat.value, "f_{ref}": f }, result)];
}

function sourceOf(rate: DecompositionRate): {
  equation: string;
  reference: string;
} {
  switch (rate.form) {
    case "eyring":
      return eyring;
    case "arrhenius":
      return arrhenius;
    case "reference":
      return reference;
    case "table":
      return {
        equation: `Least squares of ${rate.fitAs === "eyring" ? "ln(k/T)" : "ln k"} on 1/T, centred; then ${(rate.fitAs === "eyring" ? eyring : arrhenius).equation}`,
        reference: (rate.fitAs === "eyring" ? eyring : arrhenius).reference,
      };
    case "heatRate":
      return {
        equation: `${reference.equation}, k_{ref} = q′/(Q f_{ref})`,
        reference: `${reference.reference}; k_{ref} from the heat release rate: common practice`,
      };
    case "td24":
      return {
        equation: `${reference.equation}, k_{ref} such that TMRad from the given temperature is 24 h`,
        reference: `${reference.reference}; TMRad is inversely proportional to k_{ref}`,
      };
  }
}

function parametersText(rate: DecompositionRate, found: RateFindings): string {
  const kJ = (joules: number) => `${shortNumber(joules / 1000)} kJ/mol`;
  switch (rate.form) {
    case "eyring":
      return eyringText(found);
    case "arrhenius":
      return arrheniusText(found);
    case "table": {
      const used = rate.rows.filter((row) => row.leftOut === null).length;
      const pair = rate.fitAs === "eyring" ? eyringText(found) : arrheniusText(found);
      return `${used} of ${rate.rows.length} rows fitted: ${pair}`;
    }
    case "reference":
      return `k_{ref} = ${shortNumber(rate.rateConstant.value)} ${found.atProcess.unit} at ${temperatureText(rate.at.value)}, E_{a} = ${kJ(rate.activationEnergy.value)}`;
    case "heatRate":
      return `q′ = ${shortNumber(rate.heatReleaseRate.value)} W/kg at ${temperatureText(rate.at.value)}, E_{a} = ${kJ(rate.activationEnergy.value)}`;
    case "td24":
      return `T_{D24} = ${temperatureText(rate.temperature.value)}, E_{a} = ${kJ(rate.activationEnergy.value)}`;
  }
}

function eyringText({ eyring: pair }: RateFindings): string {
  return `κ = ${shortNumber(pair.transmissionCoefficient)}, c_{0} = ${shortNumber(pair.standardConcentration_mol_m3)} mol/m³, ΔS‡ = ${shortNumber(pair.activationEntropy_J_molK)} J/(mol K), ΔH‡ = ${shortNumber(pair.activationEnthalpy_J_mol / 1000)} kJ/mol`;
}

function arrheniusText({ arrhenius: pair, atProcess }: RateFindings): string {
  return `ln A = ${numberText(pair.lnPreExponential, 5)} (A in ${atProcess.unit}), E_{a} = ${shortNumber(pair.activationEnergy_J_mol / 1000)} kJ/mol`;
}
