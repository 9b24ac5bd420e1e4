import { readCase } from "../case/read.js";
import type { Findings } from "../screening/findings.js";
import type { Side } from "./compareSides.js";
import type { Course } from "./longScreenings.js";
import { endOf } from "./progressWords.js";
import type { ScreeningOrder } from "./screener.js";
import type { Services } from "./services.js";

/** What became of two cases that are held against each other. */
export type ScreenedPair =
  | {
      readonly kind: "faults";
      /** how many faults each has */
      readonly counts: readonly [number, number];
    }
  | {
      /** running: failures and draws are still being computed */
      readonly kind: "running" | "done";
      /** both with failures and draws, or both without */
      readonly full: boolean;
      readonly findings: readonly [Findings, Findings];
      /** why there are no full ones */
      readonly told: string | null;
    };

/** The page comes after so long at the latest, ms, with what is known by then. */
const patience_ms = 1000;

/**
 * Screens two cases for one page: both in full, or both quickly where the full ones take longer.
 *
 * @param quick never in full
 * @param gone the client does not wait any more
 */
export async function screenPair(
  services: Pick<Services, "screener" | "screenings">,
  first: Side,
  second: Side,
  quick: boolean,
  gone: AbortSignal,
): Promise<ScreenedPair> {
  const [one, other] = [readCase(first.document), readCase(second.document)];
  if (!one.ok || !other.ok) {
    return { kind: "faults", counts: [one.ok ? 0 : one.faults.length, other.ok ? 0 : other.faults.length] };
  }
  const orders = [one, other].map(({ model, digest }) => ({ model, digest, depth: "full" }) as const);
  const courses = quick ? [] : await coursesOf(services, orders, gone);
  const full = courses.flatMap((course) => (course.kind === "done" ? [course.findings] : []));
  const [ones, others] = full;
  if (ones !== undefined && others !== undefined) {
    return { kind: "done", full: true, findings: [ones, others], told: null };
  }
  const [a, b] = await Promise.all(
    [one, other].map(({ model, digest }) => services.screener.screen({ model, digest, depth: "quick" })),
  );
  if (a === undefined || b === undefined) throw new Error("Two cases were screened, and one is missing.");
  const told = courses.map(endOf).find((text) => text !== null) ?? null;
  const running = told === null && courses.some(({ kind }) => kind === "running");
  return { kind: running ? "running" : "done", full: false, findings: [a, b], told };
}

/** Where the full screenings are after a second. What still runs then is kept for the page that asks again. */
async function coursesOf(
  { screener, screenings }: Pick<Services, "screener" | "screenings">,
  orders: readonly ScreeningOrder[],
  gone: AbortSignal,
): Promise<Course[]> {
  const waited = orders.map(async (order): Promise<Course> => {
    const known = screener.known(order.digest);
    if (known !== null) return { kind: "done", findings: known };
    const screening = screenings.begin(order, null);
    gone.addEventListener("abort", screening.cancel);
    const course = await screening.within(patience_ms);
    gone.removeEventListener("abort", screening.cancel);
    if (course.kind === "running") screenings.keep(screening);
    return course;
  });
  return Promise.all(waited);
}
