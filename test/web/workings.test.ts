import request from "supertest";
import { describe, expect, test } from "vitest";
import { formOf, formValues } from "../../server/case/form.js";
import { demoDocument, testApp } from "./testApp.js";

const field = "/vessel/heatTransferArea";
const group = "/vessel/heatTransferAreaFrom";

// Invented vessel.
const dimensions: Readonly<Record<string, string>> = {
  bottom: "kloepper",
  innerDiameter: "1400 mm",
  wallThickness: "12 mm",
  fillVolume: "1.5 m^3",
  jacketLower: "0.1 m",
  jacketUpper: "1.2 m",
};

/** A demo case in the form, with dimensions of its vessel and what else was typed. */
function typed(extra: Readonly<Record<string, string>> = {}, document: unknown = demoDocument()) {
  const body = new URLSearchParams(formValues(formOf(document)));
  for (const [key, text] of Object.entries(dimensions)) body.set(`${group}/${key}`, text);
  for (const [name, text] of Object.entries(extra)) body.set(name, text);
  return body;
}

const send = (body: URLSearchParams) =>
  request(testApp().app).post("/cases/new").type("form").send(body.toString());

/** The controls of a page as a browser would send them back. */
function controls(html: string): URLSearchParams {
  const plain = (text: string) =>
    text
      .replaceAll("&#34;", '"')
      .replaceAll("&#39;", "'")
      .replaceAll("&lt;", "<")
      .replaceAll("&gt;", ">")
      .replaceAll("&amp;", "&");
  const body = new URLSearchParams();
  for (const [input] of html.matchAll(/<input[^>]*>/g)) {
    const name = /name="([^"]*)"/.exec(input)?.[1];
    if (name !== undefined) body.set(plain(name), plain(/value="([^"]*)"/.exec(input)?.[1] ?? ""));
  }
  for (const [, name, options] of html.matchAll(/<select[^>]*name="([^"]*)"[^>]*>(.*?)<\/select>/gs)) {
    body.set(name ?? "", /value="([^"]*)" selected/.exec(options ?? "")?.[1] ?? "");
  }
  return body;
}

