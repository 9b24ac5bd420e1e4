import { describe, expect, test } from "vitest";
import { clip, shorten, widthOf, wrap } from "../../server/sheet/lines.js";
import { shortNumber } from "../../server/sheet/shortNumber.js";

const style = { size: 9, weight: "regular" } as const;

describe("breaking text into lines", () => {
  const text =
    "The heat transfer coefficient of 320 W/(m² K) was read from a cooling curve of 40 min at 35 °C. ".repeat(
      5,
    );

  test("keeps every word, in order, and no line is wider than asked", () => {
    for (const width of [80, 150, 400]) {
      const lines = wrap(text.trim(), width, style);
      expect(lines.join(" ")).toBe(text.trim());
      for (const line of lines) expect(widthOf(line, style)).toBeLessThanOrEqual(width);
    }
  });

  test("parts neither a number from its unit nor a unit within its parentheses", () => {
    for (let width = 70; width < 300; width += 5) {
      for (const line of wrap(text.trim(), width, style)) {
        expect(line).not.toMatch(/(?:\d|\/\(\S+)$/);
      }
    }
  });

  test("breaks a word that is wider than the line, and keeps its line breaks", () => {
    const digest = "0123456789abcdef".repeat(16);
    const lines = wrap(`${digest}\nend`, 100, style);
    expect(lines.slice(0, -1).join("")).toBe(digest);
    expect(lines.at(-1)).toBe("end");
    for (const line of lines) expect(widthOf(line, style)).toBeLessThanOrEqual(100);
  });

  test("cuts with an ellipsis only where something is left out", () => {
    expect(shorten("short", 100, style)).toBe("short");
    const cut = shorten(text, 100, style);
    expect(cut).toMatch(/…$/);
    expect(widthOf(cut, style)).toBeLessThanOrEqual(100);
    expect(clip("short", 100, style, 2)).toEqual(["short"]);
    expect(clip(text, 200, style, 2)).toHaveLength(2);
    expect(clip(text, 200, style, 2)[1]).toMatch(/…$/);
  });
});

test("lowered and raised parts are narrower than the same letters on the line", () => {
  const formula = { ...style, formula: true };
  expect(widthOf("k_{ref}", formula)).toBeLessThan(widthOf("kref", style));
  expect(widthOf("k_{ref}", formula)).toBeGreaterThan(widthOf("k", style));
  expect(widthOf("k_{ref}", style)).toBeGreaterThan(widthOf("kref", style));
});

test("a number in the working has no zeros behind its last digit that counts", () => {
  expect([1450, 1.95, 0.02, 320, 4e-7, 123456, 1, 100].map(shortNumber)).toEqual([
    "1 450",
    "1.95",
    "0.02",
    "320",
    "4×10⁻⁷",
    "123 456",
    "1",
    "100",
  ]);
});
