import { describe, expect, test } from "vitest";
import { drawnFindings } from "../../server/screening/drawn.js";
import { knownRates } from "../../server/screening/known.js";
import type { CaseModel } from "../../server/screening/model.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { timeToMaximumRate } from "../../server/thermal/runaway.js";
import { td24 } from "../../server/thermal/td24.js";
import { createDraws } from "../../server/uncertainty/draws.js";
import { studyOf } from "../../server/window/study.js";
import { temperatureWindow } from "../../server/window/window.js";
import { documentOf, modelOf } from "./realised.js";

/** Every estimate of a model with a standard error in proportion to its value. */
function spread(part: unknown, relative: (value: number) => number | null): unknown {
  if (Array.isArray(part)) return part.map((each) => spread(each, relative));
  if (typeof part !== "object" || part === null) return part;
  if ("standardError" in part && "value" in part && typeof part.value === "number") {
    return { value: part.value, standardError: relative(part.value) };
  }
  return Object.fromEntries(Object.entries(part).map(([key, value]) => [key, spread(value, relative)]));
}

function drawnWith(model: CaseModel, draws: number): string {
  const known = knownRates(model);
  const study = studyOf(realise(model, known, estimates), "draws");
  const limit = study.runaway === null ? null : td24(study.runaway);
  const found = drawnFindings(
    model,
    known,
    { study, window: temperatureWindow(study), td24: limit },
    { draws },
  );
  return JSON.stringify(found, (_, value) =>
    typeof value === "number" && !Number.isFinite(value) ? "not finite" : value,
  );
}

describe("errors as large as the values themselves", () => {
  for (const name of ["batch-ring-closure", "semibatch-acylation", "batch-hydrolysis"]) {
    for (const size of [0.1, 1]) {
      test(`of ${size} times every value still give finite numbers: ${name}`, () => {
        const model = modelOf(documentOf(name));
        const wild = spread(model, (value) => size * Math.abs(value)) as CaseModel;
        expect(drawnWith({ ...wild, limits: model.limits }, 40)).not.toContain("not finite");
      });
    }
  }

  test("never draw a temperature at or below 0 K", () => {
    const model = modelOf(documentOf("semibatch-acylation"));
    const wild = spread(model, (value) => 2 * Math.abs(value)) as CaseModel;
    const draws = createDraws(200);
    for (let i = 0; i < draws.count; i += 1) {
      const { reaction, vessel, limits } = realise(wild, knownRates(wild), draws.sample(i));
      for (const temperature of [
        reaction.temperature,
        reaction.feed?.temperature ?? 0,
        vessel.coolantTemperature,
        vessel.gain?.ambient ?? 0,
        limits.maximumTechnicalTemperature,
      ]) {
        expect(temperature).toBeGreaterThan(0);
      }
    }
  });

  test("and a TMRad from below 0 K is no number, in finite time", () => {
    const { runaway } = studyOf(
      realise(
        modelOf(documentOf("semibatch-acylation")),
        knownRates(modelOf(documentOf("semibatch-acylation"))),
        estimates,
      ),
    );
    if (runaway === null) throw new Error("The acylation has a decomposition");
    expect(timeToMaximumRate(runaway, -50).time).toBeNaN();
  });
});
