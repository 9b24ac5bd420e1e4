import { expect, test } from "vitest";
import { summaryOf } from "../../server/cli/summary.js";
import { inventedDocument, inventedFindings, stoppedFindings } from "../sheet/invented.js";

test("a stop comes before every figure, with its reason", () => {
  const text = summaryOf(inventedDocument, stoppedFindings);
  expect(text.indexOf("STOP")).toBeGreaterThan(0);
  expect(text.indexOf("STOP")).toBeLessThan(text.indexOf("MTSR "));
  expect(text).toContain("ACT_TOO_LATE");
  expect(summaryOf(inventedDocument, inventedFindings)).not.toContain("STOP");
});

test("failures are listed by time to act, those that hold last", () => {
  const text = summaryOf(inventedDocument, inventedFindings);
  const lines = text.split("\n").filter((line) => /^ {2}(act|holds|LOST)/.test(line));
  expect(lines).toEqual([
    "  act within 79.1 min   Coolant pump stops, feed runs on",
    "  holds by itself       Agitator stops, restarts after 40 min",
  ]);
});

test("times and T_D24 are rounded down, MTSR up", () => {
  const text = summaryOf(inventedDocument, inventedFindings);
  expect(text).toMatch(/MTSR +48\.2 °C/);
  expect(text).toMatch(/T_D24 +100\.8 °C/);
  expect(text).toContain("Least time to act: 79.1 min");
});

test("what was typed cannot steer a terminal", () => {
  const text = summaryOf(
    { title: "a\u001b]0;x\u0007b\u202e", batch: { record: "1\r\n2" } },
    inventedFindings,
  );
  expect(text).toContain("a\\u{1b}]0;x\\u{7}b\\u{202e}");
  expect(text).toContain("1 2");
});
