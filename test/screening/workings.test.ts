import { describe, expect, test } from "vitest";
import { dimensions } from "../../server/case/dimensions.js";
import { readQuantity } from "../../server/case/quantities.js";
import { readCase } from "../../server/case/read.js";
import { screen } from "../../server/screening/screen.js";
import { workingsOf } from "../../server/screening/workings.js";
import { changed, type Document, documentOf, modelOf } from "./realised.js";

// Invented vessel.
const area = {
  bottom: "kloepper",
  innerDiameter: "1400 mm",
  wallThickness: "12 mm",
  fillVolume: "1.5 m^3",
  vesselVolume: "2 m^3",
  jacketLower: "0.1 m",
  jacketUpper: "1.2 m",
};

// Invented wall.
const wall = {
  insideFilm: "500 W/(m^2 K)",
  outsideFilm: "2000 W/(m^2 K)",
  wallThickness: "12 mm",
  wallConductivity: "15 W/(m K)",
  insideFouling: "0.0002 m^2 K/W",
  outsideFouling: "0.0005 m^2 K/W",
  jacketMedium: "brine",
  wall: "stainless",
  contents: "aqueous",
};

// Water, constants from memory.
const antoine = {
  method: "antoine",
  a: 8.07131,
  b: 1730.63,
  c: 233.426,
  pressureUnit: "mmHg",
  temperatureUnit: "degC",
  lowest: "1 degC",
  highest: "100 degC",
  pressure: "0.9 bar",
};

const at = {
  area: "/vessel/heatTransferArea",
  coefficient: "/vessel/heatTransferCoefficient",
  limit: "/limits/maximumTechnicalTemperature",
};
const groups = { area: `${at.area}From`, coefficient: `${at.coefficient}From`, limit: `${at.limit}From` };

const base = documentOf("batch-hydrolysis");
const withGroup = (which: keyof typeof at, given: object, field?: unknown): Document => {
  const document = changed(base, groups[which], given);
  return field === undefined ? document : changed(document, at[which], field);
};
const workingOf = (document: Document) => {
  const [working, ...others] = workingsOf(modelOf(document));
  expect(others).toEqual([]);
  return working;
};
const raised = (document: Document) =>
  screen(modelOf(document), { digest: "", depth: "quick" }).cautions.filter(({ code }) =>
    ["INPUT_MOVED", "OUTSIDE_HELPER_RANGE"].includes(code),
  );
const faultsOf = (document: Document) => {
  const read = readCase(document);
  return read.ok ? [] : read.faults;
};

test("a case without workings has none, and no caution of them", () => {
  expect(workingsOf(modelOf(base))).toEqual([]);
  expect(raised(base)).toEqual([]);
});

describe("every working", () => {
  test.each([
    { which: "area", given: area, kind: "area", step: 0.01 },
    { which: "coefficient", given: wall, kind: "heatTransferCoefficient", step: 1 },
    { which: "limit", given: antoine, kind: "temperature", step: 0.1 },
  ] as const)("of the $which: its text, typed into its field, is followed, and is rounded down", (row) => {
    const first = workingOf(withGroup(row.which, row.given));
    expect(first.field).toBe(at[row.which]);
    const text = first.resultText ?? "";
    const reading = readQuantity(text, dimensions[row.kind]);
    expect(reading.ok).toBe(true);
    const typed = reading.ok ? reading.measured.value : Number.NaN;
    expect(typed).toBeLessThanOrEqual(first.result ?? 0);
    expect(typed).toBeGreaterThan((first.result ?? 0) - row.step);
    const document = withGroup(row.which, row.given, text);
    expect(workingOf(document).follows).toBe(true);
    expect(raised(changed(document, "/mixture/mass", "5000 kg"))).toEqual([]);
  });

  test("stands in the findings with finite numbers and units", () => {
    const document = changed(
      changed(withGroup("area", area), groups.coefficient, wall),
      groups.limit,
      antoine,
    );
    const { workings } = screen(modelOf(document), { digest: "", depth: "quick" });
    expect(workings.map((working) => working.field)).toEqual([at.coefficient, at.area, at.limit]);
    for (const working of workings) {
      expect(Number.isFinite(working.result)).toBe(true);
      expect(working.steps.length).toBeGreaterThan(1);
      expect(working.reference).not.toBe("");
      for (const { value, text } of [...working.given, ...working.steps]) {
        expect(value === null || Number.isFinite(value)).toBe(true);
        expect(text).not.toMatch(/NaN|Infinity|undefined/);
      }
    }
  });
});

