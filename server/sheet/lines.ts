import { paperTones } from "../charts/palette.js";
import type { Weight } from "./fonts.js";
import { textWidth } from "./ruler.js";
import { type Run, runsOf } from "./runs.js";

export interface TextStyle {
  /** pt */
  readonly size: number;
  readonly weight: Weight;
  readonly colour?: string;
  /** true: `_{…}` lowers and `^{…}` raises what stands in the braces */
  readonly formula?: boolean;
}

/** Line height over font size. */
const leading = 1.35;

export function lineHeight(style: TextStyle): number {
  return leading * style.size;
}

/** A run with its size and how far its baseline is lowered, pt. */
interface Piece extends Run {
  readonly size: number;
  readonly lowered: number;
}

const script = { size: 0.74, lowered: 0.18, raised: 0.34 };
const marked = /([_^])\{([^{}]*)\}/u;

function piecesOf(line: string, { size, weight, formula = false }: TextStyle): readonly Piece[] {
  if (!formula) return runsOf(line, weight).map((run) => ({ ...run, size, lowered: 0 }));
  return line.split(/([_^]\{[^{}]*\})/u).flatMap((part) => {
    const [, mark, inner] = marked.exec(part) ?? [];
    if (inner === undefined) return runsOf(part, weight).map((run) => ({ ...run, size, lowered: 0 }));
    const lowered = size * (mark === "_" ? script.lowered : -script.raised);
    return runsOf(inner, weight).map((run) => ({
      ...run,
      size: script.size * size,
      lowered,
    }));
  });
}

/** Width of one line, pt. */
export function widthOf(line: string, style: TextStyle): number {
  return piecesOf(line, style).reduce((sum, piece) => sum + pieceWidth(piece), 0);
}

function pieceWidth({ face, size, text }: Piece): number {
  return size * textWidth(face, text);
}

/**
 * Draws one line with its baseline where a line box of `lineHeight` that starts at `y` has it.
 *
 * @param x left edge, pt
 * @param y upper edge of the line box, pt from the top of the page
 */
export function drawLine(
  pdf: PDFKit.PDFDocument,
  line: string,
  x: number,
  y: number,
  style: TextStyle,
): void {
  let at = x;
  pdf.fillColor(style.colour ?? paperTones.ink);
  for (const piece of piecesOf(line, style)) {
    const width = pieceWidth(piece);
    const baseline = y + 1.02 * style.size + piece.lowered;
    pdf.font(piece.face).fontSize(piece.size).text(piece.text, at, baseline, {
      lineBreak: false,
      baseline: "alphabetic",
    });
    at += width;
  }
}

/** A number is not parted from its unit at the end of a line. */
const unitAhead = /^(?:°C|K|s|min|h|days|years|%|W|kW|J|kJ|kg|mol|kmol|pt|L|m)(?=\W|$)/u;

/** Nor is a unit such as kJ/(kg K) parted within its parentheses. */
const openUnit = /\/\([^()]{1,12}$/u;

/**
 * Breaks text into lines that fit. A word that is wider than the line is broken where it must.
 *
 * @param width pt
 */
export function wrap(text: string, width: number, style: TextStyle): string[] {
  return text.split(/\r\n|[\n\r\u2028\u2029]/u).flatMap((part) => wrapPart(part, width, style));
}

function wrapPart(text: string, width: number, style: TextStyle): string[] {
  const lines: string[] = [];
  const space = widthOf(" ", style);
  let line: string | null = null;
  let used = 0;
  for (const word of wordsOf(text)) {
    const more = widthOf(word, style);
    if (line !== null && used + space + more <= width) {
      line = `${line} ${word}`;
      used += space + more;
      continue;
    }
    if (line !== null) lines.push(line);
    const pieces: string[] = more <= width ? [word] : breakWord(word, width, style);
    line = pieces.pop() ?? "";
    used = widthOf(line, style);
    lines.push(...pieces);
  }
  return [...lines, line ?? ""];
}

function wordsOf(text: string): string[] {
  const words: string[] = [];
  for (const word of text.split(/[ \t]+/u)) {
    const last = words.at(-1);
    const joined = last !== undefined && (openUnit.test(last) || (/\d$/u.test(last) && unitAhead.test(word)));
    if (joined) words[words.length - 1] = `${last} ${word}`;
    else words.push(word);
  }
  return words;
}

function breakWord(word: string, width: number, style: TextStyle): string[] {
  const pieces: string[] = [];
  let piece = "";
  let used = 0;
  for (const character of word) {
    const more = widthOf(character, style);
    if (piece !== "" && used + more > width) {
      pieces.push(piece);
      piece = "";
      used = 0;
    }
    piece += character;
    used += more;
  }
  pieces.push(piece);
  return pieces;
}

/** At most so many lines that fit, with an ellipsis where something was left out. */
export function clip(text: string, width: number, style: TextStyle, most: number): string[] {
  const lines = wrap(text, width, style);
  if (lines.length <= most) return lines;
  return [...lines.slice(0, most - 1), shorten(lines.slice(most - 1).join(" "), width, style)];
}

/** One line that fits, with an ellipsis where something was left out. */
export function shorten(text: string, width: number, style: TextStyle): string {
  const [first = "", ...rest] = wrap(text.slice(0, 400), width, style);
  if (rest.length === 0 && text.length <= 400) return first;
  const characters = [...first];
  while (characters.length > 0 && widthOf(`${characters.join("")}…`, style) > width) characters.pop();
  return `${characters.join("").trimEnd()}…`;
}
