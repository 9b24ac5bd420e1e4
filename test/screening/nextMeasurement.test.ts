import { describe, expect, test } from "vitest";
import { knownRates } from "../../server/screening/known.js";
import { nextMeasurements } from "../../server/screening/nextMeasurement.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

function nextOf(document: unknown, td24_K: number | null = 361) {
  const model = modelOf(document);
  return nextMeasurements(model, knownRates(model), {
    process_K: model.reaction.temperature.value,
    mtsr_K: null,
    mtt_K: 400,
    td24_K,
    allAtOnce_K: null,
  });
}

const ring: Document = documentOf("batch-ring-closure");
const pair = "/decomposition/rateConstant";

describe("the rate constant to measure next", () => {
  test("of a fitted table is taken to be as good as the fit's scatter, within the fitted range", () => {
    const { reaction } = nextOf(ring);
    expect(reaction?.relativeErrorFrom).toBe("fit");
    // 85 degC lies above the range, so the hottest measurement tells most.
    expect(reaction?.matters_K).toBeCloseTo(358.15, 9);
    expect(reaction?.at_K).toBeCloseTo(351.15, 9);
    expect(reaction?.deviationThen).toBeLessThan(reaction?.deviationNow ?? 0);
  });

  test("of a typed pair is taken to be good to 5 %", () => {
    const { decomposition } = nextOf(ring);
    expect(decomposition?.relativeErrorFrom).toBe("assumed");
    expect(decomposition?.relativeError).toBe(0.05);
    expect(decomposition?.range_K?.map((each) => Math.round(each))).toEqual([413, 463]);
    expect(decomposition?.why).toBeNull();
  });

  test("lies nowhere below the best place on its curve", () => {
    for (const next of Object.values(nextOf(ring))) {
      const least = Math.min(...next.curve.map(({ deviation }: { deviation: number }) => deviation));
      expect(next.deviationThen).toBeLessThanOrEqual(least * (1 + 1e-12));
    }
  });

  test("is found at a correlation of 0.9999", () => {
    const { decomposition } = nextOf(changed(ring, `${pair}/correlation`, 0.9999));
    expect(decomposition?.why).toBeNull();
    expect(decomposition?.at_K).toBeGreaterThan(400);
    expect(decomposition?.deviationThen).toBeLessThan(decomposition?.deviationNow ?? 0);
    expect(decomposition?.curve.every(({ deviation }) => deviation > 0 && Number.isFinite(deviation))).toBe(
      true,
    );
  });
});

describe("nothing is advised, and it is said why,", () => {
  test.each([
    [
      "the correlation is not known",
      changed(changed(ring, `${pair}/correlation`, undefined), `${pair}/points`, undefined),
      361,
      "correlation",
    ],
    ["there is no fitted range", changed(ring, `${pair}/fittedRange`, undefined), 361, "fitted range"],
    ["T_D24 is not known", ring, null, "T_D24"],
  ] as const)("where %s", (_, document, td24, word) => {
    const { decomposition } = nextOf(document, td24);
    expect(decomposition?.at_K).toBeNull();
    expect(decomposition?.why).toContain(word);
  });

  test("where the pair carries no errors", () => {
    const { decomposition } = nextOf(documentOf("semibatch-acylation"));
    expect(decomposition?.why).toContain("no standard errors");
  });

  test("but for a form without a pair there is nothing to improve", () => {
    const document = changed(ring, pair, {
      form: "td24",
      temperature: "95 degC",
      activationEnergy: "120 kJ/mol",
    });
    expect(nextOf(document).decomposition).toBeNull();
  });
});
