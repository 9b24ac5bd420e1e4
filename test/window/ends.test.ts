import { describe, expect, test } from "vitest";
import { screen } from "../../server/screening/screen.js";
import { changed, type Document, documentOf, modelOf, stepOf } from "../screening/realised.js";
import { capacityOf, dosed, dutyOf, edge, heldOf, mtsrOf, reactionK, tmradOf } from "./bruteForce.js";

function windowOf(document: Document) {
  const { window } = screen(modelOf(document), { digest: "", depth: "quick" });
  if (window === null) throw new Error("Expected a window");
  const spans = (key: string) => window.criteria.find((each) => each.key === key)?.allowed ?? [];
  return { window, spans };
}

const ring = documentOf("batch-ring-closure");
const acylation = documentOf("semibatch-acylation");
const hydrolysis = documentOf("batch-hydrolysis");
const day = 86_400;

describe("window ends agree with the plain definitions at 0.001 K", () => {
  test("completion of a first-order batch: -ln(1 - X)/k", () => {
    const step = stepOf(ring);
    const end = edge((T) => -Math.log(1 - 0.95) / reactionK(step, T) <= day, 340, 355);
    expect(windowOf(ring).spans("completion")[0][0]).toBeCloseTo(end, 2);
  });

  test("cooling of a batch at its start, both ends", () => {
    const step = stepOf(hydrolysis);
    const holds = (T: number) => reactionK(step, T) * 650 * 57e3 <= 0.8 * capacityOf(step, T);
    const [span] = windowOf(hydrolysis).spans("cooling");
    expect(span[0]).toBeCloseTo(edge(holds, 282, 300), 2);
    expect(span[1]).toBeCloseTo(edge(holds, 300, 340), 2);
  });

  test("MTSR of a batch against MTT", () => {
    const step = stepOf(ring);
    const C = step.mixture.mass * step.mixture.heatCapacity;
    const end = edge((T) => T + (3400 * 84e3) / C < 165 + 273.15, 350, 380);
    expect(windowOf(ring).spans("mtsr-mtt")[0][1]).toBeCloseTo(end, 2);
  });

  test("hold with the thermal history of an autocatalytic decomposition", () => {
    const step = stepOf(ring);
    const holds = (T: number) => Math.min(tmradOf(step, T, 0), tmradOf(step, T, heldOf(step, T))) >= day;
    expect(windowOf(ring).spans("hold")[0][1]).toBeCloseTo(edge(holds, 350, 365), 2);
  });

  test("TMRad from MTSR, where it decides", () => {
    const mild = changed(ring, "/reaction/reactants/A/amount", "0.6 kmol");
    const step = stepOf(mild);
    const C = step.mixture.mass * step.mixture.heatCapacity;
    const holds = (T: number) => {
      const mtsr = T + (600 * 84e3) / C;
      return Math.min(tmradOf(step, mtsr, 0), tmradOf(step, mtsr, heldOf(step, T))) >= day;
    };
    expect(windowOf(mild).spans("mtsr-tmr")[0][1]).toBeCloseTo(edge(holds, 330, 360), 2);
  });

  test("stability of a batch: d qnet/dT = UAe", () => {
    const step = stepOf(hydrolysis);
    const Ea = 46e3;
    const slope = (T: number) => (reactionK(step, T) * 650 * 57e3 * Ea) / (8.31446261815324 * T * T);
    const end = edge((T) => slope(T) < capacityOf(step, T) / (T - step.vessel.coolantTemperature), 290, 340);
    expect(windowOf(hydrolysis).spans("stability")[0][1]).toBeCloseTo(end, 2);
  });

  test("completion of a dosed step", () => {
    const step = stepOf(acylation);
    const holds = (T: number) => {
      const moments = dosed(step, T, 8 * 3600);
      return 1 - moments[moments.length - 1].nA / 2900 >= 0.98;
    };
    expect(windowOf(acylation).spans("completion")[0][0]).toBeCloseTo(edge(holds, 290, 300), 2);
  });

  test("cooling of a dosed step, its decomposition being nothing so cold", () => {
    const step = stepOf(acylation);
    const holds = (T: number) => dutyOf(step, T, dosed(step, T, 3 * 3600)) <= 0.8 * capacityOf(step, T);
    expect(windowOf(acylation).spans("cooling")[0][0]).toBeCloseTo(edge(holds, 298, 308), 2);
  });

  test("a control band takes its width off both ends", () => {
    const banded = changed(acylation, "/limits/controlBand", "2 K");
    const bare = windowOf(acylation).window;
    const { window } = windowOf(banded);
    expect(window.lower_K).toBeCloseTo((bare.lower_K ?? 0) + 2, 2);
    expect(window.upper_K).toBeCloseTo((bare.upper_K ?? 0) - 2, 2);
  });

  const cold = [
    ["/limits/lowestTemperature", "-60 degC"],
    ["/limits/highestTemperature", "60 degC"],
    ["/limits/availableTime", "90000 h"],
    ["/limits/maximumTechnicalTemperature", "52 degC"],
    ["/vessel/coolant/temperature", "-75 degC"],
    ["/vessel/agitatorPower", "0 W"],
    ["/decomposition", undefined],
    ["/failures", []],
  ] as const;
  const inTwo = cold.reduce<Document>((document, [path, value]) => changed(document, path, value), acylation);

  test("a window in two parts, where MTSR rises, falls and rises again", () => {
    const step = stepOf(inTwo);
    const holds = (T: number) => mtsrOf(step, T, dosed(step, T, 3 * 3600)) < 52 + 273.15;
    const { window, spans } = windowOf(inTwo);
    const ends = spans("mtsr-mtt").flat().slice(1);
    expect(ends[0]).toBeCloseTo(edge(holds, 220, 240), 2);
    expect(ends[1]).toBeCloseTo(edge(holds, 270, 290), 2);
    expect(ends[2]).toBeCloseTo(edge(holds, 300, 325), 2);
    expect(window.allowed).toHaveLength(2);
    expect(window.containsProcess).toBe(true);
    expect(window.lower_K).toBeCloseTo(ends[1], 6);
  });

  test("a criterion without its data is not assessed, marks the window and does not widen it", () => {
    const { window } = windowOf(inTwo);
    const open = window.criteria.filter((each) => !each.assessed).map((each) => each.key);
    expect(open).toEqual(["mtsr-tmr", "hold"]);
    expect(window.incomplete).toBe(true);
  });

  test("an empty window says what holds nowhere, and by how much", () => {
    const { window } = windowOf(ring);
    expect([window.lower_K, window.upper_K]).toEqual([null, null]);
    expect(window.conflict).toMatch(/“TMRad from MTSR” holds nowhere.*at 40\.0 °C.*24\.0 h are asked for/);
  });

  test("two criteria that exclude each other are named with the gap between them", () => {
    const short = changed(
      changed(ring, "/reaction/reactants/A/amount", "0.6 kmol"),
      "/limits/availableTime",
      "10 h",
    );
    const { window, spans } = windowOf(short);
    expect(spans("completion")[0][0]).toBeGreaterThan(spans("mtsr-tmr")[0][1]);
    expect(window.conflict).toMatch(
      /“done in time” asks for at least .* “TMRad from MTSR” allows at most .* apart/,
    );
  });
});
