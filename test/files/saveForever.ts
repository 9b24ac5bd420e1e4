import { caseStore } from "../../server/files/cases.js";
import { folderStorage } from "../../server/files/storage.js";

/**
 * Saves a case of some 8 MB again and again until it is killed, as a process of its own:
 * node saveForever.js FOLDER ID REVISION
 */
const [folder = "", id = "", from = ""] = process.argv.slice(2);
const cases = caseStore(folderStorage(folder));
process.stdout.write("saving\n");
for (let revision = Number(from); ; revision += 1) {
  const text = String(revision % 10).repeat(8_000_000);
  const outcome = await cases.save(id, revision, { document: { text, revision } });
  if (!outcome?.saved) throw new Error(`revision ${revision} could not be saved over`);
}
