import { open } from "node:fs/promises";
import { reasonOf } from "./output.js";

export type FileRead =
  | { readonly ok: true; readonly bytes: Buffer }
  | { readonly ok: false; readonly message: string };

/**
 * Reads a file, but never more than a bound: a wrong path to something huge is an answer, not a full memory.
 *
 * @param limit bytes; a longer file gives `limit` + 1 of them, which is enough to see that it is too long
 */
export async function readBounded(path: string, limit: number): Promise<FileRead> {
  try {
    const file = await open(path, "r");
    try {
      const chunks: Buffer[] = [];
      let length = 0;
      for await (const chunk of file.createReadStream({ end: limit, autoClose: false })) {
        const bytes = Buffer.from(chunk);
        chunks.push(bytes);
        length += bytes.length;
        if (length > limit) break;
      }
      return { ok: true, bytes: Buffer.concat(chunks).subarray(0, limit + 1) };
    } finally {
      await file.close();
    }
  } catch (error) {
    return { ok: false, message: `cannot read ${path}: ${reasonOf(error)}` };
  }
}
