/** The smallest parts of a formula as it is written in one line of text. */
export interface Token {
  readonly kind: "number" | "symbol" | "words" | "unit" | "sign" | "script" | "raised";
  readonly text: string;
  /** whether a space stands before it: `f(α)` is a call, `f (α)` a product */
  readonly spaced: boolean;
}

const unit = "(?:°C|%|k?(?:g|J|W|Pa)|mol|min|m|s|h|L|K|days|years)(?:⁻?[¹²³⁴-⁹]+)?(?![\\p{L}_{‡′])";
const units = `${unit}(?: ${unit})*(?:/(?:\\(${unit}(?: ${unit})*\\)|${unit}))?`;

const patterns: readonly (readonly [Token["kind"], RegExp])[] = [
  ["number", /\d{1,3}(?: \d{3})+(?!\d)(?:\.\d+)?(?:×10[⁻⁰¹²³⁴-⁹]+)?|\d+(?:\.\d+)?(?:×10[⁻⁰¹²³⁴-⁹]+)?/uy],
  ["script", /[_^]/uy],
  ["raised", /⁻?[⁰¹²³⁴-⁹]+/uy],
  ["sign", /[()[\]{}+−×·/,;:=<>≤≥±∫→]/uy],
  [
    "symbol",
    /(?:Δ|d)?\p{L}[‡′*]*(?![\p{L}])|[A-Z]{2}[A-Za-z]*′?(?![\p{L}])|(?:exp|ln|log|min|max|var)(?![\p{L}])/uy,
  ],
  ["words", /[^\s\d()[\]{}+−×·/,;:=<>≤≥±∫_^]+/uy],
];
const unitsAfterNumber = new RegExp(` (?:${units}|1/s)`, "uy");

/** Splits one line into its parts; every character but spaces lands in one of them. */
export function tokensOf(line: string): readonly Token[] {
  const tokens: Token[] = [];
  let at = 0;
  let spaced = false;
  while (at < line.length) {
    if (/\s/u.test(line.charAt(at))) {
      spaced = true;
      at += 1;
      continue;
    }
    const found = firstAt(line, at);
    tokens.push({ ...found, spaced });
    at += found.text.length;
    spaced = false;
    const measured =
      found.kind === "number" || found.text === "in" ? matchAt(unitsAfterNumber, line, at) : null;
    if (measured !== null) {
      tokens.push({ kind: "unit", text: measured.trim(), spaced: true });
      at += measured.length;
    }
  }
  return tokens;
}

function firstAt(line: string, at: number): { readonly kind: Token["kind"]; readonly text: string } {
  for (const [kind, pattern] of patterns) {
    const text = matchAt(pattern, line, at);
    if (text !== null) return { kind, text };
  }
  return { kind: "words", text: line.charAt(at) };
}

function matchAt(pattern: RegExp, line: string, at: number): string | null {
  pattern.lastIndex = at;
  return pattern.exec(line)?.[0] ?? null;
}
