import type { Dash, Tone, Weight } from "./figure.js";

/**
 * Colours on paper. The page takes the same ones from public/figures.css, where they have a dark set as well; a
 * test holds the two together. They differ in lightness, so that they stay apart in greyscale, and nothing is
 * told by colour alone.
 */
export const paperTones: Readonly<Record<Tone, string>> = {
  ink: "#1f2a33",
  quiet: "#5d6a73",
  faint: "#d5dce1",
  reaction: "#1d5f86",
  decomposition: "#7a3558",
  limit: "#1f2a33",
  removal: "#7b6a2c",
  plan: "#0f4c5c",
};

/** Lighter areas of the same tones. */
export const paperTints: Readonly<Record<Tone, string>> = {
  ink: "#c3ccd2",
  quiet: "#dbe1e5",
  faint: "#eef1f3",
  reaction: "#c4dbe8",
  decomposition: "#e6d0dc",
  limit: "#c3ccd2",
  removal: "#e6dfc4",
  plan: "#bcdadf",
};

export const paper = "#ffffff";

/** Lengths of strokes and gaps; empty: unbroken. */
export const dashes: Readonly<Record<Dash, readonly number[]>> = {
  solid: [],
  dashed: [6, 4],
  dotted: [1.5, 3],
  dashdot: [8, 3, 1.5, 3],
  longdash: [12, 4],
};

export const weights: Readonly<Record<Weight, number>> = {
  thin: 0.9,
  normal: 1.5,
  strong: 2.4,
};

/** Font sizes in units of the figure. */
export const textSizes = { small: 11, normal: 12.5 } as const;

export type TextSize = keyof typeof textSizes;
