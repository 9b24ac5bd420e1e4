import type { Course, LongScreening } from "./longScreenings.js";
import { Unavailable } from "./unavailable.js";

/** How far a screening is, as pages show it. */
export interface ProgressView {
  readonly id: string;
  /** null while it waits for its turn */
  readonly percent: number | null;
  readonly text: string;
}

export function progressView(screening: LongScreening): ProgressView {
  const { before, fraction } = screening.standing();
  const percent = before === null ? Math.floor(100 * fraction) : null;
  return { id: screening.id, percent, text: textOf(before, percent ?? 0) };
}

function textOf(before: number | null, percent: number): string {
  if (before === null) return `${percent} % done`;
  if (before === 0) return "Waiting for its turn; it is the next";
  return `Waiting for its turn; ${before} before it`;
}

/** Why there are no full findings, in a sentence for the page; null where there are, or will be. */
export function endOf(course: Course): string | null {
  if (course.kind === "cancelled") return "The screening was cancelled.";
  if (course.kind !== "failed") return null;
  return course.error instanceof Unavailable
    ? course.error.message
    : "The screening ended by a defect of the program, not of your input.";
}
