import { describe, expect, test } from "vitest";
import { dimensions, rateConstantDimension } from "../../server/case/dimensions.js";
import { fieldsOf, formOf } from "../../server/case/form.js";
import { readQuantity } from "../../server/case/quantities.js";
import { readBack } from "../../server/case/readBack.js";
import { typicalRanges, typicalText } from "../../server/case/typicalRanges.js";
import { demo, everyChoice } from "./completeCases.js";

const fieldAt = (document: unknown, pointer: string) =>
  fieldsOf(formOf(document)).find((field) => field.pointer === pointer);

describe("a quantity is read back in the SI", () => {
  // Conversions by definition: SI Brochure, 9th edition, tables 4 and 8; 0 °C is 273.15 K.
  test.each([
    ["35 °C", dimensions.temperature, "= 308.15 K"],
    ["1.95 kJ/(kg K)", dimensions.heatCapacity, "= 1 950 J/(kg K)"],
    ["−118 kJ·mol⁻¹", dimensions.molarEnergy, "= −118 000 J/mol"],
    ["2.5 h", dimensions.time, "= 9 000 s"],
    ["0 W", dimensions.power, "= 0 W"],
    ["16 W/(m K)", dimensions.conductivity, "= 16 W/(m K)"],
    ["300 W/(m^2 K)", dimensions.heatTransferCoefficient, "= 300 W/(m² K)"],
    ["3.6e-2 1/h", rateConstantDimension(1), "= 1×10⁻⁵ 1/s"],
    ["1e-4 L/(mol s)", rateConstantDimension(2), "= 1×10⁻⁷ m³/(mol s)"],
  ])("%s", (typed, dimension, expected) => {
    expect(readBack(typed, dimension)).toBe(expected);
  });

  test.each(["", "35", "35 kg", "1,95 kJ/(kg K)", "-300 degC", "1e999 K"])(
    "not where it cannot be read: “%s”",
    (typed) => {
      expect(readBack(typed, dimensions.temperature)).toBeUndefined();
    },
  );

  test("but not as nought or without end, where its figure is beyond doubles", () => {
    expect(readBack("1e-320 g/t", dimensions.mass)).toBeUndefined();
    expect(readBack("1e308 h", dimensions.time)).toBeUndefined();
  });
});

describe("the fields of the form", () => {
  test("every filled quantity of the demo cases is read back, and nothing else is", () => {
    for (const name of ["acylation", "hydrolysis", "ring-closure"])
      for (const field of fieldsOf(formOf(demo(name)))) {
        const isRead = field.kind === "quantity" && field.value !== "" && field.value !== "worst";
        expect([field.pointer, field.readBack !== undefined]).toEqual([field.pointer, isRead]);
      }
  });

  test("a value beside its error is read back, and one of the wrong sign too", () => {
    const document = {
      mixture: { mass: { value: "2 t", standardError: "5 kg" } },
      reaction: { heat: "85 kJ/mol" },
    };
    expect(fieldAt(document, "/mixture/mass")?.readBack).toBe("= 2 000 kg");
    expect(fieldAt(document, "/reaction/heat")?.readBack).toBe("= 85 000 J/mol");
  });

  test("a rate constant waits for an order that can be read", () => {
    const of = (order: unknown) => ({
      reaction: {
        reactants: { A: { order } },
        rateConstant: { form: "arrhenius", preExponential: "1e9 1/h" },
      },
    });
    const pointer = "/reaction/rateConstant/preExponential";
    expect(fieldAt(of(1), pointer)?.readBack).toBe("= 277 778 1/s");
    expect(fieldAt(of(2), pointer)?.readBack).toBeUndefined();
    expect(fieldAt(of("one"), pointer)?.readBack).toBeUndefined();
  });
});

describe("typical ranges", () => {
  test("each ends in the dimension of every field that shows it, the lower end below the upper", () => {
    const seen = new Set<string>();
    const byText = new Map(
      Object.entries(typicalRanges).map(([key, range]) => [typicalText(range), { key, range }]),
    );
    for (const document of everyChoice())
      for (const field of fieldsOf(formOf(document))) {
        if (field.typical === undefined) continue;
        const found = byText.get(field.typical);
        if (found === undefined) throw new Error(`No range behind "${field.typical}"`);
        const { key, range } = found;
        const unit = range.highest.replace(/^\S+ /, "");
        const dimension = Object.values(dimensions).find(
          ({ example }) => `such as ${example}` === field.unitHint,
        );
        if (dimension === undefined) throw new Error(`${field.pointer} names no dimension`);
        const [low, high] = [`${range.lowest} ${unit}`, range.highest].map((text) =>
          readQuantity(text, dimension),
        );
        if (low?.ok !== true || high?.ok !== true) throw new Error(`${key} does not fit ${field.pointer}`);
        expect(low.measured.value).toBeLessThan(high.measured.value);
        seen.add(key);
      }
    expect([...seen].sort()).toEqual(Object.keys(typicalRanges).sort());
  });

  test("that of the heat transfer coefficient spans the handbook's table", () => {
    const field = fieldAt({}, "/vessel/heatTransferCoefficient");
    // Perry's Chemical Engineers' Handbook, Table 11-7: 10 to 300 Btu/(h ft² °F), as printed in W/(m² K).
    expect(field?.typical).toBe("Typically 57 to 1700 W/(m² K), jacketed vessels (Perry, Table 11-7)");
  });
});
