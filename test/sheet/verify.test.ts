import { deflateSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { canonicalJson } from "../../server/case/canonical.js";
import { readCase } from "../../server/case/read.js";
import { recordBytes } from "../../server/records/attach.js";
import { screen } from "../../server/screening/screen.js";
import { renderSheet } from "../../server/sheet/render.js";
import { type Recompute, verifySheet } from "../../server/sheet/verify.js";
import { inventedDocument } from "./invented.js";
import { pageTexts } from "./readPdf.js";

// Quick findings keep these tests fast; verification compares whatever it is given the means to recompute.
const recompute: Recompute = (model, digest) => screen(model, { digest, depth: "quick" });

function sheetInput(document: typeof inventedDocument) {
  const read = readCase(document);
  if (!read.ok) throw new Error(JSON.stringify(read.faults));
  const { model, digest } = read;
  return { document, model, findings: screen(model, { digest, depth: "quick" }), paper: "A4" as const };
}

const honest = sheetInput(inventedDocument);
const sheet = renderSheet(honest);
const verify = (file: Buffer) => verifySheet(file, recompute);
const sentences = async (file: Buffer) =>
  (await verify(file)).checks.map((check) => check.sentence).join(" ");

/** Bounds of the content stream of a page, and of the attached record, in the bytes of a sheet. */
async function streamBounds(dictionary: RegExp): Promise<{ from: number; to: number }> {
  const text = (await sheet).toString("latin1");
  const found = dictionary.exec(text);
  if (found === null) throw new Error("no such object");
  const from = text.indexOf("stream\n", found.index) + 7;
  return { from, to: text.indexOf("\nendstream", from) };
}

async function flipped(at: number): Promise<Buffer> {
  const copy = Buffer.from(await sheet);
  copy.writeUInt8(copy.readUInt8(at) ^ 1, at);
  return copy;
}

describe("a sheet verifies", () => {
  test("when it is as the program printed it, on either paper", async () => {
    for (const paper of ["A4", "Letter"] as const) {
      const { verified, checks } = await verify(await renderSheet({ ...honest, paper }));
      expect(checks.map((check) => [check.name, check.passed])).toEqual([
        ["record", true],
        ["inputs", true],
        ["findings", true],
        ["pages", true],
      ]);
      expect(verified).toBe(true);
    }
  });

  test("when it was filed, with its place in the register printed on it", async () => {
    const filing = {
      number: 12,
      revision: 2,
      supersedes: 7,
      filedAt: "2026-01-02T03:04:05.000Z",
      previousDigest: "ab".repeat(32),
    };
    const filed = await renderSheet({ ...honest, filing });
    expect((await verify(filed)).verified).toBe(true);
    const pages = await pageTexts(filed);
    for (const text of ["No. 12, revision 2", "No. 7"]) expect(pages[0]).toContain(text);
    expect(pages.at(-1)).toContain(filing.previousDigest);
    for (const page of pages) expect(page).toContain("No. 12, revision 2");
    const moved = { ...filing, number: 13 };
    const forged = await withRecord(filed, recordBytes(honest.document, honest.findings, moved));
    expect((await verify(forged)).verified).toBe(false);
  });

  test("by its record alone as far as inputs and findings go", async () => {
    const { verified, checks } = await verify(recordBytes(honest.document, honest.findings));
    expect(verified).toBe(true);
    expect(checks.map((check) => check.name)).toEqual(["record", "inputs", "findings"]);
  });
});

describe("a sheet is refused", () => {
  test("with one byte of its attachment changed", async () => {
    const { from, to } = await streamBounds(/\/Type \/EmbeddedFile/);
    for (const at of [from + 3, Math.floor((from + to) / 2), to - 1]) {
      expect((await verify(await flipped(at))).verified).toBe(false);
    }
    expect(await sentences(await flipped(Math.floor((from + to) / 2)))).toContain(
      "The record in the PDF is broken.",
    );
  });

  test("with one digit of the findings changed, which it names", async () => {
    const { findings } = honest;
    const mtsr_K = (findings.temperatures.mtsr_K ?? 0) * (1 + 1e-9);
    const altered = { ...findings, temperatures: { ...findings.temperatures, mtsr_K } };
    const text = await sentences(await renderSheet({ ...honest, findings: altered }));
    expect(text).toContain("/temperatures/mtsr_K differ");
    expect(text).toContain("1.00×10⁻⁹");
    expect(await sentences(recordBytes(honest.document, altered))).toContain("/temperatures/mtsr_K differ");
  });

  test("with an input changed under the old findings", async () => {
    const document = { ...inventedDocument, vessel: { ...inventedDocument.vessel, agitatorPower: "3 kW" } };
    expect(await sentences(recordBytes(document, honest.findings))).toContain("The inputs were changed");
  });

  test("with a printed figure changed, and says on which page", async () => {
    const { findings } = honest;
    const warmer = {
      ...findings,
      temperatures: { ...findings.temperatures, mtt_K: findings.temperatures.mtt_K + 10 },
    };
    // The pages of one case around the record of another: what a forger would make.
    const forged = await withRecord(
      await renderSheet({ ...honest, findings: warmer }),
      recordBytes(honest.document, findings),
    );
    const { verified, checks } = await verify(forged);
    expect(verified).toBe(false);
    expect(checks.filter((check) => !check.passed).map((check) => check.name)).toEqual(["pages"]);
    expect(checks.at(-1)?.sentence).toMatch(/page 1, .*differ from what the program prints/);
  });

  test("with one byte changed anywhere else", async () => {
    const { length } = await sheet;
    const between = (await sheet).indexOf("\nendobj\n", length / 3) + 7;
    const places = Array.from({ length: 24 }, (_, part) => Math.floor(((part + 0.5) / 24) * length));
    for (const at of [between, 12, length - 2, ...places]) {
      expect([at, (await verify(await flipped(at))).verified]).toEqual([at, false]);
    }
  });

  test("with something added behind its end, or its end missing", async () => {
    const bytes = await sheet;
    expect((await verify(Buffer.concat([bytes, Buffer.from("\n1 0 obj\n")]))).verified).toBe(false);
    expect((await verify(bytes.subarray(0, bytes.length - 40))).verified).toBe(false);
  });

  test("without a record, with the record of a later format, and when it is no sheet at all", async () => {
    expect(await sentences(Buffer.from("%PDF-1.7\nnothing else"))).toContain("end of the PDF is missing");
    expect(await sentences(Buffer.from("GIF89a"))).toBe("This is not a PDF.");
    expect(await sentences(Buffer.alloc(0))).toBe("This is not a PDF.");
    const later = canonicalJson({ format: "thermal-window/record-9", case: {}, findings: {} });
    expect(await sentences(Buffer.from(later))).toContain("thermal-window/record-9");
    expect(await sentences(Buffer.from('{"format":'))).toContain("not JSON text");
    expect(await sentences(Buffer.from('{"case": 1}'))).toContain("canonical form");
    const broken = canonicalJson({ format: "thermal-window/record-1", case: { title: 7 }, findings: {} });
    expect(await sentences(Buffer.from(broken))).toContain("The case in the record is refused");
  });

  test("with an attachment that unpacks to more than any record, in bounded memory", async () => {
    const bomb = deflateSync(Buffer.alloc(200 * 1024 * 1024));
    const before = process.memoryUsage().arrayBuffers;
    expect(await sentences(await withRecord(await sheet, bomb, true))).toContain(
      "The record in the PDF is broken.",
    );
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(100 * 1024 * 1024);
  });
});

test("a sheet of another version is verified as far as the two agree, and says so", async () => {
  const findings = { ...honest.findings, program: { name: "thermal-window", version: "0.0.1" } };
  const same = await renderSheet({ ...honest, findings });
  expect((await verify(same)).verified).toBe(true);
  const heat = { ...findings.heat, adiabaticRise_K: findings.heat.adiabaticRise_K + 1 };
  const text = await sentences(await renderSheet({ ...honest, findings: { ...findings, heat } }));
  expect(text).toContain("written by thermal-window 0.0.1");
});

/** The same PDF around another attachment, with a table of offsets that fits. */
async function withRecord(pdf: Buffer, record: Buffer, packed = false): Promise<Buffer> {
  const text = pdf.toString("latin1");
  const objects = [...text.matchAll(/^(\d+) 0 obj\n/gm)].filter((match) => Number(match[1]) > 0);
  const xref = text.lastIndexOf("\nxref\n") + 1;
  const parts: Buffer[] = [pdf.subarray(0, objects[0]?.index ?? 0)];
  const offsets = new Map<number, number>();
  let length = parts[0]?.length ?? 0;
  objects.forEach((match, index) => {
    const end = objects[index + 1]?.index ?? xref;
    let body = pdf.subarray(match.index, end);
    const head = body.toString("latin1", 0, 40);
    if (head.includes("/Type /EmbeddedFile")) {
      const stream = packed ? record : deflateSync(record);
      body = Buffer.concat([
        Buffer.from(
          `${match[1]} 0 obj\n<<\n/Type /EmbeddedFile\n/Subtype /application#2Fjson\n/Length ${stream.length}\n/Filter /FlateDecode\n>>\nstream\n`,
        ),
        stream,
        Buffer.from("\nendstream\nendobj\n"),
      ]);
    }
    offsets.set(Number(match[1]), length);
    parts.push(body);
    length += body.length;
  });
  const table = text.slice(xref).replace(/startxref\n\d+/, `startxref\n${length}`);
  let id = -1;
  const moved = table.replace(/^\d{10} (\d{5}) ([nf]) $/gm, (line) => {
    id++;
    const offset = offsets.get(id);
    return offset === undefined ? line : `${String(offset).padStart(10, "0")} 00000 n `;
  });
  return Buffer.concat([...parts, Buffer.from(moved, "latin1")]);
}
