import { temperatureText } from "../words/numbers.js";

/**
 * How often a criterion fails, in words: "In 4 of 100 draws “TMRad from Tp” fails at 35.0 °C." Failures are
 * rounded up, and those too rare for a hundred are counted in all draws.
 *
 * @param label name of the criterion's lane
 * @param probability part of the draws in which it holds, 0 to 1
 * @param draws their number
 * @param temperature at which it was looked at, K
 */
export function probabilitySentence(
  label: string,
  probability: number,
  draws: number,
  temperature: number,
): string {
  return `In ${failingText(probability, draws)} draws “${label}” fails at ${temperatureText(temperature)}.`;
}

/**
 * "4 of 100", "3 of 2 000", "none of 2 000", "all 2 000".
 *
 * @param probability part of the draws in which a criterion holds, 0 to 1
 * @param draws their number
 */
export function failingText(probability: number, draws: number): string {
  const failing = draws - Math.round(probability * draws);
  const all = String(draws).replace(/\B(?=(\d{3})+$)/g, " ");
  if (failing === 0) return `none of ${all}`;
  if (failing === draws) return `all ${all}`;
  if (failing * 100 < draws || draws < 100) return `${failing} of ${all}`;
  // Rounding up must not turn "nearly all" into "all".
  return `${Math.min(99, Math.ceil((100 * failing) / draws - 1e-9))} of 100`;
}
