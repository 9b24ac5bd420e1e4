import request from "supertest";
import { describe, expect, test } from "vitest";
import { readCase } from "../../server/case/read.js";
import { screen } from "../../server/screening/screen.js";
import { failurePairs, findingDifferences } from "../../server/web/compareFindings.js";
import { inputDifferences } from "../../server/web/compareInputs.js";
import { directScreener } from "../../server/web/screener.js";
import { edited } from "../case/completeCases.js";
import { demoDocument, demos, testApp } from "./testApp.js";

const wrongNumbers = /\bNaN\b|Infinity|\bundefined\b|\[object /;

function findingsOf(document: unknown, depth: "quick" | "full" = "quick") {
  const read = readCase(document);
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  return screen(read.model, { digest: read.digest, depth });
}

const acylation = demoDocument("acylation");
// The same case otherwise: warmer, less of it, the first failure renamed and put last.
const [pump, ...others] = acylation.failures as Record<string, unknown>[];
const changed = {
  ...edited(edited(acylation, "/reaction/temperature", "40 degC"), "/mixture/mass", "1300 kg"),
  title: "Acylation, warmer",
  failures: [...others, { ...pump, name: "Renamed" }],
};

describe("the page of two cases", () => {
  test("is chosen on the first page by two lists of saved and of demo cases", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create({ title: "Mine <b>" });
    const { text } = await request(app).get("/").expect(200);
    expect(text).toContain('<form class="pair" method="get" action="/compare"');
    for (const address of [`cases/${id}`, ...demos.map(({ name }) => `demos/${name}`)]) {
      expect(text.split(`<option value="${address}"`)).toHaveLength(3);
    }
    expect(text).toContain("Mine &lt;b&gt;");
  });

  test("shows inputs, findings, both windows, the same failures and cautions, and the notice", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create(changed);
    const { text } = await request(app).get(`/compare?first=demos/acylation&second=cases/${id}`).expect(200);
    expect(text).toContain("Screening estimate, not a basis of safety.");
    expect(text).toContain('id="figure-compare-windows"');
    expect(text).toContain("Reaction: process temperature");
    expect(text).toContain("MTSR reached when cooling fails");
    expect(text).toContain("not in this case");
    expect(text).toMatch(/In the draws: [^<]*\d/);
    expect(text).toContain(String(others[0]?.name));
    expect(text).not.toMatch(wrongNumbers);
    expect(text).toContain(`<option value="cases/${id}" selected>`);
  });

  test("names what a case with faults lacks, and shows its inputs all the same", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create({ ...acylation, mixture: { mass: "heavy" } });
    const { text } = await request(app).get(`/compare?first=cases/${id}&second=demos/acylation`).expect(200);
    expect(text).toMatch(/Holds 3 faults/);
    expect(text).toContain("heavy");
    expect(text).not.toContain("figure-compare-windows");
  });

  test("says that a case is held against itself", async () => {
    const { text } = await request(testApp().app).get(
      "/compare?first=demos/hydrolysis&second=demos/hydrolysis",
    );
    expect(text).toContain("the same case twice");
    expect(text).toContain("Every input is the same.");
  });

  test("asks for what was not chosen, and names a case that is not there", async () => {
    const { app } = testApp();
    await request(app).get("/compare").expect(200);
    expect((await request(app).get("/compare?first=demos/acylation").expect(400)).text).toContain(
      "Choose two",
    );
    for (const address of [
      "cases/none",
      "demos/none",
      "demos/__proto__",
      "demos/acylation/x",
      "etc",
      "..%2F..",
    ]) {
      const { text } = await request(app).get(`/compare?first=demos/acylation&second=${address}`).expect(404);
      expect(text).toContain("There is no second case");
    }
    await request(app).get("/compare?first[]=demos/acylation&second[x]=y").expect(200);
  });

  test("comes within a second or so while the full screening runs, and looks again", async () => {
    const direct = directScreener();
    const { app } = testApp(undefined, {
      ...direct,
      screen: (order, signal) =>
        order.depth === "quick" ? direct.screen(order, signal) : new Promise(() => undefined),
    });
    const address = "/compare?first=demos/acylation&second=demos/hydrolysis";
    const { text } = await request(app).get(address).expect(200);
    expect(text).toContain('<meta http-equiv="refresh"');
    expect(text).toContain("still being computed");
    expect(text).toContain('id="figure-compare-windows"');
    const quick = await request(app).get(`${address}&parts=quick`).expect(200);
    expect(quick.text).not.toContain('http-equiv="refresh"');
    expect(quick.text).toContain("Without cooling failures");
  });

  test("says why there are no failures where the full screening fails", async () => {
    const direct = directScreener();
    const { app } = testApp(undefined, {
      ...direct,
      screen: (order, signal) =>
        order.depth === "quick" ? direct.screen(order, signal) : Promise.reject(new Error("broken")),
    });
    const { text } = await request(app)
      .get("/compare?first=demos/acylation&second=demos/hydrolysis")
      .expect(200);
    expect(text).toContain("defect of the program");
    expect(text).not.toContain("broken");
    expect(text).toContain('id="figure-compare-windows"');
  });
});

