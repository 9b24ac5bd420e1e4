import { zeroCelsius } from "../../numeric/constants.js";
import { antoineBoilingPoint, clausiusClapeyron, pressureUnits } from "../../thermal/boilingPoint.js";
import { coolingCapacity } from "../../thermal/cooling.js";
import { type Bottom, dinRadii, ellipsoidalBottom, torisphericalBottom } from "../../thermal/dishedHead.js";
import { rateOverK } from "../../thermal/reactionRate.js";
import type { Check, CheckGroup } from "./check.js";
import { plainStep } from "./plainStep.js";

/**
 * Saturated water and steam, pressure in bar and temperature in degC as printed: Wagner & Kretzschmar, International
 * Steam Tables (IAPWS-IF97), from memory.
 */
export const steamTable = [
  [0.1, "45.81"],
  [0.2, "60.06"],
  [0.5, "81.32"],
  [1, "99.61"],
  [2, "120.21"],
  [3, "133.53"],
  [5, "151.84"],
  [10, "179.89"],
] as const;

/** Antoine constants of water for mmHg and degC, below and above 100 degC: Gmehling & Onken, from memory. */
const antoineOfWater = (celsius: number) => {
  const [a, b, c] = celsius <= 100 ? [8.07131, 1730.63, 233.426] : [8.14019, 1810.94, 244.485];
  return { a, b, c, pressureUnit: pressureUnits.mmHg, temperatureZero: zeroCelsius };
};

const boiling: CheckGroup = {
  kind: "published",
  fromMemory: true,
  title: "Boiling point of water",
  source: "Wagner & Kretzschmar, International Steam Tables (IAPWS-IF97)",
  checks: [
    ...steamTable.map(
      ([bar, printed]): Check => ({
        what: `by Antoine's equation at ${bar} bar`,
        printed,
        unit: "°C",
        within: { apart: 0.5, because: "the accuracy of its constants" },
        compute: () => antoineBoilingPoint(antoineOfWater(Number(printed)), bar * 1e5) - zeroCelsius,
      }),
    ),
    ...steamTable
      .filter(([bar]) => bar >= 0.5 && bar <= 5)
      .map(
        ([bar, printed]): Check => ({
          what: `by Clausius and Clapeyron at ${bar} bar, from 99.97 °C and 40.65 kJ/mol`,
          printed,
          unit: "°C",
          within: { apart: 0.5, because: "a constant heat of vaporisation, near the normal boiling point" },
          compute: () => clausiusClapeyron(99.97 + zeroCelsius, 40_650, bar * 1e5) - zeroCelsius,
        }),
      ),
  ],
};

const areaOf = (bottom: Bottom): number => bottom.areaBelow(bottom.height);

const heads: CheckGroup = {
  kind: "published",
  fromMemory: false,
  title: "Areas of dished heads",
  source: "Worked values of an open geometry library",
  checks: [
    {
      what: "torispherical, D 2.54 m, dish 1.039370079 D, knuckle 0.062362205 D",
      printed: "6.00394283477063",
      unit: "m²",
      within: { apart: 1e-12, because: "twelve decimals" },
      compute: () => areaOf(torisphericalBottom(2.54, 1.039370079 * 2.54, 0.062362205 * 2.54)),
    },
    {
      what: "half an ellipsoid of 2 m, 1.5 m high",
      printed: "8.459109081729984",
      unit: "m²",
      within: { apart: 1e-12, because: "twelve decimals" },
      compute: () => areaOf(ellipsoidalBottom(2, 1.5)),
    },
  ],
};

/** Height of a head of 1.6 m outside and 8 mm wall, m. */
function dinHeight(form: "kloepper" | "korbbogen"): number {
  const [outer, wall] = [1.6, 0.008];
  const inner = outer - 2 * wall;
  const { dish, knuckle } = dinRadii(form, inner, wall);
  return torisphericalBottom(inner, dish, knuckle).height;
}

const heights: CheckGroup = {
  kind: "published",
  fromMemory: false,
  title: "Heights of dished heads, 1.6 m outside, wall 8 mm",
  source: "DIN 28011, h = 0.1935 Do − 0.455 t; DIN 28013, h = 0.255 Do − 0.635 t",
  checks: (
    [
      ["kloepper", "DIN 28011", 0.1935 * 1.6 - 0.455 * 0.008],
      ["korbbogen", "DIN 28013", 0.255 * 1.6 - 0.635 * 0.008],
    ] as const
  ).map(([form, what, rule]) => ({
    what,
    printed: rule.toFixed(5),
    unit: "m",
    within: { apart: 1.6e-3, because: "the rule is an approximation: 0.1 % of Do" },
    compute: () => dinHeight(form),
  })),
};

/** 0.256 m^3/min from 25 degC into 14 m^3 at 65 degC; J/min that the jacket has to take. */
function heatToRemove(): number {
  const { reaction } = plainStep({ amountA: 1, b: { amount: 1, order: 1, perA: 1 } });
  const perMinute = 9.15e-5 * rateOverK(reaction, 400 * 14, 800 * 14, 14);
  return perMinute * 48_400 - 0.256 * 662_000 * 40;
}

const heatBalance: CheckGroup = {
  kind: "published",
  fromMemory: false,
  title: "Heat balance of A + B → 2 C in a jacketed vessel of 14 m³ at 65 °C",
  source: "Tosun, Modelling in Transport Phenomena, Example 6.6, p. 173",
  checks: [
    {
      what: "heat to be removed",
      printed: "13e6",
      unit: "J/min",
      compute: heatToRemove,
    },
    {
      what: "area that takes it to a jacket at 15 °C with 1 050 W/(m² K)",
      printed: "4.1",
      unit: "m²",
      compute: () => {
        const step = plainStep({}, { ua: 1050, coolantTemperature: 15 + zeroCelsius });
        return heatToRemove() / 60 / coolingCapacity(step, 65 + zeroCelsius);
      },
    },
  ],
};

/** What the vessel and its contents are checked by. */
export const vessels: readonly CheckGroup[] = [heatBalance, heads, heights, boiling];
