import { describe, expect, test } from "vitest";
import { marginOf } from "../../server/failure/response.js";
import { assessed, caseOf, temperatureAt, vesselFor } from "./running.js";

const { step, failures } = caseOf("batch-ring-closure");
const [lostCoolant] = failures;
const vessel = vesselFor(step, lostCoolant);
const response = { detection: 120, decision: 300, action: 600 };

describe("the response to a failure", () => {
  const found = assessed(step, { ...lostCoolant, response });
  const time = found.timeToAct ?? 0;

  test("has the margin that detection, decision and action leave of the time to act", () => {
    expect(found.margin?.margin).toBeCloseTo(time - 1020, 9);
  });

  test("has the highest alarm temperature from which all three are still over in time", () => {
    const alarm = found.margin?.alarm ?? 0;
    expect(alarm).toBeCloseTo(temperatureAt(vessel, found.run, time - 1020), 6);
    expect(alarm).toBeGreaterThan(step.reaction.temperature);
    // Sounding there, the action is complete exactly at the time to act; a kelvin higher it is too late.
    expect(temperatureAt(vessel, found.run, time - 1019)).toBeGreaterThan(alarm);
  });

  test("leaves no alarm temperature where it is slower than the time to act", () => {
    const slow = assessed(step, { ...lostCoolant, response: { ...response, action: 3000 } });
    expect(slow.margin?.margin).toBeLessThan(0);
    expect(slow.margin?.alarm).toBeNull();
  });

  test("counts against a lost failure in full", () => {
    const margin = marginOf(vessel, 0, response, found.runs);
    expect(margin).toEqual({ margin: -1020, alarm: null });
  });

  test("has no alarm where the contents are not yet warmer than in normal running", () => {
    expect(marginOf(vessel, 1020, response, found.runs)).toEqual({ margin: 0, alarm: null });
  });

  test("is not asked where the failure holds, or where none is stated", () => {
    expect(assessed(step, { ...failures[1], response }).margin).toBeNull();
    expect(assessed(step, lostCoolant).margin).toBeNull();
  });
});
