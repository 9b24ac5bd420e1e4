import { drawnFindings } from "../../server/screening/drawn.js";
import { driverFindings } from "../../server/screening/drivers.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { td24 } from "../../server/thermal/td24.js";
import { studyOf } from "../../server/window/study.js";
import { temperatureWindow } from "../../server/window/window.js";
import { demo } from "./cases.js";
import { type Bench, type Line, ms, ratio } from "./measure.js";

/** A fixed piece of arithmetic, to tell a slow program from a busy machine. */
function reference(): number {
  let sum = 0;
  for (let i = 1; i <= 4_000_000; i += 1) sum += Math.exp(-1 / i) / (i + sum);
  return sum;
}

/** Least processor time of several calls, ms: what else runs on the machine hardly adds to it. */
function leastTime(call: () => unknown): number {
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < 25; i += 1) {
    const before = process.cpuUsage().user;
    call();
    least = Math.min(least, (process.cpuUsage().user - before) / 1000);
  }
  return least;
}

function drawing(name: string, work: typeof drawnFindings | typeof driverFindings = drawnFindings): number {
  const { model } = demo(name);
  const known = knownRates(model);
  const study = studyOf(realise(model, known, estimates), "draws");
  const window = temperatureWindow(study);
  const limit = study.runaway === null ? null : td24(study.runaway);
  return leastTime(() => work(model, known, { study, window, td24: limit }));
}

function within(what: string, least: number, loop: number, bound: number): Line {
  return {
    what,
    figure: `${ms(least)}, ${ratio(least, loop)} the reference loop`,
    bound: { text: `below ${ms(bound)}`, met: least < bound },
  };
}

/** 2,000 draws of everything but failures, on one core. */
export const drawsBench: Bench = {
  title: "2,000 draws of everything but failures (least processor time of several runs)",
  run() {
    const loop = leastTime(reference);
    return [
      { what: "reference loop of four million exponentials", figure: ms(loop) },
      within("batch (hydrolysis)", drawing("hydrolysis"), loop, 100),
      within("batch with an autocatalytic decomposition (ring closure)", drawing("ring-closure"), loop, 100),
      within("dosed (acylation)", drawing("acylation"), loop, 200),
    ];
  },
};

/** What moves the result: 500 draws of each input, on one core. */
export const driversBench: Bench = {
  title: "Drivers, 500 draws of each input (least processor time of several runs)",
  run() {
    const loop = leastTime(reference);
    return [
      within("batch (hydrolysis)", drawing("hydrolysis", driverFindings), loop, 300),
      within("batch, autocatalytic (ring closure)", drawing("ring-closure", driverFindings), loop, 300),
      within("dosed (acylation)", drawing("acylation", driverFindings), loop, 300),
    ];
  },
};
