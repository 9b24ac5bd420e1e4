import { describe, expect, test } from "vitest";
import { traceOf } from "../../server/failure/trace.js";
import { assessed, caseOf, temperatureAt, vesselFor } from "./running.js";

const names = ["batch-hydrolysis", "batch-ring-closure", "published-oncb", "semibatch-acylation"];
const all = names.flatMap((name) => {
  const { step, failures } = caseOf(name);
  return failures.map((failure) => ({ name: `${name}, ${failure.name}`, step, failure }));
});

describe.each(all)("the trace of $name", ({ step, failure }) => {
  const { run } = assessed(step, failure);
  const vessel = vesselFor(step, failure);
  const trace = traceOf(vessel, run);
  const mtt = step.limits.maximumTechnicalTemperature;

  test("has few points, in the order of time, from the failure on, all finite", () => {
    expect(trace.length).toBeGreaterThan(5);
    expect(trace.length).toBeLessThanOrEqual(200);
    expect(trace[0].time).toBe(0);
    for (const [i, point] of trace.entries()) {
      expect([point.time, point.temperature, point.jacket].every(Number.isFinite)).toBe(true);
      if (i > 0) expect(point.time).toBeGreaterThanOrEqual(trace[i - 1].time);
    }
  });

  test("stops a little above the technical limit, or goes on to the end", () => {
    const last = trace[trace.length - 1];
    const highest = Math.max(...trace.map((point) => point.temperature));
    if (run.marks.mtt === null) expect(last.time).toBe(run.end.time);
    else {
      expect(highest).toBeGreaterThan(mtt);
      expect(highest).toBeLessThan(mtt + 0.3 * (mtt - step.reaction.temperature));
    }
  });

  test("is straight between its points to less than a line's width", () => {
    const heights = trace.flatMap((point) => [point.temperature, point.jacket]);
    const height = Math.max(...heights) - Math.min(...heights);
    const width = trace[trace.length - 1].time;
    for (let i = 1; i < trace.length; i += 1) {
      const [from, to] = [trace[i - 1], trace[i]];
      if (to.time - from.time < 1e-3 * width) continue;
      for (const part of [0.25, 0.5, 0.75]) {
        const time = from.time + part * (to.time - from.time);
        const drawn = from.temperature + part * (to.temperature - from.temperature);
        const rise = (to.temperature - from.temperature) / height;
        const steepness = Math.hypot(1, rise / ((to.time - from.time) / width));
        const off = Math.abs(temperatureAt(vessel, run, time) - drawn) / height / steepness;
        expect(off).toBeLessThan(2e-3);
      }
    }
  });
});

test("a quench is drawn as a drop at its time", () => {
  const { step, failures } = caseOf("batch-ring-closure");
  const quenched = failures[2];
  const trace = traceOf(vesselFor(step, quenched), assessed(step, quenched).run);
  const at = trace.filter((point) => point.time === 1800);
  expect(at).toHaveLength(2);
  expect(at[0].temperature - at[1].temperature).toBeGreaterThan(5);
});
