import { randomInt } from "node:crypto";
import type { Storage } from "./storage.js";

/** A case as it was saved, with or without faults: what someone typed is kept. */
export interface SavedCase {
  readonly id: string;
  /** counts the saves, from 1 */
  readonly revision: number;
  /** ISO 8601, UTC */
  readonly savedAt: string;
  readonly archived: boolean;
  readonly document: unknown;
}

/** One line of the list of cases. */
export interface CaseEntry {
  readonly id: string;
  readonly title: string;
  readonly savedAt: string;
  readonly archived: boolean;
}

export type SaveOutcome =
  | { readonly saved: true; readonly case: SavedCase }
  /** someone saved in between: `current` is theirs, and nothing was written */
  | { readonly saved: false; readonly current: SavedCase };

export interface CaseStore {
  /** newest first; files that do not hold a case are left out */
  list(): Promise<readonly CaseEntry[]>;
  /** @returns null where there is no such case, whatever the text of the id */
  read(id: string): Promise<SavedCase | null>;
  create(document: unknown): Promise<SavedCase>;
  /** Saves over revision `over`, and only over that one. Null where there is no such case. */
  save(
    id: string,
    over: number,
    change: { readonly document?: unknown; readonly archived?: boolean },
  ): Promise<SaveOutcome | null>;
}

const folder = "cases";
const letters = "abcdefghjkmnpqrstuvwxyz23456789";
const idPattern = /^[a-hjkmnp-z2-9]{12}$/;
const namePattern = /^([a-hjkmnp-z2-9]{12})-(\d{6})\.json$/;

/**
 * Saved cases, one file for each revision: cases/ID-REVISION.json. A new revision is a new
 * file that must not exist yet, so two people, or two processes, cannot both save over the
 * same one; the file before it is removed afterwards. Of two that a crash left, the higher counts.
 *
 * @param now the clock; tests bring their own
 */
export function caseStore(storage: Storage, now: () => Date = () => new Date()): CaseStore {
  /** Highest revision of every case. */
  async function revisions(): Promise<Map<string, number>> {
    const found = new Map<string, number>();
    for (const name of await storage.list(folder)) {
      const match = namePattern.exec(name);
      if (match?.[1] === undefined) continue;
      found.set(match[1], Math.max(found.get(match[1]) ?? 0, Number(match[2])));
    }
    return found;
  }

  async function read(id: string): Promise<SavedCase | null> {
    if (!idPattern.test(id)) return null;
    // A save between listing and reading removes the file just found: look again.
    for (let attempt = 0; attempt < 5; attempt += 1) {
      const revision = (await revisions()).get(id);
      if (revision === undefined) return null;
      const text = await storage.read(pathOf(id, revision));
      if (text !== null) return parse(text, id, revision);
    }
    return null;
  }

  async function create(document: unknown): Promise<SavedCase> {
    const id = Array.from({ length: 12 }, () => letters.charAt(randomInt(letters.length))).join("");
    const made: SavedCase = { id, revision: 1, savedAt: now().toISOString(), archived: false, document };
    return (await storage.create(pathOf(id, 1), textOf(made))) ? made : create(document);
  }

  async function save(
    id: string,
    over: number,
    change: { readonly document?: unknown; readonly archived?: boolean },
  ): Promise<SaveOutcome | null> {
    const current = await read(id);
    if (current === null) return null;
    if (current.revision !== over) return { saved: false, current };
    const next = { ...current, ...change, revision: over + 1, savedAt: now().toISOString() };
    const created = await storage.create(pathOf(id, next.revision), textOf(next));
    // Others may have saved more than once since the look above, and removed what would have been in the way.
    const newest = (await revisions()).get(id) ?? next.revision;
    if (!created || newest > next.revision) {
      if (created) await storage.remove(pathOf(id, next.revision));
      return save(id, over, change);
    }
    await storage.remove(pathOf(id, over));
    return { saved: true, case: next };
  }

  async function list(): Promise<readonly CaseEntry[]> {
    const cases = await Promise.all([...(await revisions()).keys()].map(read));
    return cases
      .flatMap((each) => (each === null ? [] : [entryOf(each)]))
      .sort((a, b) => b.savedAt.localeCompare(a.savedAt));
  }

  return { list, read, create, save };
}

/** The title a document gives itself, for a list. */
export function titleOf(document: unknown): string {
  const title =
    typeof document === "object" && document !== null && "title" in document ? document.title : "";
  return typeof title === "string" && title.trim() !== "" ? title.trim() : "Untitled case";
}

function entryOf(saved: SavedCase): CaseEntry {
  return {
    id: saved.id,
    title: titleOf(saved.document),
    savedAt: saved.savedAt,
    archived: saved.archived,
  };
}

function pathOf(id: string, revision: number): string {
  return `${folder}/${id}-${String(revision).padStart(6, "0")}.json`;
}

function textOf(saved: SavedCase): string {
  const { savedAt, archived, document } = saved;
  return `${JSON.stringify({ format: "thermal-window/saved-1", savedAt, archived, document }, null, 2)}\n`;
}

/** Null for a file that someone edited into something else. */
function parse(text: string, id: string, revision: number): SavedCase | null {
  const stored = objectIn(text);
  if (stored?.format !== "thermal-window/saved-1" || typeof stored.savedAt !== "string") return null;
  return {
    id,
    revision,
    savedAt: stored.savedAt,
    archived: stored.archived === true,
    document: stored.document,
  };
}

function objectIn(text: string): Readonly<Record<string, unknown>> | null {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null ? { ...value } : null;
  } catch {
    return null;
  }
}
