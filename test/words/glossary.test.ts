import { describe, expect, test } from "vitest";
import { criteria } from "../../server/window/criteria/all.js";
import { readFormula } from "../../server/words/formula.js";
import { formulaText } from "../../server/words/formulaText.js";
import { glossary, termNamed } from "../../server/words/glossary.js";

const terms = glossary.flatMap((group) => group.terms);

test.each(terms)("$name is explained in two sentences and has a source", ({ meaning, source }) => {
  const sentences = meaning.split(/(?<=[.”])\s+(?=[A-Z0-9])/u);
  expect(sentences).toHaveLength(2);
  for (const sentence of sentences) expect(sentence).toMatch(/[.]$/u);
  expect(meaning.length).toBeLessThan(330);
  expect(source).not.toBe("");
});

test.each(terms.filter((term) => term.formula !== undefined))(
  "the formula of $name is read whole",
  ({ formula = "" }) => {
    expect(formulaText(readFormula(formula))).toBe(formula);
  },
);

test("no anchor and no name stands for two things", () => {
  const anchors = terms.map(({ id }) => id);
  expect(new Set(anchors).size).toBe(anchors.length);
  const names = terms
    .flatMap(({ name, also = [] }) => [name, ...also])
    .map((name) => (name.length > 1 ? name.toLowerCase() : name));
  expect(names.filter((name, i) => names.indexOf(name) !== i)).toEqual([]);
});

describe("a term is found", () => {
  test.each([
    ["MTSR", "mtsr"],
    ["Accumulation", "accumulation"],
    ["k", "rate-constant"],
    ["T_D24", "td24"],
    ["Cooling use", "cooling-use"],
  ])("by the name %s", (name, id) => {
    expect(termNamed(name)?.id).toBe(id);
  });

  test("by the label of every lane of the window", () => {
    for (const { label } of criteria) expect(termNamed(label), label).not.toBeNull();
  });

  test("and nothing where there is none", () => {
    expect(termNamed("K")).toBeNull();
    expect(termNamed("weather")).toBeNull();
  });
});
