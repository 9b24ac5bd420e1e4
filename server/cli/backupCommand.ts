import { isAbsolute, relative, resolve } from "node:path";
import { parseArgs } from "node:util";
import { backUp } from "../files/backup.js";
import { folderStorage } from "../files/storage.js";
import { readSettings } from "../settings.js";
import { exit, onOneLine, reasonOf, type Streams } from "./output.js";

const usage = `usage: npm run backup -- FOLDER

  FOLDER   takes the copy of DATA_DIR; it must not exist yet, or be empty

exit status: 0 copied and whole, 1 the copy could not be made or its register is not whole, 2 usage
`;

/** Copies the saved cases and the register of DATA_DIR to another folder, while the program may run. */
export async function backupCommand(
  args: readonly string[],
  environment: Readonly<Record<string, string | undefined>>,
  streams: Streams,
): Promise<number> {
  const target = targetOf(args);
  const read = readSettings(environment);
  const faults = read.ok ? target.faults : [...target.faults, ...read.faults];
  if (!read.ok || target.folder === null) return refused(streams, faults);
  const { dataFolder } = read.settings;
  const inside = relative(dataFolder, target.folder);
  if (!inside.startsWith("..") && !isAbsolute(inside)) {
    return refused(streams, ["FOLDER lies in DATA_DIR; a copy there would be lost with it."]);
  }
  try {
    const to = folderStorage(target.folder);
    if ((await to.list(".")).length > 0) return refused(streams, [`${target.folder} is not empty.`]);
    const from = folderStorage(dataFolder);
    if ((await from.list(".")).length === 0)
      return refused(streams, [`DATA_DIR, ${dataFolder}, holds nothing.`]);
    const backup = await backUp(from, to, new Date());
    streams.out(
      `Copied to ${onOneLine(target.folder)}: ${count(backup.cases, "case", "cases")}, ${count(backup.sheets, "filed sheet", "filed sheets")}, ${count(backup.entries, "entry", "entries")} of the register.\n`,
    );
    for (const fault of backup.faults) streams.err(`${onOneLine(fault)}\n`);
    if (backup.faults.length > 0) {
      streams.err("The copy was made, but the register is NOT whole.\n");
      return exit.refused;
    }
    streams.out(`The register is whole. SHA-256 of its last entry: ${backup.lastEntry}\n`);
    return exit.done;
  } catch (error) {
    streams.err(`The copy could not be made: ${onOneLine(reasonOf(error))}\n`);
    return exit.refused;
  }
}

function count(number: number, one: string, many: string): string {
  return `${number} ${number === 1 ? one : many}`;
}

function refused(streams: Streams, faults: readonly string[]): number {
  for (const fault of faults) streams.err(`${onOneLine(fault)}\n`);
  streams.err(`\n${usage}`);
  return exit.usage;
}

function targetOf(args: readonly string[]): { folder: string | null; faults: readonly string[] } {
  try {
    const { positionals } = parseArgs({ args: [...args], allowPositionals: true, options: {} });
    const [folder = "", ...more] = positionals;
    if (folder === "") return { folder: null, faults: ["Which folder is to take the copy? None was named."] };
    if (more.length > 0) return { folder: null, faults: ["One folder at a time."] };
    return { folder: resolve(folder), faults: [] };
  } catch (error) {
    return { folder: null, faults: [reasonOf(error)] };
  }
}
