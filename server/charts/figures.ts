import type { Findings } from "../screening/findings.js";
import { dosing } from "./dosing.js";
import { drivers } from "./drivers.js";
import { failures } from "./failures.js";
import { byTimeToAct } from "./failuresWords.js";
import type { Figure } from "./figure.js";
import { fitResiduals } from "./fitResiduals.js";
import { heat } from "./heat.js";
import { ladder } from "./ladder.js";
import { lever } from "./lever.js";
import { nextMeasurement } from "./nextMeasurement.js";
import { rateFigure } from "./rate.js";
import { tmrad } from "./tmrad.js";
import { vulnerable } from "./vulnerable.js";
import { windowFigure } from "./window.js";

/** All figures of a case in the order of the page; those without data are left out. */
export function figuresOf(findings: Findings): Figure[] {
  const { rate, decompositionRate } = findings;
  const figures: (Figure | null)[] = [
    findings.window === null ? ladder(findings) : windowFigure(findings, findings.window),
    drivers(findings),
    nextMeasurement(findings),
  ];
  if (rate !== null)
    figures.push(
      rateFigure(rate, "rate", "Rate constant of the reaction", "the reaction", "reaction"),
      fitResiduals(rate, "rate-residuals", "Residuals of the reaction's fit"),
    );
  if (decompositionRate !== null)
    figures.push(
      rateFigure(
        decompositionRate,
        "decomposition-rate",
        "Rate constant of the decomposition",
        "the decomposition",
        "decomposition",
      ),
      fitResiduals(decompositionRate, "decomposition-residuals", "Residuals of the decomposition's fit"),
    );
  figures.push(tmrad(findings), dosing(findings), heat(findings), lever(findings), failures(findings));
  figures.push(
    ...byTimeToAct(findings.failures ?? []).map((failure, at) =>
      vulnerable(failure.name, at + 1, failure.vulnerable ?? []),
    ),
  );
  return figures.filter((figure) => figure !== null);
}
