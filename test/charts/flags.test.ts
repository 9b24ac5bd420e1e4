import fc from "fast-check";
import { expect, test } from "vitest";
import { placeFlags } from "../../server/charts/flags.js";

const bounds = [0, 700] as const;

test("words of vertical rules never touch other words or another's rule, wherever the rules stand", () => {
  const flag = fc.record({
    x: fc.double({ min: 20, max: 680, noNaN: true }),
    text: fc.constantFrom("Tp 35.0 °C", "MTSR 48.2 °C: 1.6 years", "MTT 78.0 °C", "T_D24 100.8 °C: 24.0 h"),
  });
  fc.assert(
    fc.property(fc.array(flag, { maxLength: 6 }), (flags) => {
      const placed = placeFlags(flags, bounds);
      expect(placed).toHaveLength(flags.length);
      for (const one of placed) {
        expect(one.left).toBeGreaterThanOrEqual(bounds[0] - 1e-9);
        expect(one.right).toBeLessThanOrEqual(bounds[1] + 1e-9);
        for (const other of placed) {
          if (other === one || other.row !== one.row) continue;
          expect(one.left >= other.right || other.left >= one.right).toBe(true);
        }
      }
    }),
  );
});

test("rules far apart share one row; rules close together do not", () => {
  const far = placeFlags(
    [
      { x: 100, text: "Tp 35.0 °C" },
      { x: 400, text: "MTT 78.0 °C" },
    ],
    bounds,
  );
  expect(far.map((flag) => flag.row)).toEqual([0, 0]);
  const near = placeFlags(
    [
      { x: 100, text: "Tp 35.0 °C" },
      { x: 104, text: "MTT 78.0 °C" },
      { x: 108, text: "MTSR 36.0 °C" },
    ],
    bounds,
  );
  expect(new Set(near.map((flag) => `${flag.row} ${flag.side}`)).size).toBe(3);
});

test("words near the right edge stand left of their rule", () => {
  const [placed] = placeFlags([{ x: 690, text: "MTSR 158.4 °C" }], bounds);
  expect(placed?.side).toBe("left");
});
