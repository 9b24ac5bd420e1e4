import { describe, expect, test } from "vitest";
import { z } from "zod";
import { caseJsonSchema } from "../../server/case/jsonSchema.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { demo, demos, edited, everyChoice } from "./completeCases.js";

/** Another reader of the same schema: built from the JSON Schema alone. */
const fromJsonSchema = z.fromJSONSchema(caseJsonSchema() as Parameters<typeof z.fromJSONSchema>[0]);

describe("the JSON Schema of the case document", () => {
  test("is plain JSON of draft 2020-12 with a title and a description for its fields", () => {
    const schema = caseJsonSchema();
    expect(JSON.parse(JSON.stringify(schema))).toEqual(schema);
    expect(schema).toMatchObject({
      $schema: "https://json-schema.org/draft/2020-12/schema",
      required: ["format", "title", "mixture", "reaction", "vessel", "limits"],
      additionalProperties: false,
      properties: {
        format: { const: "thermal-window/case-1" },
        title: { title: "Title", type: "string" },
      },
    });
  });

  test.each(demos)("accepts the demo case %s", (name) => {
    expect(fromJsonSchema.safeParse(demo(name)).error).toBeUndefined();
  });

  test("accepts every choice", () => {
    for (const document of everyChoice()) expect(fromJsonSchema.safeParse(document).error).toBeUndefined();
  });

  test("refuses unknown keys, missing ones and values of the wrong type", () => {
    for (const [pointer, value] of [
      ["/mixtur", {}],
      ["/mixture/mass", undefined],
      ["/mixture/mass", 5],
      ["/limits/coolingUse", "0.8"],
      ["/reaction/operation", "batc"],
      ["/reaction/rateConstant/form", "power law"],
      ["/failures", {}],
      ["/mixture/mass", { value: "5 kg", basis: "guessed" }],
    ] as const) {
      const document = edited(demo("acylation"), pointer, value);
      expect.soft([pointer, fromJsonSchema.safeParse(document).success]).toEqual([pointer, false]);
    }
  });

  test("most broken documents are broken in shape too", () => {
    const refused = brokenDocuments.filter(({ document }) => !fromJsonSchema.safeParse(document).success);
    expect(refused.length).toBeGreaterThan(100);
  });
});
