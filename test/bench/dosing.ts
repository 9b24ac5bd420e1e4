import { lnRateConstant } from "../../server/kinetics/rateConstant.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { volumeOf } from "../../server/thermal/balance.js";
import { doseAt } from "../../server/thermal/dosing.js";
import { studyOf } from "../../server/window/study.js";
import { temperatureWindow } from "../../server/window/window.js";
import { integrateWithOdex } from "../published/odex.js";
import { demo } from "./cases.js";
import { type Bench, below, ms, ratio, time } from "./measure.js";

/** The isothermal dosing of the acylation demo, beside odex on the same balance, and its window over 80 K. */
export const dosingBench: Bench = {
  title: "Dosing and window (acylation demo)",
  run() {
    const { model } = demo("acylation");
    const step = realise(model, knownRates(model), estimates);
    const { rate, temperature, feed, amountA, b } = step.reaction;
    if (rate === null || feed === null || b === null) throw new Error("The demo is dosed");
    const k = Math.exp(lnRateConstant(rate, temperature));
    const balance = (t: number, [nA = 0, nB = 0]: number[]): number[] => {
      const reacting = (k * nA * nB) / volumeOf(step, (feed.mass * t) / feed.duration);
      return [-reacting, b.amount / feed.duration - reacting];
    };
    const odex = (tolerance: number) =>
      integrateWithOdex(balance, 0, [amountA, 0], feed.duration, tolerance, amountA * tolerance * 1e-2);
    const exact = odex(1e-13).y[0] ?? 0;
    const ours = doseAt(step, rate, temperature);
    const error = Math.abs((1 - (ours?.endExtent ?? 0)) * amountA - exact) / amountA;
    const theirError = Math.abs((odex(1e-8).y[0] ?? 0) - exact) / amountA;
    const oursTime = time(() => doseAt(step, rate, temperature) ?? 0);
    const theirs = time(() => odex(1e-8), 0.5);
    return [
      below(`isothermal dosing with MTSR, error ${error.toExponential(0)} of the recipe`, oursTime, 0.5),
      {
        what: `  odex, the balance alone, error ${theirError.toExponential(0)}`,
        figure: `${ms(theirs.median)}, ${ratio(theirs.median, oursTime.median)} as long`,
      },
      below(
        "window over 80 K",
        time(() => temperatureWindow(studyOf(step, "draws"))),
        30,
      ),
    ];
  },
};
