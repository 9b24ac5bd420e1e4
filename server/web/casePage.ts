import type { Response } from "express";
import {
  type Before,
  type FormField,
  type FormSection,
  fieldsOf,
  formOf,
  type Pasted,
  workingsShown,
} from "../case/form.js";
import { type Fault, readCase } from "../case/read.js";
import { type SavedCase, titleOf } from "../files/cases.js";
import type { DemoCase } from "../files/demos.js";
import type { Findings } from "../screening/findings.js";
import { timeText } from "../words/timeText.js";
import { beginFull } from "./beginFull.js";
import { differences } from "./differences.js";
import { type FindingsView, findingsView } from "./findingsView.js";
import { type ListedFault, listFaults, type Places, placeAt, placesOf } from "./places.js";
import { endOf, type ProgressView, progressView } from "./progressWords.js";
import type { FilingTrouble } from "./registerTrouble.js";
import type { Services } from "./services.js";

/** Where the case on a page comes from, and so where its form goes. */
export type Origin =
  | { readonly kind: "new" }
  | { readonly kind: "opened" }
  | { readonly kind: "demo"; readonly demo: DemoCase }
  | { readonly kind: "saved"; readonly saved: SavedCase };

export interface CaseToShow {
  readonly document: unknown;
  readonly origin: Origin;
  /** false while fields are still being added: an empty one is no fault yet */
  readonly faultsShown?: boolean;
  /** pointer below which alone faults are shown */
  readonly faultsUnder?: string;
  /** what fields held before they were worked out */
  readonly before?: Before;
  /** what waits in the text areas of tables */
  readonly pasted?: Pasted;
  /** otherwise the page comes with what is known at once */
  readonly findings?: Findings;
  /** why there are no full findings */
  readonly told?: string | null;
  /** address of the file that was asked for and is ready */
  readonly file?: string;
  /** what was typed differs from what `origin` holds */
  readonly changed?: boolean;
  /** of the sheet, as chosen in the form */
  readonly paper?: unknown;
  /** the newer copy that stood in the way of a save */
  readonly conflict?: SavedCase;
  /** why its sheet was not filed */
  readonly filing?: FilingTrouble;
}

/** What a screening of a typed case came to: faults, or findings, or neither yet. */
export interface Outcome {
  /** true while someone types: faults are then reported more quietly */
  readonly live: boolean;
  readonly faults: readonly ListedFault[];
  readonly findings: FindingsView | null;
  /** of the failures and draws that are being computed */
  readonly progress: ProgressView | null;
  /** why they were not */
  readonly told: string | null;
}

interface Screened {
  readonly faults: readonly Fault[];
  readonly findings: FindingsView | null;
}

/** Screens a document and answers with the page of its case. */
export async function renderCase(services: Services, response: Response, shown: CaseToShow): Promise<void> {
  const { document, origin, faultsShown = true, faultsUnder = "", before = {} } = shown;
  const screened = await screenDocument(services, document, shown.findings);
  const faults = screened.faults.filter(({ pointer }) => faultsShown && pointer.startsWith(faultsUnder));
  const sections = formOf(document, faults, before, shown.pasted);
  const places = placesOf(sections);
  const saved = origin.kind === "saved" ? origin.saved : null;
  response.render("case", {
    page: {
      title: titleOf(document),
      wide: true,
      script: ["/case.js", "/figures.js", "/progress.js"],
      state: stateOf(shown),
      action: saved === null ? "/cases/new" : `/cases/${saved.id}`,
      revision: shown.conflict?.revision ?? saved?.revision ?? null,
      sections,
      paper: shown.paper,
      outcome: {
        live: false,
        faults: listFaults(faults, places),
        findings: screened.findings,
        progress: null,
        told: shown.told ?? null,
      },
      file: shown.file ?? null,
      conflict: shown.conflict === undefined ? null : conflictOf(document, shown.conflict),
      filing: shown.filing ?? null,
    },
    targetOf: targets(places),
  });
}

/** Quick: no failures and draws. Rest: what the page shows is quick and of these fields, so only what is new. */
export type OutcomeParts = "quick" | "full" | "rest";

/** Screens what someone is typing and answers with the part of the page that holds the result, or its progress. */
export async function renderOutcome(
  services: Services,
  response: Response,
  document: unknown,
  parts: OutcomeParts,
): Promise<void> {
  const screening = parts === "quick" ? null : await beginFull(services, response, document, null);
  const course = screening?.course() ?? null;
  if (response.closed) return;
  if (parts === "rest" && screening !== null && course?.kind === "running") {
    return response.render("parts/pending", { outcome: { progress: progressView(screening), told: null } });
  }
  const { faults, findings } = await screenDocument(
    services,
    document,
    course?.kind === "done" ? course.findings : undefined,
  );
  const sections = formOf(document, faults);
  const places = placesOf(sections);
  const outcome: Outcome = {
    live: true,
    faults: listFaults(faults, places),
    findings,
    progress: screening !== null && course?.kind === "running" ? progressView(screening) : null,
    told: course === null ? null : endOf(course),
  };
  response.render("fragment", {
    outcome,
    workings: workingsShown(sections),
    reads: readsOf(sections),
    targetOf: targets(places),
  });
}

/** What each quantity of a form was understood as. */
function readsOf(sections: readonly FormSection[]): FormField[] {
  return fieldsOf(sections).filter(({ readBack }) => readBack !== undefined);
}

async function screenDocument(
  { screener }: Services,
  document: unknown,
  findings?: Findings,
): Promise<Screened> {
  const read = readCase(document);
  if (!read.ok) return { faults: read.faults, findings: null };
  const { model, digest } = read;
  const found =
    findings ?? screener.known(digest) ?? (await screener.screen({ model, digest, depth: "quick" }));
  return { faults: [], findings: findingsView(found, model) };
}

/** For links from a caution to the input it is about. */
function targets(places: Places): (pointer: string) => string | null {
  return (pointer) => placeAt(places, pointer)?.id ?? null;
}

function stateOf({ origin, changed, conflict }: CaseToShow): string {
  if (conflict !== undefined) return "Not saved";
  if (changed) return "Changed since it was last saved";
  if (origin.kind === "demo") return "A demo case, invented; saving makes a copy of your own";
  if (origin.kind === "saved") return `Saved ${timeText(origin.saved.savedAt)}`;
  return "Not saved yet";
}

function conflictOf(document: unknown, current: SavedCase) {
  return {
    savedAt: timeText(current.savedAt),
    address: `/cases/${current.id}`,
    differences: differences(document, current.document),
  };
}
