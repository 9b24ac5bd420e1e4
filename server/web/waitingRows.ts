import { type Pasted, pastedIn, stillWaiting } from "../case/form.js";
import type { CaseToShow } from "./casePage.js";
import { controlId } from "./places.js";

/**
 * What a page says where rows were pasted and are not in their table yet: what takes the case somewhere else
 * would leave them behind.
 *
 * @param body of the form
 * @returns null where nothing waits
 */
export function waitingRows(
  document: unknown,
  body: Readonly<Record<string, unknown>>,
): Pick<CaseToShow, "pasted" | "filing"> | null {
  const pasted: Pasted = stillWaiting(document, pastedIn(body));
  if (pasted.size === 0) return null;
  return {
    pasted,
    filing: {
      title: "Not done: rows that were pasted are not in their table yet",
      sentences: [
        "Take them over, or empty the field that they were pasted into. Nothing you typed is lost.",
      ],
      links: [...pasted.keys()].map((list) => ({
        address: `#${controlId(list)}`,
        words: "To the pasted rows",
      })),
      button: null,
    },
  };
}
