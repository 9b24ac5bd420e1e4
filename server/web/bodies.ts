import type { RequestHandler } from "express";
import { refuse, tooLarge } from "./problems.js";

const MiB = 2 ** 20;

/** A form carries a case with its names and escapes; no other page takes as much. */
const largest_bytes = MiB;

/** Pages that take a whole sheet. */
const larger_bytes: Readonly<Record<string, number>> = { "/verify": 16 * MiB };

/** Bodies under way, all together: each is copied a few times while it is read. */
const largestSum_bytes = 32 * MiB;

/**
 * Refuses a body that is too long as soon as that is known: by its announced length, or else once more than is
 * allowed has come. The readers of bodies know their limits too, but read on to the end before they say so.
 */
export function limitBodies(): RequestHandler {
  let held_bytes = 0;
  return (request, response, next) => {
    const allowed_bytes = larger_bytes[request.path] ?? largest_bytes;
    if (Number(request.headers["content-length"] ?? 0) > allowed_bytes) {
      return refuse(request, response, {
        ...tooLarge,
        detail: "This is longer than anything that is read here.",
      });
    }
    let came_bytes = 0;
    // A listener for "data" sets the body flowing: ours must follow that of whoever reads it.
    request.once("resume", () => {
      request.on("data", (chunk: Buffer) => {
        if (response.headersSent) return;
        came_bytes += chunk.length;
        held_bytes += chunk.length;
        if (came_bytes > allowed_bytes) return refuse(request, response, tooLarge);
        if (held_bytes <= largestSum_bytes) return;
        response.set("Retry-After", "5");
        refuse(request, response, {
          status: 503,
          title: "Service Unavailable",
          detail: "Too much is being sent to this server at once. Try again in a moment.",
          faults: [],
        });
      });
    });
    response.on("close", () => {
      held_bytes -= came_bytes;
    });
    next();
  };
}

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
