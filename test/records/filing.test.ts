import { expect, test } from "vitest";
import { canonicalJson } from "../../server/case/canonical.js";
import { parseRecord } from "../../server/records/extract.js";
import { type Filing, filingText, readFiling } from "../../server/records/filing.js";

const filing: Filing = {
  number: 12,
  revision: 2,
  supersedes: 7,
  filedAt: "2026-03-07T14:05:00.000Z",
  previousDigest: "0a".repeat(32),
};

test("a filing comes back as it was written, the first of its line too", () => {
  for (const each of [filing, { ...filing, supersedes: null }]) expect(readFiling({ ...each })).toEqual(each);
  expect(filingText(filing)).toBe("No. 12, revision 2");
});

test.each([
  null,
  "No. 12",
  {},
  { ...filing, number: 0 },
  { ...filing, number: 1.5 },
  { ...filing, number: "12" },
  { ...filing, revision: -1 },
  { ...filing, supersedes: 0 },
  { ...filing, filedAt: "yesterday" },
  { ...filing, filedAt: "2026-03-07" },
  { ...filing, previousDigest: "0A".repeat(32) },
  { ...filing, previousDigest: "" },
  { ...filing, more: 1 },
])("what is no filing makes the record broken: %j", (broken) => {
  expect(readFiling(broken)).toBeNull();
  const record = canonicalJson({ format: "thermal-window/record-1", case: {}, findings: {}, filing: broken });
  expect(parseRecord(Buffer.from(record))).toEqual({
    ok: false,
    fault: "The record's place in a register is broken.",
  });
});

test("a record without a filing is that of a sheet that was only printed", () => {
  const record = canonicalJson({ format: "thermal-window/record-1", case: {}, findings: {} });
  const read = parseRecord(Buffer.from(record));
  expect(read.ok && read.record.filing).toBeUndefined();
});