describe("inputs that differ", () => {
  test("none between a case and itself, however each quantity is typed", () => {
    expect(inputDifferences(acylation, acylation)).toEqual([]);
  });

  test("are named as the form names them, with how far they are apart", () => {
    const rows = inputDifferences(acylation, changed);
    expect(rows).toContainEqual({
      label: "Reaction: process temperature",
      first: "35 degC",
      second: "40 degC",
      change: "+5.0 K",
    });
    expect(rows.find(({ label }) => label === "Mixture: mass")?.change).toMatch(/^[+−]\d/);
  });

  test.each([
    ["1800 kg", "1.8 t", "the same, typed otherwise"],
    ["1800 kg", "2100 kg", "+17 %"],
    ["1800 kg", "1700 kg", "−5.6 %"],
    ["1800 kg", "3600 kg", "2.00 times"],
    ["1800 kg", "180 kg", "0.100 times"],
    ["1800 kg", "heavy", null],
    ["1800 kg", undefined, null],
  ])("%s and %s: %s", (first, second, change) => {
    const [one, other] = [first, second].map((mass) => edited(acylation, "/mixture/mass", mass));
    expect(inputDifferences(one, other)).toEqual([
      { label: "Mixture: mass", first, second: second ?? "", change },
    ]);
  });

  test("a quantity typed alone and one with its error are one row, and the error another", () => {
    const [one, other] = ["1800 kg", { value: "1900 kg", standardError: "20 kg" }].map((mass) =>
      edited(acylation, "/mixture/mass", mass),
    );
    expect(inputDifferences(one, other)).toEqual([
      { label: "Mixture: mass", first: "1800 kg", second: "1900 kg", change: "+5.6 %" },
      { label: "Mixture: mass, standard error", first: "", second: "20 kg", change: null },
    ]);
  });

  test("a limit and a rate constant are read as what they are", () => {
    const limit = "/limits/maximumTechnicalTemperature";
    const [one, other] = [
      edited(acylation, limit, { value: "78 degC", basis: "boiling point" }),
      edited(acylation, limit, {
        value: { value: "350.15 K", standardError: "1 K" },
        basis: "boiling point",
      }),
    ];
    expect(inputDifferences(one, other)[0]).toMatchObject({
      first: "78 degC",
      second: "350.15 K",
      change: "−1.0 K",
    });
    const rate = (value: string) =>
      edited(demoDocument("hydrolysis"), "/reaction/rateConstant/preExponential", value);
    expect(inputDifferences(rate("3.6e9 1/h"), rate("1e6 1/s"))[0]?.change).toBe("the same, typed otherwise");
  });

  test("failures are matched by name, wherever they stand", () => {
    const reordered = { ...acylation, failures: [...others, pump] };
    expect(inputDifferences(acylation, reordered)).toEqual([]);
    expect(inputDifferences(acylation, changed)).toEqual(
      expect.arrayContaining([
        { label: `Failure “${String(pump?.name)}”`, first: "given", second: "", change: null },
        { label: "Failure “Renamed”", first: "", second: "given", change: null },
      ]),
    );
    const later = { ...acylation, failures: [{ ...pump, at: "20 min" }, ...others] };
    expect(inputDifferences(acylation, later)[0]?.label).toBe(`Failure “${String(pump?.name)}”: begins at`);
  });

  test("choices are shown in their words", () => {
    const batch = edited(acylation, "/reaction/operation", "batch");
    const row = inputDifferences(acylation, batch).find(({ label }) => label === "Reaction: operation");
    expect(row?.second).toBe("Batch: everything is in the vessel at the start");
  });
});

