import { criteria as everyCriterion } from "./criteria/all.js";
import type { Criterion } from "./criterion.js";
import { holds, intersect, narrowBy, type Span, spansWhere } from "./spans.js";
import type { Study } from "./study.js";

/** One criterion over the study's temperatures. */
export interface Lane {
  readonly criterion: Criterion;
  readonly assessed: boolean;
  /** temperatures at which it holds, on [lowest - band, highest + band]; empty where not assessed */
  readonly held: readonly Span[];
  /** set points about which the criterion holds over the whole control band; empty where not assessed */
  readonly allowed: readonly Span[];
  /** at the planned temperature; null where not assessed */
  readonly metAtProcess: boolean | null;
}

/** Process temperatures that every assessed binding criterion allows. */
export interface TemperatureWindow {
  readonly lanes: readonly Lane[];
  /** all parts of the intersection */
  readonly parts: readonly Span[];
  /** the part that holds the planned temperature, else the widest; null where nothing is left */
  readonly chosen: Span | null;
  /** key of the criterion at each end, or the study's own limit */
  readonly lowerSetBy: string | null;
  readonly upperSetBy: string | null;
  readonly incomplete: boolean;
  readonly containsProcess: boolean;
}

/**
 * The temperature window: every criterion over [lowest, highest], each to hold over T +- control band, and
 * the intersection of the binding ones. A criterion without its data is not assessed and marks the window
 * incomplete; missing data never widen it.
 *
 * @param study of the step
 * @param criteria to apply
 */
export function temperatureWindow(study: Study, criteria = everyCriterion): TemperatureWindow {
  const { limits, reaction } = study.step;
  const { lowestTemperature: low, highestTemperature: high } = limits;
  const lanes = criteria.map((criterion) => laneOf(study, criterion));
  const binding = lanes.filter((lane) => lane.criterion.binding);
  const parts = binding
    .filter((lane) => lane.assessed)
    .reduce<readonly Span[]>((common, lane) => intersect(common, lane.allowed), [[low, high]]);
  const chosen = choosePart(parts, reaction.temperature);
  const touching = (end: 0 | 1): string | null =>
    chosen === null
      ? null
      : (binding.find((lane) => lane.allowed.some((span) => span[end] === chosen[end] && !atLimit(span, end)))
          ?.criterion.key ?? (end === 0 ? "lowest" : "highest"));
  const atLimit = (span: Span, end: 0 | 1): boolean => span[end] === (end === 0 ? low : high);
  return {
    lanes,
    parts,
    chosen,
    lowerSetBy: touching(0),
    upperSetBy: touching(1),
    incomplete: binding.some((lane) => !lane.assessed),
    containsProcess: chosen !== null && holds([chosen], reaction.temperature),
  };
}

function laneOf(study: Study, criterion: Criterion): Lane {
  if (!criterion.assessable(study)) {
    return { criterion, assessed: false, held: [], allowed: [], metAtProcess: null };
  }
  const { lowestTemperature: low, highestTemperature: high, controlBand } = study.step.limits;
  const process = study.step.reaction.temperature;
  const margin = (temperature: number): number => criterion.margin(study, temperature);
  const held = spansWhere(margin, low - controlBand, high + controlBand);
  return {
    criterion,
    assessed: true,
    held,
    allowed: narrowBy(held, controlBand, low, high),
    metAtProcess: holdsOverBand(margin, process, controlBand),
  };
}

/**
 * Whether a criterion holds over a whole control band. The band may lie outside the study: it is looked at by
 * itself.
 *
 * @param margin of temperature
 * @param process middle of the band, K
 * @param band half-width, K
 */
export function holdsOverBand(
  margin: (temperature: number) => number,
  process: number,
  band: number,
): boolean {
  if (band === 0) return margin(process) >= 0;
  const spans = spansWhere(margin, process - band, process + band);
  return spans.length === 1 && spans[0][0] === process - band && spans[0][1] === process + band;
}

/**
 * The part of a window that a plan would use: the one that holds the planned temperature, else the widest.
 *
 * @param parts disjoint spans
 * @param process planned temperature, K
 */
export function choosePart(parts: readonly Span[], process: number): Span | null {
  const holding = parts.find((part) => holds([part], process));
  if (holding !== undefined) return holding;
  return parts.reduce<Span | null>(
    (best, part) => (best === null || part[1] - part[0] > best[1] - best[0] ? part : best),
    null,
  );
}
