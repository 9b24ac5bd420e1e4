import { textSizes } from "./palette.js";
import { textWidth } from "./textWidth.js";

/** Words over a vertical rule. */
export interface Flag {
  readonly x: number;
  readonly text: string;
}

export interface PlacedFlag extends Flag {
  /** 0 is nearest to the panel */
  readonly row: number;
  /** the side of the rule on which the words stand */
  readonly side: "right" | "left";
  readonly left: number;
  readonly right: number;
  /** another's rule runs under the words, so that they need a clear ground */
  readonly crossed: boolean;
}

const gap = 4;

function standing(flag: Flag, side: "right" | "left"): { left: number; right: number } {
  const width = textWidth(flag.text, textSizes.small) + gap;
  return side === "right"
    ? { left: flag.x, right: flag.x + width + gap }
    : { left: flag.x - width - gap, right: flag.x };
}

/**
 * Rows for one choice of sides: a flag stands above every one whose rule passes through its words, and never
 * beside one that it would touch.
 *
 * @returns null where two flags would each have to be above the other
 */
function rowsFor(
  flags: readonly Flag[],
  sides: readonly ("right" | "left")[],
  bounds: readonly [number, number],
): PlacedFlag[] | null {
  const spans = flags.map((flag, at) => standing(flag, sides[at] ?? "right"));
  if (spans.some((span) => span.left < bounds[0] || span.right > bounds[1])) return null;
  const passes = (rule: number, words: number) => {
    const x = flags[rule]?.x ?? 0;
    const span = spans[words];
    return span !== undefined && x >= span.left - 1 && x <= span.right;
  };
  const placed: PlacedFlag[] = [];
  const open = new Set(flags.keys());
  while (open.size > 0) {
    const next = [...open].find((each) => [...open].every((other) => other === each || !passes(other, each)));
    if (next === undefined) return null;
    open.delete(next);
    const flag = flags[next] as Flag;
    const span = spans[next] as { left: number; right: number };
    const touching = placed.filter(
      (other) =>
        (other.left < span.right && span.left < other.right) ||
        (other.x >= span.left && other.x <= span.right),
    );
    const row = 1 + Math.max(-1, ...touching.map((other) => other.row));
    placed.push({
      ...flag,
      ...span,
      row,
      side: sides[next] ?? "right",
      crossed: false,
    });
  }
  return placed;
}

/**
 * Stands the words of vertical rules in rows over a panel so that no words touch other words or another's rule:
 * of all choices of sides the one with the fewest rows. Where there is none, each has a row of its own.
 *
 * @param bounds leftmost and rightmost place that words may take
 */
export function placeFlags(flags: readonly Flag[], bounds: readonly [number, number]): PlacedFlag[] {
  const sorted = [...flags].sort((a, b) => a.x - b.x);
  let best: PlacedFlag[] | null = null;
  let bestCost = Number.POSITIVE_INFINITY;
  const choices = sorted.length <= 8 ? 2 ** sorted.length : 0;
  for (let choice = 0; choice < choices; choice++) {
    const sides = sorted.map((_, at) => (((choice >> at) & 1) === 1 ? "left" : "right") as "left" | "right");
    const placed = rowsFor(sorted, sides, bounds);
    if (placed === null) continue;
    const cost =
      Math.max(0, ...placed.map((flag) => flag.row)) + 0.1 * sides.filter((each) => each === "left").length;
    if (cost < bestCost) {
      best = placed;
      bestCost = cost;
    }
  }
  return (
    best ??
    sorted.map((flag, row) => {
      const span = standing(flag, "right");
      const shift = Math.max(bounds[0] - span.left, Math.min(0, bounds[1] - span.right));
      return {
        ...flag,
        row,
        side: "right",
        left: span.left + shift,
        right: span.right + shift,
        crossed: true,
      };
    })
  );
}
