import { describe, expect, test } from "vitest";
import { formOf, isPasting, pastedIn, pasteRows } from "../../server/case/form.js";
import type { FormBlock, FormList, FormSection } from "../../server/case/formShape.js";
import { valueAt } from "../../server/case/outline.js";
import { readRate } from "../../server/case/rates.js";
import { readCase } from "../../server/case/read.js";
import { demo, edited } from "./completeCases.js";

const rateRows = "/reaction/rateConstant/rows";
const emptyTable = edited(demo("ring-closure"), rateRows, []);

/** What pasting a text into the rate constants of a case does; the table is empty before unless said. */
function pasting(
  text: string,
  verb = "paste",
  document: unknown = emptyTable,
  list = rateRows,
  placing = "add",
) {
  const pasted = pastedIn({ [`paste:${list}`]: text, [`paste-placing:${list}`]: placing });
  const after = pasteRows(document, `${verb}:${list}`, pasted);
  const left = after.pasted.get(list);
  return { rows: valueAt(after.document, ...list.split("/").slice(1)), left, ...after };
}

const kept = (left: { readonly text: string } | undefined) => left?.text;

// Invented figures.
const spreadsheet = "Temperature [degC]\tk [1/h]\n50\t0.0123\n57.5\t0.0241\n65\t0.046\n";
const expected = [
  { temperature: "50 degC", rateConstant: "0.0123 1/h" },
  { temperature: "57.5 degC", rateConstant: "0.0241 1/h" },
  { temperature: "65 degC", rateConstant: "0.046 1/h" },
];

