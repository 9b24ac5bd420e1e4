import { describe, expect, test } from "vitest";
import { effectiveMixing } from "../../server/failure/conditions.js";
import type { FullRun } from "../../server/failure/run.js";
import type { Vessel } from "../../server/failure/vessel.js";
import { gaussLegendre } from "../../server/numeric/quadrature.js";
import { limitingAmount } from "../../server/thermal/balance.js";
import type { Step } from "../../server/thermal/step.js";
import { assessed, caseOf, vesselFor } from "./running.js";

/** Integral of a function of the state over [from, to], by Gauss points in each step of the run. */
function integral(
  run: FullRun,
  from: number,
  to: number,
  value: (time: number, state: Float64Array) => number,
): number {
  const { nodes, weights } = gaussLegendre(5);
  const state = new Float64Array(run.trajectory.size);
  const times = [...run.trajectory.times()].filter((time) => time > from && time < to);
  const ends = [from, ...times, to];
  let sum = 0;
  for (let i = 1; i < ends.length; i += 1) {
    const half = 0.5 * (ends[i] - ends[i - 1]);
    for (let j = 0; j < nodes.length; j += 1) {
      const time = ends[i - 1] + half * (1 + nodes[j]);
      run.trajectory.evaluate(time, state);
      sum += weights[j] * half * value(time, state);
    }
  }
  return sum;
}

/**
 * Heat that is unaccounted for between the start and the end of a run, and the heat released on the way. Written
 * from the balance itself, with integrals for what the state does not hold.
 */
function unaccounted(step: Step, vessel: Vessel, run: FullRun): { missing: number; released: number } {
  const { reference, places } = vessel.contents;
  const { feed } = step.reaction;
  const { flowing, gain, ua } = step.vessel;
  const { mixture } = step;
  const [before, after] = [new Float64Array(run.trajectory.size), new Float64Array(run.trajectory.size)];
  let missing = 0;
  let released = 0;
  run.legs.forEach((leg, i) => {
    const from = leg.time;
    const to = run.legs[i + 1]?.time ?? run.end.time;
    if (!(to > from)) return;
    run.trajectory.evaluate(from, before);
    run.trajectory.evaluate(to, after, true);
    const { conditions, charge } = leg;
    const feedRate = conditions.feeding && feed !== null ? feed.mass / feed.duration : 0;
    const specific = feed?.heatCapacity ?? 0;
    const capacityAt = (time: number): number =>
      mixture.thermalInertia * mixture.mass * mixture.heatCapacity +
      charge.quenchCapacity +
      (charge.fed + feedRate * (time - from)) * specific;
    const temperature = (state: Float64Array): number => reference + state[0];
    // C' dT over a leg whose heat capacity grows: [C' T] less the growth at the temperature of the moment.
    const stored =
      capacityAt(to) * temperature(after) -
      capacityAt(from) * temperature(before) -
      feedRate * specific * integral(run, from, to, (_, state) => temperature(state));
    const fed =
      feed === null
        ? 0
        : feedRate * specific * integral(run, from, to, (_, state) => feed.temperature - temperature(state));
    const agitator = conditions.agitating ? step.vessel.agitatorPower * (to - from) : 0;
    const gained =
      gain === null
        ? 0
        : gain.coefficient *
          integral(run, from, to, (_, state) => Math.max(0, gain.ambient - temperature(state)));
    const reaction =
      effectiveMixing(conditions, run.mixing) === 0
        ? 0
        : limitingAmount(step) * -step.reaction.heat * (after[1] - before[1]);
    let decomposition = 0;
    const progress = places.progress;
    if (step.decomposition !== null && progress !== null) {
      const massAt = (time: number): number => mixture.mass + charge.fed + feedRate * (time - from);
      const grown = feedRate * integral(run, from, to, (_, state) => state[progress]);
      decomposition =
        step.decomposition.heat * (massAt(to) * after[progress] - massAt(from) * before[progress] - grown);
    }
    let removed = 0;
    const jacket = places.jacket;
    if (flowing !== null && jacket !== null) {
      const carriedOff = integral(
        run,
        from,
        to,
        (_, state) => reference + state[jacket] - conditions.coolantTemperature,
      );
      removed =
        flowing.holdup * flowing.heatCapacity * (after[jacket] - before[jacket]) +
        conditions.coolantFlow * flowing.flow * flowing.heatCapacity * carriedOff;
    } else {
      removed =
        conditions.coolantFlow *
        conditions.heatTransfer *
        ua *
        integral(run, from, to, (_, state) => temperature(state) - conditions.coolantTemperature);
    }
    missing += stored - (reaction + decomposition + fed + agitator + gained - removed);
    released += reaction + decomposition;
  });
  return { missing, released };
}

const names = ["batch-hydrolysis", "batch-ring-closure", "published-oncb", "semibatch-acylation"];
const all = names.flatMap((name) => {
  const { step, failures } = caseOf(name);
  return failures.map((failure) => ({ name: `${name}, ${failure.name}`, step, failure }));
});

describe("the energy balance closes to a millionth of the heat released", () => {
  test.each(all)("$name", ({ step, failure }) => {
    const { runs } = assessed(step, failure);
    const vessel = vesselFor(step, failure);
    for (const run of runs) {
      const { missing, released } = unaccounted(step, vessel, run);
      expect(released).toBeGreaterThan(1e7);
      expect(Math.abs(missing / released)).toBeLessThan(1e-6);
    }
  });
});
