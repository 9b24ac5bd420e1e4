import type { FailureFindings } from "../screening/findings.js";
import { durationText } from "../words/numbers.js";
import { durationAxis, timeUnit } from "./durationAxis.js";
import type { Axis, Figure, Mark } from "./figure.js";
import { tableReadings } from "./readings.js";

/** One moment of the batch at which a failure was made to begin. */
type VulnerableMoment = NonNullable<FailureFindings["vulnerable"]>[number];

function verdictWords({ verdict, timeToAct_s }: VulnerableMoment): string {
  if (verdict === "holds") return "holds by itself";
  return verdict === "lost" || timeToAct_s === null ? "lost" : durationText(timeToAct_s);
}

/** The moment that leaves the least time. */
function worstOf(moments: readonly VulnerableMoment[]): VulnerableMoment | null {
  const left = ({ verdict, timeToAct_s }: VulnerableMoment) =>
    verdict === "lost" ? 0 : verdict === "holds" ? Number.POSITIVE_INFINITY : (timeToAct_s ?? 0);
  return moments.reduce<VulnerableMoment | null>(
    (worst, each) => (worst === null || left(each) < left(worst) ? each : worst),
    null,
  );
}

/**
 * Time to act against the moment at which one failure begins.
 *
 * @param name of the failure
 * @param number that tells it from the others on the page
 * @returns null with fewer than two moments, and where it holds by itself whenever it begins
 */
export function vulnerable(
  name: string,
  number: number,
  moments: readonly VulnerableMoment[],
): Figure | null {
  const worst = worstOf(moments);
  if (worst === null || worst.verdict === "holds" || moments.length < 2) return null;
  const sorted = [...moments].sort((a, b) => a.startedAt_s - b.startedAt_s);
  const last = Math.max(60, ...sorted.map((moment) => moment.startedAt_s));
  const unit = timeUnit(last);
  const acts = sorted.flatMap(({ verdict, timeToAct_s }) =>
    verdict === "act" && timeToAct_s !== null && timeToAct_s > 0 ? [timeToAct_s] : [],
  );
  const axis = durationAxis(acts, "Time to act (logarithmic)");
  const [low, high] = axis.domain;
  const room = Math.max(2, (high / low) ** 0.12);
  const yAxis = { ...axis, domain: [low / room, high * room] as const };
  const at = (moment: VulnerableMoment, height: number) =>
    [moment.startedAt_s / unit.seconds, height] as const;
  const marks: Mark[] = [
    {
      type: "line",
      tone: "reaction",
      dash: "solid",
      weight: "strong",
      points: sorted.map((moment) =>
        moment.verdict === "act" && moment.timeToAct_s !== null ? at(moment, moment.timeToAct_s) : null,
      ),
      name: "time to act",
    },
  ];
  const act = sorted.filter((moment) => moment.verdict === "act" && (moment.timeToAct_s ?? 0) > 0);
  const lost = sorted.filter((moment) => moment.verdict === "lost");
  const holds = sorted.filter((moment) => moment.verdict === "holds");
  const row = (of: readonly VulnerableMoment[], height: number) => of.map((moment) => at(moment, height));
  if (act.length > 0)
    marks.push({
      type: "points",
      tone: "reaction",
      shape: "circle",
      points: act.map((moment) => at(moment, moment.timeToAct_s ?? 0)),
    });
  if (lost.length > 0)
    marks.push({
      type: "points",
      tone: "ink",
      shape: "cross",
      points: row(lost, low / room ** 0.5),
      name: "lost",
    });
  if (holds.length > 0)
    marks.push({
      type: "points",
      tone: "quiet",
      shape: "ring",
      points: row(holds, high * room ** 0.5),
      name: "holds by itself",
    });
  const begins = durationText(worst.startedAt_s, "nearest");
  const verdict =
    worst.verdict === "lost" ? "lost, no delay is short enough" : `act within ${verdictWords(worst)}`;
  const xAxis: Axis = {
    scale: "linear",
    domain: [0, last / unit.seconds],
    label: `Moment at which the failure begins, ${unit.name}`,
  };
  const table = {
    columns: ["Begins at", "Time to act"],
    rows: sorted.map((moment) => [durationText(moment.startedAt_s, "nearest"), verdictWords(moment)]),
  };
  return {
    id: `vulnerable-${number}`,
    title: `When the batch is most vulnerable: ${name}`,
    sentence: `Of ${moments.length} moments tried, “${name}” is worst when it begins at ${begins}: ${verdict}.`,
    panels: [
      {
        type: "plot",
        height: 150,
        xAxis,
        yAxis,
        marks,
      },
    ],
    captions: [],
    table,
    readings: tableReadings(
      xAxis,
      sorted.map((moment) => moment.startedAt_s / unit.seconds),
      table,
    ),
  };
}