describe("findings that differ", () => {
  test("are those that are shown differently", () => {
    const [first, second] = [findingsOf(acylation), findingsOf(changed)];
    const { differing, same } = findingDifferences(first, second);
    expect(differing.map(({ label }) => label)).toContain("Tp planned process temperature");
    expect(differing.find(({ label }) => label.startsWith("Tp"))).toMatchObject({
      first: "35.0 °C",
      second: "40.0 °C",
    });
    expect(same).toBeGreaterThan(2);
    expect(differing.map(({ label }) => label)).not.toContain("MTT technical limit");
    expect(findingDifferences(first, first).differing).toEqual([]);
  });
});

describe("the same failures across two cases", () => {
  const [first, second] = [findingsOf(acylation, "full"), findingsOf(changed, "full")];
  const pairs = failurePairs(first, second);

  test("stand beside each other by name, each with its verdict", () => {
    expect(new Set(pairs.map(({ name }) => name)).size).toBe(others.length + 2);
    for (const { name } of others as { name: string }[]) {
      const pair = pairs.find((each) => each.name === name);
      expect(pair?.first?.verdict).toBe(first.failures?.find((each) => each.name === name)?.verdict);
      expect(pair?.second?.verdict).toBe(second.failures?.find((each) => each.name === name)?.verdict);
    }
    expect(pairs.find(({ name }) => name === "Renamed")).toMatchObject({
      first: null,
      difference: "only in the second",
    });
  });

  test("the one that leaves the least time in either comes first", () => {
    const times = (pair: (typeof pairs)[number]) =>
      [first, second].map(
        ({ failures }) =>
          failures?.find(({ name }) => name === pair.name)?.timeToAct_s ?? Number.POSITIVE_INFINITY,
      );
    const least = pairs.map((pair) => Math.min(...times(pair)));
    expect(least).toEqual(least.toSorted((a, b) => a - b));
    expect(Number.isFinite(least[0])).toBe(true);
  });

  test("their difference is said in the direction that it has", () => {
    const sooner = (by: number) => ({
      ...first,
      failures: (first.failures ?? []).map((each) => ({
        ...each,
        timeToAct_s: each.timeToAct_s === null ? null : each.timeToAct_s + by,
      })),
    });
    const acting = (pair: ReturnType<typeof failurePairs>[number]) => pair.first?.verdict === "act";
    expect(failurePairs(first, sooner(-90)).find(acting)?.difference).toBe("90 s less in the second");
    expect(failurePairs(first, sooner(90)).find(acting)?.difference).toBe("90 s more in the second");
    expect(failurePairs(first, sooner(0.4)).find(acting)?.difference).toBe("the same time");
    const lost = {
      ...first,
      failures: (first.failures ?? []).map((each) => ({ ...each, verdict: "lost" as const, timeToAct_s: 0 })),
    };
    expect(failurePairs(first, lost).find(acting)?.difference).toBe("the second is worse");
    expect(failurePairs(lost, first).at(-1)?.difference).toMatch(/better/);
  });
});
