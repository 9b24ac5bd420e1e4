import { z } from "zod";
import { type Leaf, leaves } from "./leaves.js";
import { caseSchema } from "./schema.js";
import { bases } from "./typedParts.js";

type JsonSchema = z.core.JSONSchema.BaseSchema;

/**
 * JSON Schema (draft 2020-12) of the case document, from the definition that reads it. It tells the shape;
 * dimensions, signs and what fields have to do with each other are checked when a case is read.
 */
export function caseJsonSchema(): object {
  const schema = z.toJSONSchema(caseSchema, {
    io: "input",
    unrepresentable: "any",
    override: ({ zodSchema, jsonSchema }) => {
      const leaf = leaves.get(zodSchema);
      if (leaf !== undefined) Object.assign(jsonSchema, leafJsonSchema(leaf));
    },
  });
  return { title: "Thermal Window case document", ...schema };
}

function leafJsonSchema(leaf: Leaf): JsonSchema {
  const about = {
    title: leaf.label,
    ...(leaf.hint === undefined ? {} : { description: leaf.hint }),
  };
  switch (leaf.kind) {
    case "text":
    case "rateUnit":
      return { ...about, type: "string", minLength: 1 };
    case "choice":
      return { ...about, enum: Object.keys(leaf.choices) };
    case "number":
      return leaf.estimated
        ? { ...about, ...withNotes({ type: "number" }, basisWords) }
        : { ...about, type: "number" };
    case "rate":
      return {
        ...about,
        ...withNotes({ type: "string", examples: ["2.4e-5 1/s", "3e-4 L/(mol s)"] }, basisWords),
      };
    case "quantity":
      return { ...about, ...quantityJsonSchema(leaf) };
  }
}

function quantityJsonSchema(leaf: Extract<Leaf, { kind: "quantity" }>): JsonSchema {
  const { words, unit, example } = leaf.dimension;
  const text: JsonSchema = {
    type: "string",
    description: `${words}, text with its unit (${unit} or any of the same dimension)`,
    examples: leaf.word === undefined ? [example] : [example, leaf.word],
  };
  return leaf.freeBasis === true
    ? withNotes(text, { type: "string" }, withNotes(text, undefined))
    : withNotes(text, basisWords);
}

const basisWords: JsonSchema = { enum: Object.keys(bases) };

/** A bare value, or an object that says how well it is known. */
function withNotes(bare: JsonSchema, basis: JsonSchema | undefined, value: JsonSchema = bare): JsonSchema {
  return {
    anyOf: [
      bare,
      {
        type: "object",
        properties: {
          value,
          standardError: bare,
          source: { type: "string" },
          ...(basis === undefined ? {} : { basis }),
        },
        required: ["value"],
        additionalProperties: false,
      },
    ],
  };
}
