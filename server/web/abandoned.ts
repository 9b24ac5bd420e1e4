import type { Response } from "express";

/** A signal that is raised when the client goes away before it has its answer. */
export function abandoned(response: Response): AbortSignal {
  const controller = new AbortController();
  response.on("close", () => {
    if (!response.writableFinished) controller.abort();
  });
  return controller.signal;
}
