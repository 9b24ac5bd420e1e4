import type { Step } from "../thermal/step.js";
import type { UsedRate } from "./cautions/kinetics.js";
import type { Findings } from "./findings.js";
import type { KnownRates } from "./known.js";
import type { CaseModel } from "./model.js";

/**
 * The rate constants of a case and the temperatures at which its findings rest on them.
 *
 * @param model parsed case
 * @param known fits of its rate constants
 * @param step at the estimates
 * @param temperatures of the findings
 */
export function usedRates(
  model: CaseModel,
  known: KnownRates,
  step: Step,
  temperatures: Findings["temperatures"],
): UsedRate[] {
  const used: UsedRate[] = [];
  const { rateConstant } = model.reaction;
  const process = { name: "the process temperature", temperature: temperatures.process_K };
  if (rateConstant !== null && known.reaction !== null && step.reaction.rate !== null) {
    used.push({
      pointer: "/reaction/rateConstant",
      of: "the desired reaction",
      parameters: rateConstant,
      known: known.reaction,
      rate: step.reaction.rate,
      order: step.reaction.orderA + (step.reaction.b?.order ?? 0),
      twoReactants: step.reaction.b !== null,
      usedAt: [process],
    });
  }
  if (model.decomposition !== null && known.decomposition !== null && step.decomposition !== null) {
    const named = [
      { name: "T_D24", temperature: temperatures.td24_K },
      { name: "MTSR", temperature: temperatures.mtsr_K },
    ];
    used.push({
      pointer: "/decomposition/rateConstant",
      of: "the decomposition",
      parameters: model.decomposition.rateConstant,
      known: known.decomposition,
      rate: step.decomposition.rate,
      order: 1,
      twoReactants: false,
      usedAt: [
        process,
        ...named.flatMap(({ name, temperature }) => (temperature === null ? [] : [{ name, temperature }])),
      ],
    });
  }
  return used;
}
