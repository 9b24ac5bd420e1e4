import { describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { startingPoints } from "../../server/failure/startingPoints.js";
import { documentOf } from "../screening/realised.js";
import { assessed, caseOf } from "./running.js";

const nothingKnown = { processTemperature: null, coolantTemperature: null, mass: null };
const cases = [
  { name: "semibatch-acylation", operation: "semibatch", count: 8 },
  { name: "batch-ring-closure", operation: "batch", count: 7 },
] as const;

describe.each(cases)("failures to begin with, in a $operation case", ({ name, operation, count }) => {
  const { step } = caseOf(name);
  const known = {
    operation,
    processTemperature: step.reaction.temperature,
    coolantTemperature: step.vessel.coolantTemperature,
    mass: step.mixture.mass,
  };

  test("are offered, those on a feed only where there is one", () => {
    const points = startingPoints(known);
    expect(points).toHaveLength(count);
    expect(new Set(points.map((point) => point.key)).size).toBe(count);
  });

  test("are accepted as they stand, and can be run", () => {
    for (const filled of [known, { operation, ...nothingKnown }]) {
      const failures = startingPoints(filled).map((point) => point.failure);
      const read = readCase({ ...documentOf(name), failures });
      if (!read.ok) throw new Error(JSON.stringify(read.faults));
      for (const failure of read.model.failures) {
        const { run } = assessed(step, failure);
        expect(Number.isFinite(run.peak.value)).toBe(true);
      }
    }
  });

  test("are filled in from the case", () => {
    const cold = startingPoints(known).find((point) => point.key === "started-cold");
    const degrees = Math.round(step.reaction.temperature - 273.15 - 15);
    expect(cold?.failure.startTemperature).toBe(`${degrees} degC`);
  });
});
