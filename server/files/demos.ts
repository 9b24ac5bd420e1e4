import { titleOf } from "./cases.js";
import type { Storage } from "./storage.js";

/** A case that comes with the program, to read and to start from. */
export interface DemoCase {
  readonly name: string;
  readonly title: string;
  readonly document: unknown;
}

/** All demo cases of a folder, by file name. They are read once and never written. */
export async function readDemos(scenarios: Storage): Promise<readonly DemoCase[]> {
  const names = (await scenarios.list(".")).filter((name) => name.endsWith(".json"));
  return Promise.all(
    names.map(async (file) => {
      const document: unknown = JSON.parse((await scenarios.read(file)) ?? "null");
      return { name: file.replace(/\.json$/, ""), title: titleOf(document), document };
    }),
  );
}
