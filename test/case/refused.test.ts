import { describe, expect, test } from "vitest";
import { readCase, readCaseText } from "../../server/case/read.js";
import { brokenDocuments } from "./brokenDocuments.js";
import { demo, edited, type Fields } from "./completeCases.js";

/** Faults of a document, as `pointer: message`. */
function faultsOf(document: unknown): string[] {
  const read = readCase(document);
  return read.ok ? [] : read.faults.map(({ pointer, message }) => `${pointer}: ${message}`);
}

describe("refused", () => {
  test.each(brokenDocuments.map((each) => [each.name.slice(0, 80), each] as const))("%s", (_name, each) => {
    const read = readCase(each.document);
    expect(read).toMatchObject({ ok: false, kind: "case" });
    if (read.ok) return;
    expect(read.faults.map(({ pointer }) => pointer)).toContain(each.pointer);
    for (const { message } of read.faults) {
      expect(message).toMatch(/\S/);
      expect(message.length).toBeLessThan(700);
    }
  });

  test("there are at least 200 broken documents", () => {
    expect(brokenDocuments.length).toBeGreaterThanOrEqual(200);
  });

  test("all faults come at once, each at its field", () => {
    const document = demo("acylation");
    const wrong = (
      [
        ["/title", undefined],
        ["/mixture/mass", "1450 L"],
        ["/reaction/heat", "118 kJ/mol"],
        ["/vessel/heatTransferCoefficient", "320 W/m^2 K"],
        ["/limits/lowestTemperature", "90 degC"],
        ["/failures/0/changes/0/after", "1 min"],
        ["/failures/2/changes/0/heatTransfer", undefined],
      ] as const
    ).reduce<Fields>((changed, [pointer, value]) => edited(changed, pointer, value), document);
    const faults = faultsOf(wrong).join("\n");
    expect(faults).toMatch(/^\/title: is missing/m);
    expect(faults).toMatch(/^\/mixture\/mass: "1450 L" is a volume; expected a mass/m);
    expect(faults).toMatch(/^\/reaction\/heat: "118 kJ\/mol" is endothermic, which is out of scope/m);
    expect(faults).toMatch(/^\/vessel\/heatTransferCoefficient: .*write "W\/\(m\^2 K\)"/m);
    expect(faults).toMatch(/^\/limits\/lowestTemperature: is not below highestTemperature/m);
    expect(faults).toMatch(/^\/failures\/0\/changes\/0\/after: is not 0/m);
    expect(faults).toMatch(/^\/failures\/2\/changes\/0\/heatTransfer: is missing; with the agitator off/m);
  });

  test("an unknown key is met with the nearest one that is known", () => {
    expect(faultsOf(edited(demo("acylation"), "/vessel/heatTransferArae", "5 m^2"))[0]).toMatch(
      /did you mean "heatTransferArea"/,
    );
    expect(
      faultsOf(edited(demo("acylation"), "/reaction/rateConstant/activationEnergy", "5 kJ/mol"))[0],
    ).toMatch(/belongs to form "arrhenius", "reference"|belongs to form "arrhenius" or "reference"/);
  });

  test("a rate constant of the wrong order names the unit that belongs to the order", () => {
    const half = edited(demo("acylation"), "/reaction/reactants/B/order", 0.5);
    const typed = edited(half, "/reaction/rateConstant", {
      form: "reference",
      rateConstant: "3e-4 L/(mol s)",
      at: "25 degC",
      activationEnergy: "60 kJ/mol",
    });
    expect(faultsOf(typed)).toEqual([
      expect.stringMatching(
        /overall order 2; expected a rate constant of overall order 1\.5 in m\^1\.5 mol\^-0\.5 s\^-1/,
      ),
    ]);
    const right = edited(typed, "/reaction/rateConstant/rateConstant", "3e-4 L^0.5 mol^-0.5 s^-1");
    expect(faultsOf(right)).toEqual([]);
  });

  test("a number typed as text, or with a comma, says so", () => {
    expect(faultsOf(edited(demo("acylation"), "/limits/coolingUse", "0,8"))[0]).toMatch(
      /write a decimal point/,
    );
  });

  test("text that is not JSON, and text that is too long", () => {
    expect(readCaseText("{")).toMatchObject({ ok: false, kind: "json" });
    expect(readCaseText(`"${"x".repeat(256 * 1024)}"`)).toMatchObject({
      ok: false,
      kind: "size",
    });
    expect(readCaseText(`"${"°".repeat(200 * 1024)}"`)).toMatchObject({
      ok: false,
      kind: "size",
    });
    expect(readCaseText("null")).toMatchObject({ ok: false, kind: "case" });
  });

  test("a number beyond doubles in the JSON itself", () => {
    const text = JSON.stringify(demo("acylation")).replace('"coolingUse":0.8', '"coolingUse":1e999');
    expect(readCaseText(text)).toMatchObject({
      ok: false,
      faults: [expect.objectContaining({ pointer: "/limits/coolingUse" })],
    });
  });

  test("a temperature or a control band so large that a study over it would only be long", () => {
    expect(faultsOf(edited(demo("acylation"), "/limits/highestTemperature", "1e306 K"))[0]).toMatch(
      /above 3000 K/,
    );
    expect(faultsOf(edited(demo("acylation"), "/limits/controlBand", "1e6 K"))[0]).toMatch(
      /wider than 100 K/,
    );
  });
});
