import { type Formula, type Part, readFormula } from "./formula.js";
import { formulaText } from "./formulaText.js";

/**
 * A formula for a page: MathML, in pieces between which a line may break, and words between them as plain text.
 *
 * @param line as `readFormula` takes it; whatever stands in it comes out as text, never as markup
 */
export function mathMl(line: string): string {
  const pieces: string[] = [];
  /** signs that wait for what they stand before */
  let waiting = "";
  const mathematics = (inner: string): void => {
    pieces.push(`<math>${waiting}${inner}</math>`);
    waiting = "";
  };
  const words = (text: string): void => {
    if (waiting !== "") mathematics("");
    if (text !== "") pieces.push(escaped(text));
  };

  /** Lays out the outermost parts one after the other; what is inside brackets and fractions stays in one piece. */
  function flow(formula: Formula): void {
    if (formula.kind === "words" && formula.text !== "∫") words(formula.text);
    else if (formula.kind === "group" && isProse(formula)) {
      if (waiting !== "") mathematics("");
      const first = pieces.length;
      flow(formula.inner);
      pieces[first] = formula.open + (pieces[first] ?? "");
      pieces.push((pieces.pop() ?? "") + formula.close);
    } else if (formula.kind === "row" && !isShort(formula)) {
      for (const [i, { sign, formula: part }] of formula.parts.entries()) {
        if (isPause(sign)) pieces.push(`${pieces.pop() ?? ""}${sign}`);
        else if (sign !== "") waiting += signMl(sign, i);
        flow(part);
      }
    } else if (formula.kind === "product" && isLong(formula)) {
      for (const [i, factor] of formula.factors.entries()) {
        const sign = formula.signs[i] ?? "";
        if (sign !== "") waiting += signMl(sign, i);
        if (factor.kind === "words" && factor.text === "∫") waiting += "<mo>∫</mo>";
        else flow(factor);
      }
    } else mathematics(draw(formula));
  }

  flow(readFormula(line));
  if (waiting !== "") mathematics("");
  return pieces.join(" ");
}

/** A sentence whose scripts alone are drawn, for what is no formula: "at E_{a} ΔT/(R T_{0}²) ≥ n + 3". */
export function proseWithScripts(line: string): string {
  return escaped(line)
    .replace(/_\{([^{}]*)\}/gu, "<sub>$1</sub>")
    .replace(/\^\{([^{}]*)\}/gu, "<sup>$1</sup>");
}

/** More factors than these may stand on two lines. */
const shortProduct = 3;
/** A clause of so many characters stays on one line, such as "T = 308.15 K". */
const shortClause = 30;

function isShort(formula: Formula): boolean {
  const text = formulaText(formula);
  return text.length <= shortClause && !/[,;:]|\p{L}{4}/u.test(text);
}

function isLong({ factors }: Extract<Formula, { kind: "product" }>): boolean {
  return factors.length > shortProduct || factors.some(isProse);
}

/** Holds words between which a line may break, and which look better as text. */
function isProse(formula: Formula): boolean {
  switch (formula.kind) {
    case "words":
      return formula.text !== "";
    case "group":
      return isProse(formula.inner);
    case "product":
      return formula.factors.some(isProse);
    case "row":
      return formula.parts.some((part) => isProse(part.formula));
    default:
      return false;
  }
}

function isPause(sign: string): boolean {
  return /^[,;:]$/u.test(sign);
}

/** One formula without breaks. */
function draw(formula: Formula): string {
  switch (formula.kind) {
    case "number":
      return (
        numberMl(formula.text) + (formula.unit === "" ? "" : `<mtext>\u2009${escaped(formula.unit)}</mtext>`)
      );
    case "symbol":
      return symbolMl(formula.text, null, null);
    case "words":
      return formula.text === "∫" ? "<mo>∫</mo>" : `<mtext>${escaped(formula.text)}</mtext>`;
    case "scripted":
      return scriptedMl(formula);
    case "call":
      return `${draw(formula.called)}<mo>\u2061</mo>${draw(formula.group)}`;
    case "group":
      return groupMl(formula);
    case "fraction":
      return `<mfrac><mrow>${draw(unwrapped(formula.over))}</mrow><mrow>${draw(unwrapped(formula.under))}</mrow></mfrac>`;
    case "product":
      return formula.factors
        .map((each, i) => joint(formula.factors[i - 1], formula.signs[i] ?? "", each) + draw(each))
        .join("");
    case "row":
      return formula.parts.map(partMl).join("");
  }
}

