import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { inflateSync } from "node:zlib";
import PDFDocument from "pdfkit";
import { describe, expect, test } from "vitest";
import type { Figure } from "../../server/charts/figure.js";
import { figuresOf } from "../../server/charts/figures.js";
import { layout } from "../../server/charts/layout.js";
import { dashes, paperTints, paperTones, textSizes, weights } from "../../server/charts/palette.js";
import { drawPdf, type PdfFonts, pdfHeight } from "../../server/charts/pdf.js";
import type { Primitive } from "../../server/charts/primitive.js";
import { drawSvg, drawSvgAt } from "../../server/charts/svg.js";
import { inventedBatch } from "./invented.js";
import { inventedWhole } from "./inventedWhole.js";
import { screened } from "./screened.js";

const require = createRequire(import.meta.url);
const plex = require.resolve("@ibm/plex-sans/package.json").replace("package.json", "fonts/complete/woff/");
const fonts: PdfFonts = {
  regular: `${plex}IBMPlexSans-Regular.woff`,
  bold: `${plex}IBMPlexSans-SemiBold.woff`,
  fallback: require.resolve("dejavu-fonts-ttf/ttf/DejaVuSans.ttf"),
  covers: (character) => character !== "⁻",
};

/** Draws into a document and gives the operators of its page. */
async function pageOf(draw: (pdf: PDFKit.PDFDocument) => void): Promise<string> {
  const pdf = new PDFDocument({ size: "A4", margin: 0 });
  const chunks: Buffer[] = [];
  pdf.on("data", (chunk: Buffer) => chunks.push(chunk));
  const done = new Promise((resolve) => pdf.on("end", resolve));
  draw(pdf);
  pdf.end();
  await done;
  const bytes = Buffer.concat(chunks);
  const start = bytes.indexOf("stream\n") + "stream\n".length;
  return inflateSync(bytes.subarray(start, bytes.indexOf("\nendstream", start))).toString("latin1");
}

function fills(primitive: Primitive): boolean {
  return primitive.kind !== "text" && primitive.fill !== "none";
}

function strokes(primitive: Primitive): boolean {
  return primitive.kind !== "text" && primitive.stroke !== null;
}

const figures = figuresOf(inventedWhole);
const drawn: [string, Figure][] = Object.entries({ inventedBatch, inventedWhole, ...screened() }).flatMap(
  ([name, findings]) =>
    figuresOf(findings).map((figure): [string, Figure] => [`${name} ${figure.id}`, figure]),
);

describe.each(drawn)("the figure %s", (_, figure) => {
  test("has the same marks on the page and on the sheet, at the same places", async () => {
    const { primitives } = layout(figure, "wide");
    const svg = drawSvgAt(figure, "wide");
    const pdf = await pageOf((document) => drawPdf(document, figure, { x: 0, y: 0, width: 500 }, fonts));
    const count = (pattern: RegExp, text: string) => text.match(pattern)?.length ?? 0;
    expect(count(/<(rect|path|text)[ >]/g, svg)).toBe(primitives.length);
    expect(count(/^f$/gm, pdf)).toBe(primitives.filter(fills).length);
    expect(count(/^S$/gm, pdf)).toBe(primitives.filter(strokes).length);
    const words = primitives.filter((each) => each.kind === "text");
    const fallbacks = words.reduce((sum, each) => sum + (each.text.match(/⁻/g)?.length ?? 0), 0);
    expect(count(/^BT$/gm, pdf)).toBeGreaterThanOrEqual(words.length);
    expect(count(/^BT$/gm, pdf)).toBeLessThanOrEqual(words.length + 2 * fallbacks);
    for (const primitive of primitives) {
      if (primitive.kind === "rect") {
        const { x, y, width, height } = primitive;
        expect(svg).toContain(`x="${x}" y="${y}" width="${width}" height="${height}"`);
        expect(pdf).toContain(`\n${x} ${y} ${width} ${height} re\n`);
      } else if (primitive.kind === "path" && primitive.d !== "") {
        const [, x = "", y = ""] = /^M(-?[\d.]+),(-?[\d.]+)/.exec(primitive.d) ?? [];
        expect(svg).toContain(`d="${primitive.d}"`);
        expect(pdf).toContain(`\n${Number(x)} ${Number(y)} m\n`);
      }
    }
  });

  test.each(["wide", "narrow"] as const)("keeps its words on the paper and off each other (%s)", (width) => {
    expectClear(figure, width);
  });

  test("says its title and its sentence to those who cannot see it, and has its numbers in a table", () => {
    const svg = drawSvgAt(figure, "wide");
    expect(svg).toMatch(/^<svg [^>]*role="img"/);
    expect(svg).toContain(`<title id="${figure.id}-wide-title">`);
    expect(svg).toContain(`<desc id="${figure.id}-wide-desc">`);
    expect(figure.sentence).toMatch(/\d/);
    expect(figure.sentence).not.toMatch(/NaN|Infinity|undefined|null/);
    expect(figure.table.rows.length).toBeGreaterThan(0);
    for (const row of figure.table.rows) expect(row).toHaveLength(figure.table.columns.length);
  });

  test("has no style of its own, no number that is not one, and two decimals at most", () => {
    const svg = drawSvg(figure);
    expect(svg).not.toMatch(/style=|<style|<script|NaN|Infinity|undefined|null/);
    const coordinates = svg.match(/ (?:d|x|y|width|height)="[^"]*"/g) ?? [];
    for (const each of coordinates) expect(each).not.toMatch(/\.\d{3}|e-/);
  });
});

