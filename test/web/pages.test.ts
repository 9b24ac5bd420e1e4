import request from "supertest";
import { describe, expect, test } from "vitest";
import { blankCase, formOf, formValues } from "../../server/case/form.js";
import { notice } from "../../server/screening/notice.js";
import { brokenDocuments } from "../case/brokenDocuments.js";
import { filled } from "./filled.js";
import { demoDocument, demos, testApp } from "./testApp.js";

const wrongNumbers = /\bNaN\b|Infinity|\bundefined\b|\[object /;

function escaped(text: string): string {
  const entities: Readonly<Record<string, string>> = {
    "&": "&amp;",
    "<": "&lt;",
    ">": "&gt;",
    '"': "&#34;",
    "'": "&#39;",
  };
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? character);
}

describe("the page of a case", () => {
  test.each(demos.map((demo) => demo.name))(
    "demo %s is shown with its notice, figures and cautions",
    async (name) => {
      const { text } = await request(testApp().app).get(`/demos/${name}`).expect(200);
      expect(text).toContain(escaped(notice));
      expect(text).toContain("<svg");
      expect(text).toContain("PRESSURE");
      expect(text).not.toMatch(wrongNumbers);
    },
  );

  test("a blank case shows its form and no fault", async () => {
    const { text } = await request(testApp().app).get("/cases/new").expect(200);
    expect(text).toContain('name="/mixture/mass"');
    expect(text).not.toContain("another look");
    expect(text).not.toContain('aria-invalid="true"');
  });

  test("a field that was emptied is named, and everything else typed is still there", async () => {
    const document = demoDocument();
    const body = new URLSearchParams(filled(document, { do: "screen" }));
    body.set("/mixture/mass", "");
    body.set("/mixture/density", "0,91 kg per L");
    const answer = await request(testApp().app).post("/cases/new").send(body.toString()).expect(422);
    expect(answer.text).toContain("2 fields need another look");
    expect(answer.text).toContain('<a href="#at-mixture-mass">Mixture: mass</a>');
    expect(answer.text).toMatch(/id="at-mixture-mass"[^>]*aria-invalid="true"/);
    expect(answer.text).toContain('value="0,91 kg per L"');
    for (const [name, value] of formValues(formOf(document))) {
      if (name === "/mixture/mass" || name === "/mixture/density" || value === "") continue;
      expect(answer.text, name).toContain(escaped(value));
    }
  });

  test("broken documents are shown with their faults, none breaks a page", async () => {
    const { app, cases } = testApp();
    const sample = brokenDocuments.filter((_, index) => index % 5 === 0);
    expect(sample.length).toBeGreaterThan(40);
    for (const { name, document } of sample) {
      const { id } = await cases.create(document);
      const shown = await request(app).get(`/cases/${id}`);
      expect.soft([name, shown.status]).toEqual([name, 200]);
      expect.soft(shown.text, name).toContain("another look");
      const sent = await request(app)
        .post(`/cases/${id}`)
        .send(filled(document, { do: "screen", revision: "1" }));
      expect.soft([200, 422], `${name}: ${sent.status}`).toContain(sent.status);
    }
  });

  test("buttons add and remove parts of the form and keep what was typed", async () => {
    const { app } = testApp();
    const typed = { "/title": "Half done", "/mixture/mass": "12 firkin" };
    const added = await request(app)
      .post("/cases/new")
      .send(filled(blankCase(), { ...typed, do: "add:/failures" }));
    expect(added.status).toBe(200);
    expect(added.text).toContain('name="/failures/0/name"');
    expect(added.text).toContain('value="12 firkin"');
    const removed = await request(app)
      .post("/cases/new")
      .send(filled({ ...demoDocument(), title: "Half done" }, { do: "remove:/failures/0" }));
    expect(removed.text).toContain('value="Half done"');
    expect(removed.text).not.toContain('name="/failures/2/name"');
  });

  test("a choice changes which fields the form asks for", async () => {
    const body = new URLSearchParams(filled(demoDocument(), { do: "update" }));
    body.set("/reaction/operation", "semibatch");
    const { text } = await request(testApp().app).post("/cases/new").send(body.toString()).expect(200);
    expect(text).toContain('name="/reaction/feed/duration"');
  });

  test("the answer while typing holds the result alone", async () => {
    const { app } = testApp();
    const good = await request(app).post("/findings").send(filled(demoDocument())).expect(200);
    expect(good.text).toContain("MTSR");
    expect(good.text).not.toContain("<html");
    const quick = await request(app)
      .post("/findings?parts=quick")
      .send(filled(demoDocument("hydrolysis")));
    expect(quick.text).toContain("No stop so far");
    expect(quick.text).not.toContain("No stop was raised");
    expect(good.text).not.toMatch(wrongNumbers);
    const bad = await request(app).post("/findings").send(filled(blankCase())).expect(200);
    expect(bad.text).toContain('data-pointer="/mixture/mass"');
  });
});

