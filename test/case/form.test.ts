import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  blankCase,
  documentFromForm,
  editForm,
  type FormBlock,
  type FormSection,
  fieldsOf,
  formOf,
  formValues,
} from "../../server/case/form.js";
import { caseJsonSchema } from "../../server/case/jsonSchema.js";
import { readCase } from "../../server/case/read.js";
import { caseFormat } from "../../server/case/schema.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { completeCase, demo, demos, edited, everyChoice } from "./completeCases.js";

/** The document that a browser would send for a form, nothing changed. */
function sent(document: unknown): unknown {
  return documentFromForm(Object.fromEntries(formValues(formOf(document))));
}

function faultsOf(document: unknown) {
  const read = readCase(document);
  return read.ok ? [] : read.faults;
}

/** Every message that a form shows, wherever it shows it. */
function messagesOf(blocks: readonly (FormBlock | FormSection)[]): string[] {
  return blocks.flatMap((block): string[] => {
    if ("blocks" in block) return [...block.faults, ...messagesOf(block.blocks)];
    if (block.type === "list") return [...block.faults, ...messagesOf(block.entries)];
    const { detail } = block;
    const details = detail === undefined ? [] : [detail.standardError, detail.basis, detail.source];
    return [block, ...details].flatMap(({ fault }) => (fault === undefined ? [] : [fault]));
  });
}

describe("a form that is sent back unchanged gives the same document", () => {
  test.each(demos)("%s", (name) => {
    expect(sent(demo(name))).toEqual(demo(name));
  });

  test("whatever choices were made", () => {
    for (const document of everyChoice()) expect(sent(document)).toEqual(document);
  });

  test("and the one after that too, even for documents that are broken", () => {
    for (const { document } of brokenDocuments) {
      const once = sent(document);
      expect(sent(once)).toEqual(once);
    }
  });

  test("and for any JSON at all", () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 5 }), (value) => {
        const once = sent(value);
        expect(sent(once)).toEqual(once);
      }),
    );
  });
});

describe("nothing typed is lost", () => {
  test("every text of a broken document stands in a control of its form", () => {
    const lost = brokenDocuments
      .filter(({ name, document }) => !name.startsWith("over ") && typeof document === "object")
      .flatMap(({ document, name }) => {
        const shown = new Set(formValues(formOf(document)).map(([, value]) => value));
        return textsOf(document)
          .filter((text) => !shown.has(text) && text !== caseFormat)
          .map((text) => `${name}: ${text.slice(0, 80)}`);
      });
    expect(lost).toEqual([]);
  });

  test("nonsense comes back as it was typed", () => {
    const body = {
      "/mixture/mass": "heavy",
      "/limits/coolingUse": "most of it",
      "/reaction/operation": "batc",
      "/reaction/rateConstant/form": "power law",
      "/vessel/coolant/temperature": " 5 degC ",
    };
    const document = documentFromForm(body);
    const values = Object.fromEntries(formValues(formOf(document)));
    expect(values).toMatchObject(body);
  });

  test("what was typed for another form of the rate constant is shown apart, and can be cleared", () => {
    const changed = edited(demo("acylation"), "/reaction/rateConstant/form", "arrhenius");
    const reaction = formOf(changed, faultsOf(changed)).find(({ id }) => id === "reaction");
    const unused = reaction?.blocks.find((block) => block.type === "group" && /not used/.test(block.title));
    const names = unused?.type === "group" ? fieldsOf(unused.blocks).map(({ name }) => name) : [];
    expect(names).toContain("/reaction/rateConstant/activationEnthalpy/value");
    expect(formValues(formOf(changed))).toContainEqual([
      "/reaction/rateConstant/activationEnthalpy/value",
      "62 kJ/mol",
    ]);
    const cleared = JSON.stringify(editForm(changed, "remove:unused:/reaction"));
    expect(cleared).not.toContain("activationEnthalpy");
    expect(cleared).toContain("fittedRange");
    expect(sent(edited(changed, "/reaction/rateConstant/form", "eyring"))).toEqual(demo("acylation"));
  });

  test("a feed stays in sight when the operation becomes batch", () => {
    const changed = edited(demo("acylation"), "/reaction/operation", "batch");
    const names = formValues(formOf(changed)).map(([name]) => name);
    expect(names).toContain("/reaction/feed/mass");
    expect(formValues(formOf(demo("ring-closure"))).map(([name]) => name)).not.toContain(
      "/reaction/feed/mass",
    );
  });
});

