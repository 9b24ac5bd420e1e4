import type { Findings } from "../screening/findings.js";
import type { CaseModel, DecompositionModel } from "../screening/model.js";
import { durationText, numberText, temperatureText } from "../words/numbers.js";
import { shortNumber } from "./shortNumber.js";
import { typeable, worked } from "./worked.js";
import type { Method } from "./working.js";

/** TMRad, T_D24 and the criticality class. */
export function runawayMethods(model: CaseModel, findings: Findings): Method[] {
  const { decomposition } = model;
  const methods: Method[] = [];
  const tmrad = findings.timeToMaximumRate;
  const { mtsr_K: mtsr, mtt_K: mtt, td24_K: td24, process_K: process } = findings.temperatures;
  if (decomposition !== null && tmrad !== null) {
    const time = (seconds: number | null) => (seconds === null ? "not assessed" : durationText(seconds));
    methods.push(
      {
        title: "Adiabatic time to maximum rate",
        equation: `TMRad = ∫ dα/(k_{d}(T) f(α)) from α_{0} to α*, T = T_{0} + ΔT_{ad,d} (α − α_{0}), ${lawText(decomposition)}; α* where k_{d} f is largest`,
        numbers: `from the process temperature ${temperatureText(process)}: ${time(tmrad.atProcess_s)}; from MTSR${mtsr === null ? "" : ` ${temperatureText(mtsr, "up")}`}: ${time(tmrad.atMtsr_s)}`,
        reference:
          "Quadrature of the heat balance; Townsend & Tou 1980, Thermochim. Acta 37:1; Keller et al. 1997, J. Loss Prev. Process Ind. 10:31",
      },
      {
        title: "The same in closed form, zero order",
        equation: "TMR_{ad,0} = c R T_{0}²/(q′ E_{a}), q′ = k_{d}(T_{0}) f(α_{0}) Q",
        numbers: `from the process temperature: ${time(tmrad.zeroOrderAtProcess_s)}${cautionText(tmrad.zeroOrderCautious)}`,
        worked: workedClosedForm(decomposition, findings),
        reference:
          "Semenov 1928, Z. Phys. 48:571; Townsend & Tou 1980. On the careful side only for order laws with E_{a} ΔT_{ad,d}/(R T_{0}²) ≥ n + 3",
      },
    );
  }
  if (td24 !== null) {
    methods.push({
      title: "T_D24",
      equation: "TMRad(T_{D24}) = 24 h, from fresh material (α_{0} = 0)",
      numbers: `T_{D24} = ${temperatureText(td24, "down")}`,
      reference: "Stoessel 2008, Thermal Safety of Chemical Processes",
    });
  }
  const { class: found } = findings.criticality;
  if (found !== null && mtsr !== null && td24 !== null) {
    methods.push({
      title: "Criticality class",
      equation:
        "none: T ≥ min(MTT, T_{D24}); 1: MTSR < MTT < T_{D24}; 2: MTSR < T_{D24} ≤ MTT; 3: MTT ≤ MTSR < T_{D24}; 4: MTT < T_{D24} ≤ MTSR; 5: T_{D24} ≤ MTT and T_{D24} ≤ MTSR",
      numbers: `T = ${temperatureText(process)}, MTSR = ${temperatureText(mtsr, "up")}, MTT = ${temperatureText(mtt, "down")}, T_{D24} = ${temperatureText(td24, "down")}: ${found === "none" ? "no class" : `class ${found}`}`,
      reference: "Stoessel 1993, Chem. Eng. Prog. 89(10):68; Stoessel 2008; ties go to the worse side",
    });
  }
  return methods;
}

/** Heat release rate of fresh material at the process temperature, and the time that it gives. */
function workedClosedForm({ heat, rateLaw }: DecompositionModel, findings: Findings): string[] {
  const { decompositionRate, timeToMaximumRate, heat: rises } = findings;
  const time = timeToMaximumRate?.zeroOrderAtProcess_s ?? null;
  if (decompositionRate === null || time === null || rises.decompositionRise_K === null) return [];
  const { k, temperature_K: T, apparentActivationEnergy_J_mol: Ea } = decompositionRate.atProcess;
  const f = rateLaw.model === "order" ? 1 : rateLaw.initiation.value;
  if (k === null || k * f === 0) return [];
  const q = k * f * heat.value;
  return [
    worked(
      "q′ = k_{d}(T_{0}) f(0) Q",
      { "k_{d}(T_{0})": k, "f(0)": f, Q: heat.value },
      `${typeable(q)} W/kg`,
    ),
    worked(
      "TMR_{ad,0} = c R T_{0}²/(q′ E_{a})",
      { c: heat.value / rises.decompositionRise_K, "T_{0}": T, "q′": q, "E_{a}": Ea },
      `${numberText(time, 4)} s = ${durationText(time)}`,
    ),
  ];
}

function lawText({ rateLaw }: DecompositionModel): string {
  const order = shortNumber(rateLaw.order.value);
  return rateLaw.model === "order"
    ? `f = (1 − α)^{n}, n = ${order}`
    : `f = (1 − α)^{n} (w + α^{m}), n = ${order}, m = ${shortNumber(rateLaw.productOrder.value)}, w = ${shortNumber(rateLaw.initiation.value)}`;
}

function cautionText(cautious: boolean | null): string {
  if (cautious === null) return "";
  return cautious ? " (on the careful side here)" : " (NOT on the careful side here)";
}
