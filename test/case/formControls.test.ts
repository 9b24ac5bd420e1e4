import { describe, expect, test } from "vitest";
import { documentFromForm, fieldsOf, formOf, formValues } from "../../server/case/form.js";
import { caseJsonSchema } from "../../server/case/jsonSchema.js";
import { demo, everyChoice } from "./completeCases.js";

describe("controls", () => {
  test("every leaf of the case's JSON Schema has a labelled control, over all choices", () => {
    const patterns = new Set(
      everyChoice()
        .flatMap((document) => fieldsOf(formOf(document)))
        .flatMap((field) => {
          expect(field.label).toMatch(/\S/);
          const details =
            field.detail === undefined
              ? []
              : [field.detail.standardError, field.detail.basis, field.detail.source];
          for (const detail of details) expect(detail.label).toContain(field.label);
          // A quantity is one leaf in two shapes: its text alone, or beside its error, basis and source.
          return details.length === 0
            ? [field.pointer]
            : [
                field.name,
                ...details.map(({ name }) => name),
                field.pointer,
                ...["value", "standardError", "basis", "source"].map((key) => `${field.pointer}/${key}`),
              ];
        })
        .map((pointer) => pointer.replace(/\/\d+(?=\/|$)/g, "/*")),
    );
    const leaves = leavesOf(caseJsonSchema()).filter((pointer) => pointer !== "/format");
    expect(new Set(leaves).size).toBeGreaterThan(150);
    expect(leaves.filter((leaf) => !patterns.has(leaf))).toEqual([]);
  });

  test("no two controls have the same name", () => {
    for (const document of everyChoice()) {
      const names = formValues(formOf(document)).map(([name]) => name);
      expect(new Set(names).size).toBe(names.length);
    }
  });

  test("only the fields that the choices call for", () => {
    const names = formValues(formOf(demo("hydrolysis"))).map(([name]) => name);
    expect(names.filter((name) => name.startsWith("/decomposition"))).toEqual([]);
    expect(names).not.toContain("/reaction/rateConstant/activationEnthalpy");
    expect(names).toContain("/reaction/rateConstant/preExponential");
  });

  test("a table has rows to spare, and blank ones vanish", () => {
    const document = demo("ring-closure");
    const rows = formValues(formOf(document)).filter(([name]) => /rows\/\d+\/temperature$/.test(name));
    expect(rows.map(([, value]) => value)).toEqual([
      "50 degC",
      "57 degC",
      "64 degC",
      "71 degC",
      "78 degC",
      "",
    ]);
    const body = Object.fromEntries(formValues(formOf(document)));
    body["/reaction/rateConstant/rows/1/temperature"] = " ";
    body["/reaction/rateConstant/rows/1/rateConstant"] = "";
    body["/reaction/rateConstant/rows/5/temperature"] = "85 degC";
    body["/reaction/rateConstant/rows/5/rateConstant"] = "1.1e-4 s^-1";
    const rebuilt = JSON.stringify(documentFromForm(body));
    expect(rebuilt).not.toContain("57 degC");
    expect(rebuilt).toContain('{"temperature":"85 degC","rateConstant":"1.1e-4 s^-1"}');
  });

  test("a rate constant's example follows the order", () => {
    const hintOf = (name: string) =>
      fieldsOf(formOf(demo(name))).find(({ pointer }) =>
        /preExponential$|rateConstant\/rateConstant$/.test(pointer),
      )?.unitHint;
    expect(hintOf("hydrolysis")).toContain("1/s");
    expect(hintOf("published-oncb")).toContain("L/(mol s)");
  });
});

type Schema = Readonly<Record<string, unknown>>;

/** Pointer patterns of every leaf of a JSON Schema; an entry of a list is `*`. */
function leavesOf(schema: object, at = ""): string[] {
  const { properties, items, prefixItems, anyOf, oneOf } = schema as Schema;
  const below = (part: unknown, pointer: string) => leavesOf(part as object, pointer);
  if (properties !== undefined) {
    return Object.entries(properties as object).flatMap(([key, part]) => below(part, `${at}/${key}`));
  }
  if (Array.isArray(prefixItems)) return prefixItems.flatMap((part) => below(part, `${at}/*`));
  if (items !== undefined) return below(items, `${at}/*`);
  const several = anyOf ?? oneOf;
  if (Array.isArray(several)) return several.flatMap((part) => below(part, at));
  return [at];
}
