import { z } from "zod";
import { group, variants } from "./groups.js";
import { choice, estimatedNumber, limit, plain, quantity } from "./leaves.js";
import { typicalRanges } from "./typicalRanges.js";

const level = {
  innerDiameter: quantity("length", "Inner diameter"),
  fillVolume: quantity("volume", "Fill volume"),
  vesselVolume: quantity("volume", "Volume of the vessel", {
    hint: "Up to the flange; the fill volume is held against it",
  }).optional(),
  jacketLower: quantity("length", "Lower edge of the jacket", {
    sign: "notNegative",
    hint: "Height above the lowest point of the bottom",
  }),
  jacketUpper: quantity("length", "Upper edge of the jacket"),
};

const area = variants(
  {
    title: "Working of the heat transfer area",
    of: "of the vessel",
    adding: "Work it out from the vessel's dimensions",
    choosing: "Bottom",
  },
  "bottom",
  [
    group({ title: "Flat bottom" }, { bottom: z.literal("flat"), ...level }),
    group({ title: "Ellipsoidal bottom, 2:1" }, { bottom: z.literal("ellipsoidal"), ...level }),
    group(
      { title: "Torispherical bottom" },
      {
        bottom: z.literal("torispherical"),
        ...level,
        dishRadius: quantity("length", "Dish radius"),
        knuckleRadius: quantity("length", "Knuckle radius"),
      },
    ),
    group(
      { title: "Torispherical bottom, DIN 28011 (Klöpper)" },
      {
        bottom: z.literal("kloepper"),
        ...level,
        wallThickness: quantity("length", "Wall thickness", { typical: typicalRanges.wallThickness }),
      },
    ),
    group(
      { title: "Torispherical bottom, DIN 28013 (Korbbogen)" },
      {
        bottom: z.literal("korbbogen"),
        ...level,
        wallThickness: quantity("length", "Wall thickness", { typical: typicalRanges.wallThickness }),
      },
    ),
  ],
);

const coefficient = group(
  {
    title: "Working of the heat transfer coefficient, resistances in series",
    of: "of the wall",
    adding: "Work it out from films, wall and fouling",
  },
  {
    insideFilm: quantity("heatTransferCoefficient", "Film coefficient inside"),
    outsideFilm: quantity("heatTransferCoefficient", "Film coefficient in the jacket"),
    wallThickness: quantity("length", "Wall thickness", { typical: typicalRanges.wallThickness }),
    wallConductivity: quantity("conductivity", "Conductivity of the wall", {
      typical: typicalRanges.wallConductivity,
    }),
    liningThickness: quantity("length", "Lining thickness", {
      typical: typicalRanges.liningThickness,
    }).optional(),
    liningConductivity: quantity("conductivity", "Conductivity of the lining", {
      typical: typicalRanges.liningConductivity,
    }).optional(),
    insideFouling: quantity("fouling", "Fouling resistance inside", {
      sign: "notNegative",
    }).optional(),
    outsideFouling: quantity("fouling", "Fouling resistance in the jacket", {
      sign: "notNegative",
    }).optional(),
    jacketMedium: choice("Jacket medium", {
      steam: "Steam",
      brine: "Water or brine",
      heatTransferOil: "Heat transfer oil",
    }).optional(),
    wall: choice("Wall", {
      stainless: "Stainless steel",
      glassLined: "Glass-lined steel",
    }).optional(),
    contents: choice("Contents", {
      water: "Water",
      aqueous: "Aqueous solution",
      organics: "Organics",
      lightOil: "Light oil",
      heavyOil: "Heavy oil",
    }).optional(),
  },
);

const boiling = variants(
  {
    title: "Working of the maximum technical temperature, as a boiling point",
    of: "of the boiling point",
    adding: "Work it out as a boiling point",
    choosing: "Method",
  },
  "method",
  [
    group(
      { title: "Clausius-Clapeyron, from the normal boiling point" },
      {
        method: z.literal("clausius-clapeyron"),
        normalBoilingPoint: quantity("temperature", "Normal boiling point"),
        heatOfVaporisation: quantity("molarEnergy", "Heat of vaporisation", {
          typical: typicalRanges.heatOfVaporisation,
        }),
        pressure: quantity("pressure", "Pressure", { hint: "Absolute" }),
      },
    ),
    group(
      { title: "Antoine equation, log₁₀ p = a − b/(T + c)" },
      {
        method: z.literal("antoine"),
        a: plain("a", {}),
        b: plain("b", { above: 0 }),
        c: plain("c", {}),
        pressureUnit: choice("Unit of p", {
          bar: "bar",
          kPa: "kPa",
          Pa: "Pa",
          mmHg: "mmHg",
          atm: "atm",
        }),
        temperatureUnit: choice("Unit of T", { degC: "°C", K: "K" }),
        lowest: quantity("temperature", "Valid from"),
        highest: quantity("temperature", "Valid up to"),
        pressure: quantity("pressure", "Pressure", { hint: "Absolute" }),
      },
    ),
  ],
);

/** The vessel and what cools it. */
export const vessel = group(
  { title: "Vessel" },
  {
    heatTransferCoefficient: quantity("heatTransferCoefficient", "Heat transfer coefficient", {
      typical: typicalRanges.heatTransferCoefficient,
    }),
    heatTransferCoefficientFrom: coefficient.optional(),
    heatTransferArea: quantity("area", "Heat transfer area"),
    heatTransferAreaFrom: area.optional(),
    agitatorPower: quantity("power", "Agitator power", {
      sign: "notNegative",
    }).prefault("0 W"),
    heatGain: group(
      { title: "Heat gained from the surroundings", of: "of the surroundings" },
      {
        coefficient: quantity("heatPerKelvin", "Coefficient", {
          alone: "heat gain coefficient",
        }),
        ambient: quantity("temperature", "Temperature"),
      },
    ).optional(),
    coolant: group(
      {
        title: "Coolant",
        of: "of the coolant",
        intro: "Flow, heat capacity and holdup together; without them the jacket stays at one temperature",
      },
      {
        temperature: quantity("temperature", "Temperature"),
        flow: quantity("massFlow", "Flow").optional(),
        heatCapacity: quantity("heatCapacity", "Specific heat capacity", {
          typical: typicalRanges.heatCapacity,
        }).optional(),
        holdup: quantity("mass", "Mass in the jacket", {
          alone: "coolant in the jacket",
        }).optional(),
      },
    ),
  },
);

const fraction = { above: 0, atMost: 1 };

/** What must not be exceeded, and the study's range. */
export const limits = group(
  { title: "Limits" },
  {
    maximumTechnicalTemperature: limit("temperature", "Maximum technical temperature"),
    maximumTechnicalTemperatureFrom: boiling.optional(),
    lowestTemperature: quantity("temperature", "Lowest temperature studied"),
    highestTemperature: quantity("temperature", "Highest temperature studied"),
    availableTime: quantity("time", "Time available for the step"),
    targetConversion: estimatedNumber("Target conversion", fraction).prefault(0.98),
    coolingUse: estimatedNumber("Largest part of the cooling to be used", fraction).prefault(0.8),
    minimumTimeToMaximumRate: quantity("time", "Least time to the maximum rate").prefault("24 h"),
    decompositionAllowed: estimatedNumber("Decomposition allowed in a failure", fraction).prefault(0.05),
    controlBand: quantity("temperatureDifference", "Control band", {
      sign: "notNegative",
      hint: "How far the temperature swings to each side of its set point",
      typical: typicalRanges.controlBand,
    }).prefault("0 K"),
  },
);
