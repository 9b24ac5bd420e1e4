import type { SheetEntry } from "./registerEntry.js";
import { type FiledSheet, folded } from "./registerIndex.js";

/** What a search asks for; what is null does not matter. */
export interface RegisterQuery {
  /** parts of the text, whatever their case */
  readonly record: string | null;
  readonly title: string | null;
  readonly vessel: string | null;
  /** days in UTC, YYYY-MM-DD, both included */
  readonly from: string | null;
  readonly to: string | null;
  /** "not assessed" is a class that no findings gave */
  readonly class: Exclude<SheetEntry["class"], null> | "not assessed" | null;
  readonly stop: boolean | null;
  /** leaves out what another sheet superseded */
  readonly standing: boolean;
}

export const everything: RegisterQuery = {
  record: null,
  title: null,
  vessel: null,
  from: null,
  to: null,
  class: null,
  stop: null,
  standing: false,
};

/** The sheets that a search asks for, in the order in which they came. */
export function searched(sheets: readonly FiledSheet[], query: RegisterQuery): readonly FiledSheet[] {
  const texts = (["record", "title", "vessel"] as const).flatMap((key) => {
    const part = query[key];
    return part === null ? [] : [{ key, part: folded(part) }];
  });
  return sheets.filter(({ sheet, supersededBy }) => {
    const day = sheet.time.slice(0, 10);
    return (
      !(query.standing && supersededBy !== null) &&
      (query.stop === null || sheet.stop === query.stop) &&
      (query.class === null || (sheet.class ?? "not assessed") === query.class) &&
      (query.from === null || day >= query.from) &&
      (query.to === null || day <= query.to) &&
      texts.every(({ key, part }) => folded(sheet[key] ?? "").includes(part))
    );
  });
}
