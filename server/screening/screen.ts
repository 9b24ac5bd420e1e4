import { criticalityClass } from "../thermal/criticality.js";
import { doseAt } from "../thermal/dosing.js";
import { carefulTimeToMaximumRate } from "../thermal/history.js";
import { timeToMaximumRate } from "../thermal/runaway.js";
import type { Step } from "../thermal/step.js";
import { td24 } from "../thermal/td24.js";
import { drawnIsothermal } from "../uncertainty/drawnIsothermal.js";
import { type Study, studyOf } from "../window/study.js";
import { temperatureWindow } from "../window/window.js";
import { program } from "../words/program.js";
import { byLevel } from "./cautions/catalogue.js";
import { inputCautions } from "./cautions/inputs.js";
import { kineticsCautions } from "./cautions/kinetics.js";
import { cautiousSideCautions, errorCautions } from "./cautions/uncertainty.js";
import { verdictCautions } from "./cautions/verdicts.js";
import { drawnFindings, windowWithDraws } from "./drawn.js";
import { failuresWithDraws } from "./drawnFailures.js";
import { driverFindings } from "./drivers.js";
import { failureFindings } from "./failureFindings.js";
import type { Caution, Findings } from "./findings.js";
import { type KnownRates, knownRates } from "./known.js";
import { measuredCautions, measuredFindings, measuredOf, withMeasured } from "./measured.js";
import type { CaseModel } from "./model.js";
import { nextMeasurements } from "./nextMeasurement.js";
import { notice } from "./notice.js";
import { ignored, type Progress, partOf } from "./progress.js";
import { rateFindings } from "./rateFindings.js";
import { estimates, realise } from "./realise.js";
import {
  accumulationFindings,
  coolingFindings,
  heatFindings,
  temperatureFindings,
  tmradFindings,
} from "./thermalFindings.js";
import { usedRates } from "./usedRates.js";
import { windowFindings } from "./windowFindings.js";
import { workingsOf } from "./workings.js";

export interface ScreenOptions {
  /** sha256 of the case in canonical JSON */
  readonly digest: string;
  /** quick: everything but failures and draws */
  readonly depth: "quick" | "full";
  /** called now and then with the part that is done, 0 to 1 and never falling; what it throws ends the work */
  readonly onProgress?: Progress;
}

/**
 * Screens a parsed case.
 *
 * @param model parsed case, SI
 * @param options digest of the case, depth of the work, progress
 * @returns findings: every number finite or null
 */
