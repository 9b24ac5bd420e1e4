import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readFormula } from "../../server/words/formula.js";
import { formulaText, withNumbers } from "../../server/words/formulaText.js";
import { evaluate } from "./evaluate.js";

const lines = [
  "k = κ (k_{B} T/h) c_{0}^{1−n} exp(ΔS‡/R) exp(−ΔH‡/(R T))",
  "k = k_{ref} exp(−E_{a}/R (1/T − 1/T_{ref}))",
  "TMR_{ad,0} = c R T_{0}²/(q′ E_{a}), q′ = k_{d}(T_{0}) f(α_{0}) Q",
  "C′ dT/dt = r V (−ΔH_{r}) + feed c_{p} (T_{feed} − T) − UA (T − T_{j}) + heat gain; holdup c_{p} dT_{j}/dt = UA (T − T_{j})",
  "TMRad = ∫ dα/(k_{d}(T) f(α)) from α_{0} to α*, T = T_{0} + ΔT_{ad,d} (α − α_{0})",
  "C(end) = 1 450 kg × 1.95 kJ/(kg K) + 420 kg × 1.8 kJ/(kg K)",
  "T_{all} = [m_{0} c_{p,0} T + n_{lim} (−ΔH_{r})]/C(end)",
];

test.each(lines)("%s comes back as it was written", (line) => {
  expect(formulaText(readFormula(line))).toBe(line);
});

describe("how a line is read", () => {
  test.each([
    ["a quotient takes the whole product before it", "2 × 3 × 4/8", 3],
    ["and one factor behind it, what follows multiplies", "12/4 × (1/2 + 1/4)", 2.25],
    ["minus before a product", "−2 × 3 − (−1)", -5],
    ["powers, raised and written out", "3² × 2^{3} × 10^{1−2}", 7.2],
    ["numbers with powers of ten and with spaces", "1 450.5 × 2×10⁻³/(1×10³)", 0.002901],
    ["functions", "min(4, 9/3) × exp(−1 + 1)", 3],
    ["units are no factors", "1 450 kg × 1.95 kJ/(kg K)", 2827.5],
  ])("%s", (_, line, value) => {
    expect(evaluate(line)).toBeCloseTo(value, 12);
  });

  test("a derivative is one factor, whatever stands before it", () => {
    const read = readFormula("holdup c_{p} dT_{j}/dt");
    expect(read).toMatchObject({ kind: "product", factors: [{}, {}, { kind: "fraction" }] });
  });

  test("words, even senseless ones, stay in it", () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom(..."ab12 ()[]{}_^/,;=+−×∫²⁻Δ‡′<&") }), (line) => {
        const kept = (text: string) => text.replace(/[\s×]/gu, "").length;
        expect(kept(formulaText(readFormula(line)))).toBeGreaterThanOrEqual(
          line.replace(/[\s×(){}[\]_^⁻²]/gu, "").length - 2 * (line.match(/[_^]/gu)?.length ?? 0),
        );
      }),
    );
  });
});

describe("numbers put in", () => {
  const put = (line: string, values: Readonly<Record<string, string>>) =>
    formulaText(withNumbers(readFormula(line), new Map(Object.entries(values))));

  test("take the place of symbols, and multiply with a sign between them", () => {
    expect(put("m_{0} c_{p,0} T/h", { "m_{0}": "2", "c_{p,0}": "3", T: "4", h: "5" })).toBe("2 × 3 × 4/5");
    expect(put("T_{0}²/T", { "T_{0}": "300", T: "4" })).toBe("300²/4");
  });

  test("keep brackets where a calculator would go wrong without", () => {
    expect(put("a b", { a: "2", b: "−3" })).toBe("2 × (−3)");
    expect(put("a − b", { a: "2", b: "−3" })).toBe("2 − (−3)");
    expect(put("a/b", { a: "2", b: "3.6×10⁶" })).toBe("2/(3.6×10⁶)");
    expect(put("exp(a/b)", { a: "−3", b: "2" })).toBe("exp(−3/2)");
  });

  test("leave alone what has no number", () => {
    expect(put("k_{d}(T_{0}) f(0) Q", { "T_{0}": "300", Q: "5" })).toBe("k_{d}(300) × f(0) × 5");
  });
});
