import { type Response, Router, raw } from "express";
import { readCaseText } from "../case/read.js";
import { timeText } from "../words/timeText.js";
import { renderCase } from "./casePage.js";
import { compareChoices } from "./compareSides.js";
import { refuse, tooLarge } from "./problems.js";
import { type Sample, sampleOf } from "./sample.js";
import type { Services } from "./services.js";
import { readUpload } from "./upload.js";

/** Whether a file was text, and not a picture or a PDF that was chosen by mistake. */
function isText(content: string): boolean {
  return !/[\0\uFFFD]/.test(content);
}

/** The first page: what this is, cases to start from, cases that were saved, a file to open. */
export function homePages(services: Services): Router {
  const router = Router();
  let sample: Promise<Sample | null> | null = null;

  async function renderHome(response: Response, opening: { pasted?: string; fault?: string } = {}) {
    const entries = (await services.cases.list()).map((each) => ({ ...each, saved: timeText(each.savedAt) }));
    sample ??= sampleOf(services.demos, services.screener);
    response.render("home", {
      page: {
        sample: await sample,
        title: "Cases",
        demos: services.demos,
        choices: await compareChoices(services),
        cases: entries.filter((each) => !each.archived),
        archived: entries.filter((each) => each.archived),
        pasted: opening.pasted ?? "",
        fault: opening.fault ?? null,
      },
    });
  }

  router.get("/", async (_request, response) => renderHome(response));

  // The envelope of a form and its boundary come on top of the case itself.
  router.post("/open", raw({ type: "multipart/form-data", limit: "600kb" }), async (request, response) => {
    const upload = await readUpload(request);
    const text = upload?.text ?? "";
    if (text.trim() === "") {
      response.status(400);
      return renderHome(response, { fault: "Choose a file, or paste the text of a case document." });
    }
    const read = readCaseText(text);
    if (!read.ok && read.kind === "size") return refuse(request, response, tooLarge);
    if (!read.ok && read.kind === "json") {
      response.status(400);
      const fault = read.faults.map((each) => each.message).join(" ");
      // What came from a file can be mended in the page too, unless it is no text at all.
      return renderHome(response, { pasted: upload?.pasted || isText(text) ? text : "", fault });
    }
    const document: unknown = read.ok ? read.document : JSON.parse(text);
    return renderCase(services, response, { document, origin: { kind: "opened" } });
  });

  return router;
}
