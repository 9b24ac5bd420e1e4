import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { coverageOf } from "./coverage.js";
import { unpackWoff } from "./woff.js";

/** Two weights are enough for a record: text, and what must be seen first. */
export type Weight = "regular" | "strong";

/** One font file: what is embedded, and which characters it can draw. */
export interface Face {
  readonly name: string;
  readonly data: Buffer;
  readonly covers: ReadonlySet<number>;
}

const require = createRequire(import.meta.url);
const plex = (style: string) =>
  unpackWoff(readFileSync(require.resolve(`@ibm/plex-sans/fonts/complete/woff/IBMPlexSans-${style}.woff`)));
const dejavu = (style: string) =>
  readFileSync(require.resolve(`dejavu-fonts-ttf/ttf/DejaVuSans${style}.ttf`));

const loaders: Readonly<Record<Weight, readonly (readonly [string, () => Buffer])[]>> = {
  regular: [
    ["Plex", () => plex("Regular")],
    ["DejaVu", () => dejavu("")],
  ],
  strong: [
    ["Plex-Strong", () => plex("SemiBold")],
    ["DejaVu-Strong", () => dejavu("-Bold")],
  ],
};

const loaded = new Map<Weight, readonly Face[]>();

/** The fonts of a weight, the preferred one first; read from the installed packages once per process. */
export function facesOf(weight: Weight): readonly Face[] {
  const known = loaded.get(weight);
  if (known !== undefined) return known;
  const faces = loaders[weight].map(([name, load]) => {
    const data = load();
    return { name, data, covers: coverageOf(data) };
  });
  loaded.set(weight, faces);
  return faces;
}

/** Makes every face known to a document under its name; only those that are used get embedded. */
export function registerFaces(pdf: PDFKit.PDFDocument): void {
  for (const weight of ["regular", "strong"] as const) {
    for (const face of facesOf(weight)) pdf.registerFont(face.name, face.data);
  }
}
