import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { figuresOf } from "../../server/charts/figures.js";
import { drawSvg } from "../../server/charts/svg.js";
import type { Findings, Spans } from "../../server/screening/findings.js";
import { inventedBatch } from "./invented.js";
import { inventedWhole } from "./inventedWhole.js";

const kelvin = fc.double({ min: 150, max: 5000, noNaN: true });
const positive = fc.oneof(
  fc.double({ min: 1e-300, max: 1e300, noNaN: true }),
  fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
);
const maybe = <T>(value: fc.Arbitrary<T>) => fc.option(value, { nil: null });
const spans: fc.Arbitrary<Spans> = fc.array(
  fc.tuple(kelvin, kelvin).map(([a, b]) => [Math.min(a, b), Math.max(a, b)] as const),
  { maxLength: 3 },
);
const percentiles = maybe(fc.record({ p05: maybe(kelvin), p50: maybe(kelvin), p95: maybe(kelvin) }));

function whole<
  K extends "rate" | "timeToMaximumRate" | "window" | "cooling" | "accumulation" | "uncertainty",
>(key: K): NonNullable<Findings[K]> {
  return (inventedWhole[key] ?? inventedBatch[key]) as NonNullable<Findings[K]>;
}

const findings: fc.Arbitrary<Findings> = fc
  .record({
    process_K: kelvin,
    mtsr_K: maybe(kelvin),
    mtt_K: kelvin,
    td24_K: maybe(kelvin),
    times: fc.array(fc.tuple(kelvin, maybe(positive), maybe(positive)), { maxLength: 12 }),
    constants: fc.array(fc.tuple(kelvin, positive, maybe(positive), maybe(positive)), { maxLength: 12 }),
    fitted: maybe(fc.tuple(kelvin, kelvin).map(([a, b]) => [Math.min(a, b), Math.max(a, b)] as const)),
    atProcess: maybe(positive),
    lower_K: maybe(kelvin),
    upper_K: maybe(kelvin),
    allowed: spans,
    cautious: maybe(spans),
    heats: fc.array(fc.tuple(kelvin, positive, fc.double({ min: -1e9, max: 1e9, noNaN: true })), {
      maxLength: 12,
    }),
    special: fc.tuple(maybe(kelvin), maybe(kelvin), maybe(kelvin)),
    percentiles,
    trace: fc.array(fc.tuple(fc.double({ min: 0, max: 1e7, noNaN: true }), kelvin), { maxLength: 12 }),
    passing: maybe(fc.double({ min: 0, max: 1e7, noNaN: true })),
    act: maybe(fc.double({ min: 0, max: 1e7, noNaN: true })),
  })
  .map((any) => ({
    ...inventedWhole,
    temperatures: { ...any, allAtOnce_K: null },
    rate: {
      ...whole("rate"),
      atProcess: { ...whole("rate").atProcess, temperature_K: any.process_K, k: any.atProcess },
      fittedRange_K: any.fitted,
      table: any.constants.map(([temperature_K, k, low95, high95]) => ({
        temperature_K,
        k,
        low95,
        high95,
        extrapolated: null,
      })),
    },
    timeToMaximumRate: {
      ...whole("timeToMaximumRate"),
      curve: any.times.map(([temperature_K, time_s, zeroOrder_s]) => ({
        temperature_K,
        time_s,
        zeroOrder_s,
      })),
    },
    cooling: {
      ...whole("cooling"),
      noReturn_K: any.special[0],
      tangency_K: any.special[1],
      criticalCoolant_K: any.special[2],
      curve: any.heats.map(([temperature_K, release_W, removal_W]) => ({
        temperature_K,
        release_W,
        removal_W,
      })),
    },
    window: {
      ...whole("window"),
      lower_K: any.lower_K,
      upper_K: any.upper_K,
      allowed: any.allowed,
      criteria: whole("window").criteria.map((each) => ({
        ...each,
        allowed: any.allowed,
        cautious: any.cautious,
      })),
    },
    uncertainty: { ...whole("uncertainty"), td24_K: any.percentiles, mtsr_K: any.percentiles },
    failures: (inventedWhole.failures ?? []).map((failure) => ({
      ...failure,
      timeToMtt_s: any.passing,
      timeToAct_s: any.act,
      trace: any.trace
        .toSorted(([a], [b]) => a - b)
        .map(([time_s, temperature_K]) => ({ time_s, temperature_K, jacket_K: temperature_K })),
    })),
  }));

describe("figures of findings with any numbers", () => {
  test("never hold a number that is none, and never throw", () => {
    fc.assert(
      fc.property(findings, (any) => {
        for (const figure of figuresOf(any)) {
          const drawn = `${drawSvg(figure)}${figure.table.rows.flat().join(" ")}`;
          expect(drawn).not.toMatch(/ (?:d|x|y|width|height)="[^"]*e[+-]/);
          expect(drawn).not.toMatch(/ (?:width|height)="-/);
          expect(drawn).not.toMatch(/NaN|Infinity|undefined|\bnull\b/);
        }
      }),
      { numRuns: 150 },
    );
  });
});
