import fc from "fast-check";
import { expect, test } from "vitest";
import { mathMl } from "../../server/words/mathml.js";

/** Every tag is closed by its own; text holds no markup. */
function isWellFormed(markup: string): boolean {
  const open: string[] = [];
  for (const [tag, slash, name = "", rest = ""] of markup.matchAll(/<(\/?)([a-z]+)([^<>]*)>/g)) {
    if (tag.endsWith("/>")) continue;
    if (slash === "") open.push(name);
    else if (open.pop() !== name) return false;
    if (rest !== "" && !/^( [a-z]+="[^"<>]*")+$/.test(rest)) return false;
  }
  return open.length === 0 && !/[<>]/.test(markup.replace(/<\/?[a-z]+[^<>]*>/g, ""));
}

test("a fraction, scripts and an upright Δ are drawn as such", () => {
  const drawn = mathMl("exp(−ΔH‡/(R T_{ref}²))");
  expect(drawn).toContain("<mfrac>");
  expect(drawn).toContain('<mi mathvariant="normal">Δ</mi><msup><mi>H</mi>');
  expect(drawn).toContain("<msubsup><mi>T</mi><mtext>ref</mtext><mrow><mn>2</mn></mrow></msubsup>");
});

test("the brackets of a divisor become the bar of the fraction", () => {
  expect(mathMl("a/(b + c)")).not.toContain("<mo>(</mo>");
});

test("a short clause stays together, what stands between clauses is text", () => {
  expect(mathMl("a = b, or more")).toBe('<math><mi>a</mi><mo form="infix">=</mo><mi>b</mi></math>, or more');
});

test("a long equation may break before its signs", () => {
  const drawn = mathMl("k = κ (k_{B} T/h) c_{0}^{1−n} exp(ΔS‡/R) exp(−ΔH‡/(R T))");
  expect(drawn.split("</math> <math>").length).toBeGreaterThan(4);
  expect(drawn).toContain('<math><mo form="infix">=</mo><mi>κ</mi></math>');
});

test("anything typed comes out as text in well-formed markup", () => {
  expect(mathMl('<script>alert(1)</script> & "x"')).not.toContain("<script");
  const characters = fc.constantFrom(...'ab12 ()[]{}_^/,;=+−×∫²⁻Δ‡′<>&"');
  fc.assert(
    fc.property(fc.string({ unit: characters }), (line) => {
      expect(isWellFormed(mathMl(line)), mathMl(line)).toBe(true);
    }),
    { numRuns: 1000 },
  );
});