describe("the area by hand", () => {
  const flat = { bottom: "flat", innerDiameter: "1 m", jacketUpper: "2 m" };
  const stepsOf = (given: object) => workingOf(withGroup("area", given));

  test("0.5 m^3 in 1 m over a flat bottom stand 0.6366 m high; 0.5366 m of jacket are 1.686 m^2", () => {
    const working = stepsOf({ ...flat, fillVolume: "500 L", jacketLower: "10 cm" });
    expect(working.result).toBeCloseTo(Math.PI * (2 / Math.PI - 0.1), 12);
    expect(working.resultText).toBe("1.68 m^2");
    expect(working.steps.map(({ text }) => text)).toEqual(["0.6366 m", "0.6366 m", "1.686 m²"]);
  });

  test.each(["30 L", "0.2 m^3", "1 m^3", "3 m^3"])(
    "%s: the walls of bottom and shell add up to the result, wherever the jacket begins",
    (fillVolume) => {
      for (const jacketLower of ["0 m", "5 cm", "0.3 m"]) {
        const { vesselVolume: _volume, ...open } = area;
        const document = withGroup("area", { ...open, fillVolume, jacketLower });
        if (!readCase(document).ok) continue;
        const { steps, result } = workingOf(document);
        const walls = steps.filter(({ label }) => label.startsWith("Wall of")).map(({ value }) => value ?? 0);
        expect(walls.length).toBeGreaterThan(0);
        expect(walls.reduce((sum, wall) => sum + wall, 0)).toBeCloseTo(result ?? Number.NaN, 12);
      }
    },
  );
});

describe("INPUT_MOVED", () => {
  test("is raised where an input of the working changed after the field was filled", () => {
    const text = workingOf(withGroup("area", area)).resultText;
    const document = withGroup("area", { ...area, fillVolume: "1.2 m^3" }, text);
    const [caution, ...rest] = raised(document);
    expect(rest).toEqual([]);
    expect(caution).toMatchObject({ code: "INPUT_MOVED", level: "warn", about: at.area });
    expect(caution?.text).toMatch(/not the careful side/);
    expect(workingOf(document).follows).toBe(false);
  });

  test.each([
    ["area", area, "4.5 m^2", "4 m^2"],
    ["coefficient", wall, "250 W/(m^2 K)", "240 W/(m^2 K)"],
    ["limit", antoine, "96.5 degC", "95 degC"],
  ] as const)("%s: a rounded figure still follows, another one does not", (which, given, near, far) => {
    const full = (field: string) => changed(withGroup(which, given, field), "/mixture/mass", "5000 kg");
    expect(raised(full(near))).toEqual([]);
    const [caution] = raised(full(far));
    expect(caution).toMatchObject({ code: "INPUT_MOVED", about: at[which] });
    expect(caution?.text).not.toMatch(/careful side/);
  });

  test("is raised where the area was worked out for more contents than the step starts with", () => {
    const text = workingOf(withGroup("area", area)).resultText;
    const starting = (mass: string) =>
      raised(
        changed(changed(withGroup("area", area, text), "/mixture/mass", mass), "/mixture/density", "1 kg/L"),
      );
    expect(starting("1000 kg")).toMatchObject([
      { code: "INPUT_MOVED", level: "warn", about: `${groups.area}/fillVolume` },
    ]);
    expect(starting("1500 kg")).toEqual([]);
    // Above the jacket's upper edge more contents wet no more of it.
    const low = { ...area, jacketUpper: "0.5 m" };
    const lowText = workingOf(withGroup("area", low)).resultText;
    expect(raised(changed(withGroup("area", low, lowText), "/mixture/mass", "1000 kg"))).toEqual([]);
  });
});

