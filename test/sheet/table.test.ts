import { describe, expect, test } from "vitest";
import { closeDocument, openDocument } from "../../server/sheet/document.js";
import { type Cursor, startPages } from "../../server/sheet/page.js";
import { table } from "../../server/sheet/table.js";
import { pageTexts } from "./readPdf.js";

const columns = [
  { heading: "Quantity", share: 1 },
  { heading: "Value", share: 1, align: "right" as const },
];

async function pagesWith(rows: number, first = 0, cell = (row: number) => `row-${row}.`): Promise<string[]> {
  const pdf = openDocument("A4", { title: "t", subject: "s", producer: "p", keywords: "k" });
  const cursor: Cursor = startPages(pdf);
  cursor.y += first;
  table(
    cursor,
    columns,
    Array.from({ length: rows }, (_, row) => [cell(row), "1"]),
  );
  cursor.parent.end();
  return pageTexts(await closeDocument(pdf));
}

const rowsOn = (text: string) => [...text.matchAll(/row-(\d+)\./g)].map((match) => Number(match[1]));

describe("a table over several pages", () => {
  test("has its heading on each of them and each row once, in order", async () => {
    const pages = await pagesWith(200);
    expect(pages.length).toBeGreaterThan(3);
    for (const page of pages) expect(page).toMatch(/Quantity.*Value/);
    expect(pages.flatMap(rowsOn)).toEqual(Array.from({ length: 200 }, (_, row) => row));
  });

  test("never leaves a single row alone on its last page", async () => {
    for (let rows = 40; rows < 62; rows++) {
      const last = rowsOn((await pagesWith(rows)).at(-1) ?? "");
      expect([rows, last.length === 1]).toEqual([rows, false]);
    }
  });

  test("never starts with a single row at the foot of a page", async () => {
    for (let first = 640; first < 716; first += 6) {
      const [page = ""] = await pagesWith(10, first);
      expect([first, rowsOn(page).length === 1]).toEqual([first, false]);
    }
  });

  test("parts a row that is higher than a page", async () => {
    const pages = await pagesWith(3, 0, (row) => `row-${row}. ${`word${row} `.repeat(3000)}`);
    const words = pages.join(" ");
    for (const row of [0, 1, 2])
      expect([...words.matchAll(new RegExp(`word${row}\\b`, "g"))]).toHaveLength(3000);
  });
});
