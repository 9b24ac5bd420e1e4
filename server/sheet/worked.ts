import { readFormula } from "../words/formula.js";
import { formulaText, withNumbers } from "../words/formulaText.js";
import { plainNumberText } from "../words/numbers.js";

/** Exact (SI 2019); R to the digits of a pocket calculator. */
const constants = { R: "8.314462618", "k_{B}": "1.380649×10⁻²³", h: "6.62607015×10⁻³⁴" };

/**
 * An equation with this case's numbers in it, as one would type it: `k = 4.1×10⁹ × exp(−62 000/(8.314462618 × 313.15))`.
 *
 * @param equation left and right side, in the notation of `readFormula`
 * @param values SI, by symbol or bracket; constants of nature need not be among them
 * @param result what the program found, with its unit
 */
export function worked(
  equation: string,
  values: Readonly<Record<string, number | string>>,
  result: string,
): string {
  const texts = Object.entries({ ...constants, ...values }).map(
    ([symbol, value]) => [symbol, typeof value === "number" ? typeable(value) : value] as const,
  );
  const [left = "", right = ""] = equation.split(" = ");
  return `${left} = ${formulaText(withNumbers(readFormula(right), new Map(texts)))} = ${result}`;
}

/** Up to eight digits, so that a calculator comes to the same figure; no noughts behind the last that counts. */
export function typeable(value: number): string {
  return plainNumberText(value, 8);
}
