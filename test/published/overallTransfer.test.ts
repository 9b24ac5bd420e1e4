import { describe, expect, test } from "vitest";
import {
  overallCoefficient,
  resistancesOf,
  type WallInSeries,
} from "../../server/thermal/overallTransfer.js";
import { typicalTransfer } from "../../server/thermal/typicalTransfer.js";

const steel: WallInSeries = {
  insideFilm: 500,
  outsideFilm: 2000,
  wallThickness: 0.012,
  wallConductivity: 15,
  lining: null,
  insideFouling: 0,
  outsideFouling: 0,
};

describe("resistances in series, worked by hand", () => {
  test("a clean stainless wall: 0.002 + 0.0008 + 0.0005 = 0.0033 m^2 K/W, U = 303.03 W/(m^2 K)", () => {
    expect(overallCoefficient(resistancesOf(steel))).toBeCloseTo(303.030303, 6);
  });

  test("fouled on both sides: 0.0033 + 0.0002 + 0.0005 = 0.004 m^2 K/W, U = 250 W/(m^2 K)", () => {
    const fouled = { ...steel, insideFouling: 0.0002, outsideFouling: 0.0005 };
    expect(overallCoefficient(resistancesOf(fouled))).toBeCloseTo(250, 9);
  });

  test("glass-lined: 1/400 + 0.0015/1 + 0.02/50 + 0.0001 + 1/2000 = 0.005 m^2 K/W, U = 200 W/(m^2 K)", () => {
    const glass = {
      insideFilm: 400,
      outsideFilm: 2000,
      wallThickness: 0.02,
      wallConductivity: 50,
      lining: { thickness: 0.0015, conductivity: 1 },
      insideFouling: 0,
      outsideFouling: 0.0001,
    };
    expect(resistancesOf(glass)).toEqual({
      insideFilm: 0.0025,
      insideFouling: 0,
      lining: 0.0015,
      wall: 0.0004,
      outsideFouling: 0.0001,
      outsideFilm: 0.0005,
    });
    expect(overallCoefficient(resistancesOf(glass))).toBeCloseTo(200, 9);
  });

  test("no layer can be better than its worst one", () => {
    for (const insideFilm of [5, 50, 500, 5000]) {
      const u = overallCoefficient(resistancesOf({ ...steel, insideFilm }));
      expect(u).toBeLessThan(Math.min(insideFilm, steel.outsideFilm, 15 / 0.012));
    }
  });
});

describe("typical coefficients of jacketed vessels (Perry's Chemical Engineers' Handbook, Table 11-7)", () => {
  test.each([
    ["stainless", "steam", "water", 850, 1700],
    ["stainless", "steam", "organics", 285, 850],
    ["stainless", "brine", "aqueous", 200, 850],
    ["stainless", "brine", "organics", 170, 680],
    ["stainless", "heatTransferOil", "water", 285, 1140],
    ["stainless", "heatTransferOil", "heavyOil", 57, 230],
    ["glassLined", "steam", "lightOil", 230, 425],
    ["glassLined", "brine", "water", 170, 450],
    ["glassLined", "brine", "organics", 115, 340],
    ["glassLined", "heatTransferOil", "organics", 140, 370],
  ] as const)("%s, %s, %s: %d to %d W/(m^2 K)", (wall, jacket, contents, low, high) => {
    expect(typicalTransfer(wall, jacket, contents)).toEqual([low, high]);
  });

  test("water in stainless steel over brine ends at the 180 Btu/(h ft^2 degF) printed beside the misprint", () => {
    // 1 Btu/(h ft^2 degF) = 5.678263 W/(m^2 K).
    expect(typicalTransfer("stainless", "brine", "water")[1]).toBeCloseTo(180 * 5.678263, 0);
  });

  test("every range runs upwards, and glass never conducts better than bare steel", () => {
    for (const jacket of ["steam", "brine", "heatTransferOil"] as const) {
      for (const contents of ["water", "aqueous", "organics", "lightOil", "heavyOil"] as const) {
        const [bare, glass] = [
          typicalTransfer("stainless", jacket, contents),
          typicalTransfer("glassLined", jacket, contents),
        ];
        expect(bare[0]).toBeLessThan(bare[1]);
        expect(glass[0]).toBeLessThan(glass[1]);
        expect(glass[0]).toBeLessThanOrEqual(bare[0]);
        expect(glass[1]).toBeLessThanOrEqual(bare[1]);
      }
    }
  });
});
