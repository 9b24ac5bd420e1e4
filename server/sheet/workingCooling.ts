import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import {
  differenceText,
  durationText,
  numberText,
  percentText,
  powerText,
  temperatureText,
} from "../words/numbers.js";
import { shortNumber } from "./shortNumber.js";
import { typeable, worked } from "./worked.js";
import type { Method } from "./working.js";

/** Cooling, window, failures and draws. */
export function coolingMethods(model: CaseModel, findings: Findings): Method[] {
  const methods: Method[] = [];
  if (findings.cooling !== null) methods.push(capacity(model, findings.cooling), stability(findings.cooling));
  if (findings.window !== null) methods.push(window(model, findings.window));
  if (findings.failures !== null && findings.failures.length > 0) methods.push(failures(model));
  if (findings.uncertainty !== null) methods.push(draws(findings.uncertainty));
  return methods;
}

type Cooling = NonNullable<Findings["cooling"]>;

function capacity({ vessel, reaction }: CaseModel, found: Cooling): Method {
  const { flowing, temperature } = vessel.coolant;
  const ua = `UA = ${shortNumber(vessel.heatTransferCoefficient.value)} W/(m² K) × ${shortNumber(vessel.heatTransferArea.value)} m²`;
  const w =
    flowing === null
      ? ""
      : `, w = ${shortNumber(flowing.flow.value)} kg/s × ${shortNumber(flowing.heatCapacity.value / 1000)} kJ/(kg K)`;
  return {
    title: "Cooling at scale",
    equation: `${flowing === null ? "UA_{e} = UA (constant jacket temperature)" : "UA_{e} = UA w/(UA + w), w = coolant flow × c_{p}"}; capacity = UA_{e} (T − T_{c}); duty = largest of r V (−ΔH_{r}) + m Q k_{d} f(α) − feed cooling, plus the agitator`,
    numbers: `${ua}${w}, T = ${temperatureText(reaction.temperature.value)}, T_{c} = ${temperatureText(temperature.value)}: capacity ${powerText(found.capacity_W, "down")}, duty ${powerText(found.duty_W, "up")}${found.use === null ? "" : `, use ${percentText(found.use, "up")}`}`,
    worked: workedCapacity(vessel, reaction.temperature.value, found.capacity_W),
    reference:
      "Heat balance of a stirred jacket; losses to the surroundings are not credited (common practice)",
  };
}

function workedCapacity(vessel: CaseModel["vessel"], T: number, found: number): string[] {
  const { flowing, temperature } = vessel.coolant;
  const U = vessel.heatTransferCoefficient.value;
  const S = vessel.heatTransferArea.value;
  const ua = U * S;
  const w = flowing === null ? null : flowing.flow.value * flowing.heatCapacity.value;
  const effective = w === null ? ua : (ua * w) / (ua + w);
  const perKelvin = (value: number) => `${typeable(value)} W/K`;
  const lines = [worked("UA = U A", { U, A: S }, perKelvin(ua))];
  if (flowing !== null && w !== null) {
    const coolant = { flow: flowing.flow.value, "c_{p}": flowing.heatCapacity.value };
    lines.push(
      worked("w = flow × c_{p}", coolant, perKelvin(w)),
      worked("UA_{e} = UA w/(UA + w)", { UA: ua, w }, perKelvin(effective)),
    );
  }
  const values = { "UA_{e}": effective, T, "T_{c}": temperature.value };
  return [...lines, worked("capacity = UA_{e} (T − T_{c})", values, powerText(found, "down"))];
}

function stability(found: Cooling): Method {
  return {
    title: "Stability",
    equation: "stability ratio = (dq_{net}/dT)/UA_{e}, stable below 1",
    numbers: `${numberText(found.stabilityRatio)}${found.noReturn_K === null ? "" : `; no return from ${temperatureText(found.noReturn_K, "down")}`}${found.criticalCoolant_K === null ? "" : `; critical coolant temperature ${temperatureText(found.criticalCoolant_K, "down")}`}`,
    reference: "Semenov 1928, Z. Phys. 48:571; van Heerden 1953, Ind. Eng. Chem. 45:1242",
  };
}

function window({ limits }: CaseModel, found: NonNullable<Findings["window"]>): Method {
  return {
    title: "Temperature window",
    equation:
      "Intersection over T ± control band of: time to the target conversion ≤ available time; duty ≤ allowed use × capacity; MTSR < MTT; TMRad from MTSR ≥ minimum; TMRad from T ≥ minimum (both with the α that the hold leaves)",
    numbers: `target conversion ${percentText(limits.targetConversion)}, available time ${durationText(limits.availableTime)}, allowed use ${percentText(limits.coolingUse)}, minimum TMRad ${durationText(limits.minimumTimeToMaximumRate)}, band ± ${differenceText(found.controlBand_K)}, looked at from ${temperatureText(found.lowest_K)} to ${temperatureText(found.highest_K)}`,
    reference: "Gygax 1988; Stoessel 2008. Stability is advisory and takes no part in the intersection",
  };
}

function failures({ limits }: CaseModel): Method {
  return {
    title: "Cooling failures and time to act",
    equation:
      "C′ dT/dt = r V (−ΔH_{r}) + m Q k_{d} f(α) + feed c_{p} (T_{feed} − T) + P_{agitator} − UA (T − T_{j}) + heat gain; holdup c_{p} dT_{j}/dt = UA (T − T_{j}) − w (T_{j} − T_{c})",
    numbers: `lost: T reaches MTT, or α reaches ${percentText(limits.decompositionAllowed)}, or T still rises at the end; time to act: the largest delay before which every restoring of full cooling keeps the batch`,
    reference:
      "Heat balance; Hairer & Wanner, Solving ODEs II (implicit integration); watched for 24 h after the last change",
  };
}

function draws(found: NonNullable<Findings["uncertainty"]>): Method {
  return {
    title: "Uncertainty",
    equation: "Latin hypercube over every input with a standard error; percentiles by linear interpolation",
    numbers: `${found.draws} draws, seed ${found.seed}`,
    reference: "McKay, Beckman & Conover 1979, Technometrics 21:239",
  };
}
