import type { FiledSheet } from "../files/registerIndex.js";
import { reviewText } from "../files/registerStanding.js";

const columns: readonly (readonly [string, (filed: FiledSheet) => string | number | null | undefined])[] = [
  ["number", ({ sheet }) => sheet.number],
  ["filed at", ({ sheet }) => sheet.time],
  ["batch record", ({ sheet }) => sheet.record],
  ["step", ({ sheet }) => sheet.step],
  ["revision", ({ sheet }) => sheet.revision],
  ["supersedes", ({ sheet }) => sheet.supersedes],
  ["superseded by", ({ supersededBy }) => supersededBy],
  ["title", ({ sheet }) => sheet.title],
  ["vessel", ({ sheet }) => sheet.vessel],
  ["prepared by (as typed)", ({ sheet }) => sheet.preparedBy],
  ["class", ({ sheet }) => sheet.class ?? "not assessed"],
  ["stop", ({ sheet }) => (sheet.stop ? "STOP" : "no stop raised")],
  ["review", ({ reviews }) => reviewText(reviews)],
  ["last reviewer (as typed)", ({ reviews }) => reviews.at(-1)?.reviewer],
  ["last reviewed on", ({ reviews }) => reviews.at(-1)?.reviewedOn],
  ["remark of the last review", ({ reviews }) => reviews.at(-1)?.remark],
  ["program", ({ sheet }) => `${sheet.program.name} ${sheet.program.version}`],
  ["SHA-256 of the case", ({ sheet }) => sheet.digests.case],
  ["SHA-256 of the findings", ({ sheet }) => sheet.digests.findings],
  ["SHA-256 of the record", ({ sheet }) => sheet.digests.record],
  ["SHA-256 of the PDF", ({ sheet }) => sheet.digests.pdf],
  ["SHA-256 of the entry before", ({ sheet }) => sheet.previous],
];

/**
 * Sheets as comma-separated values, one line each below a line of names (RFC 4180). The mark at the beginning
 * tells spreadsheets that it is UTF-8.
 */
export function registerCsv(sheets: readonly FiledSheet[]): string {
  const lines = [columns.map(([name]) => name), ...sheets.map((filed) => columns.map(([, of]) => of(filed)))];
  return `\ufeff${lines.map((cells) => `${cells.map((value) => cell(value ?? "")).join(",")}\r\n`).join("")}`;
}

/** Text that a spreadsheet would take for a formula gets an apostrophe in front, which it shows as text. */
function cell(value: string | number): string {
  const text = /^[=+\-@\t\r]/.test(String(value)) ? `'${value}` : String(value);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
