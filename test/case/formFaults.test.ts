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
import { readCase } from "../../server/case/read.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { completeCase, demo, edited } from "./completeCases.js";

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
