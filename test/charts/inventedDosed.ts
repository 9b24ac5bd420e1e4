import type { Findings } from "../../server/screening/findings.js";
import { inventedBatch, inventedRate, inventedTimes, range, zero } from "./invented.js";

const labels = {
  completion: "done in time",
  cooling: "cooling suffices",
  "mtsr-mtt": "MTSR below MTT",
  "mtsr-tmr": "TMRad from MTSR",
  hold: "TMRad from Tp",
  stability: "steadies itself",
} as const;

const criteria = {
  completion: [[22.6, 80]],
  cooling: [[30.4, 80]],
  "mtsr-mtt": [[0, 74.9]],
  "mtsr-tmr": [],
  hold: [],
  stability: [],
} as const;

function spans(celsius: readonly (readonly [number, number])[], shrink = 0): [number, number][] {
  return celsius.map(([from, to]) => [from + zero + shrink, to + zero - shrink]);
}

/** A dosed case with a window, one criterion not assessed, one met nowhere. */
export const inventedDosed: Findings = {
  ...inventedBatch,
  rate: inventedRate(12, 64.6e3, 35 + zero, range(0 + zero, 80 + zero, 41), [5 + zero, 30 + zero]),
  decompositionRate: inventedRate(26.7, 128e3, 35 + zero, range(20 + zero, 160 + zero, 36), null),
  temperatures: {
    process_K: 35 + zero,
    mtsr_K: 48.17 + zero,
    mtt_K: 78 + zero,
    td24_K: 100.85 + zero,
    allAtOnce_K: 112 + zero,
  },
  timeToMaximumRate: inventedTimes(35 + zero, 48.17 + zero, 100.85 + zero, 260 + zero),
  criticality: { class: 1, probability: null },
  window: {
    lower_K: 30.4 + zero,
    upper_K: 74.9 + zero,
    lowerSetBy: "cooling",
    upperSetBy: "mtsr-mtt",
    incomplete: true,
    containsProcess: true,
    controlBand_K: 2,
    lowest_K: zero,
    highest_K: 80 + zero,
    allowed: spans([[30.4, 74.9]]),
    conflict: null,
    cautious: { lower_K: 33.1 + zero, upper_K: 69.2 + zero },
    criteria: (["completion", "cooling", "mtsr-mtt", "mtsr-tmr", "hold", "stability"] as const).map(
      (key) => ({
        key,
        label: labels[key],
        binding: key !== "stability",
        assessed: key !== "mtsr-tmr",
        allowed: key === "hold" ? spans([[0, 80]]) : spans(criteria[key]),
        cautious: key === "mtsr-tmr" ? null : key === "hold" ? spans([[0, 76]]) : spans(criteria[key], 3),
        metAtProcess: key === "mtsr-tmr" ? null : key !== "stability",
        probability: key === "mtsr-tmr" ? null : 0.96,
      }),
    ),
    feedLever: null,
  },
  uncertainty: {
    draws: 2000,
    seed: 1,
    td24_K: { p05: 90 + zero, p50: 101 + zero, p95: 110 + zero },
    mtsr_K: { p05: 46.6 + zero, p50: 48.2 + zero, p95: 50.1 + zero },
    upper_K: null,
    timeToMaximumRateAtProcess_s: null,
    timeToMaximumRateAtMtsr_s: null,
    coolingUse: null,
    timeToAct_s: null,
    drivers: null,
    nextMeasurement: null,
  },
};
