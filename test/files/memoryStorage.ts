import type { Storage } from "../../server/files/storage.js";

/** Storage without a disk, for tests of what stands on it. */
export function memoryStorage(): Storage {
  const files = new Map<string, string>();
  return {
    read: async (path) => files.get(path) ?? null,
    list: async (folder) =>
      [...files.keys()]
        .filter((path) => path.startsWith(`${folder}/`))
        .map((path) => path.slice(folder.length + 1))
        .sort(),
    write: async (path, content) => {
      files.set(path, content.toString());
    },
    create: async (path, content) => {
      if (files.has(path)) return false;
      files.set(path, content.toString());
      return true;
    },
    remove: async (path) => {
      files.delete(path);
    },
    sweep: async () => undefined,
  };
}
