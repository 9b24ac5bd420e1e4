import type { ErrorRequestHandler, Request, Response } from "express";
import type { Logger } from "pino";
import type { Fault } from "../case/read.js";
import { Unavailable } from "./unavailable.js";

/** Why a request was not answered as asked; `faults` says which fields, as JSON pointers. */
export interface Problem {
  readonly status: number;
  /** the status in words */
  readonly title: string;
  readonly detail: string;
  readonly faults: readonly Fault[];
}

/** Says when it is worth while to ask again. */
export function tellWhen(response: Response, { retryAfter_s }: Unavailable): void {
  if (retryAfter_s !== null) response.set("Retry-After", String(retryAfter_s));
}

/** Answers with a problem: programs get problem details (RFC 9457), people the error page. */
export function refuse(request: Request, response: Response, problem: Problem): void {
  response.status(problem.status).set("Cache-Control", "no-store");
  if (request.originalUrl.startsWith("/api/")) {
    response.type("application/problem+json").send(JSON.stringify(problemDetails(problem)));
  } else {
    response.render("error", { page: { title: problem.title, problem } });
  }
}

/**
 * What a program gets. Without a type of its own a problem is "about:blank", and its title the status in words
 * (RFC 9457, 4.2.1).
 */
export function problemDetails(problem: Problem): object {
  return { type: "about:blank", ...problem };
}

/** The problem of a case that holds faults. */
export function refusedCase(faults: readonly Fault[]): Problem {
  return {
    status: 422,
    title: "Unprocessable Content",
    detail: faults.length === 1 ? "The case has a fault." : `The case has ${faults.length} faults.`,
    faults,
  };
}

export const tooLarge: Problem = withPointer(413, "Content Too Large", "A case is at most 256 KiB.");
export const notJson: Problem = withPointer(400, "Bad Request", "This is not JSON.");
export const wrongType: Problem = withPointer(
  415,
  "Unsupported Media Type",
  "Send the case as application/json.",
);

function withPointer(status: number, title: string, detail: string): Problem {
  return { status, title, detail, faults: [{ pointer: "", message: detail }] };
}

/** Everything a handler throws ends here: what the client caused is named, the rest is logged and is our defect. */
export function answerErrors(log: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    // Answered already, or nobody there to be answered.
    if (response.closed || response.writableEnded) return;
    if (response.headersSent) return next(error);
    const problem = problemOf(error);
    if (error instanceof Unavailable) tellWhen(response, error);
    else if (problem.status >= 500)
      log.error({ err: error, method: request.method, path: request.originalUrl.split("?")[0] });
    refuse(request, response, problem);
  };
}

/** Express and its body parsers throw errors that carry the status they stand for. */
function problemOf(error: unknown): Problem {
  const status = error instanceof Error && "status" in error ? error.status : 500;
  if (status === 413) return tooLarge;
  if (status === 415) return wrongType;
  if (typeof status === "number" && status >= 400 && status < 500) {
    return withPointer(400, "Bad Request", "The request could not be read.");
  }
  if (error instanceof Unavailable) {
    return { status: 503, title: "Service Unavailable", detail: error.message, faults: [] };
  }
  return {
    status: 500,
    title: "Internal Server Error",
    detail:
      "This is a defect of the program, not of your input. What you typed is still in your browser: go back.",
    faults: [],
  };
}
