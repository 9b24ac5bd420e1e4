import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { describe, expect, test } from "vitest";
import { coverageOf } from "../../server/sheet/coverage.js";
import { facesOf } from "../../server/sheet/fonts.js";
import { runsOf } from "../../server/sheet/runs.js";
import { unpackWoff } from "../../server/sheet/woff.js";

const require = createRequire(import.meta.url);
const packed = readFileSync(require.resolve("@ibm/plex-sans/fonts/complete/woff/IBMPlexSans-Regular.woff"));

/** Checksum of a font table: OpenType specification, "Calculating Checksums". */
function checksum(table: Buffer): number {
  const whole = Buffer.concat([table, Buffer.alloc(-table.length & 3)]);
  let sum = 0;
  for (let at = 0; at < whole.length; at += 4) sum = (sum + whole.readUInt32BE(at)) >>> 0;
  return sum;
}

describe("unpacking a WOFF font", () => {
  test("gives every table with the checksum that its font states", () => {
    const font = unpackWoff(packed);
    const count = font.readUInt16BE(4);
    expect(count).toBeGreaterThan(8);
    for (let index = 0; index < count; index++) {
      const entry = 12 + 16 * index;
      const tag = font.toString("latin1", entry, entry + 4);
      const start = font.readUInt32BE(entry + 8);
      const table = Buffer.from(font.subarray(start, start + font.readUInt32BE(entry + 12)));
      // The head table's own field is taken as 0 when its checksum is computed.
      if (tag === "head") table.writeUInt32BE(0, 8);
      expect(`${tag} ${checksum(table)}`).toBe(`${tag} ${font.readUInt32BE(entry + 4)}`);
    }
  });

  test("refuses what is not a WOFF file", () => {
    expect(() => unpackWoff(Buffer.from("wOF2 and so on, long enough to have held a header"))).toThrow(
      RangeError,
    );
    expect(() => unpackWoff(Buffer.alloc(3))).toThrow(RangeError);
  });
});

describe("the characters that a font holds", () => {
  test("include letters and leave out what the package says it lacks", () => {
    const covered = coverageOf(unpackWoff(packed));
    for (const character of "AZaz09°−×·ÄßéŁ")
      expect([character, covered.has(character.codePointAt(0) ?? 0)]).toEqual([character, true]);
    expect(covered.has(0x207b)).toBe(false);
    expect(covered.has(0x4e2d)).toBe(false);
  });

  test("of both weights together hold every sign that the sheet's formulas use", () => {
    const signs = "ΔαβγδθκλμνπρστφωΣ∫≤≥≈≠±×·−⁻⁺⁰¹²³⁴⁵⁶⁷⁸⁹₀₁₂₃₄₅₆₇₈₉‡′″°µΩ→∞√…–—“”‘’";
    for (const weight of ["regular", "strong"] as const) {
      const lacking = [...signs].filter((sign) =>
        facesOf(weight).every((face) => !face.covers.has(sign.codePointAt(0) ?? 0)),
      );
      expect(lacking).toEqual([]);
    }
  });
});

describe("a line of text is split by font", () => {
  test("and stays whole where one font holds it", () => {
    expect(runsOf("heat capacity 1.95 kJ/(kg K)", "regular")).toEqual([
      { face: "Plex", text: "heat capacity 1.95 kJ/(kg K)" },
    ]);
  });

  test("and a superscript is drawn by one font, sign and digits alike", () => {
    expect(runsOf("2.17×10⁻⁶ m³", "regular").map((run) => run.text)).toEqual(["2.17×10", "⁻⁶ ", "m³"]);
    expect(runsOf("m³", "regular")).toEqual([{ face: "Plex", text: "m³" }]);
  });

  test("and a character that no font holds is written as its code", () => {
    const drawn = runsOf("vessel 中 3", "regular")
      .map((run) => run.text)
      .join("");
    expect(drawn).toBe("vessel [U+4E2D] 3");
  });

  test("and marks that reorder or hide text are shown, not obeyed", () => {
    const drawn = runsOf("MTT \u202e°C 87\u202c \u0007x\u200by", "strong")
      .map((run) => run.text)
      .join("");
    expect(drawn).toBe("MTT [U+202E]°C 87[U+202C] [U+0007]x[U+200B]y");
  });

  test("and every kind of break is drawn as a space", () => {
    expect(runsOf("one\ttwo\r\nthree", "regular")).toEqual([{ face: "Plex", text: "one two  three" }]);
  });
});