describe("pasted rows become those of the table", () => {
  test.each([
    ["parted by tabs", spreadsheet],
    ["with Windows line ends and blank lines", `\r\n${spreadsheet.replaceAll("\n", "\r\n")}\r\n`],
    ["parted by semicolons", spreadsheet.replaceAll("\t", ";")],
    ["parted by semicolons, with decimal commas", spreadsheet.replaceAll("\t", ";").replaceAll(".", ",")],
    ["parted by tabs, with decimal commas", spreadsheet.replaceAll(".", ",")],
    ["parted by commas", spreadsheet.replaceAll("\t", ",")],
    ["with blank columns at the end", spreadsheet.replaceAll("\n", "\t\t\n")],
    ["in the other order", "k / h^-1\tT / °C\n0.0123\t50\n0.0241\t57.5\n0.046\t65"],
    ["with the units in a line of their own", spreadsheet.replace(" [degC]\tk [1/h]", "\tk\ndegC\t1/h")],
    ["under a title", `Runs of the week\n${spreadsheet}`],
    [
      "with a unit behind each number and no heading",
      "50 degC;0.0123 1/h\n57.5 degC;0.0241 1/h\n65 degC;0.046 1/h",
    ],
    ["in quotation marks", spreadsheet.replace(/[^\t\n]+/g, '"$&"')],
  ])("%s", (_, text) => {
    const { rows, left } = pasting(text);
    expect(rows).toHaveLength(3);
    expect(JSON.parse(JSON.stringify(rows).replaceAll("h^-1", "1/h"))).toEqual(expected);
    expect(left?.text).toBe("");
    expect(left?.told).toContain("3 rows");
  });

  test.each([
    ["Temperature (°C)", "k (L/(mol s))", "degC", "L/(mol s)"],
    ["T/K", "k/(L mol⁻¹ s⁻¹)", "K", "L mol^-1 s^-1"],
    ["temp. in K", "rate constant in 1/s", "K", "1/s"],
    ["T, °C", "k_obs, s⁻¹", "degC", "s^-1"],
    ["ϑ / °C", "k1 [L/mol/s]", "degC", "L/mol/s"],
  ])("headed %s and %s", (temperature, k, kelvin, unit) => {
    const { rows } = pasting(`${temperature}\t${k}\n300\t1e-3\n310\t2e-3\n320\t3e-3`);
    expect(rows).toMatchObject([{ temperature: `300 ${kelvin}`, rateConstant: `1e-3 ${unit}` }, {}, {}]);
  });

  test("a cell's own unit counts before that of its heading", () => {
    const { rows } = pasting("T [K]\tk [1/h]\n50 °C\t0.0123\n330\t4e-6 s⁻¹\n340\t0.046");
    expect(rows).toMatchObject([
      { temperature: "50 °C" },
      { rateConstant: "4e-6 s⁻¹" },
      { temperature: "340 K" },
    ]);
  });

  test("a power of ten before the unit belongs to every number below it", () => {
    const { rows } = pasting("T [degC]\tk [10⁻⁵ 1/s]\n50\t0.34\n57\t0.68\n64\t1.3");
    expect(rows).toMatchObject([{ rateConstant: "0.34*10^-5 1/s" }, {}, {}]);
    const read = readRate({ value: "0.34*10^-5 1/s", standardError: null }, 1);
    expect(read).toMatchObject({ ok: true, k: { value: expect.closeTo(3.4e-6, 18) } });
  });

  test("errors come as the heading says, relative ones also in percent", () => {
    const relative = pasting(
      "T [degC]\tk [1/h]\trel. error [%]\n50\t0.0123\t3\n57\t0.024\t2.5 %\n64\t0.046\t",
    );
    expect(relative.rows).toEqual([
      { temperature: "50 degC", rateConstant: "0.0123 1/h", relativeError: 0.03 },
      { temperature: "57 degC", rateConstant: "0.024 1/h", relativeError: 0.025 },
      { temperature: "64 degC", rateConstant: "0.046 1/h" },
    ]);
    const standard = pasting("T [degC]\tk [1/h]\tstandard error [1/h]\n50\t0.0123\t4e-4");
    expect(standard.rows).toEqual([
      { temperature: "50 degC", rateConstant: { value: "0.0123 1/h", standardError: "4e-4 1/h" } },
    ]);
  });

  test("a row that is left out keeps its reason, one that is not has none", () => {
    const text =
      'T [degC],k [1/h],left out\n50,0.0123,"stirrer stood, p. 12"\n57,0.0241,no\n64,0.046,\n71,0.09,-\n';
    expect(pasting(text).rows).toEqual([
      { temperature: "50 degC", rateConstant: "0.0123 1/h", leftOut: "stirrer stood, p. 12" },
      { temperature: "57 degC", rateConstant: "0.0241 1/h" },
      { temperature: "64 degC", rateConstant: "0.046 1/h" },
      { temperature: "71 degC", rateConstant: "0.09 1/h" },
    ]);
  });

  test("a column that nobody asked for is passed over, and named", () => {
    const { rows, left } = pasting(
      "Run\tT [degC]\tk [1/h]\nA 12\t50\t0.0123\nA 13\t57.5\t0.0241\nA 14\t65\t0.046",
    );
    expect(rows).toEqual(expected);
    expect(left?.told).toContain("Not used: “Run”");
  });

  test("and so do those of a measured accumulation", () => {
    const list = "/reaction/measuredAccumulation/rows";
    const document = edited(demo("acylation"), "/reaction/measuredAccumulation", { temperature: "12 degC" });
    const { rows } = pasting(
      "Time [min];Released fraction [%]\n10;4,5\n20;12,25\n30;100",
      "paste",
      document,
      list,
    );
    expect(rows).toEqual([
      { time: "10 min", releasedFraction: 0.045 },
      { time: "20 min", releasedFraction: 0.1225 },
      { time: "30 min", releasedFraction: 1 },
    ]);
  });
});

