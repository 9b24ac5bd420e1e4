import request from "supertest";
import { describe, expect, test } from "vitest";
import { filled } from "./filled.js";
import { demoDocument, demos, testApp } from "./testApp.js";

describe("the first page", () => {
  test("explains itself and offers every demo case, a blank one and a file", async () => {
    const { text } = await request(testApp().app).get("/").expect(200);
    for (const demo of demos) expect(text).toContain(`href="/demos/${demo.name}"`);
    expect(text).toContain('href="/cases/new"');
    expect(text).toContain('type="file"');
    expect(text).toContain("None saved yet");
  });

  test("lists saved cases, archives and restores them", async () => {
    const { app, cases } = testApp();
    const { id } = await cases.create({ title: "Kept <for> later" });
    expect((await request(app).get("/")).text).toContain("Kept &lt;for&gt; later");
    await request(app).post(`/cases/${id}/archive`).expect(303);
    expect((await request(app).get("/")).text).toContain("Archived (1)");
    expect(await cases.read(id)).toMatchObject({ archived: true });
    await request(app).post(`/cases/${id}/restore`).expect(303);
    expect(await cases.read(id)).toMatchObject({ archived: false });
  });
});

test("a saved case is renamed by its title, and the first page lists it under the new one", async () => {
  const { app, cases } = testApp();
  const document = demoDocument();
  const { id, revision } = await cases.create({ ...document, title: "Under the old name" });
  const renamed = { ...document, title: "Under the new name" };
  const body = filled(renamed, { do: "save", revision: String(revision) });
  await request(app).post(`/cases/${id}`).send(body).expect(303);
  const { text } = await request(app).get("/");
  expect(text).toContain(`<a href="/cases/${id}">Under the new name</a>`);
  expect(text).not.toContain("Under the old name");
});

describe("opening a case file", () => {
  const { app } = testApp();

  test("a chosen file and pasted text both lead to the page of that case", async () => {
    const text = JSON.stringify(demoDocument());
    const chosen = await request(app).post("/open").attach("file", Buffer.from(text), "case.json");
    expect(chosen.status).toBe(200);
    expect(chosen.text).toContain("Not saved yet");
    const pasted = await request(app)
      .post("/open")
      .field("text", text)
      .attach("file", Buffer.alloc(0), { filename: "", contentType: "application/octet-stream" });
    expect(pasted.status).toBe(200);
    expect(pasted.text).toContain("MTSR");
  });

  test.each([
    ["pasted", () => request(app).post("/open").field("text", "{ <half> a case")],
    [
      "in a file",
      () => request(app).post("/open").attach("file", Buffer.from("{ <half> a case"), "case.json"),
    ],
  ])("text that is no JSON comes back with its fault, %s", async (_, send) => {
    const answer = await send();
    expect(answer.status).toBe(400);
    expect(answer.text).toContain("{ &lt;half&gt; a case");
    expect(answer.text).toContain("could not be opened");
  });

  test("a file that is no text is refused without being shown", async () => {
    const picture = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0, 0, 13]);
    const answer = await request(app).post("/open").attach("file", picture, "case.json");
    expect(answer.status).toBe(400);
    expect(answer.text).toContain("could not be opened");
    expect(answer.text).toMatch(/<textarea[^>]*><\/textarea>/);
  });

  test("nothing chosen, a broken form and a form too large are named", async () => {
    expect((await request(app).post("/open").field("text", " ")).status).toBe(400);
    const broken = await request(app)
      .post("/open")
      .set("Content-Type", "multipart/form-data; boundary=none")
      .send("no boundary here");
    expect(broken.status).toBe(400);
    const large = await request(app).post("/open").attach("file", Buffer.alloc(3_000_000, 32), "case.json");
    expect(large.status).toBe(413);
  });
});
