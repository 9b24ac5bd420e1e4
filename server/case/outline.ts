import { z } from "zod";
import { type Group, groups, type List, lists } from "./groups.js";
import { type Leaf, leaves } from "./leaves.js";
import { caseSchema } from "./schema.js";

type Schema = z.core.$ZodType;

/** One place of the schema, as the form and the faults look at it. */
export type Place = {
  readonly required: boolean;
  readonly fallback: unknown;
} & (
  | { readonly kind: "leaf"; readonly leaf: Leaf }
  /** one fixed word */
  | { readonly kind: "word"; readonly word: string }
  | {
      readonly kind: "group";
      readonly about: Group;
      readonly members: ReadonlyMap<string, Place>;
    }
  /** groups of which a word inside tells which one it is */
  | {
      readonly kind: "variants";
      readonly about: Group;
      readonly teller: string;
      readonly options: ReadonlyMap<string, Place & { readonly kind: "group" }>;
    }
  | { readonly kind: "list"; readonly about: List; readonly entry: Place }
  /** a fixed number of entries */
  | { readonly kind: "pair"; readonly entries: readonly Place[] }
);

/** The whole schema as an outline. */
export const outline = placeOf(caseSchema, true, undefined);

function placeOf(schema: Schema, required: boolean, fallback: unknown): Place {
  const whether = { required, fallback };
  if (schema instanceof z.ZodOptional) return placeOf(schema.unwrap(), false, fallback);
  if (schema instanceof z.ZodPrefault) return placeOf(schema.unwrap(), false, schema.def.defaultValue);
  const leaf = leaves.get(schema);
  if (leaf !== undefined) return { ...whether, kind: "leaf", leaf };
  if (schema instanceof z.ZodLiteral) return { ...whether, kind: "word", word: String(schema.value) };
  if (schema instanceof z.ZodObject) {
    const members = Object.entries(schema.shape).map(([key, member]): [string, Place] => [
      key,
      placeOf(member, true, undefined),
    ]);
    const about = groups.get(schema) ?? { title: "" };
    return { ...whether, kind: "group", about, members: new Map(members) };
  }
  if (schema instanceof z.ZodDiscriminatedUnion) {
    const teller = schema.def.discriminator;
    const options = new Map<string, Place & { readonly kind: "group" }>();
    for (const option of schema.options) {
      const place = placeOf(option, true, undefined);
      const word = place.kind === "group" ? place.members.get(teller) : undefined;
      if (place.kind === "group" && word?.kind === "word") options.set(word.word, place);
    }
    const about = groups.get(schema) ?? { title: "" };
    return { ...whether, kind: "variants", about, teller, options };
  }
  if (schema instanceof z.ZodArray) {
    const about = lists.get(schema) ?? {
      title: "",
      entry: "",
      layout: "groups",
      atLeast: 0,
      atMost: 0,
    };
    return {
      ...whether,
      kind: "list",
      about,
      entry: placeOf(schema.element, true, undefined),
    };
  }
  if (schema instanceof z.ZodTuple) {
    return {
      ...whether,
      kind: "pair",
      entries: schema.def.items.map((item) => placeOf(item, true, undefined)),
    };
  }
  throw new TypeError("The outline knows no such schema");
}

/** The keys that an object at a place may have, given what it holds. */
export function membersOf(place: Place, value: unknown): ReadonlyMap<string, Place> {
  if (place.kind === "group") return place.members;
  if (place.kind !== "variants") return new Map();
  const word = memberOf(value, place.teller);
  const option = typeof word === "string" ? place.options.get(word) : undefined;
  return option?.members ?? new Map();
}

/** The place below another one, or undefined where there is none. */
export function placeBelow(place: Place, key: string, value: unknown): Place | undefined {
  if (place.kind === "list") return /^\d+$/.test(key) ? place.entry : undefined;
  if (place.kind === "pair") return /^\d+$/.test(key) ? place.entries[Number(key)] : undefined;
  return membersOf(place, value).get(key);
}

/** What stands under a key of its own, undefined where there is nothing of the kind. */
export function memberOf(value: unknown, key: PropertyKey): unknown {
  if (typeof value !== "object" || value === null || !Object.hasOwn(value, key)) return undefined;
  return Reflect.get(value, key);
}

/** What stands at the end of a path. */
export function valueAt(value: unknown, ...path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(memberOf, value);
}
