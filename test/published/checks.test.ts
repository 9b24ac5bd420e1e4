import { describe, expect, test } from "vitest";
import { checkGroups, checksLine, runChecks } from "../../server/screening/checks/all.js";
import { type Check, judge } from "../../server/screening/checks/check.js";

describe.each(checkGroups)("$title ($source)", ({ checks }) => {
  test.each(checks)("$what agrees with $printed $unit", (check) => {
    const { computed, difference, allowed, agrees } = judge(check);
    expect(agrees, `${computed} is ${difference} away, ${allowed} is allowed`).toBe(true);
  });
});

test("every check fails where its figure lies further away than allowed", () => {
  for (const check of checkGroups.flatMap((group) => group.checks)) {
    const { computed, allowed } = judge(check);
    for (const sign of [-1, 1]) {
      const printed = String(computed + sign * 1.01 * allowed);
      const within = { apart: allowed, because: "" };
      expect(judge({ ...check, printed, within }).agrees, check.what).toBe(false);
    }
  }
});

describe("how a figure is judged", () => {
  const check = (printed: string, computed: number): Check => ({
    what: "",
    printed,
    unit: "",
    compute: () => computed,
  });

  test.each([
    ["12.30", 12.3049, true],
    ["12.30", 12.3051, false],
    ["6.8e11", 6.7501e11, true],
    ["6.8e11", 6.7499e11, false],
    ["-17", -17.5, true],
    ["34", Number.NaN, false],
    ["34", Number.POSITIVE_INFINITY, false],
  ])("%s and %d: %s, to the digits printed", (printed, computed, agrees) => {
    expect(judge(check(printed, computed)).agrees).toBe(agrees);
  });
});

test("no two checks of a group have the same name and figure", () => {
  for (const { checks } of checkGroups) {
    const names = checks.map(({ what, printed }) => `${what} ${printed}`);
    expect(new Set(names).size).toBe(names.length);
  }
});

test("one line says how many agree, and counts one that does not", () => {
  const groups = runChecks();
  const published = groups.filter((group) => group.kind === "published").flatMap((group) => group.checks);
  expect(published.length).toBeGreaterThan(50);
  expect(checksLine()).toContain(`${published.length} of ${published.length} published values`);
  const [first, ...rest] = groups;
  const [check, ...others] = first.checks;
  const broken = [{ ...first, checks: [{ ...check, agrees: false }, ...others] }, ...rest];
  expect(checksLine(broken)).toContain(`${published.length - 1} of ${published.length} published values`);
});
