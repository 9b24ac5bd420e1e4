import { assess } from "../../server/failure/assessment.js";
import { changed } from "../../server/failure/conditions.js";
import { fullSearch, judgeAt } from "../../server/failure/judgement.js";
import { startAt } from "../../server/failure/start.js";
import { createVessel } from "../../server/failure/vessel.js";
import { drawnFailures } from "../../server/screening/drawnFailures.js";
import { failureFindings } from "../../server/screening/failureFindings.js";
import { knownRates } from "../../server/screening/known.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { demo } from "./cases.js";
import { type Bench, type Line, ms, ratio, type Timing, time } from "./measure.js";
import { type Integrate, loosest, mathjs, odex, ours, type Problem } from "./threeIntegrators.js";

/** A demo case at its estimates. */
function opened(name: string) {
  const { model } = demo(name);
  const known = knownRates(model);
  const step = realise(model, known, estimates);
  const { rate, temperature } = step.reaction;
  const vessel = rate === null ? null : createVessel(step, rate, temperature);
  if (vessel === null) throw new Error(`${name} has nothing to run`);
  return { model, known, step, vessel };
}

const ringClosure = opened("ring-closure");

/** Half a second after the fastest rise both reactions are at their end. */
const afterRunaway = 0.5;

/** The ring closure from the loss of its coolant through the runaway: temperature, extent, jacket, decomposition. */
function runaway(): Problem {
  const { vessel, model } = ringClosure;
  const [failure] = model.failures;
  const course = assess(vessel, failure);
  const start = startAt(vessel.contents, vessel.hold, 0);
  if (course === null || start === null) throw new Error("The failure could not be run");
  vessel.contents.enter(0, start.charge, changed(start.conditions, failure.changes[0]), 1);
  const problem = {
    system: vessel.contents.system,
    start: start.state,
    until: course.run.fastest.at + afterRunaway,
  };
  const exact = ours({ ...problem, exact: [], scale: [] }, 1e-13);
  if (exact === null) throw new Error("The runaway could not be integrated");
  // Temperatures by the adiabatic rise of the decomposition, about 300 K; the others run from 0 to 1.
  return { ...problem, exact: [...Array.from(exact.y)], scale: [300, 1, 300, 1] };
}

const error = 1e-6;

function through(problem: Problem, name: string, integrate: Integrate) {
  const found = loosest(integrate, problem, error);
  if (found === null) return { what: `  ${name} does not get there`, timing: null };
  const { outcome, tolerance } = found;
  const what = `  ${name}: ${outcome.steps} steps, ${outcome.calls} calls, error ${found.error.toExponential(0)}`;
  return { what, timing: time(() => integrate(problem, tolerance), 0.5) };
}

function integrators(): Line[] {
  const problem = runaway();
  const own = through(problem, "ours", ours);
  const least = own.timing?.least ?? Number.POSITIVE_INFINITY;
  const others = [through(problem, "odex", odex), through(problem, "mathjs solveODE", mathjs)];
  return [
    { what: "ring closure through its runaway, at an error of 1e-6:", figure: "" },
    { what: own.what, figure: ms(least), bound: { text: "below 1.5 ms", met: least < 1.5 } },
    ...others.map(({ what, timing }) => ({
      what,
      figure:
        timing === null
          ? "within the calls that it is given"
          : `${ms(timing.least)}, ${ratio(timing.least, least)} as long`,
    })),
  ];
}

/** The least of several runs counts: others at work on the machine only ever add to it. */
function within(what: string, timing: Timing, bound: number): Line {
  return {
    what,
    figure: ms(timing.least),
    bound: { text: `below ${ms(bound)}`, met: timing.least < bound },
  };
}

/** Demo cases with standard errors; without them nothing is drawn. */
const uncertainCases = ["ring-closure", "acylation", "hydrolysis"] as const;
const cases = [...uncertainCases, "published-oncb"] as const;

function allFailures(name: string): Line {
  const { step, model } = opened(name);
  const timing = time(() => failureFindings(step, model.failures));
  return within(`failures of ${name} (${model.failures.length}), vulnerable moments included`, timing, 400);
}

function drawn(name: string): Line {
  const { step, model, known } = opened(name);
  const { simulated } = failureFindings(step, model.failures);
  const timing = time(() => drawnFailures(model, known, simulated), 3);
  const each = timing.least / (200 * simulated.length);
  return {
    what: `200 draws of the failures of ${name} (${simulated.length})`,
    figure: `${ms(timing.least)}, ${ms(each)} a draw of one failure`,
  };
}

/** Simulated failures: integration, time to act, whole cases, draws. */
export const failuresBench: Bench = {
  title: "Cooling failures (least of several runs)",
  run() {
    const { vessel, model } = ringClosure;
    const [failure] = model.failures;
    return [
      ...integrators(),
      within(
        "a time to act to half a second (ring closure)",
        time(() => judgeAt(vessel, failure, 0, fullSearch)),
        40,
      ),
      ...cases.map(allFailures),
      ...uncertainCases.map(drawn),
    ];
  },
};
