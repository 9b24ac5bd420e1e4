import { type Request, type Response, Router, urlencoded } from "express";
import { canonicalJson } from "../case/canonical.js";
import { documentFromForm } from "../case/form.js";
import { readCase } from "../case/read.js";
import type { SheetEntry } from "../files/registerEntry.js";
import { type FilableCase, factsOf, isFilable } from "../files/registerFacts.js";
import { recordBytes } from "../records/attach.js";
import { filingText } from "../records/filing.js";
import { timeText } from "../words/timeText.js";
import { abandoned } from "./abandoned.js";
import { type CaseToShow, type Origin, renderCase } from "./casePage.js";
import { controlId } from "./places.js";
import { tellWhen } from "./problems.js";
import { diskRefusal } from "./registerRefusal.js";
import type { FilingTrouble } from "./registerTrouble.js";
import { addressOfSheet, numberIn } from "./registerView.js";
import type { Services } from "./services.js";
import { Unavailable } from "./unavailable.js";
import { waitingRows } from "./waitingRows.js";

/** Files the sheet of a case as it stands in the form, saved or not. */
export function registerFiling(services: Services): Router {
  const { cases, register, screener, log } = services;
  const router = Router();
  const form = urlencoded({ extended: false, limit: "1mb", parameterLimit: 20_000 });

  router.post("/cases/new/file", form, (request, response) => file(request, response, { kind: "new" }));

  router.post("/cases/:id/file", form, async (request, response, next) => {
    const saved = await cases.read(String(request.params.id));
    if (saved === null) return next();
    return file(request, response, { kind: "saved", saved });
  });

  async function file(request: Request, response: Response, origin: Origin): Promise<void> {
    const body: Record<string, unknown> = request.body ?? {};
    const document = documentFromForm(body);
    const paper = body.paper === "Letter" ? "Letter" : "A4";
    const changed =
      origin.kind === "saved" && canonicalJson(document) !== canonicalJson(origin.saved.document);
    const again = (status: number, trouble: Pick<CaseToShow, "filing" | "pasted"> = {}) =>
      renderCase(services, response.status(status), { document, origin, paper, changed, ...trouble });
    const waiting = waitingRows(document, body);
    if (waiting !== null) return again(422, waiting);
    const read = readCase(document);
    if (!read.ok) return again(422);
    const typed = read.document;
    if (!isFilable(typed)) return again(422, { filing: noRecord });
    const { model, digest } = read;
    const signal = abandoned(response);
    try {
      const findings = await screener.screen({ model, digest, depth: "full" }, signal);
      const outcome = await register.file({
        facts: factsOf(typed, findings),
        caseDigest: digest,
        findings,
        supersedes: numberIn(body.supersedes),
        draw: async (filing) => ({
          pdf: await screener.sheet({ document: typed, model, findings, paper, filing }, signal),
          record: recordBytes(typed, findings, filing),
        }),
      });
      if (outcome.filed) return response.redirect(303, addressOfSheet(outcome.entry.number));
      return again(409, { filing: question(typed, digest, outcome.standing) });
    } catch (error) {
      if (error instanceof Unavailable) {
        tellWhen(response, error);
        return again(error.status, { filing: notFiled([error.message, kept]) });
      }
      const refusal = diskRefusal(error);
      if (refusal === null) throw error;
      log.error({ err: error }, "a sheet could not be filed");
      return again(refusal.status, { filing: notFiled([refusal.sentence, kept, lookFirst]) });
    }
  }

  return router;
}

const noRecord: FilingTrouble = {
  title: "Not filed: the batch record is not given",
  sentences: ["A sheet is filed under a batch record and its step. Everything else you typed stands below."],
  links: [{ address: `#${controlId("/batch/record")}`, words: "To the batch record" }],
  button: null,
};

/** Asks before another sheet is superseded. */
function question(document: FilableCase, digest: string, standing: SheetEntry | null): FilingTrouble {
  if (standing === null) {
    return {
      title: "Not filed yet: there is no sheet to supersede",
      sentences: ["No sheet is filed under this batch record and step; the one meant belongs to another."],
      links: [],
      button: { supersedes: "", words: "File it as revision 1" },
    };
  }
  const { record, step } = document.batch;
  const place = step === undefined ? `batch record ${record}` : `batch record ${record}, ${step}`;
  const same = standing.digests.case === digest ? " It is of this very case." : "";
  return {
    title: "Not filed yet: there is a sheet already",
    sentences: [
      `Under ${place} stands ${filingText(standing)}, filed at ${timeText(standing.time)}.${same}`,
      "Filing this one supersedes it. If this is another step, give it a name of its own.",
    ],
    links: [{ address: addressOfSheet(standing.number), words: `Look at No. ${standing.number}` }],
    button: {
      supersedes: String(standing.number),
      words: `File it as revision ${standing.revision + 1}, which supersedes No. ${standing.number}`,
    },
  };
}

const kept = "Nothing you typed is lost: it stands below, and “Case as JSON” gives it to you as a file.";
/** A disk may fail after it has taken the entry. */
const lookFirst = "Before you file again, look in the register whether the sheet stands there.";

function notFiled(sentences: readonly string[]): FilingTrouble {
  return {
    title: "Not filed",
    sentences,
    links: [{ address: "/register", words: "To the register" }],
    button: null,
  };
}
