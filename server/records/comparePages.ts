import { type PdfObject, readPdfObjects, unpackStream } from "./pdfObjects.js";

const largestStream = 64 * 1024 * 1024;

/**
 * Whether a sheet is printed as the program prints it now. Streams are compared unpacked, because
 * another version of zlib packs the same pages into other bytes.
 *
 * @param sheet as it came
 * @param printed as it should be
 * @returns null where they are the same, else what differs, in one sentence
 */
export function printDifference(sheet: Buffer, printed: Buffer): string | null {
  if (sheet.equals(printed)) return null;
  const [found, expected] = [readPdfObjects(sheet), readPdfObjects(printed)];
  if (!found.ok) return found.fault;
  if (!expected.ok) throw new Error(`the sheet as printed cannot be read: ${expected.fault}`);
  const pages = pagesIn(expected.objects);
  const differing = new Set<string>();
  for (const [id, object] of expected.objects) {
    if (!same(found.objects.get(id), object)) differing.add(placeOf(id, pages));
  }
  if (found.objects.size !== expected.objects.size) differing.add("the number of its parts");
  if (trailerOf(found.trailer) !== trailerOf(expected.trailer)) differing.add("its trailer");
  if (differing.size === 0) return null;
  const [first = "", ...more] = [...differing].sort(byPage);
  return `The PDF was changed: ${[first, ...more].slice(0, 6).join(", ")} ${more.length === 0 ? "differs" : "differ"} from what the program prints.`;
}

function same(found: PdfObject | undefined, expected: PdfObject): boolean {
  if (found === undefined) return false;
  if (withoutLength(found.dictionary) !== withoutLength(expected.dictionary)) return false;
  if ((found.stream === null) !== (expected.stream === null)) return false;
  if (expected.stream === null || found.stream?.equals(expected.stream) === true) return true;
  const content = unpackStream(expected, largestStream);
  const other = unpackStream(found, (content?.length ?? 0) + 1);
  return content !== null && other?.equals(content) === true;
}

function withoutLength(dictionary: string): string {
  return dictionary.replace(/\/Length \d+\n/u, "");
}

/** The table of offsets moves with the packing; the rest of the trailer does not. */
function trailerOf(trailer: string): string {
  return trailer.replace(/startxref\n\d+\n/u, "");
}

/** Objects of each page by their numbers: the page itself and its content. */
function pagesIn(objects: ReadonlyMap<number, PdfObject>): ReadonlyMap<number, number> {
  const pages = new Map<number, number>();
  const root = [...objects.values()].find(({ dictionary }) => dictionary.includes("/Type /Pages\n"));
  const kids = /\/Kids \[([^\]]*)\]/u.exec(root?.dictionary ?? "")?.[1] ?? "";
  [...kids.matchAll(/(\d+) 0 R/gu)].forEach((kid, index) => {
    const id = Number(kid[1]);
    pages.set(id, index + 1);
    const dictionary = objects.get(id)?.dictionary ?? "";
    for (const match of dictionary.matchAll(/\/(?:Contents|Resources) (\d+) 0 R/gu)) {
      pages.set(Number(match[1]), index + 1);
    }
  });
  return pages;
}

function placeOf(id: number, pages: ReadonlyMap<number, number>): string {
  const page = pages.get(id);
  return page === undefined ? "a part outside the pages" : `page ${page}`;
}

function byPage(one: string, other: string): number {
  return one.localeCompare(other, "en", { numeric: true });
}
