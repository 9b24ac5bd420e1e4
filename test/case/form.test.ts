import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { documentFromForm, editForm, fieldsOf, formOf, formValues } from "../../server/case/form.js";
import { readCase } from "../../server/case/read.js";
import { caseFormat } from "../../server/case/schema.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { demo, demos, edited, everyChoice } from "./completeCases.js";

/** The document that a browser would send for a form, nothing changed. */
function sent(document: unknown): unknown {
  return documentFromForm(Object.fromEntries(formValues(formOf(document))));
}

function faultsOf(document: unknown) {
  const read = readCase(document);
  return read.ok ? [] : read.faults;
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
