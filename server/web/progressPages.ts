import { type Request, type Response, Router } from "express";
import { readCase } from "../case/read.js";
import { titleOf } from "../files/cases.js";
import type { Findings } from "../screening/findings.js";
import { abandoned } from "./abandoned.js";
import { beginFull } from "./beginFull.js";
import { type CaseToShow, renderCase } from "./casePage.js";
import { fileName } from "./fileName.js";
import type { LongScreening, Wish } from "./longScreenings.js";
import { refuse, tellWhen } from "./problems.js";
import { endOf, progressView } from "./progressWords.js";
import type { Services } from "./services.js";
import { Unavailable } from "./unavailable.js";

const tick_ms = 300;

/** Pages of full screenings that outlast the request that asked for them. */
export function progressPages(services: Services): Router {
  const { screenings } = services;
  const router = Router();

  router.get("/screenings/:id", (request, response) => {
    const screening = screenings.find(request.params.id);
    if (screening === null || screening.wish === null) return missing(request, response);
    return renderCourse(services, response, screening, screening.wish);
  });

  router.post("/screenings/:id/cancel", (request, response) => {
    const screening = screenings.find(request.params.id);
    if (screening === null) return missing(request, response);
    screening.cancel();
    response.redirect(303, `/screenings/${screening.id}`);
  });

  router.get("/screenings/:id/file", (request, response) => {
    const screening = screenings.find(request.params.id);
    const course = screening?.course();
    if (screening?.wish?.file == null || course?.kind !== "done") return missing(request, response);
    return sendFile(services, response, screening.wish, course.findings);
  });

  router.get("/screenings/:id/events", (request, response) => {
    const screening = screenings.find(request.params.id);
    if (screening === null) return missing(request, response);
    sendEvents(response, screening);
  });

  return router;
}

/**
 * Answers with what was wished for once the full screening of a case is done: at once where it is quick, else from
 * an address of its own, which shows the progress meanwhile.
 */
export async function renderScreened(
  services: Services,
  response: Response,
  shown: CaseToShow,
  file: Wish["file"] = null,
): Promise<void> {
  const wish: Wish = { shown, file };
  const screening = await beginFull(services, response, shown.document, wish);
  if (screening === null) {
    response.status(422);
    return renderCase(services, response, shown);
  }
  const course = screening.course();
  if (course.kind === "running") return response.redirect(303, `/screenings/${screening.id}`);
  if (course.kind === "done" && file !== null) return sendFile(services, response, wish, course.findings);
  return renderCourse(services, response, screening, wish);
}

async function renderCourse(
  services: Services,
  response: Response,
  screening: LongScreening,
  { shown, file }: Wish,
): Promise<void> {
  const course = screening.course();
  if (response.closed) return;
  if (course.kind === "running") {
    screening.look();
    response.set("Cache-Control", "no-store").render("screening", {
      page: { title: titleOf(shown.document), script: "/progress.js", progress: progressView(screening) },
    });
    return;
  }
  if (course.kind === "done") {
    const ready = file === null ? {} : { file: `/screenings/${screening.id}/file` };
    return renderCase(services, response, { ...shown, findings: course.findings, ...ready });
  }
  if (course.kind === "failed") {
    response.status(course.error instanceof Unavailable ? 503 : 500);
    if (course.error instanceof Unavailable) tellWhen(response, course.error);
  }
  return renderCase(services, response, { ...shown, told: endOf(course) });
}

async function sendFile(
  { screener }: Services,
  response: Response,
  { shown, file }: Wish,
  findings: Findings,
): Promise<void> {
  const read = readCase(shown.document);
  if (!read.ok) throw new Error("A case that was screened cannot be read.");
  const name = fileName(titleOf(shown.document));
  if (file === "findings") {
    response.attachment(`${name} findings.json`).json(findings);
    return;
  }
  const paper = shown.paper === "Letter" ? "Letter" : "A4";
  const { document, model } = read;
  const sheet = await screener.sheet({ document, model, findings, paper }, abandoned(response));
  response.attachment(`${name}.pdf`).type("application/pdf").send(sheet);
}

/** Tells the progress as server-sent events, until the end or until nobody listens. */
function sendEvents(response: Response, screening: LongScreening): void {
  const leave = screening.watch();
  response.writeHead(200, {
    "Content-Type": "text/event-stream; charset=utf-8",
    "Cache-Control": "no-store",
  });
  // A connection that breaks is made anew after a second.
  response.write("retry: 1000\n\n");
  const tell = (event: string, data: unknown): void => {
    response.write(`event: ${event}\ndata: ${JSON.stringify(data)}\n\n`);
  };
  const tick = (): void => {
    const course = screening.course();
    if (course.kind === "running") {
      tell("progress", progressView(screening));
    } else {
      tell("end", { done: course.kind === "done", text: endOf(course) });
      response.end();
    }
  };
  const timer = setInterval(tick, tick_ms);
  response.on("close", () => {
    clearInterval(timer);
    leave();
  });
  tick();
}

function missing(request: Request, response: Response): void {
  refuse(request, response, {
    status: 404,
    title: "Not Found",
    detail: "There is no such screening, or it is not kept any more.",
    faults: [],
  });
}
