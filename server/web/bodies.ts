import type { Request, RequestHandler, Response } from "express";
import { type Problem, refuse } from "./problems.js";

const MiB = 2 ** 20;

/** A form carries a case with its names and escapes; no other page takes as much. */
const largest_bytes = MiB;

/** Pages that take a whole sheet. */
const larger_bytes: Readonly<Record<string, number>> = { "/verify": 4 * MiB };

/** Bodies under way, all together: each is copied a few times while it is read. */
const largestSum_bytes = 16 * MiB;

/**
 * Refuses a body that is too long as soon as that is known: by its announced length, or else once more than is
 * allowed has come. The readers of bodies know their limits too, but read on to the end before they say so.
 */
export function limitBodies(): RequestHandler {
  let underWay_bytes = 0;
  return (request, response, next) => {
    const { headers } = request;
    const allowed_bytes = larger_bytes[request.path] ?? largest_bytes;
    const unknown = headers["transfer-encoding"] !== undefined;
    const length_bytes = unknown ? allowed_bytes : Number(headers["content-length"] ?? 0);
    if (length_bytes > allowed_bytes) return refuse(request, response, tooLong);
    if (length_bytes > 0 && underWay_bytes + length_bytes > largestSum_bytes) {
      response.set("Retry-After", "5");
      return refuse(request, response, tooMuch);
    }
    underWay_bytes += length_bytes;
    response.on("close", () => {
      underWay_bytes -= length_bytes;
    });
    if (unknown) stopBeyond(allowed_bytes, request, response);
    next();
  };
}

/** Answers at once, and so not with a page: while one is made, more would come. Browsers announce their lengths. */
function stopBeyond(allowed_bytes: number, request: Request, response: Response): void {
  let came_bytes = 0;
  // A listener for "data" sets the body flowing: ours must follow that of whoever reads it.
  request.once("resume", () => {
    request.on("data", (chunk: Buffer) => {
      came_bytes += chunk.length;
      if (came_bytes <= allowed_bytes || response.headersSent) return;
      response.writeHead(tooLong.status, { "Content-Type": "application/problem+json" });
      response.end(JSON.stringify(tooLong));
    });
  });
}

const tooLong: Problem = {
  status: 413,
  title: "Content Too Large",
  detail: "This is longer than anything that is read here. A case is at most 256 KiB.",
  faults: [],
};

const tooMuch: Problem = {
  status: 503,
  title: "Service Unavailable",
  detail: "Too much is being sent to this server at once. Try again in a moment.",
  faults: [],
};

/**
 * Ends the connection of a request that was answered before all of it had come. What still comes is thrown away for
 * a few seconds: closed at once, the connection would take the answer with it, before most clients have read it.
 */
export function endUnread(linger_ms = 5000): RequestHandler {
  return (request, response, next) => {
    const { socket, headers } = request;
    if (headers["content-length"] === undefined && headers["transfer-encoding"] === undefined) return next();
    // Node closes a connection that is not to be kept right after the answer; here, that is left to what follows.
    const keeps = response.shouldKeepAlive;
    response.shouldKeepAlive = true;
    response.on("finish", () => {
      const close = () => {
        if (!request.complete) socket.destroy();
        else if (!keeps) socket.end();
      };
      if (request.complete) return close();
      request.resume();
      const timer = setTimeout(close, linger_ms);
      request.on("end", close);
      request.on("close", () => clearTimeout(timer));
    });
    next();
  };
}
