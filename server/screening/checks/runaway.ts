import { fromArrhenius } from "../../kinetics/rateConstant.js";
import { gasConstant } from "../../numeric/constants.js";
import { heatCrossings } from "../../thermal/frozenHeat.js";
import { type Runaway, timeToMaximumRate, zeroOrderTime } from "../../thermal/runaway.js";
import { td24 } from "../../thermal/td24.js";
import type { CheckGroup } from "./check.js";
import { plainStep } from "./plainStep.js";
import { tmradTable } from "./tmradTable.js";

const independent = { kind: "independent", fromMemory: false } as const;

/** The middle one of the three starts of each kinetics. */
const middle = tmradTable.filter((_, i) => i % 3 === 1);

const tmrad: CheckGroup = {
  ...independent,
  title: "TMRad and T_D24 of seven decompositions",
  source: "Independent implementation: 30-digit quadrature, and an implicit Runge-Kutta integration",
  checks: middle.flatMap(({ name, runaway, start_K, tmrad_s, td24_K }) => [
    {
      what: `TMRad from ${start_K} K, ${name}`,
      printed: tmrad_s.toPrecision(9),
      unit: "s",
      compute: () => timeToMaximumRate(runaway, start_K).time,
    },
    {
      what: `T_D24, ${name}`,
      printed: td24_K.toPrecision(9),
      unit: "K",
      compute: () => td24(runaway) ?? Number.NaN,
    },
  ]),
};

/** A zero-order decomposition of so many W/kg at its start. */
function zeroOrder(start: number, heatRate: number, energy: number, capacity: number, rise: number): Runaway {
  const lnK = Math.log(heatRate / (rise * capacity));
  return {
    law: { autocatalytic: false, order: 0, productOrder: 1, initiation: 0 },
    rate: fromArrhenius(lnK + energy / (gasConstant * start), energy),
    rise,
  };
}

const zeroOrderCases = [
  { start: 373.15, heat: 10, energy: 100_000, capacity: 2000, closed: "0.64317414", exact: "0.68610794" },
  { start: 423.15, heat: 1, energy: 150_000, capacity: 1800, closed: "4.96251258", exact: "5.21110252" },
] as const;

const closedForm: CheckGroup = {
  ...independent,
  title: "Zero-order TMRad, c R T₀²/(q′ Ea) and exact",
  source: "Independent implementation of Townsend & Tou 1980, Thermochim. Acta 37:1",
  checks: zeroOrderCases.flatMap(({ start, heat, energy, capacity, closed, exact }) => {
    const runaway = zeroOrder(start, heat, energy, capacity, 100);
    const given = `${heat} W/kg at ${start} K, ${energy / 1000} kJ/mol`;
    return [
      {
        what: `closed form, ${given}`,
        printed: closed,
        unit: "h",
        compute: () => zeroOrderTime(runaway, start) / 3600,
      },
      {
        what: `exact for a rise of 100 K, ${given}`,
        printed: exact,
        unit: "h",
        compute: () => timeToMaximumRate(runaway, start).time / 3600,
      },
    ];
  }),
};

/** The coolant that a vessel with just the UA of a tangency at `noReturn` may have at the most, K. */
function criticalCoolant(energy: number, noReturn: number): number {
  const rate = fromArrhenius(energy / (gasConstant * 350), energy);
  const release = (T: number): number => 500 * Math.exp(rate.lnPreExponential - energy / (gasConstant * T));
  const slope = (T: number): number => (release(T) * energy) / (gasConstant * T * T);
  const step = plainStep({}, { ua: slope(noReturn), coolantTemperature: 300 });
  return heatCrossings(step, { value: release, slope }, 300).criticalCoolant ?? Number.NaN;
}

const semenov: CheckGroup = {
  ...independent,
  title: "Critical coolant temperature of a zero-order reaction, T_NR − T_c = R T_NR²/E",
  source: "Independent implementation of Semenov 1928, Z. Phys. 48:571",
  checks: (
    [
      [100_000, 385.5065645, "373.15"],
      [130_000, 330.1200289, "323.15"],
    ] as const
  ).map(([energy, noReturn, coolant]) => ({
    what: `${energy / 1000} kJ/mol, tangent at ${noReturn} K`,
    printed: coolant,
    unit: "K",
    within: { apart: 1e-6, because: "the tangency is given to seven decimals" },
    compute: () => criticalCoolant(energy, noReturn),
  })),
};

/** Times and temperatures of runaways. */
export const runaways: readonly CheckGroup[] = [tmrad, closedForm, semenov];
