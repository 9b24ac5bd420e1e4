import type { Step } from "../thermal/step.js";
import { conflictIn } from "../window/conflict.js";
import { type Study, studyOf } from "../window/study.js";
import { type TemperatureWindow, temperatureWindow } from "../window/window.js";
import type { WindowFindings } from "./findings.js";
import { criterionLabel } from "./labels.js";

/** Feed durations tried, as factors of the planned one. */
const leverFactors = [0.25, 0.5, 0.75, 1, 1.5, 2, 3, 4];

/**
 * The window of a step with its lanes.
 *
 * @param study of the step at its estimates
 * @param window of that study
 * @param withLever also what a slower or faster feed does to it
 */
export function windowFindings(study: Study, window: TemperatureWindow, withLever: boolean): WindowFindings {
  const { limits } = study.step;
  return {
    lower_K: window.chosen?.[0] ?? null,
    upper_K: window.chosen?.[1] ?? null,
    lowerSetBy: window.lowerSetBy,
    upperSetBy: window.upperSetBy,
    incomplete: window.incomplete,
    containsProcess: window.containsProcess,
    controlBand_K: limits.controlBand,
    lowest_K: limits.lowestTemperature,
    highest_K: limits.highestTemperature,
    allowed: window.parts,
    conflict: conflictIn(study, window, criterionLabel),
    cautious: null,
    criteria: window.lanes.map((lane) => ({
      key: lane.criterion.key,
      label: lane.criterion.label,
      binding: lane.criterion.binding,
      assessed: lane.assessed,
      allowed: lane.allowed,
      cautious: null,
      metAtProcess: lane.metAtProcess,
      probability: null,
    })),
    feedLever: withLever ? feedLever(study.step) : null,
  };
}

function feedLever(step: Step): WindowFindings["feedLever"] {
  const { feed } = step.reaction;
  if (feed === null) return null;
  return leverFactors.map((durationFactor) => {
    const duration = feed.duration * durationFactor;
    const slower = { ...step, reaction: { ...step.reaction, feed: { ...feed, duration } } };
    const { chosen } = temperatureWindow(studyOf(slower));
    return {
      durationFactor,
      duration_s: duration,
      lower_K: chosen?.[0] ?? null,
      upper_K: chosen?.[1] ?? null,
    };
  });
}
