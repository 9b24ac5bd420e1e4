import { z } from "zod";
import { group, list } from "./groups.js";
import { choice, estimatedNumber, plain, quantity, text, timeOrWorst } from "./leaves.js";
import { decomposition, reaction } from "./reactionSchema.js";
import { typicalRanges } from "./typicalRanges.js";
import { limits, vessel } from "./vesselSchema.js";

/** The one format there is. */
export const caseFormat = "thermal-window/case-1";

const full = { hint: "1 full, 0 none" };
const factor = { atLeast: 0, atMost: 1 };

const quench = group(
  { title: "Quench", of: "of the quench", adding: "Add a quench" },
  {
    mass: quantity("mass", "Mass"),
    heatCapacity: quantity("heatCapacity", "Specific heat capacity", { typical: typicalRanges.heatCapacity }),
    density: quantity("density", "Density", { typical: typicalRanges.density }),
    temperature: quantity("temperature", "Temperature"),
  },
);

const change = group(
  { title: "Change" },
  {
    after: quantity("time", "After", {
      sign: "notNegative",
      hint: "From the failure on; the first at 0",
    }),
    coolantFlow: plain("Coolant flow", factor, full).optional(),
    heatTransfer: plain("Heat transfer", factor, full).optional(),
    coolantTemperature: quantity("temperature", "Coolant temperature").optional(),
    feed: choice("Feed", { stop: "Stops", continue: "Runs on" }, { blank: "As it was" }).optional(),
    agitator: choice(
      "Agitator",
      { on: "On", off: "Off" },
      {
        blank: "As it was",
        hint: "Off: say what is left of the heat transfer",
      },
    ).optional(),
    mixing: plain("Mixing", factor, full).optional(),
    quench: quench.optional(),
  },
);

const failure = group(
  { title: "Failure" },
  {
    name: text("Name"),
    at: timeOrWorst("Begins at", {
      hint: "A time from the start of the feed or the reaction, or the word worst",
    }).prefault("worst"),
    startTemperature: quantity("temperature", "Temperature at the failure", {
      hint: "The process temperature where empty",
    }).optional(),
    horizon: quantity("time", "Watched for", {
      hint: "Never less than 24 h beyond the last change",
    }).optional(),
    response: group(
      {
        title: "Response",
        of: "of the response",
        intro: "How long people take",
      },
      {
        detection: quantity("time", "Detection", { sign: "notNegative" }),
        decision: quantity("time", "Decision", { sign: "notNegative" }),
        action: quantity("time", "Action", { sign: "notNegative" }),
      },
    ).optional(),
    changes: list(
      {
        title: "What happens",
        entry: "Change",
        intro: "What is not named stays as it was",
        layout: "groups",
        atLeast: 1,
        atMost: 50,
      },
      change,
    ),
  },
);

const slip = group(
  { title: "Slip" },
  {
    name: text("Name"),
    chargeOfA: plain("Amount of A, times", { above: 0 }).optional(),
    chargeOfB: plain("Amount of B, times", { above: 0 }).optional(),
    fedAmount: plain(
      "Fed amount, times",
      { above: 0 },
      {
        hint: "The reactant in the feed, with its mass",
      },
    ).optional(),
    solvent: plain(
      "Solvent, times",
      { above: 0 },
      {
        hint: "The mass charged, the amounts as they are",
      },
    ).optional(),
    rate: plain("Rate constant, times", { above: 0 }).optional(),
    feedDuration: plain("Duration of the feed, times", { above: 0 }).optional(),
    heatTransfer: plain("Heat transfer, times", { atLeast: 0 }).optional(),
    feedTemperature: quantity("temperatureDifference", "Feed warmer by", {
      sign: "any",
    }).optional(),
    temperature: quantity("temperatureDifference", "Process warmer by", {
      sign: "any",
    }).optional(),
    coolantTemperature: quantity("temperatureDifference", "Coolant warmer by", {
      sign: "any",
    }).optional(),
  },
);

/** The case document. Its keys stand in the order in which a person thinks of them. */
export const caseSchema = group(
  { title: "Case" },
  {
    format: z.literal(caseFormat),
    title: text("Title"),
    remark: text("Remark").optional(),
    batch: group(
      { title: "Batch record" },
      {
        record: text("Record").optional(),
        step: text("Step").optional(),
        vessel: text("Vessel").optional(),
        preparedBy: text("Prepared by").optional(),
      },
    ).optional(),
    mixture: group(
      {
        title: "Mixture",
        of: "of the mixture",
        intro: "The contents before any feed",
      },
      {
        mass: quantity("mass", "Mass"),
        density: quantity("density", "Density", { typical: typicalRanges.density }),
        heatCapacity: quantity("heatCapacity", "Specific heat capacity", {
          typical: typicalRanges.heatCapacity,
        }),
        thermalInertia: estimatedNumber(
          "Thermal inertia",
          { atLeast: 1 },
          {
            alone: "thermal inertia",
            hint: "1: the walls take up no heat, the cautious case",
          },
        ).prefault(1),
      },
    ),
    reaction,
    decomposition: decomposition.optional(),
    vessel,
    limits,
    failures: list(
      {
        title: "Failures",
        entry: "Failure",
        intro: "What stops working, and when",
        layout: "groups",
        starter: { at: "worst", changes: [{ after: "0 min" }] },
        atLeast: 0,
        atMost: 20,
      },
      failure,
    ).optional(),
    slips: list(
      {
        title: "Slips",
        entry: "Slip",
        intro: "Ordinary slips of the recipe; the usual ones are run where none is given here",
        layout: "groups",
        atLeast: 0,
        atMost: 50,
      },
      slip,
    ).optional(),
  },
);

/** A case document that was accepted, exactly as typed. */
export type CaseDocument = z.input<typeof caseSchema>;

/** The same in SI, rate constants still waiting for their order. */
export type CaseFigures = z.output<typeof caseSchema>;
