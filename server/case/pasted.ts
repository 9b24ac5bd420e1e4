/** Characters that mean the same as a plain one, as they come from papers, spreadsheets and keyboards. */
const sameAs: readonly (readonly [RegExp, string])[] = [
  [/[\u200b\u2060\ufeff]/g, ""],
  [/[\t\u00a0\u2000-\u200a\u202f\u205f\u3000]/g, " "],
  [/[\u2010-\u2013\u2212\ufe63\uff0d]/g, "-"],
  [/[\u00b7\u2022\u2219\u22c5\u00d7]/g, "*"],
  [/[\u2044\u2215]/g, "/"],
  [/[\u00b5\u03bc]/g, "u"],
  [/\u2113/g, "L"],
  [/\u212a/g, "K"],
  [/\u2103/g, "degC"],
  [/\u2109/g, "degF"],
  [/[\u00b0\u00ba] ?([CF])(?![A-Za-z0-9])/g, "deg$1"],
  [/\bdeg ([CF])\b/g, "deg$1"],
  [/[\u00b0\u00ba] ?K\b|\bdegK\b/g, "K"],
  [/\*\*/g, "^"],
  [/\^\(([+-]?[\d.]+)\)/g, "^$1"],
];

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** The plain character of a superscript one. */
function lowered(character: string): string {
  if (character === "⁻") return "-";
  if (character === "⁺") return "+";
  return String(superscripts.indexOf(character));
}

/**
 * Quantity text in plain characters: `62 kJ·mol⁻¹` becomes `62 kJ*mol^-1`, `35 °C` becomes `35 degC`.
 * What has no plain equivalent stays, for the caller to refuse.
 */
export function plainCharacters(text: string): string {
  let plain = text.replace(/[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (run) => `^${run.replace(/./g, lowered)}`);
  for (const [pattern, replacement] of sameAs) plain = plain.replace(pattern, replacement);
  return plain.trim();
}
