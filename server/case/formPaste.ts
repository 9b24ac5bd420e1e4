import { pathOf, pointerOf } from "./faults.js";
import { placeAt, replaced } from "./formEdit.js";
import type { FormPaste } from "./formShape.js";
import { type Place, valueAt } from "./outline.js";
import type { Comma } from "./pastedCells.js";
import { type Column, exampleHeading } from "./pastedColumns.js";
import { readPastedTable } from "./pastedTable.js";

type ListPlace = Place & { readonly kind: "list" };

/** What stands in the text area of a list, and what became of it. */
export interface PastedText {
  readonly text: string;
  /** the rows already there give way */
  readonly replacing: boolean;
  readonly fault?: string;
  /** about the comma */
  readonly question?: string;
  /** what was done */
  readonly told?: string;
}

const nothing: PastedText = { text: "", replacing: false };

/** Texts that wait to become rows, by the JSON pointer of their list. */
export type Pasted = ReadonlyMap<string, PastedText>;

const textName = "paste:";
const placingName = "paste-placing:";
const answers: Readonly<Record<string, Comma | null>> = {
  paste: null,
  "paste-decimal": "decimal",
  "paste-separates": "separates",
};

/** Whether a button takes over what was pasted: `paste:/reaction/rateConstant/rows`. */
export function isPasting(action: string): boolean {
  return Object.hasOwn(answers, action.split(":")[0] ?? "");
}

/** What the text areas of a form held when it was sent. */
export function pastedIn(body: Readonly<Record<string, unknown>>): Pasted {
  const texts = Object.entries(body).flatMap(([name, text]): [string, PastedText][] => {
    if (!name.startsWith(textName) || typeof text !== "string" || text.trim() === "") return [];
    const pointer = name.slice(textName.length);
    return [[pointer, { text, replacing: body[`${placingName}${pointer}`] === "replace" }]];
  });
  return new Map(texts);
}

/** Those that a table of the form still shows, each with the words that it is not in there yet. */
export function stillWaiting(document: unknown, pasted: Pasted): Pasted {
  const fault = "These rows are not in the table yet: take them over, or empty this field";
  const shown = [...pasted].filter(([pointer]) => {
    const place = placeAt(document, pathOf(pointer));
    return place !== undefined && isTable(place);
  });
  return new Map(shown.map(([pointer, waiting]) => [pointer, { ...waiting, fault }]));
}

/**
 * Takes pasted rows over into their table, or says why not; the text is kept until it is in.
 *
 * @param action one that `isPasting`
 * @returns the document, what is to be shown in the text areas, and where the list stands
 */
export function pasteRows(
  document: unknown,
  action: string,
  pasted: Pasted,
): { readonly document: unknown; readonly pasted: Pasted; readonly list: string } {
  const [verb = "", list = ""] = action.split(":");
  const path = pathOf(list);
  const place = placeAt(document, path);
  if (place === undefined || !isTable(place)) return { document, pasted, list };
  const { text, replacing } = pasted.get(list) ?? nothing;
  const keeping = (more: Partial<PastedText>) => ({
    document,
    pasted: new Map([...pasted, [list, { text, replacing, ...more }]]),
    list,
  });
  const read = readPastedTable(text, columnsOf(place), place.about.atMost, answers[verb] ?? null);
  if (read.kind === "fault") return keeping({ fault: read.message });
  if (read.kind === "question") return keeping({ question: read.text });
  const typed = valueAt(document, ...path);
  const there: readonly unknown[] = Array.isArray(typed) && !replacing ? typed : [];
  const rows = [...there, ...read.rows];
  const { atMost } = place.about;
  if (rows.length > atMost) {
    return keeping({
      fault: `With these there would be ${rows.length} rows; the table holds at most ${atMost}`,
    });
  }
  const count = `${read.rows.length} ${read.rows.length === 1 ? "row" : "rows"}`;
  const passed = read.passedOver.map((heading) => `“${heading}”`).join(", ");
  const told = `${count} taken over.${passed === "" ? "" : ` Not used: ${passed}.`}`;
  return {
    document: replaced(document, path, rows),
    pasted: new Map([...pasted, [list, { text: "", replacing: false, told }]]),
    list,
  };
}

/** Whether a place is a list of rows that each hold single fields. */
function isTable(place: Place): place is ListPlace {
  return place.kind === "list" && place.about.layout === "rows";
}

function columnsOf({ entry }: ListPlace): Column[] {
  if (entry.kind !== "group") return [];
  return [...entry.members].flatMap(([key, member]) =>
    member.kind === "leaf" ? [{ key, leaf: member.leaf, required: member.required }] : [],
  );
}

/** The text area of a list. */
export function formPaste(
  place: ListPlace,
  path: readonly string[],
  rows: number,
  pasted: Pasted,
): FormPaste {
  const pointer = pointerOf(path);
  const waiting = pasted.get(pointer) ?? nothing;
  const { text, replacing, ...words } = waiting;
  const placing = {
    name: `${placingName}${pointer}`,
    label: "Rows already there",
    kind: "choice",
    value: replacing ? "replace" : "add",
    choices: [
      { value: "add", label: "stay: add below them" },
      { value: "replace", label: "go: replace them" },
    ],
  } as const;
  return {
    name: `${textName}${pointer}`,
    text,
    example: columnsOf(place).slice(0, 2).map(exampleHeading).join(" and "),
    ...(rows > 0 ? { placing } : {}),
    button: { value: `paste:${pointer}`, label: "Take the rows over" },
    ...words,
    answers:
      waiting.question === undefined
        ? []
        : [
            { value: `paste-decimal:${pointer}`, label: "The comma is the decimal sign" },
            { value: `paste-separates:${pointer}`, label: "The comma separates" },
          ],
  };
}
