import type { Area, Band, Line, Points, Rule } from "./figure.js";
import type { Point } from "./geometry.js";
import { textSizes } from "./palette.js";
import type { Primitive } from "./primitive.js";
import { filledBox, grown, rectangle, shapeAt, strokeAlong, textAt, textBox } from "./strokes.js";
import { textWidth, wrapText } from "./textWidth.js";

/** A mark whose name stands under the panel beside a sample of it. */
export type KeyEntry = (Line | Points | Band | Area | Rule) & {
  readonly name: string;
};

const sampleWidth = 26;
const rowHeight = 17;

function sample(entry: KeyEntry, x: number, y: number): Primitive[] {
  const box = { left: x, right: x + sampleWidth, top: y - 5, bottom: y + 5 };
  switch (entry.type) {
    case "rule":
    case "line": {
      const upright = entry.type === "rule" && entry.across === "x";
      const middle = x + sampleWidth / 2;
      const ends: readonly Point[] = upright
        ? [
            [middle, y - 7],
            [middle, y + 7],
          ]
        : [
            [x, y],
            [x + sampleWidth, y],
          ];
      return [strokeAlong(ends, entry.tone, entry.dash, entry.weight)];
    }
    case "points":
      return [shapeAt([x + sampleWidth / 2, y], entry.shape, entry.tone)];
    case "band":
      return [rectangle(box, entry.tone, "tint")];
    case "area":
      return filledBox(box, entry.fill, entry.tone, true);
  }
}

/** The short word of a line, on its sample as on the line. */
function tagged(entry: KeyEntry, x: number, y: number): Primitive[] {
  if (entry.type !== "line" || entry.tag === undefined) return [];
  const text = textAt(x + sampleWidth / 2, y + 4, entry.tag, {
    anchor: "middle",
    bold: true,
    tone: entry.tone,
  });
  return [rectangle(grown(textBox(text), 2, 0), "faint", "paper"), text];
}

/**
 * The key of a panel, in as many rows as it takes; marks of the same name stand in it once.
 *
 * @param top y of its upper edge; without entries it takes no room
 */
export function layoutKey(
  entries: readonly KeyEntry[],
  left: number,
  right: number,
  top: number,
): { readonly primitives: readonly Primitive[]; readonly bottom: number } {
  if (entries.length === 0) return { primitives: [], bottom: top };
  const primitives: Primitive[] = [];
  let x = left;
  let middle = top + rowHeight / 2;
  const named = new Map(entries.map((entry) => [entry.name, entry]));
  for (const entry of named.values()) {
    const lines = wrapText(entry.name, textSizes.small, right - left - sampleWidth);
    const width = sampleWidth + 6 + Math.max(...lines.map((line) => textWidth(line, textSizes.small)));
    if (x > left && x + width > right) {
      x = left;
      middle += rowHeight;
    }
    primitives.push(...sample(entry, x, middle), ...tagged(entry, x, middle));
    lines.forEach((line, at) => {
      if (at > 0) middle += rowHeight - 3;
      primitives.push(textAt(x + sampleWidth + 6, middle + 4, line));
    });
    x = lines.length > 1 ? right : x + width + 18;
  }
  return { primitives, bottom: middle + rowHeight / 2 + 3 };
}
