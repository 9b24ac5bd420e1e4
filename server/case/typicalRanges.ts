import { typicalTransferSpan } from "../thermal/typicalTransfer.js";

/**
 * Where most values of a quantity lie. A slip of the keyboard stands out against it; it is no limit, and a
 * value from it is no measurement.
 */
export interface TypicalRange {
  /** number alone, in the unit of `highest` */
  readonly lowest: string;
  /** with its unit, as one would type it */
  readonly highest: string;
  /** what it holds for, and what lies outside */
  readonly of: string;
}

/** "1.5 to 2.5 kJ/(kg K), organic liquids; water 4.18" */
export function typicalText({ lowest, highest, of }: TypicalRange): string {
  return `Typically ${`${lowest} to ${highest}`.replace(/\^2/g, "²").replace(/-(?=\d)/g, "−")}, ${of}`;
}

const [lowestTransfer, highestTransfer] = typicalTransferSpan();

/** By what is asked for. Common practice, unless a source stands beside it. */
export const typicalRanges = {
  density: { lowest: "0.7", highest: "1.5 kg/L", of: "most liquids; water 1.00" },
  heatCapacity: { lowest: "1.5", highest: "2.5 kJ/(kg K)", of: "organic mixtures; water 4.18" },
  heatOfReaction: { lowest: "-200", highest: "-50 kJ/mol", of: "many reactions; some far stronger" },
  heatOfDecomposition: { lowest: "100", highest: "2000 J/g", of: "the less diluted, the more" },
  activationEnergy: {
    lowest: "40",
    highest: "150 kJ/mol",
    of: "reactions in liquids; decompositions often more",
  },
  activationEntropy: {
    lowest: "-150",
    highest: "50 J/(mol K)",
    of: "negative where two meet in one complex",
  },
  viscosity: { lowest: "0.3", highest: "10 mPa s", of: "thin liquids; water 0.9 at 25 °C" },
  heatOfVaporisation: {
    lowest: "25",
    highest: "45 kJ/mol",
    of: "most solvents; water 40.7 at its boiling point",
  },
  wallThickness: { lowest: "5", highest: "30 mm", of: "stirred vessels" },
  liningThickness: { lowest: "1", highest: "2 mm", of: "glass linings" },
  wallConductivity: {
    lowest: "14",
    highest: "60 W/(m K)",
    of: "stainless steel about 16, carbon steel about 50",
  },
  liningConductivity: { lowest: "0.9", highest: "1.2 W/(m K)", of: "glass linings" },
  controlBand: { lowest: "1", highest: "5 K", of: "vessels under control" },
  /** Perry's Chemical Engineers' Handbook, Table 11-7: over all its walls, media and contents */
  heatTransferCoefficient: {
    lowest: String(lowestTransfer),
    highest: `${highestTransfer} W/(m^2 K)`,
    of: "jacketed vessels (Perry, Table 11-7)",
  },
} as const satisfies Readonly<Record<string, TypicalRange>>;
