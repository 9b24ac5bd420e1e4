import { createServer, type RequestListener, type Server } from "node:http";

/** How long a client may take to send: the head of a request, and all of it. */
export interface Patience {
  readonly head_ms: number;
  readonly whole_ms: number;
}

const usual: Patience = { head_ms: 10_000, whole_ms: 20_000 };

/** More connections at once are closed unanswered: each takes some 20 kB before anything is known of it. */
const mostConnections = 10_000;

/** Longer than proxies keep a connection that waits for the next request: theirs must be the end that closes it. */
const idle_ms = 65_000;

/** Enough for addresses and cookies; the head of a request that has not all come is held in memory. */
const largestHead_bytes = 8192;

/** A server that does not wait for ever, for many at once. A request that comes too slowly is answered with 408. */
export function serverOf(answer: RequestListener, { head_ms, whole_ms }: Patience = usual): Server {
  const server = createServer(
    {
      headersTimeout: head_ms,
      requestTimeout: whole_ms,
      maxHeaderSize: largestHead_bytes,
      keepAliveTimeout: idle_ms,
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
