import { describe, expect, test } from "vitest";
import { realise } from "../../server/screening/realise.js";
import { createCoverage } from "../../server/uncertainty/coverage.js";
import { createDraws } from "../../server/uncertainty/draws.js";
import { criteria } from "../../server/window/criteria/all.js";
import type { Criterion } from "../../server/window/criterion.js";
import { narrowBy, spansWhere } from "../../server/window/spans.js";
import { studyOf } from "../../server/window/study.js";
import { cautiousOf, type DrawnCase, drawnCase, probabilityOf } from "./drawnCase.js";
import { changed, type Document, documentOf } from "./realised.js";

const ring = documentOf("batch-ring-closure");
const acylation = documentOf("semibatch-acylation");

function altered(document: Document, changes: Readonly<Record<string, unknown>>): Document {
  return Object.entries(changes).reduce((made, [path, value]) => changed(made, path, value), document);
}

/** A ring closure diluted until something is left of its window on the cautious side. */
const diluted = altered(ring, {
  "/reaction/reactants/A/amount": "0.25 kmol",
  "/limits/availableTime": "60 h",
  "/limits/controlBand": "1.5 K",
});

/** Draws of `count` in which all criteria hold at a set point and over its band, each evaluated directly. */
function countHolding(
  { model, known }: DrawnCase,
  count: number,
  set: number,
  holding: readonly Criterion[],
): number {
  const draws = createDraws(count);
  const band = model.limits.controlBand;
  let holds = 0;
  for (let i = 0; i < count; i += 1) {
    const study = studyOf(realise(model, known, draws.sample(i)));
    const met = (at: number): boolean => holding.every((each) => each.margin(study, at) >= 0);
    if ((band === 0 || (met(set - band) && met(set + band))) && met(set)) holds += 1;
  }
  return holds;
}

describe("the cautious end by brute force", () => {
  test("of the whole window of a batch: 20,000 draws, all criteria together, evaluated directly", () => {
    const opened = drawnCase(diluted);
    const count = 20_000;
    const found = opened.draw({ draws: count }).window?.cautious;
    const [lower, upper] = found ?? [0, 0];
    expect(upper - lower).toBeGreaterThan(1);
    expect(upper - lower).toBeLessThan(
      (opened.window.chosen?.[1] ?? 0) - (opened.window.chosen?.[0] ?? 0) - 1,
    );
    const all = criteria.filter((criterion) => criterion.binding && criterion.assessable(opened.study));
    expect(all).toHaveLength(5);
    const part = (set: number): number => countHolding(opened, count, set, all) / count;
    // Never wider than what holds in 95 of 100 draws, and not by more than 0.02 K narrower.
    expect(part(upper)).toBeGreaterThanOrEqual(0.95);
    expect(part(upper + 0.02)).toBeLessThan(0.95);
    expect(part(lower)).toBeGreaterThanOrEqual(0.95);
    expect(part(lower - 0.02)).toBeLessThan(0.95);
  });

  test("of MTSR below MTT of a dosed case: 4,000 draws, each integrated", () => {
    const opened = drawnCase(acylation);
    const count = 4000;
    const [span] = cautiousOf(opened.draw({ draws: count }), "mtsr-mtt") ?? [];
    const upper = span?.[1] ?? 0;
    const only = criteria.filter((criterion) => criterion.key === "mtsr-mtt");
    expect(countHolding(opened, count, upper, only) / count).toBeGreaterThanOrEqual(0.95);
    expect(countHolding(opened, count, upper + 0.02, only) / count).toBeLessThan(0.95);
  });

  test("of the cooling where the recipe carries errors too: 200 draws, each integrated", () => {
    const opened = drawnCase(
      altered(acylation, {
        "/reaction/reactants/A/amount": { value: "2.9 kmol", standardError: "0.05 kmol" },
        "/reaction/feed/duration": { value: "3 h", standardError: "5 min" },
        "/mixture/mass": { value: "1450 kg", standardError: "20 kg" },
      }),
    );
    const count = 200;
    const [span] = cautiousOf(opened.draw({ draws: count }), "cooling") ?? [];
    const lower = span?.[0] ?? 0;
    const only = criteria.filter((criterion) => criterion.key === "cooling");
    expect(countHolding(opened, count, lower, only) / count).toBeGreaterThanOrEqual(0.95);
    expect(countHolding(opened, count, lower - 0.02, only) / count).toBeLessThan(0.95);
  });
});

