import type { Storage } from "../../server/files/storage.js";

/** Storage without a disk, for tests of what stands on it. */
export function memoryStorage(): Storage {
  const files = new Map<string, Buffer>();
  return {
    read: async (path) => files.get(path)?.toString("utf8") ?? null,
    readBytes: async (path) => files.get(path) ?? null,
    list: async (folder) =>
      [...files.keys()]
        .filter((path) => path.startsWith(`${folder}/`))
        .map((path) => path.slice(folder.length + 1))
        .sort(),
    write: async (path, content) => {
      files.set(path, Buffer.from(content));
    },
    create: async (path, content) => {
      if (files.has(path)) return false;
      files.set(path, Buffer.from(content));
      return true;
    },
    move: async (from, to) => {
      const content = files.get(from);
      if (content === undefined) return false;
      files.set(to, content);
      return files.delete(from);
    },
    remove: async (path) => {
      files.delete(path);
    },
    sweep: async () => undefined,
  };
}
