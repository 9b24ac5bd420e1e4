import { parseArgs } from "node:util";
import { largestSheet } from "../records/extract.js";
import { screen } from "../screening/screen.js";
import { verifySheet } from "../sheet/verify.js";
import { readBounded } from "./inputFile.js";
import { exit, onOneLine, reasonOf, type Streams } from "./output.js";

const usage = `usage: npm run --silent verify -- SHEET.pdf

  SHEET.pdf   a sheet, or the record of one as JSON

exit status: 0 verified, 1 not verified, 2 usage
`;

/** Whether a sheet still follows from its own inputs. */
export async function verifyCommand(args: readonly string[], streams: Streams): Promise<number> {
  const path = pathOf(args);
  if (path.fault !== null) {
    streams.err(`${path.fault}\n\n${usage}`);
    return exit.usage;
  }
  const file = await readBounded(path.name, largestSheet);
  if (!file.ok) {
    streams.err(`${onOneLine(file.message)}\n`);
    return exit.usage;
  }
  const { verified, checks } = await verifySheet(file.bytes, (model, digest) =>
    screen(model, { digest, depth: "full" }),
  );
  for (const check of checks) {
    const line = `${check.name}: ${onOneLine(check.sentence)}\n`;
    if (check.passed) streams.out(line);
    else streams.err(line);
  }
  if (verified)
    streams.out("Verified: the sheet follows from its own inputs. That does not make the step safe.\n");
  else streams.out("NOT verified: do not rely on this sheet.\n");
  return verified ? exit.done : exit.refused;
}

function pathOf(args: readonly string[]): { name: string; fault: null } | { name: null; fault: string } {
  try {
    const { positionals } = parseArgs({ args: [...args], allowPositionals: true, options: {} });
    const [name, ...more] = positionals;
    if (name === undefined) return { name: null, fault: "which sheet? no file was named" };
    return more.length > 0 ? { name: null, fault: "one sheet at a time" } : { name, fault: null };
  } catch (error) {
    return { name: null, fault: onOneLine(reasonOf(error)) };
  }
}
