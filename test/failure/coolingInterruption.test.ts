import { describe, expect, test } from "vitest";
import { fullSearch } from "../../server/failure/judgement.js";
import { runToHorizon } from "../../server/failure/run.js";
import { startAt } from "../../server/failure/start.js";
import { savedBy, timeToAct } from "../../server/failure/timeToAct.js";
import type { Step } from "../../server/thermal/step.js";
import { assessed, caseOf, rateOf, runFrom, temperatureAt, timelineOf, vesselFor } from "./running.js";

// Fogler, Elements of Chemical Reaction Engineering, 3rd ed., Example 9-2, pages 574 and 576 (later editions 13-2):
// o-nitrochlorobenzene and ammonia at 175 degC, held for 45 min, then ten minutes without cooling. The book rounds k,
// which shifts its conversions by up to 1.5 %.
const { step, failures } = caseOf("published-oncb");
const [interruption] = failures;
const vessel = vesselFor(step, interruption);
const [heldFor, withoutCooling] = [2700, 600];
const kilocaloriePerMinute = 4184 / 60;

describe("the published ten minutes without cooling", () => {
  const run = runFrom(vessel, interruption, heldFor);
  const state = new Float64Array(vessel.contents.system.size);
  run.trajectory.evaluate(withoutCooling, state, true);
  const temperature = temperatureAt(vessel, run, withoutCooling);

  test("after 45 min at constant temperature 3.3 % has reacted (from memory)", () => {
    expect(Math.abs((vessel.hold.extentAt(heldFor) ?? 0) / 0.033 - 1)).toBeLessThan(0.02);
  });

  test("end at 467.992 K", () => {
    expect(Math.abs(temperature - 467.992)).toBeLessThan(0.2);
  });

  test("end at the conversion 0.0423866", () => {
    expect(Math.abs(state[1] / 0.0423866 - 1)).toBeLessThan(0.02);
  });

  test("end with 6,591 kcal/min released against 6,093 kcal/min removed, and 0.2 degC/min", () => {
    const removed = step.vessel.ua * (temperature - step.vessel.coolantTemperature);
    const leg = run.legs[0];
    vessel.contents.enter(leg.time, leg.charge, leg.conditions, 1);
    const released = vessel.contents.heatToRemove(withoutCooling, state);
    expect(Math.abs(removed / kilocaloriePerMinute / 6093 - 1)).toBeLessThan(1e-3);
    expect(Math.abs(released / kilocaloriePerMinute / 6591 - 1)).toBeLessThan(0.02);
    const rise = ((released - removed) / vessel.contents.heatCapacity(withoutCooling)) * 60;
    expect(rise).toBeCloseTo(0.2, 1);
  });

  test("are too long: the batch is lost although the cooling comes back", () => {
    expect(run.loss?.by).toBe("mtt");
  });

  test("come 44 s too late: the time to act is 555.6 s (independent implementation)", () => {
    expect(assessed(step, interruption).timeToAct).toBeGreaterThan(555.564 - 1);
    expect(assessed(step, interruption).timeToAct).toBeLessThan(555.564 + 0.01);
  });
});

describe("the usual charge of the same example, 3.17 kmol with 43 kmol of ammonia", () => {
  // Heat capacities of the book: 40, 18 and 8.38 cal/(mol K). Its volume lies between those of the aqueous ammonia
  // alone and of the larger charge, and the verdict does not depend on it.
  const heatCapacity = (3.17 * 40 + 103.7 * 18 + 43 * 8.38) * 4184;
  test.each([3.2, 4, 5.119])("holds through the same ten minutes, in %d m3", (volume) => {
    const usual: Step = {
      ...step,
      mixture: { mass: 1, density: 1 / volume, heatCapacity, thermalInertia: 1 },
      reaction: {
        ...step.reaction,
        amountA: 3170,
        b: { amount: 43_000, order: 1, perA: 2 },
      },
    };
    expect(rateOf(usual)).toBe(rateOf(step));
    expect(assessed(usual, interruption).verdict).toBe("holds");
  });
});

// A quench of 300 kg at 600 s into the same batch; independent implementation.
describe("a quench that makes the good delays two intervals", () => {
  const quench = { mass: 300, heatCapacity: 2000, density: 1000, temperature: 298.15 };
  const timeline = timelineOf([
    { after: 0, coolantFlow: 0 },
    { after: 600, quench },
  ]);
  const start = startAt(vessel.contents, vessel.hold, heldFor);
  if (start === null) throw new Error("No start");
  const run = runToHorizon(vessel, start, timeline, "mixed", 1e-8);

  test.each([540, 552, 601, 700, 800])("cooling restored after %d s saves the batch", (delay) => {
    expect(savedBy(vessel, run, "restore", delay, "before", 1e-7)).toBe(true);
  });

  test.each([558, 580, 599, 600, 1000, 1200])("cooling restored after %d s does not", (delay) => {
    expect(savedBy(vessel, run, "restore", delay, "before", 1e-7)).toBe(false);
  });

  test("right after the quench the batch can be saved, right before it cannot", () => {
    expect(savedBy(vessel, run, "restore", 600, "before", 1e-7)).toBe(false);
    expect(savedBy(vessel, run, "restore", 600, "after", 1e-7)).toBe(true);
  });

  test("the time to act stays the first end, about 555 s", () => {
    const found = timeToAct(vessel, [run], "restore", fullSearch);
    expect(found).toBeGreaterThan(554.5);
    expect(found).toBeLessThan(555.6);
  });

  test("a scan too coarse to meet the gap still sees it before the quench", () => {
    expect(timeToAct(vessel, [run], "restore", { ...fullSearch, scan: 1 })).toBeCloseTo(555.3, 0);
  });
});
