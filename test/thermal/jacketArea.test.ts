import { describe, expect, test } from "vitest";
import { ellipsoidalBottom, flatBottom, torisphericalBottom } from "../../server/thermal/dishedHead.js";
import { levelOf, volumeBelow, wallBelow, wettedJacket } from "../../server/thermal/jacketArea.js";

const bottoms = [
  { name: "flat", bottom: flatBottom(1.4) },
  { name: "ellipsoidal", bottom: ellipsoidalBottom(1.4) },
  { name: "torispherical", bottom: torisphericalBottom(1.4, 1.4, 0.14) },
  { name: "hemispherical", bottom: torisphericalBottom(1.4, 0.7, 0.7) },
];

describe.each(bottoms)("a vessel of 1.4 m with a $name bottom", ({ bottom }) => {
  test("the level of a volume holds that volume", () => {
    for (const volume of [0, 1e-9, 1e-4, 0.02, 0.1, 0.2, 0.26, 0.3, 0.7, 1.5, 4]) {
      const level = levelOf(bottom, volume);
      expect(level).toBeGreaterThanOrEqual(0);
      expect(volumeBelow(bottom, level)).toBeCloseTo(volume, 14);
    }
  });

  test("volume and wall grow with the level, without a jump where the shell begins", () => {
    const step = 1e-3;
    for (let level = 0; level < 0.9; level += step) {
      const grown = volumeBelow(bottom, level + step) - volumeBelow(bottom, level);
      expect(grown).toBeGreaterThan(0);
      expect(grown).toBeLessThanOrEqual(((Math.PI * 1.4 ** 2) / 4) * step + 1e-12);
      expect(wallBelow(bottom, level + step)).toBeGreaterThan(wallBelow(bottom, level));
    }
    const { height } = bottom;
    expect(wallBelow(bottom, height + 1e-9) - wallBelow(bottom, Math.max(0, height - 1e-9))).toBeLessThan(
      1e-6,
    );
  });

  test("jackets that meet add up to one jacket", () => {
    const parts = wettedJacket(bottom, 1, 0.1, 0.3) + wettedJacket(bottom, 1, 0.3, 1.2);
    expect(parts).toBeCloseTo(wettedJacket(bottom, 1, 0.1, 1.2), 12);
  });

  test("what lies above the level or outside the jacket does not count", () => {
    expect(wettedJacket(bottom, 0.2, 0.25, 1)).toBe(0);
    expect(wettedJacket(bottom, 0.25, 0.25, 1)).toBe(0);
    expect(wettedJacket(bottom, 5, 0.1, 0.9)).toBe(wettedJacket(bottom, 0.9, 0.1, 5));
  });
});

test("a shell alone, by hand: 1 m^3 stands 1.2732 m high in 1 m, and 1 m of it is pi m^2", () => {
  const shell = flatBottom(1);
  expect(levelOf(shell, 1)).toBeCloseTo(4 / Math.PI, 14);
  expect(wettedJacket(shell, levelOf(shell, 1), 0.2, 1.2)).toBeCloseTo(Math.PI, 14);
});

test("half full, by hand: a hemisphere of radius 1 m up to 0.5 m holds 5 pi/24 m^3 and wets pi m^2", () => {
  const hemisphere = torisphericalBottom(2, 1, 1);
  const level = levelOf(hemisphere, (5 * Math.PI) / 24);
  expect(level).toBeCloseTo(0.5, 12);
  expect(wettedJacket(hemisphere, level, 0, 2)).toBeCloseTo(Math.PI, 12);
});
