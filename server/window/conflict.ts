import { differenceText, temperatureText } from "../words/numbers.js";
import type { Study } from "./study.js";
import type { Lane, TemperatureWindow } from "./window.js";

/**
 * Why nothing is left of a window, in words: the criterion that holds nowhere, with the best it reaches, or
 * the two that exclude each other, and by how much.
 *
 * @param study of the step
 * @param window that is empty
 * @param label of a criterion by its key
 * @returns null where something is left
 */
export function conflictIn(
  study: Study,
  window: TemperatureWindow,
  label: (key: string) => string,
): string | null {
  if (window.chosen !== null) return null;
  const binding = window.lanes.filter((lane) => lane.criterion.binding && lane.assessed);
  const nowhere = binding.filter((lane) => lane.allowed.length === 0);
  if (nowhere.length > 0) {
    return nowhere
      .map((lane) => {
        const best = bestTemperature(study, lane);
        const account = lane.criterion.account(study, best);
        return `“${label(lane.criterion.key)}” holds nowhere in the range studied: at best, at ${temperatureText(best)}, ${account}.`;
      })
      .join(" ");
  }
  return apart(binding, label);
}

/** Temperature of the study, on its 1 K grid, at which a criterion comes closest to holding. */
function bestTemperature(study: Study, lane: Lane): number {
  const { lowestTemperature: low, highestTemperature: high } = study.step.limits;
  let best = low;
  let bestMargin = Number.NEGATIVE_INFINITY;
  const cells = Math.max(1, Math.ceil(high - low - 1e-9));
  for (let i = 0; i <= cells; i += 1) {
    const temperature = low + ((high - low) * i) / cells;
    const margin = lane.criterion.margin(study, temperature);
    if (margin > bestMargin) {
      best = temperature;
      bestMargin = margin;
    }
  }
  return best;
}

function apart(lanes: readonly Lane[], label: (key: string) => string): string {
  let text = "The criteria allow no common temperature.";
  let widest = Number.NEGATIVE_INFINITY;
  for (const upper of lanes) {
    for (const lower of lanes) {
      const from = upper.allowed[0][0];
      const to = lower.allowed[lower.allowed.length - 1][1];
      if (from - to > widest && from > to) {
        widest = from - to;
        text = `“${label(upper.criterion.key)}” asks for at least ${temperatureText(from, "up")}, “${label(lower.criterion.key)}” allows at most ${temperatureText(to, "down")}: they are ${differenceText(from - to, "up")} apart.`;
      }
    }
  }
  return text;
}
