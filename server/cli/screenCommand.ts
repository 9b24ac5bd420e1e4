import { basename, dirname, resolve } from "node:path";
import { parseArgs } from "node:util";
import { readCaseText } from "../case/read.js";
import { folderStorage } from "../files/storage.js";
import { screen } from "../screening/screen.js";
import type { Paper } from "../sheet/document.js";
import { renderSheet } from "../sheet/render.js";
import { readBounded } from "./inputFile.js";
import { exit, onOneLine, reasonOf, type Streams } from "./output.js";
import { summaryOf } from "./summary.js";

const usage = `usage: npm run --silent screen -- CASE.json [--json] [--pdf OUT.pdf] [--paper a4|letter]

  CASE.json       the case document
  --json          findings as JSON on standard output, nothing else there
  --pdf OUT.pdf   writes the sheet
  --paper letter  on US Letter; A4 unless said

exit status: 0 screened, 1 the case is refused, 2 usage
`;

interface Request {
  readonly path: string;
  readonly json: boolean;
  readonly pdf: string | null;
  readonly paper: Paper;
}

/** More than a case document may hold; the reader refuses what is longer than it allows. */
const readLimit = 1024 * 1024;

/** Screens one case document from a file. */
export async function screenCommand(args: readonly string[], streams: Streams): Promise<number> {
  const request = requestOf(args);
  if (typeof request === "string") {
    streams.err(`${request}\n\n${usage}`);
    return exit.usage;
  }
  const file = await readBounded(request.path, readLimit);
  if (!file.ok) {
    streams.err(`${onOneLine(file.message)}\n`);
    return exit.usage;
  }
  const read = readCaseText(file.bytes.toString("utf8"));
  if (!read.ok) {
    for (const fault of read.faults) streams.err(`${fault.pointer}: ${onOneLine(fault.message)}\n`);
    return exit.refused;
  }
  const { document, model, digest } = read;
  const findings = screen(model, { digest, depth: "full" });
  if (request.pdf !== null) {
    const sheet = await renderSheet({ document, model, findings, paper: request.paper });
    const fault = await writeWhole(request.pdf, sheet);
    if (fault !== null) {
      streams.err(`${onOneLine(fault)}\n`);
      return exit.usage;
    }
  }
  streams.out(request.json ? `${JSON.stringify(findings, null, 2)}\n` : summaryOf(document, findings));
  if (request.pdf !== null && !request.json) streams.out(`\nSheet written to ${onOneLine(request.pdf)}\n`);
  return exit.done;
}

/** The request, or what is wrong with it in words. */
function requestOf(args: readonly string[]): Request | string {
  try {
    const { values, positionals } = parseArgs({
      args: [...args],
      allowPositionals: true,
      options: {
        json: { type: "boolean", default: false },
        pdf: { type: "string" },
        paper: { type: "string", default: "a4" },
      },
    });
    const [path, ...more] = positionals;
    if (path === undefined) return "which case? no file was named";
    if (more.length > 0) return `one case at a time; too many: ${onOneLine(more.join(" "))}`;
    if (values.pdf === "") return "--pdf needs the name of a file";
    const paper = paperOf(values.paper);
    if (paper === null) return `--paper takes a4 or letter, not ${onOneLine(values.paper)}`;
    return { path, json: values.json, pdf: values.pdf ?? null, paper };
  } catch (error) {
    return onOneLine(reasonOf(error));
  }
}

function paperOf(name: string): Paper | null {
  switch (name.toLowerCase()) {
    case "a4":
      return "A4";
    case "letter":
      return "Letter";
    default:
      return null;
  }
}

async function writeWhole(path: string, bytes: Buffer): Promise<string | null> {
  const target = resolve(path);
  try {
    await folderStorage(dirname(target)).write(basename(target), bytes);
    return null;
  } catch (error) {
    return `cannot write ${path}: ${reasonOf(error)}`;
  }
}