describe("saving", () => {
  test("a new case gets an address of its own, a saved one a new revision", async () => {
    const { app, cases } = testApp();
    const made = await request(app)
      .post("/cases/new")
      .send(filled(demoDocument(), { do: "save" }))
      .expect(303);
    const address = String(made.headers.location);
    const shown = await request(app).get(address).expect(200);
    expect(shown.text).toContain('name="revision" value="1"');
    const id = address.replace("/cases/", "");
    expect((await cases.read(id))?.document).toEqual(demoDocument());
    const changed = new URLSearchParams(filled(demoDocument(), { do: "save", revision: "1" }));
    changed.set("/title", "Renamed");
    await request(app).post(address).send(changed.toString()).expect(303);
    expect(await cases.read(id)).toMatchObject({ revision: 2, document: { title: "Renamed" } });
  });

  test("a case with faults is saved as typed", async () => {
    const { app, cases } = testApp();
    const body = new URLSearchParams(filled(blankCase(), { do: "save", "/title": "Draft" }));
    body.set("/mixture/mass", "heavy");
    const made = await request(app).post("/cases/new").send(body.toString()).expect(303);
    const { text } = await request(app).get(String(made.headers.location)).expect(200);
    expect(text).toContain('value="heavy"');
    expect(await cases.list()).toMatchObject([{ title: "Draft" }]);
  });

  test("saving over a newer copy is refused, both are shown, and saving again replaces it", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create(demoDocument());
    await cases.save(id, 1, { document: { ...demoDocument(), title: "Theirs" } });
    const body = new URLSearchParams(filled(demoDocument(), { do: "save", revision: "1" }));
    body.set("/title", "Mine");
    const refused = await request(app).post(`/cases/${id}`).send(body.toString()).expect(409);
    expect(refused.text).toContain("<td>Mine</td><td>Theirs</td>");
    expect(refused.text).toContain('name="revision" value="2"');
    expect(await cases.read(id)).toMatchObject({ document: { title: "Theirs" } });
    body.set("revision", "2");
    await request(app).post(`/cases/${id}`).send(body.toString()).expect(303);
    expect(await cases.read(id)).toMatchObject({ revision: 3, document: { title: "Mine" } });
  });

  test("a copy is a case of its own", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create(demoDocument());
    await request(app)
      .post(`/cases/${id}`)
      .send(filled(demoDocument(), { do: "copy", revision: "1" }))
      .expect(303);
    const titles = (await cases.list()).map((entry) => entry.title);
    expect(titles.toSorted()).toEqual([String(demoDocument().title), `${demoDocument().title}, copy`]);
  });
});