describe("a comma that can be read two ways is asked about, not guessed", () => {
  test.each([
    ["one decimal number, or two columns", "25,3\n35,7\n45,9"],
    ["with units behind", "25,3 degC,1,2 1/h\n35,7 degC,2,5 1/h"],
    ["thousands, or decimals, between tabs", "T [K]\tk [1/h]\n300\t1,234\n310\t2,345\n320\t3,456"],
  ])("%s", (_, text) => {
    const { rows, left, document } = pasting(text);
    expect(left?.question).toMatch(/Which is it\?$/);
    expect(kept(left)).toBe(text);
    expect(rows).toEqual([]);
    const list = listAt(formOf(document, [], {}, pasting(text).pasted), rateRows);
    expect(list?.paste?.answers.map(({ value }) => value)).toEqual([
      `paste-decimal:${rateRows}`,
      `paste-separates:${rateRows}`,
    ]);
  });

  test("and read as the answer says", () => {
    const thousands = "T [K]\tk [1/h]\n300\t1,234\n310\t2,345";
    expect(pasting(thousands, "paste-decimal").rows).toMatchObject([{ rateConstant: "1.234 1/h" }, {}]);
    expect(pasting(thousands, "paste-separates").rows).toMatchObject([{ rateConstant: "1234 1/h" }, {}]);
    const units = "25,3 degC,1,2 1/h\n35,7 degC,2,5 1/h";
    expect(pasting(units, "paste-decimal").rows).toMatchObject([
      { temperature: "25.3 degC", rateConstant: "1.2 1/h" },
      { temperature: "35.7 degC", rateConstant: "2.5 1/h" },
    ]);
    expect(pasting("25,3\n35,7", "paste-separates").left?.fault).toContain("has no unit");
  });

  test("what can be read one way only is not asked about", () => {
    for (const text of [
      "T [degC],k [1/h]\n25,3\n35,7",
      "25 degC,3 1/h\n35 degC,7 1/h",
      "T [degC]\tk [1/h]\n25,5\t1,234\n35\t2,345",
      "T [degC],k [1/h]\n25.0,0.1\n35.0,0.2",
      "T [degC]\tk [1/h]\n25\t1,234,567\n35\t2,345,678",
    ]) {
      const { left, rows } = pasting(text);
      expect.soft(left?.question, text).toBeUndefined();
      expect.soft(rows, text).toHaveLength(2);
    }
  });

  test("commas of both kinds are refused", () => {
    expect(pasting("T [degC]\tk [1/h]\n25,5\t1,234,567").left?.fault).toContain("write one of the two");
  });
});

describe("what cannot be read stays in the text area, with its fault", () => {
  test.each([
    ["nothing", "  ", /Paste rows first/],
    ["words alone", "T\tk\nwarm\tfast", /No line holds the numbers/],
    ["one column", "50\n57\n64", /No columns were found/],
    ["no unit", "T\tk\n50\t0.1\n57\t0.2", /Line 2: “50” has no unit.*Temperature \[degC\]/],
    ["a unit for one of the two", "T [degC]\tk\n50\t0.1", /“0.1” has no unit.*k \[1\/s\]/],
    [
      "reciprocal temperatures",
      "1000/T [1/K]\tk [1/h]\n3.1\t0.1\n3.0\t0.2",
      /No heading names the column for temperature/,
    ],
    ["logarithms", "T [degC]\tln k\n50\t-2.3\n57\t-1.6", /No heading names the column for rate constant/],
    ["a factor in the heading", "T [degC]\t10⁵ k [1/s]\n50\t0.34\n57\t0.68", /multiplies its column/],
    ["a factor behind the name", "T / °C\tk·10^5 / s^-1\n50\t0.34\n57\t0.68", /multiplies its column/],
    ["an error of no kind", "T [degC]\tk [1/h]\terror\n50\t0.1\t0.01", /does not say which error/],
    ["three columns without headings", "50 degC\t0.1 1/h\t0.03", /Paste the headings as well/],
    ["a column twice", "T [degC]\tT [K]\tk [1/h]\n50\t323\t0.1", /there already/],
    ["a row longer than its heading", "T [degC]\tk [1/h]\n50\t0.1\t7", /Line 2 has more cells/],
    ["too many rows", `T [degC]\tk [1/h]\n${"50\t0.1\n".repeat(1001)}`, /1001 rows.*at most 1000/],
    ["too long a text", "x".repeat(200_001), /at most 200000/],
  ])("%s", (_, text, fault) => {
    const { rows, left } = pasting(text);
    expect(left?.fault).toMatch(fault);
    expect(rows).toEqual([]);
    if (text.trim() !== "") expect(kept(left)).toBe(text);
  });
});

