import { register } from "../../server/files/register.js";
import { folderStorage } from "../../server/files/storage.js";
import { plainSheet } from "./registerSheets.js";

/**
 * Files sheets of no substance as a process of its own, and says which numbers it was given:
 * node registerFiling.js FOLDER NAME HOW-MANY
 */
const [folder = "", name = "", count = ""] = process.argv.slice(2);
const sheets = register(folderStorage(folder));
await sheets.start();
process.stdout.write("begun\n");
for (let sheet = 1; sheet <= Number(count); sheet += 1) {
  const outcome = await sheets.file(plainSheet({ record: `${name}-${sheet}` }));
  if (!outcome.filed) throw new Error(`sheet ${sheet} of ${name} was not filed`);
  process.stdout.write(`${outcome.entry.number} ${outcome.entry.digests.pdf}\n`);
}
