import { type Face, facesOf, type Weight } from "./fonts.js";

/** A stretch of text that one font draws. */
export interface Run {
  readonly face: string;
  readonly text: string;
}

const graphemes = new Intl.Segmenter("en", { granularity: "grapheme" });

/** A raised or lowered number stays in one font, else its digits would stand at two heights. */
const scripts = /[⁰¹²³⁴-⁹⁺⁻⁼⁽⁾ⁿ]+|[₀-₉₊₋₌₍₎ₐ-ₜ]+/gu;

/** What has no shape of its own; as a code it cannot hide or reorder text on a record. */
const shapeless = /[\p{Cc}\p{Cf}\p{Co}\p{Cn}\p{Cs}]/u;

/**
 * Splits one line of text into runs by font. A character that no font holds is written as its code,
 * such as [U+4E2D]: nothing that was typed disappears or turns into an empty box.
 */
export function runsOf(line: string, weight: Weight): readonly Run[] {
  const faces = facesOf(weight);
  const [preferred] = faces;
  const text = line.normalize("NFC").replace(/\s/gu, plainSpace);
  if (text === "") return [];
  if (preferred !== undefined && holds(preferred, text)) return [{ face: preferred.name, text }];
  return mixedRuns(text, faces);
}

/** The same text with codes in place of what no font holds, for those who draw it by themselves. */
export function drawable(text: string): string {
  return runsOf(text, "regular")
    .map((run) => run.text)
    .join("");
}

function mixedRuns(line: string, faces: readonly Face[]): readonly Run[] {
  const runs: { face: string; text: string }[] = [];
  for (const cluster of clustersOf(line)) {
    const face = faceFor(cluster, faces);
    const text = face === undefined ? codesOf(cluster) : cluster;
    const name = (face ?? faces[0])?.name ?? "";
    const last = runs.at(-1);
    if (last !== undefined && (last.face === name || cluster === " ")) last.text += text;
    else runs.push({ face: name, text });
  }
  return runs;
}

function plainSpace(space: string): string {
  return space === "\u00a0" || space === "\u202f" || space === "\u2009" ? space : " ";
}

function* clustersOf(line: string): Generator<string> {
  let from = 0;
  for (const match of line.matchAll(scripts)) {
    for (const { segment } of graphemes.segment(line.slice(from, match.index))) yield segment;
    yield match[0];
    from = match.index + match[0].length;
  }
  for (const { segment } of graphemes.segment(line.slice(from))) yield segment;
}

function faceFor(cluster: string, faces: readonly Face[]): Face | undefined {
  return faces.find((face) => holds(face, cluster));
}

function holds(face: Face, text: string): boolean {
  if (shapeless.test(text)) return false;
  for (const character of text) if (!face.covers.has(character.codePointAt(0) ?? 0)) return false;
  return true;
}

function codesOf(cluster: string): string {
  return [...cluster]
    .map((character) => `[U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0")}]`)
    .join("");
}
