import { z } from "zod";
import { everything, type RegisterQuery } from "../files/registerSearch.js";

/** A search as it was typed into the form of the register. */
export type TypedQuery = Readonly<Record<QueryField, string>>;

const fields = ["record", "title", "vessel", "from", "to", "class", "stop", "standing"] as const;
export type QueryField = (typeof fields)[number];

export interface ReadQuery {
  readonly typed: TypedQuery;
  /** one sentence each, by the field that it is about; none: `query` is what was asked for */
  readonly faults: Readonly<Partial<Record<QueryField, string>>>;
  readonly query: RegisterQuery;
}

const longest = 300;
const day = z.iso.date();
const classes = [1, 2, 3, 4, 5, "none", "not assessed"] as const;

/** Reads a search from the address; what it does not know is left aside, what it cannot read is a fault. */
export function readQuery(from: Readonly<Record<string, unknown>>): ReadQuery {
  const value = (field: QueryField) => {
    const given = from[field];
    return typeof given === "string" ? given.trim() : "";
  };
  const typed: TypedQuery = {
    record: value("record"),
    title: value("title"),
    vessel: value("vessel"),
    from: value("from"),
    to: value("to"),
    class: value("class"),
    stop: value("stop"),
    standing: value("standing"),
  };
  const faults: Partial<Record<QueryField, string>> = {};
  for (const field of ["record", "title", "vessel"] as const) {
    if (typed[field].length > longest) faults[field] = `At most ${longest} characters would do.`;
  }
  for (const field of ["from", "to"] as const) {
    if (typed[field] !== "" && !day.safeParse(typed[field]).success) {
      faults[field] = `“${typed[field].slice(0, 40)}” is no day; one such as 2026-03-07 would do.`;
    }
  }
  const wanted = classes.find((each) => String(each) === typed.class);
  if (typed.class !== "" && wanted === undefined) faults.class = `A class is one of ${classes.join(", ")}.`;
  if (!["", "yes", "no"].includes(typed.stop)) faults.stop = "Yes or no would do, or nothing.";
  const query: RegisterQuery = {
    record: typed.record || null,
    title: typed.title || null,
    vessel: typed.vessel || null,
    from: typed.from || null,
    to: typed.to || null,
    class: wanted ?? null,
    stop: typed.stop === "" ? null : typed.stop === "yes",
    standing: typed.standing === "yes",
  };
  return { typed, faults, query: Object.keys(faults).length === 0 ? query : everything };
}

/** The address of the same search, with another ending or page. */
export function addressOf(path: string, typed: TypedQuery, page = 1): string {
  const parts = new URLSearchParams();
  for (const field of fields) if (typed[field] !== "") parts.set(field, typed[field]);
  if (page > 1) parts.set("page", String(page));
  const text = parts.toString();
  return text === "" ? path : `${path}?${text}`;
}
