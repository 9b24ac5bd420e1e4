import type { FailureFindings, Findings } from "../../server/screening/findings.js";
import { range, zero } from "./invented.js";
import { inventedDosed } from "./inventedDosed.js";

/** A course that rises from `start` to `end` with a time constant, and runs away where `away` is given. */
function course(start: number, end: number, constant: number, away: number | null): FailureFindings["trace"] {
  return range(0, 400, 401).map((at) => {
    const time_s = 86400 * (at / 400) ** 3;
    const calm = end - (end - start) * Math.exp(-time_s / constant);
    const temperature_K =
      away === null || time_s < 0.5 * away ? calm : calm + 40 / Math.max(0.02, 1 - time_s / away) - 80;
    return {
      time_s,
      temperature_K: Math.min(600, Math.max(calm, temperature_K)),
      jacket_K: calm - 5,
    };
  });
}

function failure(
  name: string,
  verdict: FailureFindings["verdict"],
  timeToMtt_s: number | null,
  timeToAct_s: number | null,
  trace: FailureFindings["trace"],
): FailureFindings {
  const peak = trace.reduce((highest, point) =>
    point.temperature_K > highest.temperature_K ? point : highest,
  );
  return {
    name,
    startedAt_s: 5400,
    peak_K: peak.temperature_K,
    peakAt_s: peak.time_s,
    timeToMtt_s,
    timeToTd24_s: null,
    maximumRate_K_s: 0.01,
    timeToMaximumRate_s: 900,
    conversion: 0.97,
    decomposed: 0.001,
    beyondModel: timeToMtt_s !== null,
    mixingAssumed: null,
    verdict,
    timeToAct_s,
    margin_s: null,
    alarm_K: null,
    trace,
  };
}

/** Where a course first reaches MTT, s. */
function passing(trace: FailureFindings["trace"]): number {
  return trace.find((point) => point.temperature_K >= 78 + zero)?.time_s ?? 0;
}

const runningOn = course(35 + zero, 70 + zero, 5e3, 9e3);
const slow = course(35 + zero, 62 + zero, 2e4, 7e4);

/** The dosed case with everything: failures, a measured run and the feed lever. */
export const inventedWhole: Findings = {
  ...inventedDosed,
  accumulation: {
    maximumFraction: 0.14,
    at_s: 9720,
    curve: dosed(0.14),
    measured: {
      temperature_K: 35 + zero,
      maximumFraction: 0.2,
      at_s: 9720,
      mtsr_K: 52 + zero,
      curve: dosed(0.2),
    },
    usedFor: "measured",
  },
  cooling: {
    duty_W: 33050,
    capacity_W: 48410,
    use: 0.683,
    stabilityRatio: 1.63,
    noReturn_K: 57.6 + zero,
    tangency_K: 40.4 + zero,
    criticalCoolant_K: 13.7 + zero,
    curve: range(2 + zero, 80 + zero, 61).map((kelvin) => ({
      temperature_K: kelvin,
      release_W: 3e4 * Math.exp((kelvin - 35 - zero) / 16.5),
      removal_W: 1614 * (kelvin - 5 - zero),
    })),
  },
  window: {
    ...(inventedDosed.window as NonNullable<Findings["window"]>),
    feedLever: [0.25, 0.5, 1, 2, 4].map((durationFactor) => ({
      durationFactor,
      duration_s: 10800 * durationFactor,
      lower_K: durationFactor < 0.5 ? null : zero + 32 - 4 * Math.log(durationFactor),
      upper_K: durationFactor < 0.5 ? null : zero + 75 + Math.log(durationFactor),
    })),
  },
  failures: [
    failure(
      "Agitator stops at half dosing, restarts after 40 min",
      "holds",
      null,
      null,
      course(35 + zero, 52 + zero, 1500, null),
    ),
    failure("Coolant pump stops, feed stopped at once", "act", passing(slow), passing(slow) - 9e3, slow),
    {
      ...failure(
        "Coolant pump stops, feed runs on <b>unnoticed</b>",
        "act",
        passing(runningOn),
        passing(runningOn) - 700,
        runningOn,
      ),
      vulnerable: range(0, 10800, 13).map((startedAt_s, at) => ({
        startedAt_s,
        timeToAct_s: at === 0 ? 0 : at > 10 ? null : 600 + 300 * at,
        verdict: at === 0 ? "lost" : at > 10 ? "holds" : "act",
      })),
    },
    failure("Jacket steams", "lost", 500, 0, course(35 + zero, 130 + zero, 900, null)),
  ],
};

function dosed(maximum: number) {
  return range(0, 10800, 61).map((time_s) => {
    const fed = (1.05 * time_s) / 10800;
    const accumulated = maximum * Math.sin((Math.PI / 2) * (time_s / 9720)) ** 2;
    return {
      time_s,
      fed,
      reacted: Math.max(0, Math.min(1, fed) - accumulated),
      accumulated,
      mtsr_K: 35 + zero + 95 * accumulated * (1 - 0.2 * fed),
    };
  });
}
