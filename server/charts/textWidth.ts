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

/** For every other character: no narrower than those that figures use (°, −, ×, superscripts). */
const otherAdvance = 620;

/** Semibold letters are at most this much wider. */
const boldFactor = 1.06;

/**
 * Width of a line of text in the fonts of page and sheet.
 *
 * @param size font size in the unit of the result
 */
export function textWidth(text: string, size: number, bold = false): number {
  let sum = 0;
  for (const character of text) sum += advances[(character.codePointAt(0) ?? 0) - 32] ?? otherAdvance;
  return (sum / 1000) * size * (bold ? boldFactor : 1);
}

/**
 * Breaks text at spaces into lines no wider than `width`; a longer word stands alone on its line.
 */
export function wrapText(text: string, size: number, width: number): string[] {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(/\s+/).filter((each) => each !== "")) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (line !== "" && textWidth(longer, size) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  return line === "" ? lines : [...lines, line];
}

/** Cuts text to a width, with an ellipsis where something is missing. */
export function shortened(text: string, size: number, width: number): string {
  if (textWidth(text, size) <= width) return text;
  const characters = [...text];
  while (characters.length > 1 && textWidth(`${characters.join("")}…`, size) > width) characters.pop();
  return `${characters.join("").trimEnd()}…`;
}
