import request from "supertest";
import { describe, expect, test } from "vitest";
import { caseStore } from "../../server/files/cases.js";
import { register } from "../../server/files/register.js";
import { places } from "../../server/files/registerEntry.js";
import type { Storage } from "../../server/files/storage.js";
import { notice } from "../../server/screening/notice.js";
import { directScreener, type Screener } from "../../server/web/screener.js";
import { memoryStorage } from "../files/memoryStorage.js";
import { plainSheet, ticking } from "../files/registerSheets.js";
import { filled } from "./filled.js";
import { demoDocument, testApp } from "./testApp.js";

/** The demo case that is screened the quickest: the register is what is tried here. */
const someCase = () => demoDocument("hydrolysis");

function appOver(storage: Storage, screener: Screener = directScreener()) {
  return testApp(caseStore(memoryStorage()), screener, register(storage, ticking()));
}

/** An application whose register holds so many sheets of no substance. */
async function appWith(count: number) {
  const storage = memoryStorage();
  const made = appOver(storage);
  for (let sheet = 1; sheet <= count; sheet += 1) {
    await made.sheets.file(
      plainSheet({
        record: `B-${sheet}`,
        vessel: sheet % 2 === 0 ? "V-even" : "V-odd",
        stop: sheet % 3 === 0,
        class: sheet % 3 === 0 ? 5 : null,
      }),
    );
  }
  return { ...made, storage };
}

