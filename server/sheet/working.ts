import type { Findings } from "../screening/findings.js";
import type { CaseModel } from "../screening/model.js";
import { lineHeight, wrap } from "./lines.js";
import { type Cursor, ensure, heading, paragraph, styles, within } from "./page.js";
import { coolingMethods } from "./workingCooling.js";
import { heatMethods } from "./workingHeat.js";
import { rateMethods } from "./workingRate.js";
import { runawayMethods } from "./workingRunaway.js";

const indent = 12;

/** One method as a reviewer checks it: the equation, this case's numbers in it, and where it is published. */
export interface Method {
  readonly title: string;
  readonly equation: string;
  readonly numbers: string;
  /** equations of it with the numbers put in, SI, for a pocket calculator; left out where no single line does it */
  readonly worked?: readonly string[];
  readonly reference: string;
}

/** The methods in the order in which the program applies them. */
export function methodsOf(model: CaseModel, findings: Findings): Method[] {
  return [
    ...rateMethods(model, findings),
    ...heatMethods(model, findings),
    ...runawayMethods(model, findings),
    ...coolingMethods(model, findings),
  ];
}

/** The working: so that a second person can follow each figure with a pocket calculator. */
export function writeWorking(cursor: Cursor, model: CaseModel, findings: Findings): void {
  heading(cursor, "Working");
  paragraph(
    cursor,
    "SI inside; R = 8.314462618 J/(mol K), k_{B} = 1.380649×10⁻²³ J/K, h = 6.62607015×10⁻³⁴ J s (exact, SI 2019). Numbers beside their units are shown rounded, the program calculates with all digits; a line of numbers alone is in SI.",
    { ...styles.small, formula: true },
  );
  for (const method of methodsOf(model, findings)) writeMethod(cursor, method);
}

function writeMethod(cursor: Cursor, method: Method): void {
  const worked = method.worked ?? [];
  const lines = [method.equation, method.numbers, ...worked].flatMap((text) =>
    wrap(text, cursor.width - indent, styles.formula),
  );
  ensure(cursor, (lines.length + 3) * lineHeight(styles.body));
  within(cursor, "Sect", () => {
    paragraph(cursor, method.title, styles.strong, { tag: "H3", after: 0 });
    paragraph(cursor, method.equation, styles.formula, { indent, after: 0 });
    paragraph(cursor, method.numbers, styles.formula, { indent, after: 0 });
    for (const line of worked) paragraph(cursor, line, styles.formula, { indent, after: 0 });
    paragraph(cursor, method.reference, { ...styles.label, formula: true }, { indent, after: 6 });
  });
}