describe("working out the area", () => {
  test("shows its working before anything is filled, and leaves the field as it was", async () => {
    const body = typed({ do: "update" });
    const { text } = await send(body).expect(200);
    expect(text).toContain("Level of the contents");
    expect(text).toContain("4.557 m²");
    expect(text).toContain("Work out the area");
    expect(controls(text).get(`${field}/value`) ?? controls(text).get(field)).toBe(
      body.get(`${field}/value`) ?? body.get(field),
    );
    expect(text).not.toContain("Undo:");
  });

  test("fills the field at the button, says where it comes from, and takes it back at the next one", async () => {
    const before = typed();
    const filled = await send(typed({ do: `work:${field}` })).expect(200);
    const sent = controls(filled.text);
    expect(sent.get(`${field}`) ?? sent.get(`${field}/value`)).toBe("4.55 m^2");
    expect(sent.get(`${field}/source`)).toBe("worked out from the vessel's dimensions");
    expect(filled.text).toContain("which follows from this");
    expect(filled.text).toContain("<svg");
    // Other buttons in between lose nothing.
    sent.set("do", "add:/failures");
    const added = controls((await send(sent).expect(200)).text);
    added.set("do", `undo:${field}`);
    const undone = await send(added).expect(200);
    const after = controls(undone.text);
    for (const part of ["", "/value", "/source", "/basis", "/standardError"]) {
      expect(after.get(`${field}${part}`) ?? "").toBe(before.get(`${field}${part}`) ?? "");
    }
    expect(undone.text).not.toContain("Undo:");
  });

  test("says in the findings when an input of the working has changed since", async () => {
    const filled = controls((await send(typed({ do: `work:${field}` }))).text);
    filled.set(`${group}/fillVolume`, "1.1 m^3");
    filled.set("do", "screen");
    const { text } = await send(filled).expect(200);
    expect(text).toContain("INPUT_MOVED");
    expect(text).not.toContain("which follows from this");
  });

  test("fills an empty field while other fields are still wrong, and shows only its own faults", async () => {
    const body = typed({ do: `work:${field}`, "/mixture/mass": "heavy" });
    for (const name of [...body.keys()])
      if (name === field || name.startsWith(`${field}/`)) body.delete(name);
    const { text } = await send(body).expect(200);
    const sent = controls(text);
    expect(sent.get(field) ?? sent.get(`${field}/value`)).toBe("4.55 m^2");
    expect(sent.get("/mixture/mass") ?? sent.get("/mixture/mass/value")).toBe("heavy");
    expect(text).toContain("Undo: empty the field again");
    expect(text).not.toContain("another look");
    sent.set("do", `undo:${field}`);
    const undone = controls((await send(sent)).text);
    expect(undone.get(field) ?? "").toBe("");
  });

  test("that cannot be done changes nothing and names what is wrong", async () => {
    const body = typed({ do: `work:${field}`, [`${group}/jacketLower`]: "1.15 m" });
    const { text } = await send(body).expect(200);
    expect(text).toContain("the area is 0");
    expect(text).toContain("One field needs another look");
    expect(text).not.toContain("Undo:");
    const emptied = await send(typed({ do: `work:${field}`, [`${group}/innerDiameter`]: "" })).expect(200);
    expect(emptied.text).toContain('id="at-vessel-heatTransferAreaFrom-innerDiameter-fault"');
    expect(emptied.text).toMatch(/innerDiameter-fault"[^>]*>is missing/);
  });

  test("a hidden control with nonsense does no harm", async () => {
    for (const kept of ["{", "null", '{"__proto__":{"a":1}}', "[[1]]", "x".repeat(5000)]) {
      const { text } = await send(typed({ do: `undo:${field}`, [`before:${field}`]: kept })).expect(200);
      expect(text).toContain("Work out the area");
    }
    await send(typed({ do: "work:/mixture/mass" })).expect(200);
    await send(typed({ do: "undo:/vessel/heatTransferArea" })).expect(200);
  });
});

test("what is typed is answered with the working anew, beside the findings", async () => {
  const { text } = await request(testApp().app)
    .post("/findings?parts=quick")
    .type("form")
    .send(typed({ [`${group}/fillVolume`]: "1.1 m^3" }).toString())
    .expect(200);
  expect(text).toContain('id="working-at-vessel-heatTransferArea"');
  expect(text).toMatch(/Level of the contents/);
});

test.each([
  {
    of: "/vessel/heatTransferCoefficient",
    given: {
      insideFilm: "500 W/(m^2 K)",
      outsideFilm: "2000 W/(m^2 K)",
      wallThickness: "12 mm",
      wallConductivity: "15 W/(m K)",
      jacketMedium: "brine",
      wall: "stainless",
      contents: "organics",
    },
    button: "Work out U",
    filled: "303 W/(m^2 K)",
    basis: "estimated",
    shown: "170 to 680 W/(m² K)",
  },
  {
    of: "/limits/maximumTechnicalTemperature",
    given: {
      method: "clausius-clapeyron",
      normalBoilingPoint: "78.3 degC",
      heatOfVaporisation: "38.6 kJ/mol",
      pressure: "1.5 bar",
    },
    button: "Work out MTT",
    filled: "89.0 degC",
    basis: "boiling point at 1.5 bar",
    shown: "Clausius-Clapeyron",
  },
])("$button fills $of and shows its working", async ({ of, given, button, filled, basis, shown }) => {
  const extra = Object.fromEntries(Object.entries(given).map(([key, text]) => [`${of}From/${key}`, text]));
  const { text } = await send(typed({ ...extra, do: `work:${of}` })).expect(200);
  const sent = controls(text);
  expect(text).toContain(button);
  expect(text).toContain(shown);
  expect([...sent].filter(([name]) => name.startsWith(of)).map(([, value]) => value)).toContain(basis);
  const value = sent.get(`${of}/value`) ?? sent.get(of);
  expect(value).toBe(filled);
});