function partMl({ sign, formula }: Part, place: number): string {
  const pause = isPause(sign) ? '<mspace width="0.3em"/>' : "";
  return `${sign === "" ? "" : signMl(sign, place)}${pause}${draw(formula)}`;
}

function joint(before: Formula | undefined, sign: string, after: Formula): string {
  if (before === undefined) return "";
  if (sign !== "") return `<mo>${sign}</mo>`;
  if (after.kind === "call" && after.called.kind === "symbol" && /^[a-z]{2}/u.test(after.called.text)) {
    return '<mspace width="0.17em"/>';
  }
  return before.kind === "words" || after.kind === "words" ? '<mspace width="0.3em"/>' : "<mo>\u2062</mo>";
}

/** Where a piece begins with it, a sign between two things would pass for one before a single thing. */
function signMl(sign: string, place: number): string {
  return `<mo form="${place === 0 ? "prefix" : "infix"}">${escaped(sign)}</mo>`;
}

/** Brackets as tall as what they hold; around a plain line some fonts would make them taller than it. */
function groupMl({ open, close, inner }: Extract<Formula, { kind: "group" }>): string {
  const drawn = draw(inner);
  const stretch = drawn.includes("<mfrac>") ? "" : ' stretchy="false"';
  return `<mrow><mo${stretch}>${open}</mo>${drawn}<mo${stretch}>${close}</mo></mrow>`;
}

/** A bar of a fraction holds together what brackets would. */
function unwrapped(formula: Formula): Formula {
  return formula.kind === "group" && formula.open !== "{" ? formula.inner : formula;
}

function numberMl(text: string): string {
  const [mantissa = "", exponent] = text.split("×10");
  const number = `<mn>${mantissa.replaceAll(" ", "\u2009")}</mn>`;
  if (exponent === undefined) return number;
  const plain = [...exponent].map((each) => (each === "⁻" ? "−" : "⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(each))).join("");
  return `${number}<mo>×</mo><msup><mn>10</mn><mn>${plain}</mn></msup>`;
}

function scriptedMl({ base, below, above }: Extract<Formula, { kind: "scripted" }>): string {
  if (base.kind === "symbol") return symbolMl(base.text, below, above);
  return scripts(`<mrow>${draw(base)}</mrow>`, below, above === null ? null : draw(above));
}

/** ΔH‡ is an upright Δ, an H in italics and a raised ‡. */
function symbolMl(text: string, below: string | null, above: Formula | null): string {
  const [, lead = "", letters = "", marks = ""] = /^(Δ|d(?=\p{L}))?(\p{L}+)([‡′*]*)$/u.exec(text) ?? [
    null,
    "",
    text,
    "",
  ];
  const upright = lead === "" ? "" : `<mi mathvariant="normal">${lead}</mi>`;
  const raised = above === null ? "" : draw(above);
  const marked = marks === "" ? "" : `<mo lspace="0" rspace="0">${escaped(marks)}</mo>`;
  const top = marked + raised;
  return upright + scripts(`<mi>${escaped(letters)}</mi>`, below, top === "" ? null : top);
}

function scripts(base: string, below: string | null, above: string | null): string {
  const lower = below === null ? "" : `<mtext>${escaped(below)}</mtext>`;
  const upper = above === null ? "" : `<mrow>${above}</mrow>`;
  if (lower !== "" && upper !== "") return `<msubsup>${base}${lower}${upper}</msubsup>`;
  if (lower !== "") return `<msub>${base}${lower}</msub>`;
  return upper === "" ? base : `<msup>${base}${upper}</msup>`;
}

const entities: Readonly<Record<string, string>> = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" };

function escaped(text: string): string {
  return text.replace(/[&<>"]/gu, (character) => entities[character] ?? character);
}
