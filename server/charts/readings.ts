import { scaleOf } from "./axes.js";
import type { Axis, Figure } from "./figure.js";

/** What a figure says where someone points at it. */
export interface Reading {
  /** place on the horizontal axis: 0 at its left end, 1 at its right end */
  readonly at: number;
  readonly text: string;
}

/** Readings at values of the horizontal axis; those beyond it are left out. */
export function readingsAt(axis: Axis, places: readonly { value: number; text: string }[]): Reading[] {
  const scale = scaleOf(axis, 0, 1);
  return places.flatMap(({ value, text }) => {
    const at = scale(value);
    return at >= -1e-9 && at <= 1 + 1e-9 ? [{ at: Math.round(at * 1e4) / 1e4 || 0, text }] : [];
  });
}

/**
 * Each row of a figure's table as a reading, so that nothing is told that the table does not hold.
 *
 * @param values of the rows, in their order, on the horizontal axis
 */
export function tableReadings(axis: Axis, values: readonly number[], table: Figure["table"]): Reading[] {
  return readingsAt(
    axis,
    table.rows.flatMap((row, index) => {
      const value = values[index];
      const text = row.map((cell, column) => `${table.columns[column] ?? ""}: ${cell}`).join(" · ");
      return value === undefined ? [] : [{ value, text }];
    }),
  );
}