describe("the cautious sides", () => {
  test("lie within what the estimates allow, criterion by criterion and together", () => {
    for (const document of [ring, diluted, acylation, documentOf("batch-hydrolysis")]) {
      const opened = drawnCase(document);
      const found = opened.draw({ draws: 500 });
      for (const lane of opened.window.lanes) {
        for (const [low, high] of cautiousOf(found, lane.criterion.key) ?? []) {
          expect(lane.allowed.some(([from, to]) => from <= low && high <= to)).toBe(true);
        }
      }
      const cautious = found.window?.cautious ?? null;
      if (cautious !== null) {
        expect(opened.window.parts.some(([from, to]) => from <= cautious[0] && cautious[1] <= to)).toBe(true);
      }
    }
  });

  test("agree with a search of the whole range in every draw to 0.02 K", () => {
    const opened = drawnCase(diluted);
    const count = 300;
    const found = opened.draw({ draws: count });
    const draws = createDraws(count);
    const { lowestTemperature: low, highestTemperature: high, controlBand: band } = opened.model.limits;
    const coverages = criteria.map(() => createCoverage());
    for (let i = 0; i < count; i += 1) {
      const study = studyOf(realise(opened.model, opened.known, draws.sample(i)), "draws");
      criteria.forEach((criterion, j) => {
        const held = spansWhere((at) => criterion.margin(study, at), low - band, high + band);
        coverages[j]?.add(narrowBy(held, band, low, high));
      });
    }
    criteria.forEach((criterion, j) => {
      const searched = coverages[j]?.coveredBy(0.95 * count) ?? [];
      const followed = cautiousOf(found, criterion.key) ?? [];
      expect(followed).toHaveLength(searched.length);
      followed.forEach(([from, to], k) => {
        expect(Math.abs(from - (searched[k]?.[0] ?? 0))).toBeLessThan(0.02);
        expect(Math.abs(to - (searched[k]?.[1] ?? 0))).toBeLessThan(0.02);
      });
    });
  });

  test("a criterion's probability at the planned temperature is the count of draws that hold there", () => {
    const opened = drawnCase(altered(diluted, { "/reaction/temperature": "78 degC" }));
    const found = opened.draw({ draws: 400 });
    for (const criterion of criteria) {
      const counted = countHolding(opened, 400, 351.15, [criterion]) / 400;
      expect(probabilityOf(found, criterion.key)).toBeCloseTo(counted, 9);
    }
  });

  test("hold for a planned temperature outside the study as well", () => {
    const opened = drawnCase(altered(diluted, { "/limits/highestTemperature": "70 degC" }));
    const found = opened.draw({ draws: 400 });
    const hold = criteria.filter((criterion) => criterion.key === "hold");
    expect(probabilityOf(found, "hold")).toBeCloseTo(countHolding(opened, 400, 358.15, hold) / 400, 9);
  });

  test("the percentiles of the upper end are null only where too many draws leave no window", () => {
    expect(drawnCase(ring).draw({ draws: 200 }).uncertainty.upper_K).toEqual({
      p05: null,
      p50: null,
      p95: null,
    });
    const { upper_K } = drawnCase(acylation).draw({ draws: 200 }).uncertainty;
    const { p05, p50, p95 } = upper_K ?? { p05: null, p50: null, p95: null };
    expect(p05 ?? 0).toBeLessThan(p50 ?? 0);
    expect(p50 ?? 0).toBeLessThan(p95 ?? 0);
  });
});
