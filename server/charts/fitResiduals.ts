import type { RateFindings } from "../screening/findings.js";
import { numberText, temperatureNumber } from "../words/numbers.js";
import type { Axis, Figure, Mark, Rule } from "./figure.js";
import { reciprocal, reciprocalAxis } from "./rate.js";
import { tableReadings } from "./readings.js";
import { roomyDomain } from "./temperatureAxis.js";

/**
 * What a fit leaves unexplained, ln(k/fitted) over 1000/T.
 *
 * @returns null where nothing was fitted
 */
export function fitResiduals(rate: RateFindings, id: string, title: string): Figure | null {
  const { fit } = rate;
  if (fit === null) return null;
  const rows = fit.rows.flatMap((row) => (row.residual === null ? [] : [{ ...row, residual: row.residual }]));
  if (rows.length === 0) return null;
  const scatter = fit.residualStandardDeviation;
  const place = (row: (typeof rows)[number]) => [reciprocal(row.temperature_K), row.residual] as const;
  const rule = (value: number, dash: "solid" | "dotted", label?: string): Rule => ({
    type: "rule",
    across: "y",
    value,
    tone: "quiet",
    dash,
    weight: "thin",
    ...(label === undefined ? {} : { label }),
  });
  const leftOut = rows.filter((row) => row.leftOut !== null);
  const marks: Mark[] = [
    rule(0, "solid"),
    rule(scatter, "dotted", "+ one residual standard deviation"),
    rule(-scatter, "dotted"),
    {
      type: "points",
      tone: "reaction",
      shape: "ring",
      points: rows.filter((row) => row.leftOut === null).map(place),
    },
    ...(leftOut.length === 0
      ? []
      : [
          {
            type: "points",
            tone: "quiet",
            shape: "cross",
            points: leftOut.map(place),
            name: "left out",
          } as const,
        ]),
  ];
  const curvature =
    fit.curvatureP === null
      ? "There are too few rows to test for curvature."
      : `The test for curvature gives p = ${numberText(fit.curvatureP, 2)}${fit.curvatureP < 0.05 ? ": a straight line may not be enough." : "."}`;
  const xAxis: Axis = reciprocalAxis(rate);
  const table = {
    columns: [
      "Temperature, °C",
      `k, ${rate.atProcess.unit}`,
      "Fitted",
      "ln(k/fitted)",
      "Leverage",
      "Left out",
    ],
    rows: fit.rows.map(({ temperature_K, k, fitted, residual, leverage, leftOut: reason }) => [
      temperatureNumber(temperature_K),
      numberText(k),
      fitted === null ? "none" : numberText(fitted),
      residual === null ? "none" : numberText(residual, 2),
      leverage === null ? "none" : numberText(leverage, 2),
      reason ?? "no",
    ]),
  };
  return {
    id,
    title,
    sentence: `The residual standard deviation of ln k is ${numberText(scatter, 2)} with ${fit.degreesOfFreedom} degrees of freedom. ${curvature}`,
    panels: [
      {
        type: "plot",
        height: 120,
        xAxis,
        yAxis: {
          scale: "linear",
          domain: roomyDomain([...rows.map((row) => row.residual), 1.4 * scatter, -1.4 * scatter], 1e-6),
          label: "ln(k/fitted)",
        },
        marks,
      },
    ],
    captions: [],
    table,
    readings: tableReadings(
      xAxis,
      fit.rows.map((row) => reciprocal(row.temperature_K)),
      table,
    ),
  };
}
