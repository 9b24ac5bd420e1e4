import { describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { normalQuantile } from "../../server/numeric/normal.js";
import { screen } from "../../server/screening/screen.js";
import { td24 } from "../../server/thermal/td24.js";
import { logNormalValue } from "../../server/uncertainty/distribution.js";
import { drawnCase, probabilityOf } from "./drawnCase.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

const ring = documentOf("batch-ring-closure");
const acylation = documentOf("semibatch-acylation");
const hydrolysis = documentOf("batch-hydrolysis");

function with_(document: Document, changes: Readonly<Record<string, unknown>>): Document {
  return Object.entries(changes).reduce((made, [path, value]) => changed(made, path, value), document);
}

/** The three numbers of a case document that must be there. */
function three(found: { p05: number | null; p50: number | null; p95: number | null } | null): number[] {
  if (found === null) throw new Error("No percentiles");
  return [found.p05, found.p50, found.p95].map((value) => value ?? Number.NaN);
}

function expectWithin(ours: readonly number[], theirs: readonly number[], tolerance: number): void {
  ours.forEach((each, i) => {
    expect(Math.abs(each - (theirs[i] ?? Number.NaN))).toBeLessThan(tolerance);
  });
}

// Independent implementation: 60,000 plain random draws.
describe("the ring closure's draws agree with 60,000 independent random ones", () => {
  const found = drawnCase(ring).draw();

  test("in the percentiles of T_D24 and MTSR to 0.4 K", () => {
    expectWithin(three(found.uncertainty.td24_K), [356.8, 361.29, 365.3], 0.4);
    expectWithin(three(found.uncertainty.mtsr_K), [426.06, 431.43, 437.16], 0.4);
  });

  test("in the class, a stop in about one draw of ten, to 0.02", () => {
    expect(Math.abs((found.criticalityProbability?.none ?? 0) - 0.095)).toBeLessThan(0.02);
    expect(Math.abs((found.criticalityProbability?.["5"] ?? 0) - 0.905)).toBeLessThan(0.02);
  });

  test("in how often the hold is met with its thermal history, to 0.02", () => {
    expect(Math.abs((probabilityOf(found, "hold") ?? 0) - 0.51)).toBeLessThan(0.02);
  });

  test("in how often the hold is met from fresh material, to 0.02", () => {
    const fresh = with_(ring, { "/limits/availableTime": "1 s" });
    expect(Math.abs((probabilityOf(drawnCase(fresh).draw(), "hold") ?? 0) - 0.905)).toBeLessThan(0.02);
  });
});

describe("the probabilities of the classes", () => {
  test("sum to 1 and are counted in draws", () => {
    const found = drawnCase(ring).draw().criticalityProbability;
    const all = Object.values(found ?? {});
    expect(all).toHaveLength(6);
    expect(all.reduce((sum, each) => sum + each, 0)).toBeCloseTo(1, 12);
    for (const each of all) expect(each * 2000).toBeCloseTo(Math.round(each * 2000), 9);
  });

  test("are not given without a decomposition, as the class is not", () => {
    expect(drawnCase(hydrolysis).draw().criticalityProbability).toBeNull();
    expect(drawnCase(hydrolysis).draw().uncertainty.td24_K).toBeNull();
  });

  test("count a draw as a stop whose T_D24 lies below every temperature that is searched", () => {
    // So wide an error of the heat release rate puts T_D24 under 180 K in some draws.
    const wild = with_(ring, {
      "/decomposition/rateConstant": {
        form: "heatRate",
        heatReleaseRate: { value: "0.5 W/kg", standardError: "1e30 W/kg" },
        at: "100 degC",
        activationEnergy: "30 kJ/mol",
      },
    });
    const found = drawnCase(wild).draw({ draws: 500 });
    const probability = found.criticalityProbability;
    expect(found.uncertainty.td24_K?.p05).toBeNull();
    expect(probability?.none).toBeGreaterThan(0.3);
    expect(Object.values(probability ?? {}).reduce((sum, each) => sum + each, 0)).toBeCloseTo(1, 12);
  });
});

describe("the same case", () => {
  const findings = (document: unknown) =>
    JSON.stringify(screen(modelOf(document), { digest: "", depth: "full" }));

  test("gives the same bytes at every screening", () => {
    expect(findings(ring)).toBe(findings(structuredClone(ring)));
    expect(findings(hydrolysis)).toBe(findings(structuredClone(hydrolysis)));
  });

  test("gives the same bytes whatever the units it is typed in", () => {
    const others = with_(ring, {
      "/mixture/mass": "1.9 t",
      "/mixture/heatCapacity": { value: "2050 J/(kg K)", standardError: "0.06 kJ/(kg K)" },
      "/reaction/heat": { value: "-84000 J/mol", standardError: "3000 J/mol" },
      "/decomposition/heat": { value: "610 kJ/kg", standardError: "40000 J/kg" },
      "/vessel/heatTransferArea": "6.1e4 cm^2",
      "/limits/availableTime": "1 d",
    });
    const read = readCase(others);
    expect(read.ok).toBe(true);
    const draws = (document: unknown) => JSON.stringify(drawnCase(document).draw());
    expect(draws(others)).toBe(draws(ring));
  });

  test("with another seed gives other draws and nearly the same percentiles", () => {
    const opened = drawnCase(ring);
    const [one, other] = [1, 7].map((seed) => opened.draw({ seed }).uncertainty);
    expect(one?.td24_K).not.toEqual(other?.td24_K);
    expectWithin(three(one?.td24_K ?? null), three(other?.td24_K ?? null), 0.4);
  });
});

test("50,000 draws converge on 2,000 within 0.4 K and 0.02", () => {
  const opened = drawnCase(ring);
  const [few, many] = [opened.draw(), opened.draw({ draws: 50_000 })];
  expectWithin(three(few.uncertainty.td24_K), three(many.uncertainty.td24_K), 0.4);
  expectWithin(three(few.uncertainty.mtsr_K), three(many.uncertainty.mtsr_K), 0.4);
  for (const key of ["completion", "cooling", "mtsr-mtt", "mtsr-tmr", "hold"]) {
    expect(Math.abs((probabilityOf(few, key) ?? 0) - (probabilityOf(many, key) ?? 0))).toBeLessThan(0.02);
  }
  expect(
    Math.abs((few.criticalityProbability?.none ?? 0) - (many.criticalityProbability?.none ?? 0)),
  ).toBeLessThan(0.02);
});

describe("a batch's MTSR, Tp + n(-dHr)/(m cp)", () => {
  test("with small errors spreads as error propagation by hand says, to 2 %", () => {
    const small = with_(ring, {
      "/reaction/temperature": { value: "85 degC", standardError: "0.5 K" },
      "/mixture/mass": { value: "1900 kg", standardError: "19 kg" },
      "/mixture/heatCapacity": { value: "2.05 kJ/(kg K)", standardError: "0.02 kJ/(kg K)" },
      "/reaction/heat": { value: "-84 kJ/mol", standardError: "1 kJ/mol" },
      "/reaction/reactants/A/amount": { value: "3.4 kmol", standardError: "0.02 kmol" },
    });
    const rise = (3400 * 84_000) / (1900 * 2050);
    const relative = [19 / 1900, 0.02 / 2.05, 1 / 84, 0.02 / 3.4];
    const deviation = Math.hypot(0.5, ...relative.map((each) => each * rise));
    const [low, , high] = three(drawnCase(small).draw().uncertainty.mtsr_K);
    const drawn = ((high ?? 0) - (low ?? 0)) / (2 * normalQuantile(0.95));
    expect(Math.abs(drawn / deviation - 1)).toBeLessThan(0.02);
  });
});

describe("with the error of one input alone the percentiles are those of that input, carried through", () => {
  const exact: Readonly<Record<string, unknown>> = {
    "/mixture/heatCapacity": "2.05 kJ/(kg K)",
    "/reaction/heat": "-84 kJ/mol",
    "/decomposition/rateConstant/activationEnthalpy": "121 kJ/mol",
    "/decomposition/rateConstant/activationEntropy": "-8 J/(mol K)",
    "/decomposition/heat": "610 J/g",
    "/reaction/rateConstant": {
      form: "reference",
      rateConstant: "5.2e-5 s^-1",
      at: "78 degC",
      activationEnergy: "107 kJ/mol",
    },
  };

  test("a heat capacity: MTSR, T_D24 and the cooling's use", () => {
    const opened = drawnCase(
      with_(ring, {
        ...exact,
        "/mixture/heatCapacity": { value: "2.05 kJ/(kg K)", standardError: "0.3 kJ/(kg K)" },
      }),
    );
    const { uncertainty } = opened.draw();
    const [p95, p50, p05] = [0.05, 0.5, 0.95].map((p) =>
      logNormalValue({ value: 2050, standardError: 300 }, normalQuantile(p)),
    );
    const capacities = [p05 ?? 0, p50 ?? 0, p95 ?? 0];
    const mtsr = capacities.map((c) => 358.15 + (3400 * 84_000) / (1900 * c));
    expectWithin(three(uncertainty.mtsr_K), mtsr, 0.02 * ((mtsr[2] ?? 0) - (mtsr[0] ?? 0)));
    const { runaway } = opened.study;
    if (runaway === null) throw new Error("The ring closure has a decomposition");
    const limits = capacities
      .map((c) => td24({ ...runaway, rise: 610_000 / c }) ?? Number.NaN)
      .sort((a, b) => a - b);
    expectWithin(three(uncertainty.td24_K), limits, 0.02 * ((limits[2] ?? 0) - (limits[0] ?? 0)));
    const use = uncertainty.coolingUse;
    // The duty of a batch holds no heat capacity.
    expect(use?.p05).toBe(use?.p95);
  });

  test("a process temperature: TMRad at it", () => {
    const opened = drawnCase(
      with_(ring, { ...exact, "/reaction/temperature": { value: "85 degC", standardError: "2 K" } }),
    );
    const [low, middle, high] = three(opened.draw().uncertainty.timeToMaximumRateAtProcess_s);
    const at = (shift: number) => {
      const moved = drawnCase(with_(ring, { ...exact, "/reaction/temperature": `${85 + shift} degC` }));
      return three(moved.draw().uncertainty.timeToMaximumRateAtProcess_s)[1] ?? Number.NaN;
    };
    const shift = 2 * normalQuantile(0.95);
    expect((middle ?? 0) / at(0)).toBeCloseTo(1, 2);
    expect((low ?? 0) / at(shift)).toBeCloseTo(1, 2);
    expect((high ?? 0) / at(-shift)).toBeCloseTo(1, 2);
  });
});

test("without any error the draws are the estimates, and the cautious side is the window itself", () => {
  const exact = with_(hydrolysis, {
    "/mixture/heatCapacity": "3.9 kJ/(kg K)",
    "/reaction/heat": "-57 kJ/mol",
  });
  const opened = drawnCase(exact);
  const found = opened.draw();
  expect(found.uncertainty.draws).toBe(2000);
  expect(new Set(three(found.uncertainty.mtsr_K)).size).toBe(1);
  expect(found.window?.cautious).toEqual(opened.window.chosen);
  for (const lane of opened.window.lanes.filter((each) => each.assessed)) {
    expect(probabilityOf(found, lane.criterion.key)).toBe(lane.metAtProcess ? 1 : 0);
  }
});

test("a criterion without its data stays not assessed", () => {
  const lanes = drawnCase(hydrolysis).draw().window?.lanes ?? [];
  const hold = lanes.find((lane) => lane.key === "hold");
  expect(hold).toEqual({ key: "hold", cautious: null, probability: null });
});

test("every number of the draws is finite or null", () => {
  const text = JSON.stringify(drawnCase(acylation).draw({ draws: 200 }), (_, value) =>
    typeof value === "number" && !Number.isFinite(value) ? "not finite" : value,
  );
  expect(text).not.toContain("not finite");
});

test("progress is told from 0 on, and what its listener throws ends the work", () => {
  const opened = drawnCase(hydrolysis);
  const seen: number[] = [];
  opened.draw({ onProgress: (fraction) => seen.push(fraction) });
  expect(seen[0]).toBe(0);
  expect(seen.length).toBeGreaterThan(10);
  expect(Math.max(...seen)).toBeLessThan(1);
  const stop = () => {
    throw new Error("enough");
  };
  expect(() => opened.draw({ onProgress: stop })).toThrow("enough");
});
