import { type Token, tokensOf } from "./formulaTokens.js";

/**
 * A formula as its parts. It is written as one line of text, the same line that the sheet prints: `_{…}` lowers,
 * `^{…}` raises, a space multiplies, and `/` divides the whole product before it by the one factor behind it, as in
 * `c R T_{0}²/(q′ E_{a})`. Words may stand in between.
 */
export type Formula =
  | { readonly kind: "number"; readonly text: string; readonly unit: string }
  | { readonly kind: "symbol"; readonly text: string }
  | { readonly kind: "words"; readonly text: string }
  | {
      readonly kind: "scripted";
      readonly base: Formula;
      /** plain text: what stands below tells which one is meant, and is not computed with */
      readonly below: string | null;
      readonly above: Formula | null;
    }
  | { readonly kind: "call"; readonly called: Formula; readonly group: Formula }
  | { readonly kind: "group"; readonly open: string; readonly close: string; readonly inner: Formula }
  | { readonly kind: "fraction"; readonly over: Formula; readonly under: Formula }
  | {
      readonly kind: "product";
      readonly factors: readonly Formula[];
      readonly signs: readonly ("" | "×" | "·")[];
    }
  /** parts in a row, each with the sign before it: sums, equations, lists */
  | { readonly kind: "row"; readonly parts: readonly Part[] };

export interface Part {
  /** "" before the first part */
  readonly sign: string;
  readonly formula: Formula;
}

const closing: Readonly<Record<string, string>> = { "(": ")", "[": "]", "{": "}" };
const raisedDigits = "⁰¹²³⁴⁵⁶⁷⁸⁹";
const rowSigns = [
  [",", ";", ":"],
  ["=", "<", ">", "≤", "≥", "→"],
  ["+", "−", "±"],
] as const;

