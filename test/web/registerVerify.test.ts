import request from "supertest";
import { beforeAll, describe, expect, test } from "vitest";
import { canonicalJson } from "../../server/case/canonical.js";
import { formOf, formValues } from "../../server/case/form.js";
import { caseStore } from "../../server/files/cases.js";
import { register } from "../../server/files/register.js";
import { places } from "../../server/files/registerEntry.js";
import { notice } from "../../server/screening/notice.js";
import { directScreener } from "../../server/web/screener.js";
import { memoryStorage } from "../files/memoryStorage.js";
import { ticking } from "../files/registerSheets.js";
import { demoDocument, testApp } from "./testApp.js";

function text(html: string): string {
  return html
    .replace(/<[^>]*>/g, " ")
    .replace(/&#34;/g, '"')
    .replace(/\s+/g, " ");
}

/** Two demo cases filed as No. 1 and No. 2, and a third one as No. 3. */
async function threeFiled() {
  const storage = memoryStorage();
  const made = testApp(caseStore(memoryStorage()), directScreener(), register(storage, ticking()));
  for (const name of ["ring-closure", "hydrolysis", "published-oncb"]) {
    const body = new URLSearchParams([...formValues(formOf(demoDocument(name)))]).toString();
    await request(made.app).post("/cases/new/file").send(body).expect(303);
  }
  const get = async (path: string): Promise<Buffer> =>
    (await request(made.app).get(path).responseType("blob").expect(200)).body;
  const upload = (file: Buffer, name = "sheet.pdf") =>
    request(made.app).post("/verify").attach("file", file, name);
  return {
    ...made,
    storage,
    upload,
    pdf: await get("/register/2/sheet.pdf"),
    record: await get("/register/2/record.json"),
  };
}

let filed: Awaited<ReturnType<typeof threeFiled>>;

beforeAll(async () => {
  filed = await threeFiled();
});

describe("the page that verifies", () => {
  test("asks for a file, with the notice", async () => {
    const { text: html } = await request(filed.app).get("/verify").expect(200);
    expect(html).toContain(notice);
    expect(html).toContain('type="file"');
  });

  test("bears out a filed PDF: inputs, findings, pages, register and chain", async () => {
    const words = text((await filed.upload(filed.pdf).expect(200)).text);
    expect(words).toContain(
      "Verified: the sheet follows from its own inputs and stands in this register. That does not make the step safe.",
    );
    expect(words).toContain("Pages yes Every page is printed exactly");
    expect(words).toContain("Register yes In this register as No. 2, revision 1");
    expect(words).toContain("Chain yes The register is whole from its first entry to entry 2.");
  });

  test("bears out its record, and the sheet by its number", async () => {
    expect(text((await filed.upload(filed.record, "r.json")).text)).toContain("Verified: the sheet follows");
    const own = await request(filed.app).post("/register/2/verify").expect(200);
    expect(text(own.text)).toContain("and stands in this register");
    expect(own.text).toContain('href="/register/2"');
  });

  test("refuses one changed byte of the PDF, wherever it is", async () => {
    for (const at of [400, Math.floor(filed.pdf.length / 2), filed.pdf.length - 600]) {
      const changed = Buffer.from(filed.pdf.map((byte, index) => (index === at ? byte ^ 1 : byte)));
      const words = text((await filed.upload(changed)).text);
      expect(words, `byte ${at}`).toContain("NOT verified: do not rely on this sheet.");
    }
  });

  test("refuses a record whose place in the register was changed", async () => {
    const record = JSON.parse(filed.record.toString());
    const moved = canonicalJson({ ...record, filing: { ...record.filing, number: 7 } });
    const words = text((await filed.upload(Buffer.from(moved), "r.json")).text);
    expect(words).toContain("NOT verified");
    expect(words).toContain("filed as No. 7, revision 1. This register holds no sheet of that number");
    const renamed = canonicalJson({ ...record, filing: { ...record.filing, revision: 2 } });
    expect(text((await filed.upload(Buffer.from(renamed), "r.json")).text)).toContain(
      "in this register is another file",
    );
  });

  test("says of a sheet that was only printed that it is not in the register", async () => {
    const printed = await request(filed.app)
      .post("/api/sheet")
      .responseType("blob")
      .send(demoDocument("hydrolysis"));
    const words = text((await filed.upload(printed.body)).text);
    expect(words).toContain(
      "Verified: the sheet follows from its own inputs, but it is not in this register.",
    );
    expect(words).toContain("printed without being filed");
  });

  test("says what superseded a sheet", async () => {
    const { app, upload, pdf } = await threeFiled();
    const body = new URLSearchParams([...formValues(formOf(demoDocument("hydrolysis")))]);
    body.set("supersedes", "2");
    await request(app).post("/cases/new/file").send(body.toString()).expect(303);
    expect(text((await upload(pdf)).text)).toContain("and is in this register, superseded by No. 4.");
  });

  test("refuses a sheet whose register was changed up to it", async () => {
    const { storage, upload, pdf, app } = await threeFiled();
    const entry = (await storage.read(places.entry(1))) ?? "";
    await storage.write(places.entry(1), entry.replace('"vessel":"V-204"', '"vessel":"V-205"'));
    const words = text((await upload(pdf)).text);
    expect(words).toContain("NOT verified");
    expect(words).toContain("Chain NO Entry 1 was changed: its digest is not the one that entry 2 carries.");
    const whole = text((await request(app).post("/register/check")).text);
    expect(whole).toContain("The register is NOT whole.");
    expect(whole).toContain("Entry 1 was changed");
  });

  test("tells of a filed sheet whose own file is gone", async () => {
    const { storage, app, sheets } = await threeFiled();
    await storage.remove(places.pdf((await sheets.fresh()).sheet(2)?.sheet ?? { files: "" }));
    const words = text((await request(app).post("/register/2/verify").expect(200)).text);
    expect(words).toContain("NOT verified");
    expect(words).toContain("The PDF of sheet 2 is missing: it was removed.");
  });

  test("checks the whole register, an empty one too", async () => {
    const words = text((await request(filed.app).post("/register/check").expect(200)).text);
    expect(words).toContain("The register is whole. ");
    expect(words).toContain(
      "All 3 entries follow from each other, and every sheet is the one that was filed.",
    );
    const empty = text((await request(testApp().app).post("/register/check").expect(200)).text);
    expect(empty).toContain("The register is empty.");
  });
});

describe("files that are no sheets", () => {
  test.each([
    ["text", Buffer.from("hello")],
    ["an empty PDF", Buffer.from("%PDF-1.7\n%%EOF\n")],
    ["JSON of another kind", Buffer.from("{}")],
    ["JSON of a later format", Buffer.from('{"format":"thermal-window/record-9"}')],
    ["markup", Buffer.from("{<script>alert(1)</script>")],
    ["zeros", Buffer.alloc(100_000)],
  ])("get a clear sentence: %s", async (_name, file) => {
    const answer = await filed.upload(file);
    expect(answer.status).toBe(200);
    const words = text(answer.text);
    expect(words).toContain("NOT verified");
    expect(words).toContain("Record NO");
    expect(answer.text).not.toContain("<script>alert");
  });

  test("none at all, and a broken form, are asked for again", async () => {
    const none = await request(filed.app).post("/verify").field("other", "x");
    expect([none.status, text(none.text).includes("Choose a sheet")]).toEqual([400, true]);
    const broken = await request(filed.app)
      .post("/verify")
      .set("Content-Type", "multipart/form-data; boundary=none")
      .send("no boundary here");
    expect(broken.status).toBe(400);
    expect((await request(filed.app).post("/verify").send("x=1")).status).toBe(400);
  });

  test("longer than any sheet are not read, and do not stay in memory", async () => {
    const large = Buffer.alloc(200_000_000, 32);
    const before = process.memoryUsage().rss;
    const answer = await filed.upload(large);
    expect(answer.status).toBe(413);
    expect(text(answer.text)).toContain("longer than anything that is read here");
    expect(process.memoryUsage().rss - before).toBeLessThan(500_000_000);
  });
});
