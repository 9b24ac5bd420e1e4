import { describe, expect, test } from "vitest";
import { type Assessment, assess, reported } from "../../server/failure/assessment.js";
import { caseOf, vesselFor } from "./running.js";

const names = ["batch-hydrolysis", "batch-ring-closure", "published-oncb", "semibatch-acylation"];
const all = names.flatMap((name) => {
  const { step, failures } = caseOf(name);
  return failures.map((failure) => ({ name: `${name}, ${failure.name}`, step, failure }));
});

function relative(one: number | null, other: number | null): number {
  if (one === null || other === null) return one === other ? 0 : Number.POSITIVE_INFINITY;
  return Math.abs(one - other) / Math.max(Math.abs(one), 1e-9);
}

describe("a tolerance ten times tighter moves no figure beyond its promise", () => {
  test.each(all)("$name", ({ step, failure }) => {
    const vessel = vesselFor(step, failure);
    const started = assess(vessel, failure);
    const at = started?.start.startedAt ?? 0;
    const usual = assess(vessel, { ...failure, at });
    const tight = assess(
      vessel,
      { ...failure, at },
      {
        relativeTolerance: reported.relativeTolerance / 10,
        search: {
          ...reported.search,
          relativeTolerance: reported.search.relativeTolerance / 10,
          width: 0.1 * reported.search.width,
        },
      },
    );
    if (usual === null || tight === null) throw new Error("Not run");
    const figures = (of: Assessment) => of.run;
    expect(usual.verdict).toBe(tight.verdict);
    expect(Math.abs(figures(usual).peak.value - figures(tight).peak.value)).toBeLessThan(0.01);
    for (const mark of ["mtt", "td24", "allowed"] as const) {
      expect(relative(figures(usual).marks[mark], figures(tight).marks[mark])).toBeLessThan(1e-4);
    }
    expect(relative(figures(usual).fastest.value, figures(tight).fastest.value)).toBeLessThan(1e-4);
    expect(relative(usual.run.end.state[1], tight.run.end.state[1])).toBeLessThan(1e-6);
    const [time, tightTime] = [usual.timeToAct ?? 0, tight.timeToAct ?? 0];
    expect(Math.abs(time - tightTime)).toBeLessThan(0.5 + 1e-6 * tightTime);
  });
});