/** Reads a line; what makes no sense as a formula stays in it as words. */
export function readFormula(line: string): Formula {
  const tokens = tokensOf(line);
  let at = 0;

  const peek = (): Token | undefined => tokens[at];
  const isSign = (token: Token | undefined, signs: readonly string[]): boolean =>
    token?.kind === "sign" && signs.includes(token.text);

  /** Parts between signs of one rank; the ranks run from lists over equations to sums. */
  function row(rank: number): Formula {
    const signs: readonly string[] | undefined = rowSigns[rank];
    if (signs === undefined) return product();
    const parts: Part[] = [];
    let sign = "";
    do {
      if (isSign(peek(), signs)) {
        sign = peek()?.text ?? "";
        at += 1;
      }
      parts.push({ sign, formula: row(rank + 1) });
    } while (isSign(peek(), signs));
    const [only] = parts;
    return parts.length === 1 && only?.sign === "" ? only.formula : { kind: "row", parts };
  }

  function product(): Formula {
    const factors: Formula[] = [];
    const signs: ("" | "×" | "·")[] = [];
    let sign: "" | "×" | "·" = "";
    for (let token = peek(); token !== undefined; token = peek()) {
      if (isSign(token, ["×", "·"])) {
        sign = token.text === "×" ? "×" : "·";
        at += 1;
      } else if (isSign(token, ["/"])) {
        at += 1;
        divide(factors, signs, factor());
      } else if (token.kind === "sign" && !isSign(token, ["(", "[", "∫"])) {
        break;
      } else {
        signs.push(factors.length === 0 ? "" : sign);
        factors.push(factor());
        sign = "";
      }
    }
    const [only] = factors;
    if (factors.length === 1 && only !== undefined) return only;
    return { kind: "product", factors, signs };
  }

  function factor(): Formula {
    const token = peek();
    if (token === undefined || isSign(token, [...Object.values(closing)])) return { kind: "words", text: "" };
    at += 1;
    if (token.kind === "number") {
      const unit = peek()?.kind === "unit" ? (tokens[at++]?.text ?? "") : "";
      return scripted({ kind: "number", text: token.text, unit });
    }
    if (token.kind === "sign" && closing[token.text] !== undefined) return scripted(group(token.text));
    if (token.kind === "symbol") return called(scripted({ kind: "symbol", text: token.text }));
    let text = token.text;
    for (let next = peek(); token.kind === "words" && isWord(next, tokens[at + 1]); next = peek()) {
      if (next === undefined) break;
      text += (next.spaced ? " " : "") + next.text;
      at += 1;
    }
    return scripted({ kind: "words", text });
  }

  function group(open: string): Formula {
    const close = closing[open] ?? ")";
    const inner = row(0);
    if (isSign(peek(), [close])) at += 1;
    return { kind: "group", open, close, inner };
  }

  function scripted(base: Formula): Formula {
    let below: string | null = null;
    let above: Formula | null = null;
    for (let token = peek(); token !== undefined; token = peek()) {
      if (token.kind === "raised" && !token.spaced) {
        at += 1;
        above = { kind: "number", text: plainDigits(token.text), unit: "" };
      } else if (token.kind === "script" && isSign(tokens[at + 1], ["{"])) {
        at += 2;
        const from = at;
        const inner = row(0);
        if (token.text === "^") above = inner;
        else
          below = tokens
            .slice(from, at)
            .map(({ text, spaced }, i) => (spaced && i > 0 ? ` ${text}` : text))
            .join("");
        if (isSign(peek(), ["}"])) at += 1;
      } else {
        break;
      }
    }
    return below === null && above === null ? base : { kind: "scripted", base, below, above };
  }

  function called(name: Formula): Formula {
    const token = peek();
    if (token === undefined || token.spaced || !isSign(token, ["("])) return name;
    at += 1;
    return scripted({ kind: "call", called: name, group: group("(") });
  }

  const parts: Formula[] = [row(0)];
  // A bracket that closes nothing ends a row early: it is kept, and reading goes on behind it.
  for (let token = peek(); token !== undefined; token = peek()) {
    at += 1;
    parts.push({ kind: "words", text: token.text }, row(0));
  }
  const [only] = parts;
  if (parts.length === 1 && only !== undefined) return only;
  return { kind: "product", factors: parts, signs: parts.map(() => "" as const) };
}

/** "a" between two words is the article, not a symbol. */
function isWord(token: Token | undefined, after: Token | undefined): boolean {
  return (
    token?.kind === "words" || token?.kind === "unit" || (token?.text === "a" && after?.kind === "words")
  );
}

/** Divides the product so far, back to the last words or integral sign, by one factor. */
function divide(factors: Formula[], signs: ("" | "×" | "·")[], under: Formula): void {
  const kindOf = (each: Formula | undefined): string =>
    each?.kind === "words" ? (each.text === "∫" ? "integral" : "words") : "mathematics";
  const last = kindOf(factors.at(-1));
  let from = factors.length;
  while (from > 0 && kindOf(factors[from - 1]) === last && !isDerivative(factors[from], under)) from -= 1;
  const over = factors.slice(from);
  const overSigns = signs.slice(from);
  const sign = overSigns[0] ?? "";
  overSigns[0] = "";
  factors.length = from;
  signs.length = from;
  const [only] = over;
  const whole: Formula =
    over.length === 1 && only !== undefined ? only : { kind: "product", factors: over, signs: overSigns };
  factors.push({ kind: "fraction", over: whole, under });
  signs.push(sign);
}

/** dT/dt is one thing, whatever stands before it. */
function isDerivative(over: Formula | undefined, under: Formula): boolean {
  const base = over?.kind === "scripted" ? over.base : over;
  return [base, under].every((each) => each?.kind === "symbol" && /^d\p{L}/u.test(each.text));
}

function plainDigits(raised: string): string {
  return [...raised].map((each) => (each === "⁻" ? "−" : raisedDigits.indexOf(each))).join("");
}
