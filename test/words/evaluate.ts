import { type Formula, readFormula } from "../../server/words/formula.js";

const raised = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** The value of a number as it is shown, such as "−1 450.5" or "3.6×10⁻⁶". */
export function numberOf(text: string): number {
  const plain = text
    .replaceAll(" ", "")
    .replace("−", "-")
    .replace(
      /×10(.+)$/u,
      (_, exponent: string) =>
        `e${[...exponent].map((each) => (each === "⁻" ? "-" : raised.indexOf(each))).join("")}`,
    );
  return Number(plain);
}

/** What a pocket calculator makes of a line without symbols. */
export function evaluate(line: string): number {
  return resultOf(readFormula(line));
}

function resultOf(formula: Formula): number {
  switch (formula.kind) {
    case "number":
      return numberOf(formula.text);
    case "group":
      return resultOf(formula.inner);
    case "fraction":
      return resultOf(formula.over) / resultOf(formula.under);
    case "product":
      return formula.factors.map(resultOf).reduce((product, factor) => product * factor, 1);
    case "scripted":
      return resultOf(formula.base) ** (formula.above === null ? 1 : resultOf(formula.above));
    case "row":
      return formula.parts.reduce(
        (sum, { sign, formula: part }) => sum + (sign === "−" ? -1 : 1) * resultOf(part),
        0,
      );
    case "call": {
      const [name, inner] = [formula.called.kind === "symbol" ? formula.called.text : "", formula.group];
      if (name === "exp") return Math.exp(resultOf(inner));
      if (name === "min" && inner.kind === "group" && inner.inner.kind === "row") {
        return Math.min(...inner.inner.parts.map((part) => resultOf(part.formula)));
      }
      throw new Error(`No number: ${name}`);
    }
    default:
      throw new Error(`No number: ${formula.text}`);
  }
}
