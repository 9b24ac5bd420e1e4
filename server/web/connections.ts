import { createServer, type RequestListener, type Server } from "node:http";

/** How long a client may take to send: the head of a request, and all of it. */
export interface Patience {
  readonly head_ms: number;
  readonly whole_ms: number;
}

const usual: Patience = { head_ms: 10_000, whole_ms: 20_000 };

/** More connections at once are closed unanswered: each takes memory before anything is known of it. */
const mostConnections = 2000;

/** A server that does not wait for ever, for many at once. A request that comes too slowly is answered with 408. */
export function serverOf(answer: RequestListener, { head_ms, whole_ms }: Patience = usual): Server {
  const server = createServer(
    {
      headersTimeout: head_ms,
      requestTimeout: whole_ms,
      connectionsCheckingInterval: Math.min(1000, head_ms / 4),
    },
    answer,
  );
  server.maxConnections = mostConnections;
  // Whoever asks before sending a long body is answered as if it had been sent, and need not send it where that is a refusal.
  server.on("checkContinue", (request, response) => {
    request.once("resume", () => {
      if (!response.headersSent) response.writeContinue();
    });
    server.emit("request", request, response);
  });
  return server;
}
