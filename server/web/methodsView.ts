import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { methodsOf } from "../sheet/working.js";
import { mathMl, proseWithScripts } from "../words/mathml.js";

/** A method as a reviewer redoes it by hand: equation, this case's numbers, and the two together, drawn. */
export interface MethodView {
  readonly title: string;
  readonly equation: string;
  readonly numbers: string;
  readonly worked: readonly string[];
  readonly reference: string;
}

/** The same methods as on the sheet, from the same lines. */
export function methodsView(model: CaseModel, findings: Findings): readonly MethodView[] {
  return methodsOf(model, findings).map(({ title, equation, numbers, worked = [], reference }) => ({
    title,
    equation: mathMl(equation),
    numbers: mathMl(numbers),
    worked: worked.map(mathMl),
    reference: proseWithScripts(reference),
  }));
}