describe("downloads", () => {
  const { app } = testApp();
  const ask = (what: string, document: unknown = demoDocument()) =>
    request(app)
      .post("/cases/new")
      .send(filled(document, { do: what, paper: "Letter" }));

  test("the sheet is a PDF with a name from the title", async () => {
    const answer = await ask("sheet").responseType("blob").expect(200);
    expect(answer.type).toBe("application/pdf");
    expect(answer.headers["content-disposition"]).toMatch(/^attachment; filename="?[a-z0-9-]+\.pdf"?$/);
    expect(answer.body.subarray(0, 5).toString()).toBe("%PDF-");
  });

  test("the case document is what was typed, the findings are those of the JSON interface", async () => {
    expect(JSON.parse((await ask("case").expect(200)).text)).toEqual(demoDocument());
    const findings = await ask("findings").expect(200);
    const direct = await request(app).post("/api/screen").send(demoDocument());
    expect(JSON.parse(findings.text)).toEqual(direct.body);
  });

  test("a case with faults shows them instead of a sheet", async () => {
    const answer = await ask("sheet", { ...demoDocument(), mixture: {} }).expect(422);
    expect(answer.text).toContain("another look");
  });
});

describe("requests that are wrong", () => {
  const { app } = testApp();

  test("identifiers that climb out of the folder find nothing", async () => {
    for (const id of ["..%2F..%2Fpackage", "%2e%2e%2fsecret", "..", "a%00b", "%E0%A4%A", "x".repeat(3000)]) {
      for (const path of [`/cases/${id}`, `/demos/${id}`]) {
        expect([400, 404], path).toContain((await request(app).get(path)).status);
      }
      expect([400, 404]).toContain((await request(app).post(`/cases/${id}/archive`)).status);
    }
  });

  test("a form of nonsense is answered with a page", async () => {
    for (const body of [
      "do=nothing",
      "%2F=x&%2F%2F=y",
      "%2Ftitle=a&%2Ftitle=b",
      "%2Ffailures%2F99999999%2Fname=x",
      "do=add%3A%2F__proto__%2Fx&%2F__proto__%2Fpolluted=1",
      "%2Fconstructor%2Fprototype%2Fpolluted=1&do=screen",
      "do=remove%3A",
      "revision=abc&do=save",
    ]) {
      const answer = await request(app).post("/cases/new").send(body);
      expect.soft([200, 303, 422], `${body}: ${answer.status}`).toContain(answer.status);
    }
    expect(Object.hasOwn(Object.prototype, "polluted")).toBe(false);
  });

  test("a form over 1 MB gets 413 and a form of another type is a blank one", async () => {
    const large = await request(app)
      .post("/cases/new")
      .send(`%2Ftitle=${"x".repeat(1_200_000)}`);
    expect(large.status).toBe(413);
    const other = await request(app).post("/cases/new").set("Content-Type", "text/plain").send("x");
    expect(other.status).toBe(422);
  });

  test("foreign hosts and cross-site posts are refused on pages too", async () => {
    await request(app).get("/").set("Host", "evil.example").expect(421);
    await request(app).post("/cases/new").set("Origin", "http://evil.example").send("do=save").expect(403);
  });
});

test("the log names what was asked, and nothing that was typed", async () => {
  const { app, logged } = testApp();
  await request(app)
    .post("/cases/new")
    .send(filled({ ...demoDocument(), title: "Secret route 77" }, { do: "save" }));
  expect(logged.join("")).toContain('"status":303');
  expect(logged.join("")).not.toMatch(/Secret|route 77|ester/);
});

test("an answer of the program's own defect is a page, logged, without its workings", async () => {
  const { app, logged } = testApp({
    list: () => Promise.reject(new Error("the disk is gone at /secret/place")),
    read: async () => null,
    create: () => Promise.reject(new Error("no")),
    save: async () => null,
  });
  const answer = await request(app).get("/");
  expect(answer.status).toBe(500);
  expect(answer.text).toContain("defect of the program");
  expect(answer.text).not.toContain("/secret/place");
  // Messages of errors may quote what was typed; where it happened cannot.
  expect(logged.join("")).not.toContain("the disk is gone");
  expect(logged.join("")).toMatch(/"err":\{"type":"Error","at":\["[^"]*pages\.test\.ts/);
});