export function screen(model: CaseModel, options: ScreenOptions): Findings {
  const { onProgress = ignored } = options;
  onProgress(0);
  const known = withMeasured(model, knownRates(model));
  const step = realise(model, known, estimates);
  const study = studyOf(step, "draws");
  const process = step.reaction.temperature;
  const { runaway } = study;
  const { rate } = step.reaction;
  const dosing = rate === null ? null : doseAt(step, rate, process);
  const measured = measuredOf(model, step);
  const rise = dosing?.rise.value ?? measured?.rise.value ?? null;
  const mtsr = rise === null ? null : process + rise;
  const t24 = runaway === null ? null : td24(runaway);
  const temperatures = temperatureFindings(step, mtsr, t24);
  const kinetic = dosing === null ? null : accumulationFindings(step, dosing);
  const accumulation = measuredFindings(step, kinetic, measured, model);
  const span = curveSpan(step, mtsr, t24);
  const timeToMaximumRate = tmradFindings(runaway, process, mtsr, span);
  const cooling = dosing === null ? null : coolingFindings(step, dosing);
  const full = options.depth === "full";
  const allowed = rate === null ? null : temperatureWindow(study);
  onProgress(partDone.estimates);
  const nominal = {
    study,
    window: allowed,
    td24: t24,
    ...(full ? { isothermal: drawnIsothermal(step) } : {}),
  };
  const drawn = full
    ? drawnFindings(model, known, nominal, {
        onProgress: partOf(onProgress, partDone.estimates, partDone.draws),
      })
    : null;
  const drivers = full
    ? driverFindings(model, known, nominal, {
        onProgress: partOf(onProgress, partDone.draws, partDone.drivers),
      })
    : null;
  const window = allowed === null ? null : windowWithDraws(windowFindings(study, allowed, full), drawn);
  const simulated = full
    ? failureFindings(step, model.failures, partOf(onProgress, partDone.drivers, partDone.failures))
    : null;
  const failed =
    simulated === null
      ? null
      : failuresWithDraws(model, known, simulated, partOf(onProgress, partDone.failures, 1));
  const criticality: Findings["criticality"] = {
    class: mtsr === null || t24 === null ? null : criticalityClass(process, mtsr, temperatures.mtt_K, t24),
    probability: drawn?.criticalityProbability ?? null,
  };
  const judged = { temperatures, criticality, cooling, window, timeToMaximumRate };
  const workings = workingsOf(model);
  const cautions: Caution[] = [
    ...verdictCautions(judged, {
      coolant_K: step.vessel.coolantTemperature,
      decompositionKnown: runaway !== null,
      dosingFailed: rate !== null && dosing === null,
      noAcceleration: !accelerates(study, mtsr),
      historyRatio: historyRatio(study),
    }),
    ...cautiousSideCautions(window, drawn?.uncertainty ?? null, process),
    ...usedRates(model, known, step, temperatures).flatMap((used) => kineticsCautions(used, process)),
    ...measuredCautions(model, step, dosing),
    ...(failed?.cautions ?? []),
    ...workings.flatMap((working) => working.cautions),
    ...inputCautions(model),
    ...errorCautions(model, known),
  ];
  return {
    format: "thermal-window/findings-1",
    notice,
    program,
    digest: options.digest,
    ...ratesOf(model, known, step, span),
    heat: heatFindings(step, runaway),
    accumulation,
    temperatures,
    timeToMaximumRate,
    criticality,
    cooling,
    window,
    failures: failed?.failures ?? null,
    uncertainty:
      drawn === null
        ? null
        : {
            ...drawn.uncertainty,
            timeToAct_s: failed?.timeToAct ?? null,
            drivers,
            nextMeasurement: nextMeasurements(model, known, temperatures),
          },
    workings,
    cautions: byLevel(cautions),
  };
}

/** What is done of a full screening after each of its first parts, by the time that they usually take. */
const partDone = { estimates: 0.02, draws: 0.15, drivers: 0.25, failures: 0.5 };

/** Temperatures over which curves are drawn: the study, and what the case can reach. */
function curveSpan(step: Step, mtsr: number | null, t24: number | null): readonly [number, number] {
  const { lowestTemperature, highestTemperature } = step.limits;
  const process = step.reaction.temperature;
  return [
    Math.min(lowestTemperature, process, t24 ?? process),
    Math.max(highestTemperature, process, mtsr ?? process, t24 ?? process),
  ];
}

function ratesOf(
  model: CaseModel,
  known: KnownRates,
  step: Step,
  span: readonly [number, number],
): Pick<Findings, "rate" | "decompositionRate"> {
  const { rateConstant, temperature } = model.reaction;
  const { lowestTemperature, highestTemperature } = step.limits;
  const order = step.reaction.orderA + (step.reaction.b?.order ?? 0);
  return {
    rate:
      rateConstant === null || known.reaction === null || step.reaction.rate === null
        ? null
        : rateFindings(rateConstant, known.reaction, step.reaction.rate, order, temperature.value, [
            lowestTemperature,
            highestTemperature,
          ]),
    decompositionRate:
      model.decomposition === null || known.decomposition === null || step.decomposition === null
        ? null
        : rateFindings(
            model.decomposition.rateConstant,
            known.decomposition,
            step.decomposition.rate,
            1,
            temperature.value,
            span,
          ),
  };
}

function accelerates(study: Study, mtsr: number | null): boolean {
  const { runaway, step } = study;
  if (runaway === null) return true;
  return [step.reaction.temperature, mtsr ?? step.reaction.temperature].every(
    (temperature) => timeToMaximumRate(runaway, temperature).accelerates,
  );
}

function historyRatio(study: Study): number | null {
  const { runaway, step } = study;
  if (runaway === null) return null;
  const process = step.reaction.temperature;
  const fresh = timeToMaximumRate(runaway, process).time;
  const careful = carefulTimeToMaximumRate(runaway, process, study.heldAt(process));
  return Number.isFinite(fresh) && fresh > 0 ? careful / fresh : null;
}
