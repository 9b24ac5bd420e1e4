import { zeroCelsius } from "../numeric/constants.js";

/** A failure as a case document states it, text with units: something to begin with, to be edited. */
interface FailureText {
  readonly name: string;
  readonly at: string;
  readonly startTemperature?: string;
  readonly changes: readonly ChangeText[];
}

interface ChangeText {
  readonly after: string;
  readonly coolantFlow?: number;
  readonly heatTransfer?: number;
  readonly coolantTemperature?: string;
  readonly feed?: "stop" | "continue";
  readonly agitator?: "on" | "off";
  readonly quench?: {
    readonly mass: string;
    readonly heatCapacity: string;
    readonly density: string;
    readonly temperature: string;
  };
}

/** A failure that is offered, and what it asks. */
export interface StartingPoint {
  readonly key: string;
  readonly question: string;
  readonly failure: FailureText;
}

/** What the timelines are filled in from, SI; null where the case does not say it yet. */
export interface Known {
  readonly operation: "batch" | "semibatch";
  readonly processTemperature: number | null;
  readonly coolantTemperature: number | null;
  /** kg of the first charge */
  readonly mass: number | null;
}

/** Kelvin by which the coolant comes warmer, and the contents start colder. */
const warmer = 30;
const colder = 15;

/** Part of the heat transfer that is left without stirring, and part of the charge dropped in as a quench. */
const unstirred = 0.2;
const quenchPart = 0.2;

/**
 * Failures to begin with: plain timelines, filled in with round figures that have to be replaced by those of the
 * plant. Common practice, no single source.
 *
 * @param known of the case so far
 * @returns in the order in which they are offered; those on a feed only where there is one
 */
export function startingPoints(known: Known): StartingPoint[] {
  const fed = known.operation === "semibatch";
  const stop = fed ? ({ feed: "stop" } as const) : {};
  const run = fed ? ({ feed: "continue" } as const) : {};
  const point = (
    key: string,
    name: string,
    question: string,
    changes: readonly ChangeText[],
    startTemperature?: string,
  ): StartingPoint => ({
    key,
    question,
    failure: { name, at: "worst", ...(startTemperature === undefined ? {} : { startTemperature }), changes },
  });
  return [
    point(
      "coolant-stops",
      "Coolant stops",
      "The coolant pump trips and stays off. How long is there to act?",
      [{ after: "0 min", coolantFlow: 0, ...stop }],
    ),
    point(
      "coolant-warm",
      "Coolant comes warm",
      "The chiller fails and the coolant keeps flowing, but warm.",
      [{ after: "0 min", coolantTemperature: celsius(known.coolantTemperature, warmer, 40), ...stop }],
    ),
    point("agitator-stops", "Agitator stops", "The stirrer stops: what is left of the heat transfer?", [
      { after: "0 min", agitator: "off", heatTransfer: unstirred, ...stop },
    ]),
    ...(fed
      ? [
          point(
            "feed-runs-on",
            "Coolant stops, feed runs on",
            "The coolant stops and nobody stops the feed.",
            [{ after: "0 min", coolantFlow: 0, feed: "continue" }],
          ),
        ]
      : []),
    point(
      "started-cold",
      "Started too cold, then the coolant stops",
      "The batch was begun below its temperature, so that less has reacted when the coolant stops.",
      [{ after: "0 min", coolantFlow: 0, ...stop }],
      celsius(known.processTemperature, -colder, 20),
    ),
    point(
      "late-restart",
      "Agitator restarts late",
      "The stirrer stands still for a while, then starts again on what has piled up.",
      [
        { after: "0 min", agitator: "off", heatTransfer: unstirred, ...run },
        { after: "30 min", agitator: "on", heatTransfer: 1 },
      ],
    ),
    point(
      "half-transfer",
      "Half the heat transfer",
      "Fouling, a low level or a thick batch leaves half of the heat transfer.",
      [{ after: "0 min", heatTransfer: 0.5, ...run }],
    ),
    point(
      "quench",
      "Coolant stops, quenched after 15 min",
      "The coolant stops and a cold solvent is dropped in. Is it enough, and in time?",
      [
        { after: "0 min", coolantFlow: 0, ...stop },
        {
          after: "15 min",
          quench: {
            mass: known.mass === null ? "300 kg" : `${rounded(quenchPart * known.mass)} kg`,
            heatCapacity: "2 kJ/(kg K)",
            density: "0.9 kg/L",
            temperature: "20 degC",
          },
        },
      ],
    ),
  ];
}

/** A temperature moved by some kelvin, as text in whole degrees; `otherwise` where it is not known. */
function celsius(kelvin: number | null, by: number, otherwise: number): string {
  const degrees = kelvin === null ? otherwise : Math.round(kelvin - zeroCelsius + by);
  return `${degrees} degC`;
}

/** Two digits are enough for a figure that has to be replaced. */
function rounded(mass: number): string {
  return String(Number(mass.toPrecision(2)));
}
