import { formOf, formValues } from "../../server/case/form.js";

/** The form of a document as a browser would send it, with what else its buttons say. */
export function filled(document: unknown, extra: Readonly<Record<string, string>> = {}): string {
  return new URLSearchParams([...formValues(formOf(document)), ...Object.entries(extra)]).toString();
}
