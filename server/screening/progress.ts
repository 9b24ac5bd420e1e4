/** Told the part of a work that is done, 0 to 1. It may throw, which ends the work. */
export type Progress = (fraction: number) => void;

/** For work that nobody watches. */
export const ignored: Progress = () => undefined;

/** The progress of one part of a work, told as progress of the whole. */
export function partOf(whole: Progress, from: number, to: number): Progress {
  return (fraction) => whole(from + (to - from) * fraction);
}