describe("faults", () => {
  test("each fault is shown once, beside its field or its group", () => {
    const unseen = brokenDocuments.flatMap(({ document, name }) => {
      const asSent = sent(document);
      const faults = faultsOf(asSent);
      const shown = messagesOf(formOf(asSent, faults)).join(". ");
      return faults
        .filter(({ message }) => !shown.includes(message))
        .map(({ pointer }) => `${name}: ${pointer}`);
    });
    expect(unseen).toEqual([]);
  });

  test("a fault of a field stands at that field", () => {
    const wrong = edited(demo("acylation"), "/mixture/mass", "1450 L");
    const field = fieldsOf(formOf(wrong, faultsOf(wrong))).find(({ pointer }) => pointer === "/mixture/mass");
    expect(field).toMatchObject({
      value: "1450 L",
      fault: expect.stringContaining("is a volume"),
    });
  });

  test("a fault of a standard error stands at its control", () => {
    const wrong = edited(demo("acylation"), "/mixture/heatCapacity/standardError", "1 kg");
    const field = fieldsOf(formOf(wrong, faultsOf(wrong))).find(
      ({ pointer }) => pointer === "/mixture/heatCapacity",
    );
    expect(field?.fault).toBeUndefined();
    expect(field?.detail?.standardError.fault).toMatch(/is a mass/);
    expect(field?.detail?.used).toBe(true);
  });

  test("an empty form has a fault at every field that is needed", () => {
    const blank = sent(blankCase());
    const needed = fieldsOf(formOf(blank, faultsOf(blank)))
      .filter(({ fault }) => fault !== undefined)
      .map(({ pointer }) => pointer);
    expect(needed).toEqual([
      "/title",
      "/mixture/mass",
      "/mixture/density",
      "/mixture/heatCapacity",
      "/reaction/temperature",
      "/reaction/reactants/A/amount",
      "/reaction/heat",
      "/reaction/rateConstant/preExponential",
      "/reaction/rateConstant/activationEnergy",
      "/vessel/heatTransferCoefficient",
      "/vessel/heatTransferArea",
      "/vessel/coolant/temperature",
      "/limits/maximumTechnicalTemperature",
      "/limits/lowestTemperature",
      "/limits/highestTemperature",
      "/limits/availableTime",
    ]);
  });
});

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

describe("buttons", () => {
  const count = (document: unknown, name: RegExp) =>
    formValues(formOf(document)).filter(([each]) => name.test(each)).length;

  test("add and remove entries of lists", () => {
    const added = editForm(demo("acylation"), "add:/failures");
    expect(count(added, /^\/failures\/\d+\/name$/)).toBe(4);
    expect(count(sent(added), /^\/failures\/\d+\/name$/)).toBe(4);
    const removed = editForm(added, "remove:/failures/0");
    expect(count(removed, /^\/failures\/\d+\/name$/)).toBe(3);
    expect(JSON.stringify(removed)).not.toContain("feed stopped at once");
    const change = editForm(demo("acylation"), "add:/failures/1/changes");
    expect(count(sent(change), /^\/failures\/1\/changes\/\d+\/after$/)).toBe(2);
  });

  test("add and remove groups that are left out at first", () => {
    const added = editForm(demo("hydrolysis"), "add:/decomposition");
    expect(count(added, /^\/decomposition\/heat$/)).toBe(1);
    expect(count(sent(added), /^\/decomposition\/heat$/)).toBe(1);
    expect(editForm(added, "remove:/decomposition")).toEqual(demo("hydrolysis"));
  });

  test("a full list has no button, and adding to it changes nothing", () => {
    const full = edited(
      completeCase(),
      "/failures",
      Array.from({ length: 20 }, () => ({})),
    );
    expect(editForm(full, "add:/failures")).toEqual(full);
    const list = formOf(full).find(({ id }) => id === "failures")?.blocks[0];
    expect(list).not.toHaveProperty("button");
  });

  test("any other action changes nothing and never throws", () => {
    for (const action of [
      "",
      "update",
      "add:",
      "add:/",
      "add:/nowhere/x",
      "add:/title",
      "remove:",
      "remove:/x/y",
      "remove:/failures/99",
      "add:/__proto__/x",
      "remove:unused:/nothing",
    ]) {
      expect(editForm(demo("acylation"), action)).toEqual(demo("acylation"));
    }
    fc.assert(
      fc.property(fc.jsonValue(), fc.string(), (document, pointer) => {
        for (const action of ["add:", "remove:", "remove:unused:"])
          editForm(document, `${action}/${pointer}`);
      }),
    );
  });
});

describe("what is sent", () => {
  test("controls that are not pointers are passed over, and so are absurd ones", () => {
    const document = documentFromForm({
      do: "save",
      revision: "3",
      "/title": ["", "Second of two"],
      ["/x".repeat(1e5)]: "deep",
      "/mixture/mass": { value: "5 kg" },
      "/__proto__/polluted": "yes",
    });
    expect(document).toMatchObject({ title: "Second of two" });
    expect(Reflect.get({}, "polluted")).toBeUndefined();
    expect(JSON.stringify(document)).not.toContain("deep");
  });

  test("numbers become numbers, also as they are pasted; quantities stay text", () => {
    const document = documentFromForm({
      "/reaction/rateConstant/form": "eyring",
      "/reaction/rateConstant/correlation": "−0.5",
      "/reaction/reactants/A/order": " 1.5 ",
      "/mixture/thermalInertia": "1,0",
      "/mixture/mass": "5",
    });
    expect(document).toMatchObject({
      reaction: {
        rateConstant: { correlation: -0.5 },
        reactants: { A: { order: 1.5 } },
      },
      mixture: { thermalInertia: "1,0", mass: "5" },
    });
  });

  test("a quantity whose error alone was typed keeps the error", () => {
    expect(
      documentFromForm({
        "/mixture/mass": "",
        "/mixture/mass/standardError": "1 kg",
      }),
    ).toMatchObject({
      mixture: { mass: { standardError: "1 kg" } },
    });
  });

  test("half a fitted range keeps its place", () => {
    const document = documentFromForm({
      "/reaction/rateConstant/form": "eyring",
      "/reaction/rateConstant/fittedRange/0": "",
      "/reaction/rateConstant/fittedRange/1": "30 degC",
    });
    expect(document).toMatchObject({
      reaction: { rateConstant: { fittedRange: ["", "30 degC"] } },
    });
  });
});

/** Texts of a document that stand where a form can show them. */
function textsOf(value: unknown): string[] {
  if (typeof value === "string") return value.trim() === "" ? [] : [value];
  if (typeof value !== "object" || value === null) return [];
  return Object.values(value).flatMap(textsOf);
}

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
