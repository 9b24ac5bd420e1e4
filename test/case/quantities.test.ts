import { describe, expect, test } from "vitest";
import { dimensions, type Kind, rateConstantDimension } from "../../server/case/dimensions.js";
import { readQuantity, readUnit } from "../../server/case/quantities.js";

function si(text: string, kind: Kind): number {
  const reading = readQuantity(text, dimensions[kind]);
  if (!reading.ok) throw new Error(reading.message);
  return reading.measured.value;
}

function rate(text: string, order: number): number {
  const reading = readQuantity(text, rateConstantDimension(order));
  if (!reading.ok) throw new Error(reading.message);
  return reading.measured.value;
}

function refusal(text: string, kind: Kind): string {
  const reading = readQuantity(text, dimensions[kind]);
  return reading.ok ? `accepted as ${reading.measured.value}` : reading.message;
}

describe("temperatures", () => {
  test("35 degC as a temperature is 308.15 K, 0.5 degC as a difference is 0.5 K", () => {
    expect(si("35 degC", "temperature")).toBe(308.15);
    expect(si("0.5 degC", "temperatureDifference")).toBe(0.5);
    expect(si("0.5 K", "temperatureDifference")).toBe(0.5);
  });

  test("the Fahrenheit scale has its own zero and its own step", () => {
    expect(si("32 degF", "temperature")).toBeCloseTo(273.15, 10);
    expect(si("9 degF", "temperatureDifference")).toBeCloseTo(5, 12);
  });

  test.each(["-273.15 degC", "0 K", "-5 K", "-459.67 degF", "-300 °C"])("%s is refused", (text) => {
    expect(refusal(text, "temperature")).toMatch(/absolute zero/);
  });

  test("a difference may be zero or negative; its sign is for the field to judge", () => {
    expect(si("-2 K", "temperatureDifference")).toBe(-2);
  });

  test("in a heat capacity a degree Celsius is a difference", () => {
    expect(si("1.95 kJ/(kg degC)", "heatCapacity")).toBe(1950);
    expect(si("1.95 kJ/(kg °C)", "heatCapacity")).toBe(1950);
  });

  test("a lone C or F is told how degrees are written", () => {
    expect(refusal("35 C", "temperature")).toMatch(/write degC/);
    expect(refusal("95 F", "temperature")).toMatch(/write degF/);
  });
});

describe("rate constants", () => {
  test("the ways to write a second-order rate constant agree", () => {
    const ways = [
      "0.3 L/mol/s",
      "0.3 L mol^-1 s^-1",
      "0.3 L/(mol s)",
      "18 L/(mol min)",
      "0.3 M^-1 s^-1",
      "0.3 L·mol⁻¹·s⁻¹",
      "0.3 dm^3 mol^-1 s^-1",
    ];
    for (const text of ways) expect(rate(text, 2)).toBeCloseTo(3e-4, 15);
  });

  test("the ways to write a first-order rate constant agree", () => {
    for (const text of ["2.05e-6 s^-1", "2.05e-6 1/s", "2.05e-6 /s", "2.05×10⁻⁶ s⁻¹", "2.05·10^-6 s^(-1)"]) {
      expect(rate(text, 1)).toBeCloseTo(2.05e-6, 20);
    }
    expect(rate("3.6 1/h", 1)).toBeCloseTo(1e-3, 18);
    expect(rate("86.4 d^-1", 1)).toBeCloseTo(1e-3, 18);
  });

  test("orders that are not whole give powers that are not whole", () => {
    expect(rate("2 L^0.5 mol^-0.5 s^-1", 1.5)).toBeCloseTo(2 * Math.sqrt(1e-3), 14);
    expect(rate("2 mol^0.5 L^-0.5 s^-1", 0.5)).toBeCloseTo(2 * Math.sqrt(1000), 10);
    expect(rate("1 L^0.37 mol^-0.37 s^-1", 1.37)).toBeCloseTo(1e-3 ** 0.37, 14);
  });

  test("a wrong one names what came and what belongs to the order", () => {
    const reading = readQuantity("0.3 L/(mol s)", rateConstantDimension(1));
    expect(reading).toMatchObject({ ok: false });
    expect(JSON.stringify(reading)).toMatch(/rate constant of overall order 2.*overall order 1.*1\/s/);
    const half = readQuantity("3e-4 1/s", rateConstantDimension(1.5));
    expect(JSON.stringify(half)).toMatch(/m\^1\.5 mol\^-0\.5 s\^-1/);
  });

  test("1e84 1/h is exact in its logarithm", () => {
    const reading = readQuantity("1e84 1/h", rateConstantDimension(1));
    if (!reading.ok) throw new Error(reading.message);
    const expected = 84 * Math.LN10 - Math.log(3600);
    expect(Math.abs(reading.measured.ln / expected - 1)).toBeLessThan(1e-15);
  });

  test("a logarithm stays finite where the SI figure does not", () => {
    const reading = readQuantity("1e307 ms^-1", rateConstantDimension(1));
    if (!reading.ok) throw new Error(reading.message);
    expect(reading.measured.value).toBe(Number.POSITIVE_INFINITY);
    expect(reading.measured.ln).toBeCloseTo(310 * Math.LN10, 10);
  });

  test("the unit of a logarithm's argument is read on its own", () => {
    const reading = readUnit("1/h", rateConstantDimension(1));
    if (!reading.ok) throw new Error(reading.message);
    expect(reading.measured.ln).toBeCloseTo(-Math.log(3600), 14);
    for (const text of ["kg", "5 1/s", "x10^3 1/s", "e3 1/s", ""]) {
      expect(readUnit(text, rateConstantDimension(1)).ok).toBe(false);
    }
  });
});

