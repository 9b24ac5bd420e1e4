import type { RequestHandler } from "express";
import type { Logger } from "pino";

/** One line per answered request: what was asked and how long it took, nothing of what was typed. */
export function requestLog(log: Logger): RequestHandler {
  return (request, response, next) => {
    const start = performance.now();
    const { method, path } = request; // before routers shorten the path
    response.on("finish", () => {
      const time_ms = Math.round(performance.now() - start);
      log.info({ method, path, status: response.statusCode, time_ms }, "answered");
    });
    next();
  };
}
