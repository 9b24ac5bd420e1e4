import { z } from "zod";

/** What a form must know about a group of fields. */
export interface Group {
  readonly title: string;
  readonly intro?: string;
  /** behind the name of a field where it stands alone: "of the feed" */
  readonly of?: string;
  /** of variants: what the choice between them is called */
  readonly choosing?: string;
  /** the group is left out unless someone asks for it: the words of the button that does */
  readonly adding?: string;
  /** the group belongs to one word of a field beside it: ["operation", "semibatch"] */
  readonly onlyWith?: readonly [string, string];
}

/** What a form must know about a list. */
export interface List {
  readonly title: string;
  /** one entry: "Failure" */
  readonly entry: string;
  readonly intro?: string;
  /** a table of rows, or one group below the other */
  readonly layout: "rows" | "groups";
  /** what a new entry holds at first */
  readonly starter?: object;
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

/** Groups of which the word under `teller` tells which one it is. */
export function variants<
  const Options extends readonly [z.core.$ZodTypeDiscriminable, ...z.core.$ZodTypeDiscriminable[]],
  Teller extends string,
>(about: Group & { readonly choosing: string }, teller: Teller, options: Options) {
  const schema = z.discriminatedUnion(teller, options);
  groups.add(schema, about);
  return schema;
}

/** A list of entries of one kind. */
export function list<Entry extends z.ZodType>(about: List, entry: Entry) {
  return z.array(entry).min(about.atLeast).max(about.atMost).register(lists, about);
}