describe("units", () => {
  test("the calorie is 4.184 J exactly", () => {
    expect(si("1 cal/mol", "molarEnergy")).toBe(4.184);
    expect(si("1 kcal/(kg K)", "heatCapacity")).toBe(4184);
    expect(si("-590 kcal/mol", "molarEnergy")).toBe(-2468560);
  });

  test("M is a mole per litre, with prefixes; d is a day", () => {
    expect(si("1 M", "concentration")).toBe(1000);
    expect(si("5 mM", "concentration")).toBeCloseTo(5, 12);
    expect(si("2 d", "time")).toBe(172800);
    expect(si("1 cP", "viscosity")).toBeCloseTo(1e-3, 15);
  });

  test("text is taken as people paste it", () => {
    expect(si("62 kJ·mol⁻¹", "molarEnergy")).toBe(62000);
    expect(si("−118 kJ/mol", "molarEnergy")).toBe(-118000);
    expect(si("–118 kJ/mol", "molarEnergy")).toBe(-118000);
    expect(si("1.95 kJ kg^-1 K^-1", "heatCapacity")).toBe(1950);
    expect(si("35°C", "temperature")).toBe(308.15);
    expect(si("35 ℃", "temperature")).toBe(308.15);
    expect(si("35 ° C", "temperature")).toBe(308.15);
    expect(si("35 deg C", "temperature")).toBe(308.15);
    expect(si("300 °K", "temperature")).toBe(300);
    expect(si("320\u00a0W/(m²\u202fK)", "heatTransferCoefficient")).toBe(320);
    expect(si("320 W·m⁻²·K⁻¹", "heatTransferCoefficient")).toBe(320);
    expect(si("850 µPa s", "viscosity")).toBeCloseTo(8.5e-4, 15);
    expect(si("2.5 m³", "volume")).toBe(2.5);
    expect(si("5.6m2", "area")).toBe(5.6);
    expect(si("1.2e3 kg", "mass")).toBe(1200);
    expect(si(" +1.5E3 kg ", "mass")).toBe(1500);
    expect(si(".5 t", "mass")).toBe(500);
    expect(si("10^3 kg", "mass")).toBe(1000);
  });

  test("factors are exact where a person expects it", () => {
    expect(si("0.91 kg/L", "density")).toBe(910);
    expect(si("610 J/g", "specificEnergy")).toBe(610000);
    expect(si("2.05 kJ/(kg K)", "heatCapacity")).toBe(2050);
    expect(si("1 g/mL", "density")).toBe(1000);
    expect(si("24 h", "time")).toBe(86400);
  });
});