function expectClear(figure: Figure, width: "wide" | "narrow"): void {
  const drawn = layout(figure, width);
  const boxes = drawn.primitives.flatMap((each) =>
    each.kind === "text" && !each.upright ? [{ words: each.text, ...boxOf(each) }] : [],
  );
  for (const [at, box] of boxes.entries()) {
    expect(box.left, box.words).toBeGreaterThanOrEqual(-0.5);
    expect(box.right, box.words).toBeLessThanOrEqual(drawn.width + 0.5);
    expect(box.bottom, box.words).toBeLessThanOrEqual(drawn.height + 0.5);
    for (const other of boxes.slice(at + 1)) {
      const touching =
        box.left < other.right && other.left < box.right && box.top < other.bottom && other.top < box.bottom;
      expect(touching, `${box.words} | ${other.words}`).toBe(false);
    }
  }
}

const measure = new PDFDocument();

/** The room of a line of text by the font file itself. */
function boxOf(text: Extract<Primitive, { kind: "text" }>) {
  const size = textSizes[text.size];
  const width = measure.font(text.bold ? fonts.bold : fonts.regular, size).widthOfString(text.text);
  const left = text.anchor === "start" ? text.x : text.anchor === "end" ? text.x - width : text.x - width / 2;
  return { left, right: left + width, top: text.y - 0.7 * size, bottom: text.y + 0.2 * size };
}

test("markup in the words of a case arrives as words", () => {
  const figure: Figure = {
    ...(figures[0] as Figure),
    title: `</title><script>alert("1")</script>`,
    sentence: "a & b < c \u0000\ud800 ' end",
  };
  const svg = drawSvgAt(figure, "wide");
  expect(svg).not.toContain("<script");
  expect(svg).toContain("&lt;/title&gt;&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt;");
  expect(svg).toContain("a &amp; b &lt; c \uFFFD\uFFFD &#39; end");
});

test("drawing on a sheet gives the height it said and leaves the document where it was", () => {
  const pdf = new PDFDocument({ size: "A4" });
  const before = { x: pdf.x, y: pdf.y };
  for (const figure of figures) {
    for (const width of [240, 500]) {
      const used = drawPdf(pdf, figure, { x: 40, y: 60, width }, fonts);
      expect(used).toBe(pdfHeight(figure, width));
    }
  }
  expect({ x: pdf.x, y: pdf.y }).toEqual(before);
  expect(pdf.bufferedPageRange().count).toBe(1);
});

test("page and sheet agree on colours, dashes, weights and sizes", () => {
  const css = readFileSync(new URL("../../public/figures.css", import.meta.url), "utf8");
  const light = css.slice(0, css.indexOf("@container"));
  const dark = css.slice(css.indexOf("prefers-color-scheme: dark"));
  for (const [tone, colour] of Object.entries(paperTones)) {
    expect(light).toContain(`--${tone}: ${colour};`);
    expect(light).toContain(`--${tone}-tint: ${paperTints[tone as keyof typeof paperTints]};`);
    expect(dark).toContain(`--${tone}: #`);
    expect(css).toContain(`.figure .${tone} {`);
  }
  for (const [dash, lengths] of Object.entries(dashes))
    if (lengths.length > 0)
      expect(css).toContain(`.figure .${dash} {\n  stroke-dasharray: ${lengths.join(" ")};`);
  for (const [weight, width] of Object.entries(weights))
    expect(css).toContain(`.figure .${weight} {\n  stroke-width: ${width};`);
  for (const [size, height] of Object.entries(textSizes))
    expect(css).toContain(`.figure .t-${size} {\n  font-size: ${height}px;`);
});
