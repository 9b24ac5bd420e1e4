import { printedUnit, type Working } from "../screening/workingsOutline.js";
import { lineHeight } from "./lines.js";
import { type Cursor, ensure, paragraph, styles, subheading, within } from "./page.js";

const indent = 12;

/** How inputs were worked out from other figures, and whether they still follow from them. */
export function writeInputWorkings(cursor: Cursor, workings: readonly Working[]): void {
  if (workings.length === 0) return;
  subheading(cursor, "How inputs were worked out");
  for (const working of workings) writeWorking(cursor, working);
}

function writeWorking(cursor: Cursor, working: Working): void {
  ensure(cursor, (working.steps.length + 4) * lineHeight(styles.body));
  within(cursor, "Sect", () => {
    paragraph(cursor, working.title, styles.strong, { tag: "H4", after: 0 });
    const given = working.given.map((value) => `${value.label} ${value.text}`).join("; ");
    if (given !== "") paragraph(cursor, `Given: ${given}`, styles.body, { indent, after: 0 });
    for (const step of working.steps) {
      const text = `${step.label}: ${step.equation} = ${step.text}`;
      paragraph(cursor, text, styles.body, { indent, after: 0 });
    }
    for (const fault of working.faults) {
      paragraph(cursor, `Cannot be done: ${fault.message}`, styles.strong, { indent, after: 0 });
    }
    if (working.resultText !== null) {
      const agreement = working.follows
        ? "the input agrees with it"
        : "the input does NOT agree with it, and the input counts";
      paragraph(cursor, `Result: ${working.resultText}; ${agreement}`, styles.body, { indent, after: 0 });
    }
    if (working.typical !== null) {
      const [low, high] = working.typical;
      const text = `Typical in the handbook: ${low} to ${high} ${printedUnit(working.unit)}`;
      paragraph(cursor, text, styles.body, { indent, after: 0 });
    }
    paragraph(cursor, working.reference, styles.label, { indent, after: 6 });
  });
}
