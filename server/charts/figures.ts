import type { Findings } from "../screening/findings.js";
import type { Figure } from "./figure.js";
import { fitResiduals } from "./fitResiduals.js";
import { ladder } from "./ladder.js";
import { rateFigure } from "./rate.js";
import { tmrad } from "./tmrad.js";
import { windowFigure } from "./window.js";

/** All figures of a case in the order of the page; those without data are left out. */
export function figuresOf(findings: Findings): Figure[] {
  const { rate, decompositionRate } = findings;
  const figures: (Figure | null)[] = [
    findings.window === null ? ladder(findings) : windowFigure(findings, findings.window),
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
  figures.push(tmrad(findings));
  return figures.filter((figure) => figure !== null);
}
