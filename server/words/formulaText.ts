import { type Formula, type Part, readFormula } from "./formula.js";
import { superscript } from "./numbers.js";

/** Writes a formula back as the line that `readFormula` reads. */
export function formulaText(formula: Formula): string {
  switch (formula.kind) {
    case "number":
      return formula.unit === "" ? formula.text : `${formula.text} ${formula.unit}`;
    case "symbol":
    case "words":
      return formula.text;
    case "scripted":
      return `${formulaText(formula.base)}${formula.below === null ? "" : `_{${formula.below}}`}${formula.above === null ? "" : raisedText(formula.above)}`;
    case "call":
      return formulaText(formula.called) + formulaText(formula.group);
    case "group":
      return formula.open + formulaText(formula.inner) + formula.close;
    case "fraction":
      return `${formulaText(formula.over)}/${formulaText(formula.under)}`;
    case "product":
      return formula.factors
        .map(
          (factor, i) =>
            `${i === 0 ? "" : formula.signs[i] === "" ? " " : ` ${formula.signs[i]} `}${formulaText(factor)}`,
        )
        .join("");
    case "row":
      return formula.parts.map(partText).join("");
  }
}

function partText({ sign, formula }: Part, place: number): string {
  const text = formulaText(formula);
  if (sign === "") return text;
  if (/[,;:]/u.test(sign)) return `${sign} ${text}`;
  return place === 0 ? sign + text : ` ${sign} ${text}`;
}

/** What is raised stands without spaces, so that no line breaks inside it. */
function raisedText(above: Formula): string {
  if (above.kind === "number" && /^−?\d+$/u.test(above.text)) {
    return superscript(Number(above.text.replace("−", "-")));
  }
  return `^{${formulaText(above).replaceAll(" ", "")}}`;
}

/**
 * The formula with numbers where its symbols stood: what one types into a pocket calculator.
 *
 * @param values by symbol or bracket as it is written, such as "ΔH‡", "T_{c}", "(−ΔH_{r})"
 */
export function withNumbers(formula: Formula, values: ReadonlyMap<string, string>): Formula {
  const value = values.get(formulaText(formula));
  if (value !== undefined) return readFormula(value);
  const put = (each: Formula): Formula => withNumbers(each, values);
  switch (formula.kind) {
    case "number":
    case "symbol":
    case "words":
      return formula;
    case "scripted": {
      const bare = formula.above === null ? undefined : values.get(formulaText({ ...formula, above: null }));
      if (bare !== undefined) {
        const base = bracketed(readFormula(bare));
        return { kind: "scripted", base, below: null, above: put(formula.above ?? base) };
      }
      const above = formula.above === null ? null : put(formula.above);
      return { ...formula, base: bracketed(put(formula.base)), above };
    }
    case "call":
      return { ...formula, group: put(formula.group) };
    case "group":
      return { ...formula, inner: put(formula.inner) };
    case "fraction":
      return { kind: "fraction", over: put(formula.over), under: divisor(put(formula.under)) };
    case "product": {
      const factors = formula.factors.map((each, i) => (i === 0 ? put(each) : bracketed(put(each))));
      const signs = factors.map((each, i) => {
        const before = factors[i - 1];
        return before !== undefined && needsSign(before, each) ? "×" : (formula.signs[i] ?? "");
      });
      return { kind: "product", factors, signs };
    }
    case "row":
      return {
        kind: "row",
        parts: formula.parts.map(({ sign, formula: each }) => ({
          sign,
          formula: /[+−±]/u.test(sign) ? bracketed(put(each)) : put(each),
        })),
      };
  }
}

/** A negative number, a sum or a quotient in brackets where it stands behind another sign. */
function bracketed(formula: Formula): Formula {
  return formula.kind === "row" ? { kind: "group", open: "(", close: ")", inner: formula } : formula;
}

/** Behind a stroke 3.6×10⁶ needs brackets of its own. */
function divisor(formula: Formula): Formula {
  if (formula.kind !== "number" || !formula.text.includes("×")) return bracketed(formula);
  return { kind: "group", open: "(", close: ")", inner: formula };
}

/** Between numbers a space does not multiply. */
function needsSign(before: Formula, after: Formula): boolean {
  return (
    beginsWithNumber(after) || (holdsNumber(before) && after.kind !== "symbol" && after.kind !== "words")
  );
}

function beginsWithNumber(formula: Formula): boolean {
  if (formula.kind === "number") return true;
  if (formula.kind === "scripted") return beginsWithNumber(formula.base);
  if (formula.kind === "fraction") return beginsWithNumber(formula.over);
  if (formula.kind === "product") return formula.factors.slice(0, 1).some(beginsWithNumber);
  return false;
}

function holdsNumber(formula: Formula): boolean {
  switch (formula.kind) {
    case "number":
      return true;
    case "scripted":
      return holdsNumber(formula.base);
    case "call":
      return holdsNumber(formula.group);
    case "group":
      return holdsNumber(formula.inner);
    case "fraction":
      return holdsNumber(formula.over);
    case "product":
      return formula.factors.some(holdsNumber);
    case "row":
      return formula.parts.some((part) => holdsNumber(part.formula));
    default:
      return false;
  }
}
