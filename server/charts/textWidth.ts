/**
 * Advance widths of IBM Plex Sans Regular for U+0020 to U+007E, thousandths of an em, so that a layout on the
 * server knows what fits. A test compares them with the font file.
 */
const advances = [
  236, 284, 419, 713, 598, 927, 694, 242, 335, 335, 450, 600, 272, 399, 272, 383, 600, 600, 600, 600, 600,
  600, 600, 600, 600, 600, 292, 292, 600, 600, 600, 477, 891, 641, 653, 621, 671, 583, 559, 695, 707, 400,
  510, 634, 501, 812, 707, 708, 606, 708, 640, 581, 572, 678, 609, 891, 613, 593, 580, 317, 383, 317, 600,
  565, 600, 534, 580, 503, 580, 549, 324, 528, 568, 250, 250, 527, 272, 873, 568, 560, 580, 580, 367, 487,
  351, 568, 492, 768, 507, 499, 464, 343, 314, 343, 600,
] as const;

/** As wide as a space. */
const noBreak = "\u00a0";

/** Letters with accents and the symbols that figures use (°, −, ×, superscripts) are no wider. */
const symbolAdvance = 620;
const symbols = /[\u00a1-\u024f\u2070-\u207f−≥≤–]/;

/** Anything else may come from a fallback font: as wide as it is high. */
const otherAdvance = 1000;

/** Semibold letters are at most this much wider. */
const boldFactor = 1.06;

/**
 * Width of a line of text in the fonts of page and sheet.
 *
 * @param size font size in the unit of the result
 */
export function textWidth(text: string, size: number, bold = false): number {
  let sum = 0;
  for (const character of text.replaceAll(noBreak, " "))
    sum +=
      advances[(character.codePointAt(0) ?? 0) - 32] ??
      (symbols.test(character) ? symbolAdvance : otherAdvance);
  return (sum / 1000) * size * (bold ? boldFactor : 1);
}

/** A space before a unit, where no line may end. */
const beforeUnit = /\s+(?=(?:°C|K|%|s|min|h|days|years|W|kW)(?:[\s.,;:)]|$))/g;

/**
 * Breaks text at spaces into lines no wider than `width`; a longer word stands alone on its line, and a number
 * stays with its unit.
 */
export function wrapText(text: string, size: number, width: number): string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text
    .replace(beforeUnit, noBreak)
    .split(/[ \t\r\n]+/)
    .filter((each) => each !== "")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (line !== "" && textWidth(longer, size) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  if (line !== "") lines.push(line);
  return lines.map((each) => each.replaceAll(noBreak, " "));
}

/** Cuts text to a width, with an ellipsis where something is missing. */
export function shortened(text: string, size: number, width: number): string {
  if (textWidth(text, size) <= width) return text;
  const characters = [...text];
  while (characters.length > 1 && textWidth(`${characters.join("")}…`, size) > width) characters.pop();
  return `${characters.join("").trimEnd()}…`;
}
