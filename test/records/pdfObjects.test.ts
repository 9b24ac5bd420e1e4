import { deflateSync } from "node:zlib";
import { describe, expect, test } from "vitest";
import { attachRecord, recordFormat } from "../../server/records/attach.js";
import { extractRecord, largestSheet } from "../../server/records/extract.js";
import { readPdfObjects, unpackStream } from "../../server/records/pdfObjects.js";
import { closeDocument, openDocument } from "../../server/sheet/document.js";

const record = { format: recordFormat, case: { title: "ä ∆" }, findings: { a: 1 } };
const canonical = Buffer.from(
  '{"case":{"title":"ä ∆"},"findings":{"a":1},"format":"thermal-window/record-1"}',
);

async function pdfWith(...attachments: readonly Buffer[]): Promise<Buffer> {
  const pdf = openDocument("A4", { title: "t", subject: "s", producer: "p", keywords: "k" });
  pdf.addPage();
  for (const attachment of attachments) attachRecord(pdf, attachment);
  return closeDocument(pdf);
}

describe("the record in a PDF", () => {
  test("comes out as it went in", async () => {
    expect(extractRecord(await pdfWith(canonical))).toEqual({
      ok: true,
      record: { case: record.case, findings: record.findings, filing: undefined },
    });
  });

  test("is refused where there is none, or more than one", async () => {
    expect(extractRecord(await pdfWith())).toEqual({
      ok: false,
      fault: "The PDF holds no record of this program.",
    });
    const other = Buffer.from(canonical.toString("utf8").replace('"a":1', '"a":2'));
    expect(extractRecord(await pdfWith(canonical, other))).toEqual({
      ok: false,
      fault: "The PDF holds more than one record.",
    });
  });

  test("is refused where it is not UTF-8, not JSON, not canonical or lacks a part", async () => {
    for (const [bytes, fault] of [
      [Buffer.from([0x7b, 0xff]), "not JSON text"],
      [Buffer.from("{"), "not JSON text"],
      [Buffer.from(JSON.stringify(record)), "canonical form"],
      [Buffer.from('{"case":1,"case":1}'), "canonical form"],
      [Buffer.from("[]"), "does not say of which format"],
      [Buffer.from('{"format":"thermal-window/record-1"}'), "lacks its case or its findings"],
      [Buffer.from('{"format":7}'), "another format (7)"],
      [
        Buffer.from('{"case":1,"filing":{"number":0},"findings":1,"format":"thermal-window/record-1"}'),
        "place in a register is broken",
      ],
    ] as const) {
      const extracted = extractRecord(await pdfWith(bytes));
      expect(extracted.ok ? "accepted" : extracted.fault).toContain(fault);
    }
  });

  test("is not looked for in a file that is larger than any sheet", () => {
    const extracted = extractRecord(Buffer.alloc(largestSheet + 1));
    expect(extracted).toEqual({ ok: false, fault: "The file is larger than any sheet." });
  });
});

describe("reading the objects of a PDF", () => {
  test("finds every object that its table lists", async () => {
    const pdf = await pdfWith(canonical);
    const read = readPdfObjects(pdf);
    if (!read.ok) throw new Error(read.fault);
    const size = Number(/\/Size (\d+)/.exec(read.trailer)?.[1]);
    expect(read.objects.size).toBe(size - 1);
    expect([...read.objects.values()].some(({ dictionary }) => dictionary.includes("/Type /Catalog"))).toBe(
      true,
    );
  });

  test("refuses one that was encrypted, added to, cut short or moved", async () => {
    const text = (await pdfWith(canonical)).toString("latin1");
    const faultOf = (changed: string) => {
      const read = readPdfObjects(Buffer.from(changed, "latin1"));
      return read.ok ? "accepted" : read.fault;
    };
    expect(faultOf(text)).toBe("accepted");
    expect(faultOf(text.replace("/Root", "/Encrypt 1 0 R\n/Root"))).toBe("The PDF is encrypted.");
    expect(faultOf(`${text}%`)).toContain("added to it");
    expect(faultOf(text.slice(0, -9))).toContain("end of the PDF is missing");
    expect(faultOf(text.replace("%PDF-1.7\n", "%PDF-1.7\n\n"))).toContain("damaged");
    expect(faultOf(text.replace("\nendobj\n", "\nendobj \n"))).toContain("damaged");
    expect(faultOf(text.replace(/startxref\n\d+/, "startxref\n999999999"))).toContain("damaged");
    expect(faultOf("%PDF-1.7")).toContain("end of the PDF is missing");
    expect(faultOf("")).toBe("This is not a PDF.");
  });

  test("unpacks no stream beyond the bound it is given", () => {
    const stream = deflateSync(Buffer.alloc(1000));
    const object = { dictionary: "<<\n/Filter /FlateDecode\n>>", stream };
    expect(unpackStream(object, 1000)).toHaveLength(1000);
    expect(unpackStream(object, 999)).toBeNull();
    expect(unpackStream({ ...object, stream: stream.subarray(0, 5) }, 1000)).toBeNull();
    expect(unpackStream({ dictionary: "<<\n>>", stream }, stream.length - 1)).toBeNull();
    expect(unpackStream({ dictionary: "<<\n>>", stream: null }, 10)).toBeNull();
  });
});
