import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { describe, expect, test } from "vitest";
import { recordBytes, recordName } from "../../server/records/attach.js";
import { checksLine } from "../../server/screening/checks/all.js";
import { notice, noticeFirstSentence } from "../../server/screening/notice.js";
import { renderSheet } from "../../server/sheet/render.js";
import { built } from "../build.js";
import {
  inventedDocument,
  inventedFindings,
  inventedModel,
  inventedStop,
  stoppedFindings,
} from "./invented.js";
import { missingGlyphs, openPdf, pageTexts } from "./readPdf.js";

const input = {
  document: inventedDocument,
  model: inventedModel,
  findings: inventedFindings,
  paper: "A4",
} as const;
const sheet = renderSheet(input);
const stopped = renderSheet({ ...input, findings: stoppedFindings, paper: "Letter" });
const sheets = [
  ["A4", sheet],
  ["Letter with a stop", stopped],
] as const;

describe("the sheet's first page", () => {
  test("carries the whole notice, the batch record, the four temperatures and the time to act", async () => {
    const [first = ""] = await pageTexts(await sheet);
    for (const text of [
      notice,
      "INVENTED-0001",
      "Step 3, acylation",
      "V-000",
      "as typed, not verified",
      "MTSR 48.2 °C",
      "MTT 78.0 °C",
      "T_D24 100.8 °C",
      "Criticality class 1",
      "from 30.4 °C (cooling suffices) to 74.8 °C (MTSR below MTT)",
      "Least time to act: 79.1 min",
      "FEED_RUNS_ON",
    ]) {
      expect(first).toContain(text);
    }
  });

  test("says STOP with its reason where a stop stands, and only there", async () => {
    const [first = ""] = await pageTexts(await stopped);
    expect(first).toContain("STOP");
    expect(first).toContain(inventedStop.text);
    expect((await pageTexts(await sheet)).join(" ")).not.toContain("STOP");
  });
});

describe.each(sheets)("every page of the sheet, %s,", (_name, rendered) => {
  test("has the notice's first sentence, the program, the digest and its number at its foot", async () => {
    const texts = await pageTexts(await rendered);
    expect(texts.length).toBeGreaterThan(3);
    texts.forEach((text, index) => {
      expect(text).toContain(noticeFirstSentence);
      expect(text).toContain("thermal-window 0.0.0 · case 0123456789ab");
      expect(text).toContain(`page ${index + 1} of ${texts.length}`);
      expect(text).toContain("Batch record: INVENTED-0001");
    });
  });

  test("is drawn with glyphs that its fonts have", async () => {
    const { glyphs, missing } = await missingGlyphs(await rendered);
    expect(glyphs).toBeGreaterThan(3000);
    expect(missing).toBe(0);
  });
});

test("inputs, findings, working, cautions and review follow one another, with bookmarks", async () => {
  const pdf = await openPdf(await sheet);
  const outline = await pdf.getOutline();
  expect(outline.map((item) => item.title)).toEqual([
    "Summary",
    "Inputs as typed",
    "Findings",
    "Figures",
    "Working",
    "Cautions in words",
    "Preparation and review",
  ]);
  await pdf.destroy();
  const text = (await pageTexts(await sheet)).join(" ");
  expect(text.indexOf("Assumed inputs (1)")).toBeLessThan(text.indexOf("Notebook 14, p. 31"));
  expect(text).toContain("0.05 kJ/(kg K)");
  expect(text).toContain(inventedFindings.digest);
});

test("the sheet is tagged: a screen reader finds headings, tables with headings, and words for each figure", async () => {
  const pdf = await openPdf(await sheet);
  expect((await pdf.getMarkInfo())?.Marked).toBe(true);
  const roles = new Set<string>();
  const alternatives: string[] = [];
  const walk = (node: unknown): void => {
    if (typeof node !== "object" || node === null) return;
    if ("role" in node && typeof node.role === "string") roles.add(node.role);
    if ("alt" in node && typeof node.alt === "string") alternatives.push(node.alt);
    if ("children" in node && Array.isArray(node.children)) node.children.forEach(walk);
  };
  for (let page = 1; page <= pdf.numPages; page++) walk(await (await pdf.getPage(page)).getStructTree());
  await pdf.destroy();
  expect([...roles]).toEqual(
    expect.arrayContaining(["Document", "H1", "H2", "H3", "P", "Table", "TR", "TH", "TD", "Figure"]),
  );
  expect(alternatives.some((text) => text.includes("MTSR 48.2 °C"))).toBe(true);
});

