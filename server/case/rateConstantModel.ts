import type { DecompositionRate, RateConstant, TableRow } from "../kinetics/parameters.js";
import type { Estimate } from "../numeric/estimate.js";
import { readRate, readRateUnit } from "./rates.js";
import type { CaseFigures } from "./schema.js";
import type { TypedRate } from "./typedQuantities.js";

type Figures = NonNullable<CaseFigures["reaction"]["rateConstant"]>;
type DecompositionFigures = NonNullable<CaseFigures["decomposition"]>["rateConstant"];
type ArrheniusFigures = Extract<Figures, { form: "arrhenius" }>;
type RowFigures = Extract<Figures, { form: "table" }>["rows"][number];

/**
 * Parameters of a rate constant in SI.
 *
 * @param order overall order of its rate law
 */
export function rateConstantOf(figures: Figures, order: number): RateConstant {
  switch (figures.form) {
    case "eyring":
      return {
        form: "eyring",
        order,
        activationEnthalpy: figures.activationEnthalpy,
        activationEntropy: figures.activationEntropy,
        standardConcentration: figures.standardConcentration.value,
        transmissionCoefficient: figures.transmissionCoefficient,
        ...fittedOf(figures),
      };
    case "arrhenius":
      return {
        form: "arrhenius",
        order,
        lnPreExponential: lnFactorOf(figures, order),
        activationEnergy: figures.activationEnergy,
        ...fittedOf(figures),
      };
    case "reference":
      return {
        form: "reference",
        order,
        rateConstant: rateOf(figures.rateConstant, order).k,
        at: figures.at,
        activationEnergy: figures.activationEnergy,
        fittedRange: rangeOf(figures.fittedRange),
      };
    case "table":
      return {
        form: "table",
        order,
        rows: figures.rows.map((row) => rowOf(row, order)),
        fitAs: figures.fitAs,
        viscosity: figures.viscosity?.value ?? null,
      };
  }
}

/** The same of a decomposition, whose rate constant is per time whatever the order: alpha has no dimension. */
export function decompositionRateOf(figures: DecompositionFigures): DecompositionRate {
  return figures.form === "heatRate" || figures.form === "td24" ? figures : rateConstantOf(figures, 1);
}

function fittedOf(figures: Extract<Figures, { form: "eyring" | "arrhenius" }>) {
  return {
    correlation: figures.correlation ?? null,
    fittedRange: rangeOf(figures.fittedRange),
    points: figures.points ?? null,
    viscosity: figures.viscosity?.value ?? null,
  };
}

function rangeOf(range: [Estimate, Estimate] | undefined): readonly [number, number] | null {
  return range === undefined ? null : [range[0].value, range[1].value];
}

function lnFactorOf(figures: ArrheniusFigures, order: number): Estimate {
  const { preExponential, lnPreExponential } = figures;
  if (preExponential !== undefined) return rateOf(preExponential, order).lnK;
  if (lnPreExponential === undefined) throw new TypeError("A document without a fault has a factor");
  const ln = readRateUnit(lnPreExponential.unit, order);
  if (typeof ln === "string") throw new TypeError(ln);
  return {
    value: lnPreExponential.value + ln,
    standardError: lnPreExponential.standardError ?? null,
  };
}

function rowOf(row: RowFigures, order: number): TableRow {
  const { lnK } = rateOf(row.rateConstant, order);
  return {
    temperature: row.temperature.value,
    lnRateConstant: lnK.value,
    relativeError: row.relativeError ?? (lnK.standardError === 0 ? null : lnK.standardError),
    leftOut: row.leftOut ?? null,
  };
}

/** Rate constants were read once already, for their faults: here they cannot fail. */
function rateOf(typed: TypedRate, order: number): { k: Estimate; lnK: Estimate } {
  const reading = readRate(typed, order);
  if (!reading.ok) throw new TypeError(reading.message);
  return reading;
}
