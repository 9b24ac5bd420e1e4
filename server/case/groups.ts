import { z } from "zod";

/** What a form must know about a group of fields. */
export interface Group {
  readonly title: string;
  readonly intro?: string;
  /** behind the name of a field where it stands alone: "of the feed" */
  readonly of?: string;
}

/** What a form must know about a list. */
export interface List {
  readonly title: string;
  /** one entry: "Failure" */
  readonly entry: string;
  readonly intro?: string;
  /** a table of rows, or one group below the other */
  readonly layout: "rows" | "groups";
  readonly atLeast: number;
  readonly atMost: number;
}

/** Every group and every list of the schema with what is known about it. */
export const groups = z.registry<Group>();
export const lists = z.registry<List>();

/** An object with exactly these keys. */
export function group<Shape extends z.ZodRawShape>(about: Group, shape: Shape) {
  return z.strictObject(shape).register(groups, about);
}

/** A list of entries of one kind. */
export function list<Entry extends z.ZodType>(about: List, entry: Entry) {
  return z.array(entry).min(about.atLeast).max(about.atMost).register(lists, about);
}