describe("OUTSIDE_HELPER_RANGE", () => {
  const boiling = (pressure: string) => withGroup("limit", { ...antoine, pressure });
  const followed = (document: Document) =>
    raised(changed(document, at.limit, workingOf(document).resultText));

  test("Antoine outside its range: the value is shown all the same", () => {
    const document = boiling("2 bar");
    expect(workingOf(document).result).toBeCloseTo(120.1 + 273.15, 1);
    expect(followed(document)).toMatchObject([
      { code: "OUTSIDE_HELPER_RANGE", level: "warn", about: groups.limit },
    ]);
    expect(followed(boiling("1 bar"))).toEqual([]);
    expect(followed(boiling("0.005 bar"))).toMatchObject([{ code: "OUTSIDE_HELPER_RANGE" }]);
  });

  test("Clausius-Clapeyron far from 1 atm", () => {
    const clapeyron = (pressure: string) =>
      withGroup("limit", {
        method: "clausius-clapeyron",
        normalBoilingPoint: "99.97 degC",
        heatOfVaporisation: "40.65 kJ/mol",
        pressure,
      });
    expect(followed(clapeyron("2 bar"))).toEqual([]);
    expect(followed(clapeyron("12 bar"))).toMatchObject([{ code: "OUTSIDE_HELPER_RANGE" }]);
    expect(followed(clapeyron("50 mbar"))).toMatchObject([{ code: "OUTSIDE_HELPER_RANGE" }]);
  });

  test("a coefficient above the handbook's range warns, one below is noted, one inside is neither", () => {
    const film = (insideFilm: string) => {
      const document = withGroup("coefficient", {
        ...wall,
        insideFouling: "0 m^2 K/W",
        outsideFouling: "0 m^2 K/W",
        insideFilm,
      });
      return changed(document, at.coefficient, workingOf(document).resultText);
    };
    // 200 to 850 W/(m^2 K): Perry, Table 11-7.
    expect(workingOf(film("500 W/(m^2 K)")).typical).toEqual([200, 850]);
    expect(raised(film("500 W/(m^2 K)"))).toEqual([]);
    expect(raised(film("150 W/(m^2 K)"))).toMatchObject([{ code: "OUTSIDE_HELPER_RANGE", level: "note" }]);
    const thin = withGroup("coefficient", {
      ...wall,
      insideFilm: "5000 W/(m^2 K)",
      outsideFilm: "5000 W/(m^2 K)",
      wallThickness: "5 mm",
      insideFouling: "0 m^2 K/W",
      outsideFouling: "0 m^2 K/W",
    });
    expect(raised(changed(thin, at.coefficient, workingOf(thin).resultText))).toMatchObject([
      { code: "OUTSIDE_HELPER_RANGE", level: "warn", about: at.coefficient },
    ]);
  });

  test("no range is named where jacket medium, wall or contents are not told", () => {
    for (const key of ["jacketMedium", "wall", "contents"]) {
      const document = changed(withGroup("coefficient", wall), `${groups.coefficient}/${key}`, undefined);
      expect(workingOf(document).typical).toBeNull();
    }
  });
});

describe("what a working cannot do is a fault of the case", () => {
  test.each([
    ["more than the vessel holds", { fillVolume: "2.1 m^3" }, "fillVolume", /more than the 2 m³/],
    ["a level below the jacket", { fillVolume: "10 L" }, "jacketLower", /the area is 0/],
    [
      "a level at the jacket's edge of a flat bottom",
      { bottom: "flat", wallThickness: undefined, fillVolume: "0.1 m^3", jacketLower: "0.5 m" },
      "jacketLower",
      /0\.06496 m high/,
    ],
    ["a jacket upside down", { jacketLower: "1.3 m" }, "jacketLower", /low to high/],
    ["no vessel's diameter", { innerDiameter: "0.1 mm" }, "innerDiameter", /1 mm to 100 m/],
    ["a wall as thick as the vessel", { wallThickness: "1.4 m" }, "wallThickness", /quarter/],
    [
      "a tower of contents",
      { fillVolume: "1e300 m^3", vesselVolume: undefined },
      "fillVolume",
      /higher than any/,
    ],
  ] as const)("%s", (_name, changes, key, message) => {
    const given = Object.fromEntries(
      Object.entries({ ...area, ...changes }).filter(([, value]) => value !== undefined),
    );
    const faults = faultsOf(withGroup("area", given));
    expect(faults.map(({ pointer }) => pointer)).toContain(`${groups.area}/${key}`);
    expect(faults.map((fault) => fault.message).join("; ")).toMatch(message);
  });

  test.each([
    ["a dish flatter than its vessel is wide", { dishRadius: "0.6 m" }, "dishRadius"],
    ["a knuckle wider than the vessel", { knuckleRadius: "0.8 m" }, "knuckleRadius"],
    ["a dish as good as flat", { dishRadius: "1000 m" }, "dishRadius"],
  ])("%s", (_name, changes, key) => {
    const { wallThickness: _wall, ...rest } = area;
    const given = { ...rest, bottom: "torispherical", dishRadius: "1.4 m", knuckleRadius: "0.14 m" };
    expect(faultsOf(withGroup("area", given))).toEqual([]);
    const faults = faultsOf(withGroup("area", { ...given, ...changes }));
    expect(faults.map(({ pointer }) => pointer)).toEqual([`${groups.area}/${key}`]);
  });

  test.each([
    ["a pressure without a boiling point", { a: 2, pressure: "2 bar" }, "pressure"],
    ["a pressure that no vessel has", { pressure: "1e9 bar" }, "pressure"],
    ["constants that lead below absolute zero", { c: 900 }, "c"],
  ])("%s", (_name, changes, key) => {
    const faults = faultsOf(withGroup("limit", { ...antoine, ...changes }));
    expect(faults.map(({ pointer }) => pointer)).toEqual([`${groups.limit}/${key}`]);
  });

  test("resistances beyond numbers", () => {
    const faults = faultsOf(withGroup("coefficient", { ...wall, insideFilm: "1e-310 W/(m^2 K)" }));
    expect(faults.map(({ pointer }) => pointer)).toEqual([groups.coefficient]);
  });
});
