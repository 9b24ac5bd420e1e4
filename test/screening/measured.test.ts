import { describe, expect, test } from "vitest";
import { screen } from "../../server/screening/screen.js";
import { changed, documentOf, modelOf } from "./realised.js";

const acylation = documentOf("semibatch-acylation");

/** Released parts of an invented calorimetric run at the planned temperature: 20 % lag behind the feed. */
const run = {
  temperature: "35 degC",
  rows: [
    { time: "1 h", releasedFraction: 0.2 },
    { time: "2 h", releasedFraction: 0.5 },
    { time: "3 h", releasedFraction: 0.8 },
    { time: "6 h", releasedFraction: 1 },
  ],
};

function findingsOf(document: unknown) {
  return screen(modelOf(document), { digest: "", depth: "quick" });
}

describe("a measured accumulation", () => {
  const alone = changed(
    changed(acylation, "/reaction/rateConstant", undefined),
    "/reaction/measuredAccumulation",
    run,
  );

  test("alone gives MTSR by min(fed/stoichiometric, 1) - released, worked by hand", () => {
    const findings = findingsOf(alone);
    // Stoichiometric at 3 h x 2.9/3.05 = 2.852459 h; released there 0.5 + 0.3 x 0.852459 = 0.755738.
    expect(findings.accumulation?.maximumFraction).toBeCloseTo(1 - 0.7557377, 6);
    expect(findings.accumulation?.at_s).toBeCloseTo(2.852459 * 3600, 2);
    // At 2 h: fed 0.701149, released 0.5, C = 1450 x 1950 + 280 x 1800 J/K; at the stoichiometric point
    // 0.2442623 and 1450 x 1950 + 399.3443 x 1800.
    const heat = 2900 * 118e3;
    const rise = (0.2442623 * heat) / (1450 * 1950 + 399.3443 * 1800);
    expect(findings.temperatures.mtsr_K).toBeCloseTo(308.15 + rise, 3);
  });

  test("alone gives no window and says so", () => {
    const findings = findingsOf(alone);
    expect(findings.window).toBeNull();
    expect(findings.rate).toBeNull();
    expect(findings.criticality.class).toBe(1);
    const text = findings.cautions.filter((each) => each.code === "NOT_ASSESSED").map((each) => each.text);
    expect(text.join(" ")).toMatch(/it gives MTSR, but no window/);
  });

  test("beside kinetics the larger MTSR is used and named, in the window too", () => {
    const both = findingsOf(changed(acylation, "/reaction/measuredAccumulation", run));
    const kinetic = findingsOf(acylation);
    expect(both.accumulation?.usedFor).toBe("measured");
    expect(both.accumulation?.maximumFraction).toBeCloseTo(kinetic.accumulation?.maximumFraction ?? 0, 9);
    expect(both.temperatures.mtsr_K).toBeCloseTo(both.accumulation?.measured?.mtsr_K ?? 0, 9);
    expect(both.window?.upper_K).toBeLessThan((kinetic.window?.upper_K ?? 0) - 5);
    expect(both.cautions.map((each) => each.code)).toContain("MEASURED_ACCUMULATION");
  });

  test("that shows less than the kinetics changes nothing", () => {
    const quick = {
      ...run,
      rows: [
        { time: "1 h", releasedFraction: 0.34 },
        { time: "3 h", releasedFraction: 1 },
      ],
    };
    const both = findingsOf(changed(acylation, "/reaction/measuredAccumulation", quick));
    expect(both.accumulation?.usedFor).toBe("kinetics");
    expect(both.temperatures.mtsr_K).toBe(findingsOf(acylation).temperatures.mtsr_K);
  });

  test("of another temperature is shown, not used, and says so", () => {
    const colder = { ...run, temperature: "20 degC" };
    const both = findingsOf(changed(acylation, "/reaction/measuredAccumulation", colder));
    expect(both.temperatures.mtsr_K).toBe(findingsOf(acylation).temperatures.mtsr_K);
    const text = both.cautions.find((each) => each.code === "MEASURED_ACCUMULATION")?.text;
    expect(text).toMatch(/20\.0 °C, the planned temperature is 35\.0 °C.*shown, not used/);
  });
});
