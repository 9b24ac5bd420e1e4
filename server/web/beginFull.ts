import type { Response } from "express";
import { readCase } from "../case/read.js";
import { abandoned } from "./abandoned.js";
import type { LongScreening, Wish } from "./longScreenings.js";
import type { Services } from "./services.js";

/** Work that takes longer than this shows its progress, ms. */
const patience_ms = 1000;

/**
 * Begins the full screening of a document and waits a second for it. After that it is kept, to be asked for by its
 * identifier; within it, it ends with the client that asked.
 *
 * @returns null where the document has faults
 */
export async function beginFull(
  { screenings }: Pick<Services, "screenings">,
  response: Response,
  document: unknown,
  wish: Wish | null,
): Promise<LongScreening | null> {
  const read = readCase(document);
  if (!read.ok) return null;
  const screening = screenings.begin({ model: read.model, digest: read.digest, depth: "full" }, wish);
  const gone = abandoned(response);
  gone.addEventListener("abort", screening.cancel);
  const course = await screening.within(patience_ms);
  gone.removeEventListener("abort", screening.cancel);
  if (course.kind === "running") screenings.keep(screening);
  return screening;
}
