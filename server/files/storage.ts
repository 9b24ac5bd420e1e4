import { randomBytes } from "node:crypto";
import { link, mkdir, open, readdir, readFile, rename, stat, unlink } from "node:fs/promises";
import { dirname, join } from "node:path";

/**
 * The one door to the disk. A file is either whole or not there: text goes to a temporary
 * file, is forced to the disk, and only then takes its name; at last the folder is forced
 * to the disk, so that the name survives a power cut too.
 * Paths are relative to the storage's folder and are built by the program, never from input.
 */
export interface Storage {
  /** @returns null where there is no such file */
  read(path: string): Promise<string | null>;
  /** The same for a file that is not text. */
  readBytes(path: string): Promise<Buffer | null>;
  /** Names in a folder, sorted; none where the folder does not exist. Unfinished files are not listed. */
  list(folder: string): Promise<readonly string[]>;
  /** Writes a file, replacing the one of that name. */
  write(path: string, content: string | Uint8Array): Promise<void>;
  /**
   * Writes a file that must not exist yet. Of several processes that try the same name, one succeeds.
   *
   * @returns false where the name is taken; the file that has it is untouched
   */
  create(path: string, content: string | Uint8Array): Promise<boolean>;
  /**
   * Gives a file another name, in another folder or the same.
   *
   * @returns false where there is no such file
   */
  move(from: string, to: string): Promise<boolean>;
  /** Removes a file; one that is already gone is no error. */
  remove(path: string): Promise<void>;
  /** Removes what a killed process left unfinished in a folder, once it is an hour old. */
  sweep(folder: string): Promise<void>;
}

const unfinished = /^\.[0-9a-f]{16}\.part$/;
const hour_ms = 3_600_000;

/** Storage in a folder of the file system, which is made when something is first written. */
export function folderStorage(root: string): Storage {
  return {
    async read(path) {
      return unlessMissing(readFile(join(root, path), "utf8"), null);
    },

    async readBytes(path) {
      return unlessMissing(readFile(join(root, path)), null);
    },

    async list(folder) {
      const names = await unlessMissing(readdir(join(root, folder)), []);
      return names.filter((name) => !unfinished.test(name)).sort();
    },

    async write(path, content) {
      const target = join(root, path);
      const part = await writePart(dirname(target), content);
      await settling(part, async () => rename(part, target));
      await syncFolder(dirname(target));
    },

    async create(path, content) {
      const target = join(root, path);
      const part = await writePart(dirname(target), content);
      // A hard link fails where the name is taken, which a rename does not.
      const created = await settling(part, async () => unlessTaken(link(part, target)));
      await unlink(part);
      if (created) await syncFolder(dirname(target));
      return created;
    },

    async move(from, to) {
      const [source, target] = [join(root, from), join(root, to)];
      await makeFolder(dirname(target));
      const moved = rename(source, target).then(() => true);
      if (!(await unlessMissing(moved, false))) return false;
      await syncFolder(dirname(target));
      await syncFolder(dirname(source));
      return true;
    },

    async remove(path) {
      const target = join(root, path);
      await unlessMissing(unlink(target), undefined);
      await unlessMissing(syncFolder(dirname(target)), undefined);
    },

    async sweep(folder) {
      const names = await unlessMissing(readdir(join(root, folder)), []);
      for (const name of names.filter((each) => unfinished.test(each))) {
        const path = join(root, folder, name);
        const state = await unlessMissing(stat(path), null);
        if (state !== null && Date.now() - state.mtimeMs > hour_ms) {
          await unlessMissing(unlink(path), undefined);
        }
      }
    },
  };
}

/** Content on the disk for good, under a temporary name in the folder it is meant for. */
async function writePart(folder: string, content: string | Uint8Array): Promise<string> {
  await makeFolder(folder);
  const part = join(folder, `.${randomBytes(8).toString("hex")}.part`);
  await settling(part, async () => {
    const file = await open(part, "wx");
    try {
      await file.writeFile(content);
      await file.sync();
    } finally {
      await file.close();
    }
  });
  return part;
}

/** Runs a step; where it fails, removes the unfinished file before passing the failure on. */
async function settling<T>(part: string, step: () => Promise<T>): Promise<T> {
  try {
    return await step();
  } catch (error) {
    await unlink(part).catch(() => undefined);
    throw error;
  }
}

/** Makes a folder where it is missing, on the disk for good: its name stands in the folder above it. */
async function makeFolder(folder: string): Promise<void> {
  const first = await mkdir(folder, { recursive: true });
  if (first === undefined) return;
  for (let made = folder; made.length >= first.length; made = dirname(made)) await syncFolder(dirname(made));
}

async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, "r");
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

async function unlessMissing<T>(work: Promise<T>, instead: T): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (codeOf(error) === "ENOENT") return instead;
    throw error;
  }
}

async function unlessTaken(work: Promise<void>): Promise<boolean> {
  try {
    await work;
    return true;
  } catch (error) {
    if (codeOf(error) === "EEXIST") return false;
    throw error;
  }
}

function codeOf(error: unknown): unknown {
  return error instanceof Error && "code" in error ? error.code : undefined;
}