describe("rows already there", () => {
  const document = demo("ring-closure");
  const before = valueAt(document, "reaction", "rateConstant", "rows");

  test("stay where nobody asked to replace them", () => {
    expect(pasting(spreadsheet, "paste", document).rows).toEqual([...(before as object[]), ...expected]);
  });

  test("go where someone did", () => {
    expect(pasting(spreadsheet, "paste", document, rateRows, "replace").rows).toEqual(expected);
  });

  test("stay when the pasted ones cannot be read", () => {
    expect(pasting("T\tk\n50\t1", "paste", document, rateRows, "replace").rows).toEqual(before);
  });
});

describe("what the table makes of the rows is told beside it, and the rows are kept as pasted", () => {
  test.each([
    ["fewer than three temperatures", "50\t0.1\n50\t0.11\n57\t0.2", "", /2 different temperatures/],
    ["two identical rows", "50\t0.1\n57\t0.2\n64\t0.4\n57\t0.2", "/3", /same as row 2/],
    ["a rate constant of zero", "50\t0\n57\t0.2\n64\t0.4", "/0/rateConstant", /not above zero/],
    ["a rate constant below zero", "50\t0.1\n57\t-0.2\n64\t0.4", "/1/rateConstant", /not above zero/],
    ["words for a number", "50\t0.1\n57\tn/a\n64\t0.4", "/1/rateConstant", /does not start with a number/],
    ["a wrong dimension", "50\t0.1 kg\n57\t0.2\n64\t0.4", "/0/rateConstant", /mass/],
    [
      "all rows left out",
      "50\t0.1\tspilt\n57\t0.2\tspilt\n64\t0.4\tspilt",
      "",
      /0 different temperatures that are not left out/,
    ],
  ])("%s", (_, body, at, message) => {
    const heading = body.includes("spilt") ? "T [degC]\tk [1/h]\tleft out" : "T [degC]\tk [1/h]";
    const { document, rows, left } = pasting(`${heading}\n${body}`);
    expect(left?.fault).toBeUndefined();
    expect(rows).toHaveLength(body.split("\n").length);
    const result = readCase(document);
    const faults = result.ok ? [] : result.faults;
    expect(faults).toContainEqual({
      pointer: `${rateRows}${at}`,
      message: expect.stringMatching(message),
    });
    const values = JSON.stringify(formOf(document, faults));
    for (const [cell] of body.matchAll(/[\w.-]+/g)) expect(values).toContain(cell);
  });
});

test("only a list of single fields takes rows, and only its own buttons put them there", () => {
  const pasted = pastedIn({
    "paste:/failures": spreadsheet,
    "paste:/mixture": "x\ty",
    "paste:": "z",
    "/title": "t",
  });
  for (const action of [
    "paste:/failures",
    "paste:/mixture",
    "paste:",
    "paste:/__proto__/x",
    "paste:/nowhere",
  ]) {
    expect(pasteRows(demo("ring-closure"), action, pasted).document).toEqual(demo("ring-closure"));
  }
  expect(isPasting("paste-decimal:/x")).toBe(true);
  for (const action of ["paste-other:/x", "constructor:/x", "screen", ""])
    expect(isPasting(action)).toBe(false);
});

function listAt(blocks: readonly (FormBlock | FormSection)[], pointer: string): FormList | undefined {
  for (const block of blocks) {
    if ("type" in block && block.type === "list") {
      if (block.pointer === pointer) return block;
    } else if ("blocks" in block) {
      const found = listAt(block.blocks, pointer);
      if (found !== undefined) return found;
    }
  }
  return undefined;
}
