import { group, list } from "./groups.js";
import { choice, estimatedNumber, plain, quantity, text } from "./leaves.js";
import { decompositionRateConstant, rateConstant, rateLaw } from "./rateConstantSchema.js";
import { typicalRanges } from "./typicalRanges.js";

const reactionOrder = { above: 0, atMost: 3 };

const reactants = group(
  { title: "Reactants", intro: "Without B the rate depends on A alone" },
  {
    A: group(
      { title: "Reactant A", of: "of A" },
      {
        name: text("Name").optional(),
        amount: quantity("amount", "Amount", {
          hint: "All of it, whether charged or fed",
        }),
        order: estimatedNumber("Order", reactionOrder).prefault(1),
      },
    ),
    B: group(
      { title: "Reactant B", of: "of B" },
      {
        name: text("Name").optional(),
        amount: quantity("amount", "Amount", {
          hint: "All of it, whether charged or fed",
        }),
        order: estimatedNumber("Order", reactionOrder).prefault(1),
        perA: estimatedNumber(
          "Mol of B per mol of A",
          { above: 0 },
          { alone: "mol of B per mol of A" },
        ).prefault(1),
      },
    ).optional(),
  },
);

const feed = group(
  {
    title: "Feed",
    of: "of the feed",
    intro: "Dosed at a constant rate over its duration",
    onlyWith: ["operation", "semibatch"],
  },
  {
    reactant: choice("Fed reactant", { A: "A", B: "B" }),
    mass: quantity("mass", "Mass"),
    density: quantity("density", "Density", { typical: typicalRanges.density }),
    heatCapacity: quantity("heatCapacity", "Specific heat capacity", { typical: typicalRanges.heatCapacity }),
    temperature: quantity("temperature", "Temperature"),
    duration: quantity("time", "Duration"),
  },
);

const measuredAccumulation = group(
  {
    title: "Measured accumulation",
    of: "of the measured accumulation",
    intro: "From a calorimetric run of this feed: instead of a rate constant, or beside it",
    onlyWith: ["operation", "semibatch"],
    adding: "Add a measured accumulation",
  },
  {
    temperature: quantity("temperature", "Temperature of the run"),
    rows: list(
      {
        title: "Heat released",
        entry: "Row",
        intro: "Part of the whole heat that was released by each time from the start of the feed",
        layout: "rows",
        atLeast: 2,
        atMost: 1000,
      },
      group(
        { title: "Row" },
        {
          time: quantity("time", "Time", { sign: "notNegative" }),
          releasedFraction: plain("Released fraction", {
            atLeast: 0,
            atMost: 1,
          }),
        },
      ),
    ),
  },
);

/** The desired reaction. */
export const reaction = group(
  { title: "Reaction", of: "of the reaction" },
  {
    name: text("Name").optional(),
    operation: choice("Operation", {
      batch: "Batch: everything is in the vessel at the start",
      semibatch: "Semibatch: one reactant is fed",
    }),
    temperature: quantity("temperature", "Process temperature", {
      alone: "process temperature",
    }),
    reactants,
    feed: feed.optional(),
    heat: quantity("molarEnergy", "Heat of reaction", {
      sign: "exothermic",
      alone: "heat of reaction",
      hint: "Per mol of A; negative, because heat leaves",
      typical: typicalRanges.heatOfReaction,
    }),
    rateConstant: rateConstant.optional(),
    measuredAccumulation: measuredAccumulation.optional(),
  },
);

/** What the mixture does when it gets too hot. */
export const decomposition = group(
  {
    title: "Decomposition",
    of: "of the decomposition",
    intro: "Of the mixture as it is in the vessel. Without it the window is incomplete",
    adding: "Add a decomposition",
  },
  {
    heat: quantity("specificEnergy", "Heat of decomposition", {
      alone: "heat of decomposition",
      hint: "Per mass of mixture; positive",
      typical: typicalRanges.heatOfDecomposition,
    }),
    rateLaw,
    rateConstant: decompositionRateConstant,
  },
);
