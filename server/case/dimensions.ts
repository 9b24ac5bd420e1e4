import type { Powers } from "./units.js";

/** What a quantity is, for its check and for the words of a fault. */
export interface Dimension {
  /** with its article: "a mass" */
  readonly words: string;
  /** unit as a reader writes it */
  readonly unit: string;
  /** a whole quantity that would do */
  readonly example: string;
  readonly powers: Powers;
  /** an absolute temperature: its scale has a zero, and nothing lies at or below 0 K */
  readonly absolute?: true;
}

function powers(mass: number, length: number, time: number, temperature = 0, amount = 0): Powers {
  return { mass, length, time, temperature, amount, other: false };
}

/** Every kind of quantity that a case document holds; rate constants depend on their order. */
export const dimensions = {
  mass: {
    words: "a mass",
    unit: "kg",
    example: "150 kg",
    powers: powers(1, 0, 0),
  },
  amount: {
    words: "an amount of substance",
    unit: "mol",
    example: "2.5 kmol",
    powers: powers(0, 0, 0, 0, 1),
  },
  volume: {
    words: "a volume",
    unit: "m^3",
    example: "1500 L",
    powers: powers(0, 3, 0),
  },
  density: {
    words: "a density",
    unit: "kg/m^3",
    example: "0.91 kg/L",
    powers: powers(1, -3, 0),
  },
  heatCapacity: {
    words: "a specific heat capacity",
    unit: "J/(kg K)",
    example: "2.0 kJ/(kg K)",
    powers: powers(0, 2, -2, -1),
  },
  temperature: {
    words: "a temperature",
    unit: "degC",
    example: "35 degC",
    powers: powers(0, 0, 0, 1),
    absolute: true,
  },
  temperatureDifference: {
    words: "a temperature difference",
    unit: "K",
    example: "2 K",
    powers: powers(0, 0, 0, 1),
  },
  time: {
    words: "a time",
    unit: "s",
    example: "30 min",
    powers: powers(0, 0, 1),
  },
  molarEnergy: {
    words: "an energy per amount of substance",
    unit: "J/mol",
    example: "85 kJ/mol",
    powers: powers(1, 2, -2, 0, -1),
  },
  molarEntropy: {
    words: "an entropy per amount of substance",
    unit: "J/(mol K)",
    example: "-40 J/(mol K)",
    powers: powers(1, 2, -2, -1, -1),
  },
  specificEnergy: {
    words: "an energy per mass",
    unit: "J/kg",
    example: "400 J/g",
    powers: powers(0, 2, -2),
  },
  specificPower: {
    words: "a heat release rate per mass",
    unit: "W/kg",
    example: "10 W/kg",
    powers: powers(0, 2, -3),
  },
  heatTransferCoefficient: {
    words: "a heat transfer coefficient",
    unit: "W/(m^2 K)",
    example: "300 W/(m^2 K)",
    powers: powers(1, 0, -3, -1),
  },
  area: {
    words: "an area",
    unit: "m^2",
    example: "5.6 m^2",
    powers: powers(0, 2, 0),
  },
  length: {
    words: "a length",
    unit: "m",
    example: "1.4 m",
    powers: powers(0, 1, 0),
  },
  power: {
    words: "a power",
    unit: "W",
    example: "1.5 kW",
    powers: powers(1, 2, -3),
  },
  heatPerKelvin: {
    words: "a heat flow per kelvin",
    unit: "W/K",
    example: "15 W/K",
    powers: powers(1, 2, -3, -1),
  },
  massFlow: {
    words: "a mass flow",
    unit: "kg/s",
    example: "4.5 kg/s",
    powers: powers(1, 0, -1),
  },
  concentration: {
    words: "a concentration",
    unit: "mol/m^3",
    example: "1 mol/L",
    powers: powers(0, -3, 0, 0, 1),
  },
  viscosity: {
    words: "a viscosity",
    unit: "Pa s",
    example: "0.9 mPa s",
    powers: powers(1, -1, -1),
  },
  conductivity: {
    words: "a thermal conductivity",
    unit: "W/(m K)",
    example: "16 W/(m K)",
    powers: powers(1, 1, -3, -1),
  },
  fouling: {
    words: "a fouling resistance",
    unit: "m^2 K/W",
    example: "0.0002 m^2 K/W",
    powers: powers(-1, 0, 3, 1),
  },
  pressure: {
    words: "a pressure",
    unit: "Pa",
    example: "1.5 bar",
    powers: powers(1, -1, -2),
  },
} satisfies Readonly<Record<string, Dimension>>;

/** Name of a kind of quantity. */
export type Kind = keyof typeof dimensions;

/**
 * A rate constant k in r = k c^n, c per volume.
 *
 * @param order overall order n of the rate law
 */
export function rateConstantDimension(order: number): Dimension {
  const over = rounded(order - 1);
  const unit = rateUnit("m^3", over, 3);
  return {
    words: `a rate constant of overall order ${rounded(order)}`,
    unit,
    example: `1e-4 ${rateUnit("L", over, 1)}`,
    powers: {
      mass: 0,
      length: 3 * (order - 1),
      time: -1,
      temperature: 0,
      amount: 1 - order,
      other: false,
    },
  };
}

function rounded(value: number): number {
  return Number(value.toFixed(6));
}

function rateUnit(volume: string, over: number, power: number): string {
  if (over === 0) return "1/s";
  if (over === 1) return `${volume}/(mol s)`;
  const base = volume.replace(/\^.*/, "");
  return `${base}^${rounded(power * over)} mol^${rounded(-over)} s^-1`;
}

/** Whether two sets of powers are the same dimension; powers may come from orders that are not whole. */
export function sameDimension(a: Powers, b: Powers): boolean {
  const near = (x: number, y: number) => Math.abs(x - y) < 1e-6;
  return (
    near(a.mass, b.mass) &&
    near(a.length, b.length) &&
    near(a.time, b.time) &&
    near(a.temperature, b.temperature) &&
    near(a.amount, b.amount) &&
    a.other === b.other &&
    !a.other
  );
}

/** A dimension in words where it has a name here, otherwise in base units. */
export function describe(given: Powers): string {
  const named = Object.values(dimensions).find((each) => sameDimension(each.powers, given));
  if (named !== undefined) return named.words;
  if (given.other) return "a quantity of electricity, light, angle or data";
  const order = 1 - given.amount;
  const asRate = rateConstantDimension(order);
  if (order > 0 && order <= 6 && sameDimension(asRate.powers, given)) return asRate.words;
  const parts = [
    part("kg", given.mass),
    part("m", given.length),
    part("s", given.time),
    part("K", given.temperature),
    part("mol", given.amount),
  ].filter((text) => text !== "");
  return parts.length === 0 ? "a number without dimension" : `a quantity in ${parts.join(" ")}`;
}

function part(unit: string, power: number): string {
  if (Math.abs(power) < 1e-6) return "";
  return Math.abs(power - 1) < 1e-6 ? unit : `${unit}^${rounded(power)}`;
}
