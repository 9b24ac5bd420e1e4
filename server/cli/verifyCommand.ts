import { parseArgs } from "node:util";
import { register } from "../files/register.js";
import { standingOf } from "../files/registerStanding.js";
import { folderStorage } from "../files/storage.js";
import { largestSheet } from "../records/extract.js";
import { screen } from "../screening/screen.js";
import { readSettings } from "../settings.js";
import { verifySheet } from "../sheet/verify.js";
import { readBounded } from "./inputFile.js";
import { exit, onOneLine, reasonOf, type Streams } from "./output.js";

const usage = `usage: npm run --silent verify -- SHEET.pdf

  SHEET.pdf   a sheet, or the record of one as JSON

DATA_DIR names the folder whose register is asked whether the sheet was filed there.

exit status: 0 verified, 1 not verified, 2 usage
`;

/**
 * Whether a sheet still follows from its own inputs, and what the register says of it.
 *
 * @param environment names the register's folder; null: no register is asked
 */
export async function verifyCommand(
  args: readonly string[],
  streams: Streams,
  environment: Readonly<Record<string, string | undefined>> | null = null,
): Promise<number> {
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
  const borneOut = environment === null || (await askRegister(file.bytes, environment, streams));
  if (verified && borneOut)
    streams.out("Verified: the sheet follows from its own inputs. That does not make the step safe.\n");
  else streams.out("NOT verified: do not rely on this sheet.\n");
  return verified && borneOut ? exit.done : exit.refused;
}

/** @returns false where the register contradicts the sheet, or is not whole up to it */
async function askRegister(
  file: Buffer,
  environment: Readonly<Record<string, string | undefined>>,
  streams: Streams,
): Promise<boolean> {
  const read = readSettings(environment);
  if (!read.ok) {
    for (const fault of read.faults) streams.err(`register: ${onOneLine(fault)}\n`);
    return false;
  }
  const sheets = register(folderStorage(read.settings.dataFolder));
  if ((await sheets.fresh()).last() === 0) {
    streams.out("register: not asked, for DATA_DIR holds none\n");
    return true;
  }
  const { state, sentence, filed, faults } = await standingOf(sheets, file);
  (state === "against" ? streams.err : streams.out)(`register: ${onOneLine(sentence)}\n`);
  for (const fault of faults) streams.err(`chain: ${onOneLine(fault)}\n`);
  if (filed !== null && faults.length === 0) {
    streams.out(`chain: The register is whole from its first entry to entry ${filed.sheet.number}.\n`);
  }
  return state !== "against" && faults.length === 0;
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