test("title and language are set, and no clock has left a date", async () => {
  const pdf = await openPdf(await sheet);
  const { info } = await pdf.getMetadata();
  expect(info).toMatchObject({ Title: `INVENTED-0001: ${inventedDocument.title}`, Language: "en-GB" });
  expect(info).not.toHaveProperty("CreationDate");
  expect((await sheet).toString("latin1")).not.toMatch(/\(D:\d|CreateDate|ModDate/);
  await pdf.destroy();
});

test("a title with markup is text in the metadata too", async () => {
  const title = `<b>A & B</b> ]]> "quoted" é \u0007`;
  const pdf = await openPdf(await renderSheet({ ...input, document: { ...inventedDocument, title } }));
  const { info, metadata } = await pdf.getMetadata();
  expect(info).toMatchObject({ Title: `INVENTED-0001: ${title}` });
  expect(metadata?.get("dc:title")).toBe(`INVENTED-0001: ${title.replace("\u0007", "\ufffd")}`);
  await pdf.destroy();
});

test("the record travels inside, whole and canonical", async () => {
  const pdf = await openPdf(await sheet);
  const attachments: Record<string, { content: Uint8Array }> = await pdf.getAttachments();
  expect(Object.keys(attachments)).toEqual([recordName]);
  expect(Buffer.from(attachments[recordName]?.content ?? [])).toEqual(
    recordBytes(inventedDocument, inventedFindings),
  );
  await pdf.destroy();
});

test.each(sheets)(
  "the last page of the sheet, %s, says in one line what the checks of this build came to",
  async (_name, rendered) => {
    const pages = await pageTexts(await rendered);
    const { length } = pages;
    expect(pages.map((page) => page.replace(/\s+/g, " ").includes(checksLine()))).toEqual(
      pages.map((_, at) => at === length - 1),
    );
  },
);

describe("the same inputs give the same bytes", () => {
  test("when rendered twice", async () => {
    expect((await renderSheet(input)).equals(await sheet)).toBe(true);
  });

  test("in another process", async () => {
    const program = `
      const { renderSheet } = await import(process.argv[1]);
      const { createHash } = await import("node:crypto");
      let text = "";
      for await (const chunk of process.stdin) text += chunk;
      process.stdout.write(createHash("sha256").update(await renderSheet(JSON.parse(text))).digest("hex"));`;
    const run = spawnSync(
      process.execPath,
      ["--input-type=module", "-e", program, built("server/sheet/render.ts")],
      { input: JSON.stringify(input), encoding: "utf8" },
    );
    expect(run.stderr).toBe("");
    expect(run.stdout).toBe(
      createHash("sha256")
        .update(await sheet)
        .digest("hex"),
    );
  });

  test("and another digit gives others", async () => {
    const other = { ...inventedFindings, temperatures: { ...inventedFindings.temperatures, mtsr_K: 321.5 } };
    expect((await renderSheet({ ...input, findings: other })).equals(await sheet)).toBe(false);
  });
});

test("anything that can be typed can be printed", async () => {
  const strange = {
    ...inventedDocument,
    title: `<b>&amp; "quoted" \u202e ${"very ".repeat(300)}long 中文 \u0000 👩‍🔬 ${"x".repeat(2000)}`,
    batch: { record: "]]>&<", step: "", vessel: "ä".repeat(400), preparedBy: "العربية" },
  };
  const { mixture } = inventedDocument;
  const talkative = {
    ...strange,
    mixture: { ...mixture, mass: { value: "1450 kg", source: "y ".repeat(60_000) } },
  };
  const texts = await pageTexts(await renderSheet({ ...input, document: talkative }));
  expect(texts.length).toBeGreaterThan(20);
  expect(texts[0]).toContain("[U+202E]");
  const failures = (inventedFindings.failures ?? []).map((failure) => ({
    ...failure,
    name: `泵停 \u202e ${failure.name}`,
  }));
  const findings = { ...inventedFindings, failures };
  const { missing } = await missingGlyphs(await renderSheet({ ...input, document: strange, findings }));
  expect(missing).toBe(0);
});
