import { expect, test } from "vitest";
import { failingText, probabilitySentence } from "../../server/uncertainty/probabilitySentence.js";

test("a probability reads as a count of draws that fail, at a temperature", () => {
  expect(probabilitySentence("TMRad from Tp", 0.96, 2000, 308.15)).toBe(
    "In 4 of 100 draws “TMRad from Tp” fails at 35.0 °C.",
  );
});

test("failures are rounded up, never to all and never to none", () => {
  expect(failingText(0.9595, 2000)).toBe("5 of 100");
  expect(failingText(0.0005, 2000)).toBe("99 of 100");
  expect(failingText(0.9995, 2000)).toBe("1 of 2 000");
  expect(failingText(1, 2000)).toBe("none of 2 000");
  expect(failingText(0, 2000)).toBe("all 2 000");
  expect(failingText(0.5, 20)).toBe("10 of 20");
  expect(failingText(1 - 30 / 50_000, 50_000)).toBe("30 of 50 000");
});