function text(html: string): string {
  return html
    .replace(/<[^>]*>/g, " ")
    .replace(/&#34;/g, '"')
    .replace(/&amp;/g, "&")
    .replace(/\s+/g, " ");
}

const review = {
  reviewer: "B. Reviewer, chartered",
  reviewedOn: "2026-02-03",
  conclusion: "objection",
  remark: "Cooling was never measured.",
};

describe("filing from the page of a case", () => {
  test("the button stands on the page, and files what is typed as the next number", async () => {
    const { app, sheets } = appOver(memoryStorage());
    const page = await request(app).get("/cases/new");
    expect(page.text).toContain('formaction="/cases/new/file"');
    const body = new URLSearchParams(filled(someCase(), { paper: "Letter" }));
    body.set("/title", "As typed, never saved");
    const answer = await request(app).post("/cases/new/file").send(body.toString());
    expect([answer.status, answer.headers.location]).toEqual([303, "/register/1"]);
    const filed = (await sheets.fresh()).sheet(1)?.sheet;
    expect(filed).toMatchObject({ title: "As typed, never saved", record: "DEMO-0200", revision: 1 });

    const pdf = await request(app).get("/register/1/sheet.pdf").responseType("blob");
    expect([pdf.type, pdf.headers["content-disposition"]]).toEqual([
      "application/pdf",
      'inline; filename="sheet-1.pdf"',
    ]);
    expect(pdf.body.includes("/MediaBox [0 0 612 792]")).toBe(true);
    const record = await request(app).get("/register/1/record.json");
    expect(record.headers["content-disposition"]).toContain("sheet-1.json");
    expect(record.body.filing).toMatchObject({ number: 1, revision: 1, supersedes: null });
    expect(record.body.findings.uncertainty).not.toBeNull();
  });

  test("a saved case files what is typed, not what was saved", async () => {
    const { app, cases, sheets } = appOver(memoryStorage());
    const { id } = await cases.create(someCase());
    const body = new URLSearchParams(filled(someCase(), { revision: "1" }));
    body.set("/title", "Typed since");
    await request(app).post(`/cases/${id}/file`).send(body.toString()).expect(303);
    expect((await sheets.fresh()).sheet(1)?.sheet.title).toBe("Typed since");
    await request(app).post("/cases/abcdefghjkmn/file").send(body.toString()).expect(404);
  });

  test("a second sheet of one batch record and step is asked about, then supersedes the first", async () => {
    const { app, sheets } = appOver(memoryStorage());
    const file = (extra = {}) => request(app).post("/cases/new/file").send(filled(someCase(), extra));
    await file().expect(303);
    const asked = await file().expect(409);
    expect(text(asked.text)).toContain(
      "stands No. 1, revision 1, filed at 2026-01-01 00:00 UTC. It is of this very case.",
    );
    expect(asked.text).toContain(
      'name="supersedes" value="1">File it as revision 2, which supersedes No. 1<',
    );
    expect(asked.text).toContain(`value="${someCase().title}"`);
    expect((await sheets.fresh()).last()).toBe(1);
    expect((await file({ supersedes: "1" })).headers.location).toBe("/register/2");
    const first = await request(app).get("/register/1");
    expect(text(first.text)).toContain("Superseded by No. 2 : this sheet no longer stands.");
    await file({ supersedes: "1" }).expect(409);
    await file({ supersedes: "nonsense" }).expect(409);
  });

  test("a case with faults, or without a batch record, is not filed and nothing typed is lost", async () => {
    const { app, sheets } = appOver(memoryStorage());
    const body = new URLSearchParams(filled(someCase()));
    body.set("/mixture/mass", "12 firkin");
    const faulty = await request(app).post("/cases/new/file").send(body.toString()).expect(422);
    expect(faulty.text).toContain('value="12 firkin"');
    expect(faulty.text).toContain("another look");
    const { batch: _, ...nameless } = someCase();
    const asked = await request(app)
      .post("/cases/new/file")
      .send(filled({ ...nameless, title: "Nameless" }))
      .expect(422);
    expect(text(asked.text)).toContain("Not filed: the batch record is not given");
    const target = /href="#(at-batch-record)"/.exec(asked.text)?.[1];
    expect(asked.text).toContain(`id="${target}"`);
    expect(asked.text).toContain('value="Nameless"');
    expect((await sheets.fresh()).last()).toBe(0);
  });

  test.each([
    ["ENOSPC", 507, "The disk of the server is full."],
    ["EROFS", 500, "The disk of the server refuses to be written."],
  ])(
    "a disk that answers %s gives a clear page with the form kept, and files nothing",
    async (code, status, sentence) => {
      const storage = memoryStorage();
      const refuse = () => Promise.reject(Object.assign(new Error(`${code} at /secret/place`), { code }));
      const { app, logged } = appOver({ ...storage, write: refuse });
      const answer = await request(app).post("/cases/new/file").send(filled(someCase())).expect(status);
      expect(text(answer.text)).toContain(sentence);
      expect(answer.text).toContain(`value="${someCase().title}"`);
      expect(answer.text).toContain('value="800 kg"');
      expect(answer.text).not.toContain("/secret/place");
      expect(logged.join("")).toContain(code);
      expect(await storage.list(places.entries)).toEqual([]);
      expect(await storage.list(places.sheets)).toEqual([]);
    },
  );
});

describe("the list", () => {
  test("shows sheets newest first, a hundred on a page, with the notice", async () => {
    const { app } = await appWith(130);
    const first = await request(app).get("/register").expect(200);
    expect(first.text).toContain(notice);
    expect(text(first.text)).toContain("130 sheets");
    expect([...first.text.matchAll(/href="\/register\/(\d+)"/g)].map((link) => Number(link[1]))).toEqual(
      Array.from({ length: 100 }, (_, index) => 130 - index),
    );
    expect(first.text).toContain('rel="next" href="/register?page=2"');
    const second = await request(app).get("/register?page=2");
    expect([...second.text.matchAll(/href="\/register\/(\d+)"/g)]).toHaveLength(30);
    for (const page of ["0", "-1", "99999", "x", "1e3"]) {
      expect((await request(app).get(`/register?page=${page}`)).status).toBe(200);
    }
  });

  test("is empty at first, and says how that changes", async () => {
    const { text: html } = await request(testApp().app).get("/register").expect(200);
    expect(text(html)).toContain("None filed yet.");
  });

  test.each([
    ["record=b-7", [7]],
    ["record=B-1", [12, 11, 10, 1]],
    ["vessel=EVEN&stop=yes", [12, 6]],
    ["class=5", [12, 9, 6, 3]],
    ["class=not+assessed&stop=no&vessel=odd", [11, 7, 5, 1]],
    ["title=coupling+in&record=b-2", [2]],
    ["from=2026-01-02", []],
    ["from=2026-01-01&to=2026-01-01&record=B-3", [3]],
    ["to=2025-12-31", []],
  ])("is searched by %s", async (query, numbers) => {
    const { app } = await appWith(12);
    const { text: html } = await request(app).get(`/register?${query}`).expect(200);
    expect(
      [...html.matchAll(/<th scope="row"><a href="\/register\/(\d+)"/g)].map((link) => Number(link[1])),
    ).toEqual(numbers);
    expect(text(html)).toContain(`${numbers.length} of 12 sheets`);
  });

  test("leaves out what was superseded where that is asked for", async () => {
    const { app, sheets } = await appWith(2);
    await sheets.file(plainSheet({ record: "B-1" }, 1));
    const { text: html } = await request(app).get("/register?standing=yes");
    expect([...html.matchAll(/<th scope="row"><a href="\/register\/(\d+)"/g)].map((link) => link[1])).toEqual(
      ["3", "2"],
    );
  });

  test("names what it cannot read in a search, and keeps it", async () => {
    const { app } = await appWith(2);
    const answer = await request(app).get(
      "/register?from=7+March&class=9&stop=maybe&title=%3Cb%3E&record=a&record=b",
    );
    expect(answer.status).toBe(400);
    expect(answer.text).toContain('value="7 March"');
    expect(answer.text).toContain('value="&lt;b&gt;"');
    expect([...answer.text.matchAll(/class="fault"/g)]).toHaveLength(3);
    expect((await request(app).get("/register.csv?from=x")).status).toBe(400);
  });

  test("names missing, unreadable and void numbers", async () => {
    const { storage } = await appWith(5);
    await storage.remove(places.entry(2));
    await storage.write(places.entry(3), "{}");
    await storage.write(places.entry(5), "{ half");
    const again = appOver(storage);
    await again.sheets.start();
    const words = text((await request(again.app).get("/register")).text);
    expect(words).toContain("Entry 2 is missing.");
    expect(words).toContain("Entry 3 cannot be read");
    expect(words).toContain("No. 5 is void");
  });
});

describe("CSV", () => {
  test("holds one line for each sheet that was searched for, below the names", async () => {
    const { app, sheets } = await appWith(6);
    await sheets.review(6, { ...review, conclusion: "objection", remark: 'said "no",\nand meant it' });
    const answer = await request(app).get("/register.csv?stop=yes").expect(200);
    expect(answer.headers["content-type"]).toBe("text/csv; charset=utf-8");
    expect(answer.headers["content-disposition"]).toContain("register.csv");
    const lines = answer.text.replace(/^\ufeff/, "").split("\r\n");
    expect(lines[0]).toMatch(/^number,filed at,batch record,step,revision,supersedes,/);
    expect(lines[1]).toMatch(/^6,2026-01-01T00:05:00\.000Z,B-6,"Step 2, coupling",1,,,/);
    expect(lines[1]).toContain('"said ""no"",\nand meant it"');
    expect(lines[2]).toMatch(/^3,.*,5,STOP,Unreviewed,/);
    expect(lines).toHaveLength(4);
  });

  test("lets no spreadsheet take what was typed for a formula", async () => {
    const { app, sheets } = await appWith(0);
    for (const title of ["=1+1", "+1", "-1", "@A1"]) await sheets.file(plainSheet({ title, record: title }));
    const { text: csv } = await request(app).get("/register.csv");
    for (const title of ["=1+1", "+1", "-1", "@A1"]) expect(csv).toContain(`,'${title},`);
  });
});

describe("the page of a sheet", () => {
  test("shows what was filed, STOP first, and every digest", async () => {
    const { app, sheets } = await appWith(3);
    const filed = (await sheets.fresh()).sheet(3)?.sheet;
    const { text: html } = await request(app).get("/register/3").expect(200);
    expect(html).toContain(notice);
    const words = text(html);
    expect(words).toContain("STOP The result must not be used as it is.");
    expect(words).toContain("This sheet stands: no later one supersedes it. Unreviewed.");
    for (const digest of [...Object.values(filed?.digests ?? {}), filed?.previous])
      expect(html).toContain(digest);
  });

  test("takes a review, which others are added to", async () => {
    const { app, sheets } = await appWith(1);
    const enter = (fields: object) => request(app).post("/register/1/reviews").type("form").send(fields);
    expect((await enter(review)).headers.location).toBe("/register/1#reviews");
    await enter({ ...review, conclusion: "no objection", remark: "" }).expect(303);
    const words = text((await request(app).get("/register/1")).text);
    expect(words).toContain("Reviewed, opinions differ.");
    expect(words).toContain(
      "Objection , B. Reviewer, chartered, reviewed on 2026-02-03 (entry 2, entered 2026-01-01 00:01 UTC) Cooling was never measured.",
    );
    expect((await sheets.fresh()).sheet(1)?.reviews).toHaveLength(2);
  });

  test.each([
    [{ ...review, reviewer: " " }, "Who reviewed the sheet?"],
    [{ ...review, reviewedOn: "2026-02-30" }, "The day of the review"],
    [{ ...review, conclusion: "" }, "What did the review come to?"],
    [{ ...review, remark: "" }, "What is the objection?"],
    [{ ...review, reviewer: "x".repeat(301) }, "At most 300 characters"],
    [{}, "Who reviewed the sheet?"],
  ])("refuses a review with a fault, and keeps what was typed: %#", async (fields, sentence) => {
    const { app, sheets } = await appWith(1);
    const answer = await request(app).post("/register/1/reviews").type("form").send(fields);
    expect(answer.status).toBe(422);
    expect(text(answer.text)).toContain(sentence);
    for (const value of Object.values(fields).filter((each) => each.trim() !== ""))
      expect(answer.text).toContain(value);
    expect((await sheets.fresh()).last()).toBe(1);
  });

  test("keeps a review in its form where the disk refuses it", async () => {
    const { storage } = await appWith(1);
    const full = () => Promise.reject(Object.assign(new Error("full"), { code: "ENOSPC" }));
    const { app } = appOver({ ...storage, create: full });
    const answer = await request(app).post("/register/1/reviews").type("form").send(review);
    expect(answer.status).toBe(507);
    expect(text(answer.text)).toContain("The disk of the server is full. The review was not entered.");
    expect(answer.text).toContain('value="B. Reviewer, chartered"');
    expect(answer.text).toContain("Cooling was never measured.</textarea>");
  });

  test("opens its case for a new revision", async () => {
    const { app } = appOver(memoryStorage());
    await request(app).post("/cases/new/file").send(filled(someCase())).expect(303);
    const { text: html } = await request(app).get("/register/1/case").expect(200);
    expect(html).toContain(`value="${someCase().title}"`);
    expect(html).toContain('formaction="/cases/new/file"');
  });

  test("hands out no file that is not the one that was filed", async () => {
    const { app, storage, sheets } = await appWith(1);
    const filed = (await sheets.fresh()).sheet(1)?.sheet ?? { files: "" };
    await storage.write(places.pdf(filed), "%PDF of another kind");
    await storage.remove(places.record(filed));
    for (const path of ["sheet.pdf", "record.json", "case"]) {
      const answer = await request(app).get(`/register/1/${path}`);
      expect([path, answer.status]).toEqual([path, 500]);
      expect(text(answer.text)).toContain("was changed since it was filed");
    }
  });

  test("is not there for other numbers, nor for what is no number", async () => {
    const { app } = await appWith(2);
    await request(app).post("/register/1/reviews").type("form").send(review).expect(303);
    for (const number of ["3", "99", "0", "01", "1e0", "-1", "..%2f..", "%00", "x".repeat(3000)]) {
      for (const path of ["", "/sheet.pdf", "/record.json", "/case"]) {
        expect([400, 404], `${number}${path}`).toContain(
          (await request(app).get(`/register/${number}${path}`)).status,
        );
      }
      expect([400, 404]).toContain(
        (await request(app).post(`/register/${number}/reviews`).type("form").send(review)).status,
      );
      expect([400, 404]).toContain((await request(app).post(`/register/${number}/verify`)).status);
    }
  });
});

test("markup in what was typed is text on every page of the register", async () => {
  const markup = `"><script>alert(1)</script><b onmouseover='x'>`;
  const { app, sheets } = await appWith(0);
  await sheets.file(plainSheet({ record: markup, step: markup, title: markup, vessel: markup }));
  await request(app)
    .post("/register/1/reviews")
    .type("form")
    .send({ ...review, reviewer: markup, remark: markup });
  const bad = { ...review, reviewer: markup, reviewedOn: markup, conclusion: markup, remark: markup };
  for (const { text: html } of [
    await request(app).get("/register"),
    await request(app).get("/register/1"),
    await request(app).get("/register").query({ record: markup, from: markup, class: markup, stop: markup }),
    await request(app).post("/register/1/reviews").type("form").send(bad),
    await request(app)
      .post("/cases/new/file")
      .send(filled({ ...someCase(), title: markup, batch: { record: markup, step: markup } })),
    await request(app).post("/register/1/verify"),
  ]) {
    expect(html).not.toContain("<script>alert");
    expect(html).not.toContain("<b on");
  }
});

test("nothing that is filed can be changed or removed over the network", async () => {
  const { app } = await appWith(1);
  for (const path of ["/register", "/register/1", "/register/1/sheet.pdf", "/register/1/record.json"]) {
    for (const method of ["put", "patch", "delete"] as const) {
      expect([403, 404, 405]).toContain((await request(app)[method](path)).status);
    }
  }
  await request(app)
    .post("/register/1/reviews")
    .set("Origin", "http://evil.example")
    .type("form")
    .send(review)
    .expect(403);
});
