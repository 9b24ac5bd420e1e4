import { findRoot } from "../numeric/roots.js";
import type { Bottom } from "./dishedHead.js";

/**
 * Cross-section of the shell, pi D^2/4.
 *
 * @param bottom of the vessel
 * @returns m^2
 */
function shellSection({ diameter }: Bottom): number {
  return (Math.PI * diameter * diameter) / 4;
}

/**
 * Volume below a level in an upright vessel.
 *
 * @param bottom of the vessel
 * @param level above the lowest point, m; >= 0
 * @returns m^3
 */
export function volumeBelow(bottom: Bottom, level: number): number {
  const { height } = bottom;
  const above = Math.max(0, level - height);
  return bottom.volumeBelow(Math.min(level, height)) + shellSection(bottom) * above;
}

/**
 * Inner wall below a level, bottom and shell together.
 *
 * @param bottom of the vessel
 * @param level above the lowest point, m; >= 0
 * @returns m^2
 */
export function wallBelow(bottom: Bottom, level: number): number {
  const { diameter, height } = bottom;
  const above = Math.max(0, level - height);
  return bottom.areaBelow(Math.min(level, height)) + Math.PI * diameter * above;
}

/**
 * Level of a volume of contents at rest: the inverse of `volumeBelow`, in closed form in the shell and as a
 * root in the bottom. A stirrer's vortex and internals are left out.
 *
 * @param bottom of the vessel
 * @param volume m^3; >= 0
 * @returns m above the lowest point
 */
export function levelOf(bottom: Bottom, volume: number): number {
  const { height } = bottom;
  const inBottom = bottom.volumeBelow(height);
  if (volume >= inBottom) return height + (volume - inBottom) / shellSection(bottom);
  return findRoot((level) => bottom.volumeBelow(level) - volume, 0, height);
}

/**
 * Wall that is both wetted and jacketed, between the jacket's lower edge and the lower of its upper edge and
 * the level.
 *
 * @param bottom of the vessel
 * @param level of the contents, m
 * @param lower edge of the jacket above the lowest point, m; >= 0
 * @param upper edge of the jacket, m
 * @returns m^2; 0 where the level does not reach the jacket
 */
export function wettedJacket(bottom: Bottom, level: number, lower: number, upper: number): number {
  return Math.max(0, wallBelow(bottom, Math.min(level, upper)) - wallBelow(bottom, lower));
}
