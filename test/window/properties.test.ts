import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fromReference } from "../../server/kinetics/rateConstant.js";
import { gasConstant } from "../../server/numeric/constants.js";
import type { Findings } from "../../server/screening/findings.js";
import { screen } from "../../server/screening/screen.js";
import { td24 } from "../../server/thermal/td24.js";
import { changed, type Document, documentOf, modelOf } from "../screening/realised.js";

const ring = documentOf("batch-ring-closure");
const acylation = documentOf("semibatch-acylation");

function quick(document: Document): Findings {
  return screen(modelOf(document), { digest: "", depth: "quick" });
}

function spansOf(document: Document, key: string) {
  return quick(document).window?.criteria.find((each) => each.key === key)?.allowed ?? [];
}

/** Every number among the findings, by path. */
function numbersIn(value: unknown, path = ""): [string, number][] {
  if (typeof value === "number") return [[path, value]];
  if (typeof value !== "object" || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}/${key}`));
}

describe("the window", () => {
  test("never narrows what cooling allows when UA grows", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 4, noNaN: true }),
        fc.constantFrom(ring, acylation),
        (times, document) => {
          const more = changed(document, "/vessel/heatTransferArea", `${5 * times} m^2`);
          const less = changed(document, "/vessel/heatTransferArea", "5 m^2");
          for (const [low, high] of spansOf(less, "cooling")) {
            const inside = spansOf(more, "cooling").some(([l, h]) => l <= low + 1e-3 && h >= high - 1e-3);
            expect(inside).toBe(true);
          }
        },
      ),
      { numRuns: 12 },
    );
  });

  test("stays the same when every extensive input is scaled together", () => {
    const scaled = (document: Document, paths: Record<string, string>): Document =>
      Object.entries(paths).reduce<Document>((made, [path, text]) => changed(made, path, text), document);
    const three = scaled(acylation, {
      "/mixture/mass": "4350 kg",
      "/reaction/reactants/A/amount": "8.7 kmol",
      "/reaction/reactants/B/amount": "9.15 kmol",
      "/reaction/feed/mass": "1260 kg",
      "/vessel/heatTransferArea": "16.8 m^2",
      "/vessel/agitatorPower": "6 kW",
      "/vessel/coolant/flow": "13.5 kg/s",
      "/vessel/coolant/holdup": "540 kg",
      "/vessel/heatGain/coefficient": "45 W/K",
    });
    const small = quick(acylation);
    const large = quick(three);
    expect(large.window?.lower_K).toBeCloseTo(small.window?.lower_K ?? 0, 6);
    expect(large.window?.upper_K).toBeCloseTo(small.window?.upper_K ?? 0, 6);
    expect(large.temperatures.mtsr_K).toBeCloseTo(small.temperatures.mtsr_K ?? 0, 6);
    expect(large.cooling?.duty_W).toBeCloseTo(3 * (small.cooling?.duty_W ?? 0), 3);
  });

  test("and every other finding do not depend on the unit a value is typed in", () => {
    const typed: [string, unknown][] = [
      ["/mixture/mass", "1.45 t"],
      ["/mixture/density", "940 g/L"],
      ["/mixture/heatCapacity", { value: "1950 J/(kg K)", standardError: "50 J kg^-1 K^-1" }],
      ["/reaction/temperature", "308.15 K"],
      ["/reaction/feed/duration", "180 min"],
      ["/reaction/feed/temperature", "68 degF"],
      ["/reaction/heat", { value: "-118000 J/mol", standardError: "4000 J/mol" }],
      ["/vessel/heatTransferCoefficient", "0.32 kW/(m^2 K)"],
      ["/vessel/heatTransferArea", "56000 cm^2"],
      ["/limits/availableTime", "480 min"],
      ["/limits/maximumTechnicalTemperature", { value: "351.15 K", basis: "boiling point at 1 atm" }],
      ["/decomposition/heat", { value: "420 kJ/kg", standardError: "25000 J/kg" }],
    ];
    const want = numbersIn(quick(acylation));
    for (const [path, value] of typed) {
      const got = numbersIn(quick(changed(acylation, path, value)));
      expect(
        got.map(([at]) => at),
        path,
      ).toEqual(want.map(([at]) => at));
      for (const [i, [at, number]] of got.entries()) {
        const wanted = want[i]?.[1] ?? 0;
        expect(Math.abs(number - wanted), `${at} after ${path}`).toBeLessThanOrEqual(
          1e-6 * Math.abs(wanted) + 1e-9,
        );
      }
    }
  });
});

describe("T_D24", () => {
  test("rises with Ea at a fixed reference rate well where 1/T_D24 - 1/Tref >= R/Ea (order laws)", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 60e3, max: 220e3, noNaN: true }),
        fc.double({ min: 1.01, max: 1.5, noNaN: true }),
        fc.double({ min: -9, max: -4, noNaN: true }),
        fc.double({ min: 150, max: 600, noNaN: true }),
        fc.constantFrom(0, 1, 2),
        (energy, factor, lnK, rise, order) => {
          const law = { autocatalytic: false, order, productOrder: 1, initiation: 0 };
          const at = 423.15;
          const first = td24({ law, rate: fromReference(lnK, at, energy), rise });
          const second = td24({ law, rate: fromReference(lnK, at, energy * factor), rise });
          // R/Ea is exact for the closed form; the full integral moves it by terms of order R T/Ea and n/B.
          const bound = (2.5 * gasConstant) / energy;
          fc.pre(first !== null && second !== null && 1 / first - 1 / at >= bound);
          expect(second).toBeGreaterThan(first ?? Number.NaN);
        },
      ),
      { numRuns: 100 },
    );
  });
});
