import { runToHorizon } from "../../failure/run.js";
import { startAt } from "../../failure/start.js";
import { createVessel } from "../../failure/vessel.js";
import { fromReference, lnRateConstant } from "../../kinetics/rateConstant.js";
import { rateOverK } from "../../thermal/reactionRate.js";
import type { CheckGroup } from "./check.js";
import { plainStep } from "./plainStep.js";

const kilocalorie = 4184;
const perMinute = kilocalorie / 60;
/** m^3 of the charge */
const volume = 5.119;
const [amountA, amountB] = [9044.8, 33_000];
const rate = fromReference(Math.log(0.00017 / 1000 / 60), 461, 11_273 * 4.184);

const step = plainStep(
  {
    temperature: 448,
    amountA,
    b: { amount: amountB, order: 1, perA: 2 },
    heat: -590 * kilocalorie,
    rate,
  },
  { ua: 35.83 * perMinute, coolantTemperature: 298 },
  // Its own walls included: 2504 kcal/K.
  { mass: 2504, density: 2504 / volume, heatCapacity: kilocalorie, thermalInertia: 1 },
  { maximumTechnicalTemperature: 538.15 },
);

interface End {
  readonly temperature: number;
  readonly conversion: number;
}

/** State after ten minutes without cooling that begin 45 min into the batch. */
function endOfInterruption(): End | null {
  const vessel = createVessel(step, rate, step.reaction.temperature);
  const start = vessel === null ? null : startAt(vessel.contents, vessel.hold, 45 * 60);
  if (vessel === null || start === null) return null;
  const changes = [
    { after: 0, coolantFlow: 0 },
    { after: 600, coolantFlow: 1 },
  ];
  const timeline = { name: "", at: 0, startTemperature: null, horizon: null, response: null, changes };
  const run = runToHorizon(vessel, start, timeline, "mixed", 1e-8);
  return {
    temperature: vessel.contents.reference + run.trajectory.component(600, 0, true),
    conversion: run.trajectory.component(600, 1, true),
  };
}

function ofEnd(figure: (end: End) => number): () => number {
  return () => {
    const end = endOfInterruption();
    return end === null ? Number.NaN : figure(end);
  };
}

/** kcal/min */
function released({ temperature, conversion }: End): number {
  const left = rateOverK(
    step.reaction,
    amountA * (1 - conversion),
    amountB - 2 * amountA * conversion,
    volume,
  );
  return (Math.exp(lnRateConstant(rate, temperature)) * left * -step.reaction.heat) / perMinute;
}

const rounding = "the book rounds its rate constant, which shifts its conversions by up to 1.5 %";

/** A cooling failure in a textbook, worked there by hand and by computer. */
export const interruption: CheckGroup = {
  kind: "published",
  fromMemory: false,
  title: "Ten minutes without cooling, o-nitrochlorobenzene and ammonia at 175 °C",
  source:
    "Fogler, Elements of Chemical Reaction Engineering, 3rd ed., Example 9-2, pp. 574 and 576; volume from memory",
  checks: [
    {
      what: "temperature at their end",
      printed: "467.992",
      unit: "K",
      within: { apart: 0.2, because: rounding },
      compute: ofEnd((end) => end.temperature),
    },
    {
      what: "conversion at their end",
      printed: "0.0423866",
      unit: "",
      within: { apart: 0.02 * 0.0423866, because: rounding },
      compute: ofEnd((end) => end.conversion),
    },
    {
      what: "heat released at their end",
      printed: "6591",
      unit: "kcal/min",
      within: { apart: 0.02 * 6591, because: rounding },
      compute: ofEnd(released),
    },
    {
      what: "heat that full cooling takes at their end",
      printed: "6093",
      unit: "kcal/min",
      within: { apart: 1e-3 * 6093, because: "it follows the temperature" },
      compute: ofEnd((end) => (step.vessel.ua * (end.temperature - 298)) / perMinute),
    },
  ],
};
