import { titleOf } from "../files/cases.js";
import { timeText } from "../words/timeText.js";
import type { Services } from "./services.js";

/** One of two cases that are held against each other. */
export interface Side {
  /** as in the address of its page: "cases/abc", "demos/ring-closure" */
  readonly address: string;
  readonly title: string;
  /** where it comes from: "saved 2026-03-07 14:05 UTC" */
  readonly state: string;
  readonly document: unknown;
}

/** Cases to choose from, in groups. */
export interface Choices {
  readonly title: string;
  readonly cases: readonly { readonly address: string; readonly label: string }[];
}

/** The case at an address; null where there is none. */
export async function sideOf({ cases, demos }: Services, address: string): Promise<Side | null> {
  const [kind, name = "", ...rest] = address.split("/");
  if (rest.length > 0) return null;
  if (kind === "demos") {
    const demo = demos.find((each) => each.name === name);
    if (demo === undefined) return null;
    return { address, title: demo.title, state: "a demo case, invented", document: demo.document };
  }
  const saved = kind === "cases" ? await cases.read(name) : null;
  if (saved === null) return null;
  const { document } = saved;
  return { address, title: titleOf(document), state: `saved ${timeText(saved.savedAt)}`, document };
}

/** Saved cases, the newest first, and demo cases; groups without any are left out. */
export async function compareChoices({ cases, demos }: Services): Promise<readonly Choices[]> {
  const saved = (await cases.list()).filter((each) => !each.archived);
  const groups = [
    {
      title: "Your cases",
      cases: saved.map(({ id, title, savedAt }) => ({
        address: `cases/${id}`,
        label: `${title} (${timeText(savedAt)})`,
      })),
    },
    {
      title: "Demo cases",
      cases: demos.map(({ name, title }) => ({ address: `demos/${name}`, label: title })),
    },
  ];
  return groups.filter((group) => group.cases.length > 0);
}
