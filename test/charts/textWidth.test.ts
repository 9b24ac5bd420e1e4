import { createRequire } from "node:module";
import PDFDocument from "pdfkit";
import { describe, expect, test } from "vitest";
import { shortened, textWidth, wrapText } from "../../server/charts/textWidth.js";

const require = createRequire(import.meta.url);
const fonts = require.resolve("@ibm/plex-sans/package.json").replace("package.json", "fonts/complete/woff/");
const pdf = new PDFDocument();

function measured(text: string, face: string): number {
  return pdf
    .font(`${fonts}IBMPlexSans-${face}.woff`, 1000)
    .widthOfString(text, { features: ["-kern"] as never });
}

describe("the width of a line of text", () => {
  test("is that of the font file for every printable ASCII character", () => {
    for (let code = 32; code < 127; code++) {
      const character = String.fromCharCode(code);
      expect(textWidth(character, 1000), character).toBeCloseTo(measured(character, "Regular"), 0);
    }
  });

  test("is never below that of the symbols that figures use", () => {
    for (const character of "−×·°≥≤²³⁰¹⁴–±")
      expect(textWidth(character, 1000), character).toBeGreaterThanOrEqual(measured(character, "Regular"));
  });

  test("covers the semibold face for the words that stand on figures", () => {
    for (const words of [
      "Tp 85.0 °C",
      "MTSR 158.4 °C (153.0 to 163.9)",
      "T_D24 88.1 °C",
      "planned process temperature",
    ])
      expect(textWidth(words, 1000, true)).toBeGreaterThanOrEqual(measured(words, "SemiBold"));
  });
});

describe("breaking and cutting text", () => {
  test("breaks at spaces into lines that fit and loses no word", () => {
    const words = "Bars: 5th to 95th percentile of 2000 draws from the given standard errors.";
    const lines = wrapText(words, 11, 150);
    expect(lines.join(" ")).toBe(words);
    for (const line of lines) expect(textWidth(line, 11)).toBeLessThanOrEqual(150);
  });

  test("never parts a number from its unit", () => {
    for (let width = 20; width < 200; width += 5) {
      const lines = wrapText("limits of the study, 0.0 to 80.0 °C, held for 3 min or 4 h", 11, width);
      for (const line of lines) expect(line).not.toMatch(/^(°C|min|h)( |,|$)/);
    }
  });

  test("leaves a word that is too long alone on its line", () => {
    expect(wrapText("a incomprehensibilities b", 11, 40)).toEqual(["a", "incomprehensibilities", "b"]);
  });

  test("cuts with an ellipsis, by whole characters", () => {
    const cut = shortened("Kühlung 🧊🧊🧊🧊🧊🧊🧊🧊🧊🧊 fällt aus", 11, 90);
    expect(cut.endsWith("…")).toBe(true);
    expect(cut).toBe(Array.from(cut).join(""));
    expect(textWidth(cut, 11)).toBeLessThanOrEqual(90);
    expect(shortened("short", 11, 90)).toBe("short");
  });
});
