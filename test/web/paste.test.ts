import request from "supertest";
import { describe, expect, test } from "vitest";
import { formOf, formValues } from "../../server/case/form.js";
import { demoDocument, testApp } from "./testApp.js";

const list = "/reaction/rateConstant/rows";

// Invented figures.
const sound = "T [degC]\tk [1/h]\n50\t0.0123\n57.5\t0.0241\n65\t0.046";

/** Sends the form of a demo case with a text pasted into its table of rate constants. */
function paste(
  text: string,
  action: string,
  extra: Readonly<Record<string, string>> = {},
  app = testApp().app,
) {
  const body = new URLSearchParams(formValues(formOf(demoDocument())));
  for (const [name, value] of Object.entries({ [`paste:${list}`]: text, ...extra, do: action })) {
    body.set(name, value);
  }
  return request(app).post("/cases/new").send(body.toString());
}

/** Temperatures of the table on a page. */
function temperatures(text: string): string[] {
  const found = text.matchAll(/name="\/reaction\/rateConstant\/rows\/\d+\/temperature" value="([^"]*)"/g);
  return [...found].flatMap(([, value]) => (value ? [value] : []));
}

/** What stands in the text area. */
function waiting(text: string): string {
  return /name="paste:\/reaction\/rateConstant\/rows"[^>]*>([^<]*)</.exec(text)?.[1] ?? "";
}

describe("pasting into a table, by the form alone", () => {
  test("adds the rows below those already there, or replaces them where that is chosen", async () => {
    const added = await paste(sound, `paste:${list}`).expect(200);
    expect(temperatures(added.text)).toEqual([
      ..."50 57 64 71 78".split(" ").map((each) => `${each} degC`),
      ..."50 57.5 65".split(" ").map((each) => `${each} degC`),
    ]);
    expect(added.text).toContain("3 rows taken over.");
    expect(waiting(added.text)).toBe("");
    const replaced = await paste(sound, `paste:${list}`, { [`paste-placing:${list}`]: "replace" });
    expect(temperatures(replaced.text)).toEqual(["50 degC", "57.5 degC", "65 degC"]);
    expect(replaced.text).not.toContain("another look");
  });

  test("asks about the comma with two buttons, keeps the text, and follows the answer", async () => {
    const doubtful = sound.replace("0.0123", "1,234").replace("0.0241", "2,345").replace("0.046", "3,456");
    const asked = await paste(doubtful, `paste:${list}`).expect(200);
    expect(asked.text).toContain("Which is it?");
    expect(asked.text).toContain(`value="paste-decimal:${list}"`);
    expect(asked.text).toContain(`value="paste-separates:${list}"`);
    expect(waiting(asked.text)).toBe(doubtful);
    expect(temperatures(asked.text)).toHaveLength(5);
    const answered = await paste(doubtful, `paste-decimal:${list}`).expect(200);
    expect(answered.text).toContain('value="1.234 1/h"');
    expect((await paste(doubtful, `paste-separates:${list}`)).text).toContain('value="1234 1/h"');
  });

  test("a text that cannot be read is kept, with its fault, also when it is markup", async () => {
    const markup = '</textarea><script>alert("1")</script>\tb\n1\t2';
    const refused = await paste(markup, `paste:${list}`).expect(200);
    expect(refused.text).toContain("No heading names the column");
    expect(refused.text).not.toContain("<script>alert");
    expect(refused.text).toContain("&lt;/textarea&gt;&lt;script&gt;");
  });

  test("what the rows lack is told beside the table, and they are kept as pasted", async () => {
    const { text } = await paste("T [degC]\tk [1/h]\n50\t0.1\n50\t0.1\n50\t-3", `paste:${list}`, {
      [`paste-placing:${list}`]: "replace",
    });
    expect(text).toMatch(
      /id="at-reaction-rateConstant-rows-2-rateConstant"[^>]*value="-3 1\/h"[^>]*aria-invalid/,
    );
    expect(text).toContain("is the same as row 1; a measurement counts once");
    expect(text).toContain("1 different temperature that are not left out");
  });
});

describe("a text that was not taken over", () => {
  test.each(["update", "screen", "add:/failures", "add-failure:quench"])(
    "stays where it is on %s",
    async (action) => {
      expect(waiting((await paste(sound, action).expect(200)).text)).toBe(sound);
    },
  );

  test.each(["save", "copy", "sheet", "case", "findings"])("is not left behind by %s", async (action) => {
    const { app, cases } = testApp();
    const { text } = await paste(sound, action, {}, app).expect(422);
    expect(waiting(text)).toBe(sound);
    expect(text).toContain("not in the table yet");
    expect(text).toContain('<a href="#at-reaction-rateConstant-rows">To the pasted rows</a>');
    expect(await cases.list()).toEqual([]);
  });

  test("is not left behind by a sheet that is filed", async () => {
    const body = new URLSearchParams(formValues(formOf(demoDocument())));
    body.set(`paste:${list}`, sound);
    const { app, sheets } = testApp();
    const { text } = await request(app).post("/cases/new/file").send(body.toString()).expect(422);
    expect(waiting(text)).toBe(sound);
    expect(text).toContain("To the pasted rows");
    expect((await sheets.fresh()).sheets()).toEqual([]);
  });

  test("holds up nothing where its table is not shown any more", async () => {
    await paste(sound, "save", { "/reaction/rateConstant/form": "arrhenius" }).expect(303);
  });
});

test("a table of a thousand rows is taken over, shown, and sent back", async () => {
  const { app } = testApp();
  const many = Array.from({ length: 995 }, (_, at) => `${20 + at / 20}\t${(1 + at) * 1e-3}`).join("\n");
  const { text } = await paste(`T [degC]\tk [1/h]\n${many}`, `paste:${list}`, {}, app).expect(200);
  expect(temperatures(text)).toHaveLength(1000);
  const names = [...text.matchAll(/<(?:input type="text"|select)[^>]* name="([^"]*)"/g)].map(
    ([, name]) => name ?? "",
  );
  const body = new URLSearchParams(names.map((name) => [name, ""]));
  await request(app).post("/cases/new").send(`${body.toString()}&do=update`).expect(200);
});