describe("refused, with what came and what would do", () => {
  test("320 W/m^2 K has another dimension than 320 W/(m^2 K), and the parentheses are suggested", () => {
    const message = refusal("320 W/m^2 K", "heatTransferCoefficient");
    expect(message).toMatch(/expected a heat transfer coefficient/);
    expect(message).toContain('write "W/(m^2 K)"');
    expect(refusal("320 W/m²·K", "heatTransferCoefficient")).toContain('write "W/(m^2 K)"');
    expect(refusal("62 kJ/kg K", "heatCapacity")).toContain('write "kJ/(kg K)"');
  });

  test("units that were run together, or written in the wrong case, are met with the right ones", () => {
    expect(refusal("320 W/m2K", "heatTransferCoefficient")).toContain('did you mean "W/(m2 K)"');
    expect(refusal("2.1 kJ/kgK", "heatCapacity")).toContain('did you mean "kJ/(kg K)"');
    expect(refusal("5 Kg", "mass")).toContain('did you mean "kg"');
    expect(refusal("62 KJ/mol", "molarEnergy")).toContain('did you mean "kJ/mol"');
    expect(refusal("3 Kmol", "amount")).toContain('did you mean "kmol"');
  });

  test("a unit that means different things to different people", () => {
    expect(refusal("2 ton", "mass")).toMatch(/write t for 1000 kg/);
    expect(refusal("2 tons/h", "massFlow")).toMatch(/write t for 1000 kg/);
    expect(refusal("2 mt", "mass")).toMatch(/write t for 1000 kg/);
    expect(si("2 t", "mass")).toBe(2000);
  });

  test("an error written behind its value has a field of its own", () => {
    expect(refusal("62 ± 1.6 kJ/mol", "molarEnergy")).toMatch(/standardError/);
    expect(refusal("62 +/- 1.6 kJ/mol", "molarEnergy")).toMatch(/standardError/);
  });

  test("a wrong dimension names both", () => {
    expect(refusal("150 L", "mass")).toMatch(/"150 L" is a volume; expected a mass in kg/);
    expect(refusal("5 kg", "time")).toMatch(/is a mass; expected a time/);
    expect(refusal("5 kg^2/s", "mass")).toMatch(/is a quantity in kg\^2 s\^-1/);
    expect(refusal("5 A", "mass")).toMatch(/electricity/);
  });

  test("what is not finite", () => {
    expect(refusal("1e400 kg", "mass")).toMatch(/not finite/);
  });

  test("decimal commas and marks between thousands", () => {
    expect(refusal("0,5 kg", "mass")).toMatch(/decimal point.*"0\.5 kg"/);
    expect(refusal("1,900.5 kg", "mass")).toMatch(/decimal point/);
    expect(refusal("1 900 kg", "mass")).toMatch(/one number/);
  });

  test("two quantities in one", () => {
    expect(refusal("3 h 20 min", "time")).toMatch(/more than one number.*200 min/);
  });

  test("missing parts", () => {
    expect(refusal("", "mass")).toMatch(/nothing was typed/);
    expect(refusal("5", "mass")).toMatch(/no unit/);
    expect(refusal("kg", "mass")).toMatch(/does not start with a number/);
    expect(refusal("5 flurbs", "mass")).toMatch(/"flurbs" is not a unit/);
    expect(refusal("2e-5 s-1", "time")).toMatch(/caret: write "s\^-1"/);
    expect(refusal("5 kg/(m s", "mass")).toMatch(/parenthesis/);
    expect(refusal("10 m", "time")).toMatch(/m is the metre/);
  });

  test.each([
    "import('fs')",
    "5 kg; 3",
    "f(x)=1",
    "5 kg\u0000",
    "<script>",
    "5 kg = 3 g",
    "[1,2]",
    "5 k\u{1f600}g",
    "\ud800 kg",
    "cos(5) kg",
    "createUnit kg",
    "1/0 kg",
    "NaN kg",
    "Infinity kg",
    "0x10 kg",
    "5 __proto__",
    "5 constructor",
    "5 kg^1e400",
    "5 kg^999",
    "((((5 kg",
    "5 ()",
    "5 kg^",
    "5 kg/",
    "--5 kg",
    "x".repeat(1e6),
  ])("odd text %# is refused in words", (text) => {
    const message = refusal(text, "mass");
    expect(message).not.toMatch(/accepted/);
    expect(message).toMatch(/expected|write|too large/);
    expect(message.length).toBeLessThan(500);
  });

  test("an evaluator is not in the process: operators between numbers mean nothing", () => {
    expect(refusal("2*3 kg", "mass")).toMatch(/one number/);
    expect(refusal("2+3 kg", "mass")).toMatch(/one number/);
  });
});
