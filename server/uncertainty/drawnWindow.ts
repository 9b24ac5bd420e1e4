import { holds, intersect, narrowBy, type Span, spansWhere } from "../window/spans.js";
import type { Study } from "../window/study.js";
import { choosePart, holdsOverBand, type Lane, type TemperatureWindow } from "../window/window.js";
import { cautiousPart, createCoverage } from "./coverage.js";
import { alike, heldAlong, type Trail, trailOf } from "./trail.js";

/** The cautious side of one criterion. */
export interface DrawnLane {
  readonly key: string;
  /** temperatures at which it holds in at least 95 % of the draws; null where not assessed */
  readonly cautious: readonly Span[] | null;
  /** part of the draws in which it holds at the planned temperature and its band; null where not assessed */
  readonly probability: number | null;
}

/** The window over all draws. */
export interface DrawnWindow {
  readonly lanes: readonly DrawnLane[];
  /** part of what all assessed binding criteria allow jointly in at least 95 % of the draws; null: nothing */
  readonly cautious: Span | null;
}

/** One draw of a step. */
export interface DrawnStudy {
  readonly study: Study;
  /** K by which its T_D24 lies above that of the estimates; 0 where there is none. Some ends move with it */
  readonly shift: number;
}

/** A window that draws are laid into, one after the other. */
export interface WindowCollector {
  /**
   * @param draw of the step
   * @returns upper end of its window, K; -Infinity where nothing is left of it
   */
  add(draw: DrawnStudy): number;
  /** Upper end as `add` gives it, of a draw that does not count. */
  upperIn(draw: DrawnStudy): number;
  /** @param count of draws that were added */
  result(count: number): DrawnWindow;
}

/** Draws on which following the ends is held against a search of the whole range. */
const checks = 16;

/** Ends that are followed may differ from those of the search by this, K. */
const agreement = 0.02;

/** Cautious ends are drawn in by this, K, so that what they are resolved to never widens a claim. */
const drawnIn = 0.005;

/**
 * Follows the ends of every criterion from the estimates into the draws. On evenly spaced draws the followed ends
 * are held against a search of the whole range; a criterion that differs on any of them is searched on all.
 *
 * @param study of the step at its estimates
 * @param window of that study
 * @param count of the draws
 * @param drawn one draw by its index, for the check
 */
export function collectWindows(
  study: Study,
  window: TemperatureWindow,
  count: number,
  drawn: (index: number) => DrawnStudy,
): WindowCollector {
  const { lowestTemperature: low, highestTemperature: high, controlBand: band } = study.step.limits;
  const [bottom, top] = [low - band, high + band];
  const lanes = window.lanes
    .filter((lane) => lane.assessed)
    .map((lane) => ({
      lane,
      trail: trailOf((at) => lane.criterion.margin(study, at), lane.held, bottom, top),
      coverage: createCoverage(),
      met: 0,
    }));
  const checked = checkedDraws(count).map(drawn);
  const followers = lanes.map((each) => ({ ...each, ...checkedTrail(each.lane, each.trail, checked) }));
  const joint = createCoverage();

  const allowedIn = (follower: (typeof followers)[number], { study: draw, shift }: DrawnStudy) => {
    const margin = (at: number): number => follower.lane.criterion.margin(draw, at);
    const held = heldAlong(follower.trail, margin, bottom, top, follower.shifts ? shift : 0);
    return { margin, allowed: narrowBy(held, band, low, high) };
  };
  const upperOf = (common: readonly Span[], process: number): number =>
    choosePart(common, process)?.[1] ?? Number.NEGATIVE_INFINITY;

  function add(draw: DrawnStudy): number {
    const process = draw.study.step.reaction.temperature;
    const inside = process >= low && process <= high;
    let common: readonly Span[] = [[low, high]];
    for (const follower of followers) {
      const { margin, allowed } = allowedIn(follower, draw);
      follower.coverage.add(allowed);
      if (inside ? holds(allowed, process) : holdsOverBand(margin, process, band)) follower.met += 1;
      if (follower.lane.criterion.binding) common = intersect(common, allowed);
    }
    joint.add(common);
    return upperOf(common, process);
  }

  function upperIn(draw: DrawnStudy): number {
    const common = followers
      .filter(({ lane }) => lane.criterion.binding)
      .reduce<readonly Span[]>(
        (spans, each) => intersect(spans, allowedIn(each, draw).allowed),
        [[low, high]],
      );
    return upperOf(common, draw.study.step.reaction.temperature);
  }

  return {
    add,
    upperIn,
    result(added) {
      const needed = Math.ceil(cautiousPart * added - 1e-9);
      // A single draw is the estimates themselves: there is nothing to resolve.
      const inward = (spans: readonly Span[]): readonly Span[] =>
        added === 1 ? spans : drawIn(spans, low, high);
      return {
        lanes: window.lanes.map((lane) => {
          const follower = followers.find((each) => each.lane === lane);
          return {
            key: lane.criterion.key,
            cautious:
              follower === undefined
                ? null
                : intersect(inward(follower.coverage.coveredBy(needed)), lane.allowed),
            probability: follower === undefined ? null : follower.met / added,
          };
        }),
        cautious: choosePart(
          intersect(inward(joint.coveredBy(needed)), window.parts),
          study.step.reaction.temperature,
        ),
      };
    },
  };
}

/** Evenly spaced: a Latin hypercube's draws stand in random order. */
function checkedDraws(count: number): number[] {
  const number = Math.min(checks, count);
  return Array.from({ length: number }, (_, i) => Math.floor(((i + 0.5) * count) / number));
}

/**
 * A trail held against a search of the whole range in some draws: null where it differs in any, and whether its ends
 * keep closer to where T_D24 moves than to where they were.
 */
function checkedTrail(
  { criterion }: Lane,
  trail: Trail,
  draws: readonly DrawnStudy[],
): { readonly trail: Trail | null; readonly shifts: boolean } {
  let still = 0;
  let moved = 0;
  for (const { study, shift } of draws) {
    const margin = (at: number): number => criterion.margin(study, at);
    const searched = spansWhere(margin, trail.low, trail.high);
    if (!alike(heldAlong(trail, margin, trail.low, trail.high), searched, agreement)) {
      return { trail: null, shifts: false };
    }
    const ends = searched.flat().filter((end) => end > trail.low && end < trail.high);
    if (ends.length !== trail.ends.length) continue;
    ends.forEach((end, i) => {
      still += Math.abs(end - trail.ends[i].at);
      moved += Math.abs(end - trail.ends[i].at - shift);
    });
  }
  return { trail, shifts: moved < still };
}

function drawIn(spans: readonly Span[], low: number, high: number): readonly Span[] {
  return spans
    .map(([start, end]): Span => [start > low ? start + drawnIn : start, end < high ? end - drawnIn : end])
    .filter(([start, end]) => start <= end);
}
