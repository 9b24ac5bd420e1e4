import { isIPv6 } from "node:net";
import type { RequestHandler } from "express";
import { refuse } from "./problems.js";

/** How much one client may ask for: a burst, and what comes back of it with time. */
export interface Allowance {
  readonly burst: number;
  readonly perSecond: number;
}

/** Token buckets, one for each client that asked lately. */
export interface TokenBuckets {
  /** Takes a token. @returns 0 where there was one, otherwise the seconds until there is */
  take(client: string): number;
  /** Fills a client's bucket. */
  refill(client: string): void;
}

/** So many clients are told apart at most; beyond it, the half that asked the longest ago is forgotten. */
const mostClients = 20_000;

/**
 * A bucket needs one number, the moment at which it is full again: a token pushes that moment on by
 * 1/perSecond, and none is left while it lies more than burst/perSecond ahead.
 *
 * @param now a clock that never goes back, ms; tests bring their own
 */
export function tokenBuckets({ burst, perSecond }: Allowance, now = () => performance.now()): TokenBuckets {
  const token_ms = 1000 / perSecond;
  const fullAt = new Map<string, number>();

  return {
    take(client) {
      const at = now();
      const full = Math.max(at, fullAt.get(client) ?? at) + token_ms;
      const missing_ms = full - at - burst * token_ms;
      if (missing_ms > 1e-6) return missing_ms / 1000;
      // Taken out and put back, so that the map stays in the order of the last tokens.
      fullAt.delete(client);
      fullAt.set(client, full);
      if (fullAt.size > mostClients) forgetHalf(fullAt);
      return 0;
    },
    refill: (client) => void fullAt.delete(client),
  };
}

/** Half at once: looking for the first entry of a map takes the longer, the more were taken out before it. */
function forgetHalf(clients: Map<string, unknown>): void {
  let left = Math.ceil(clients.size / 2);
  for (const client of clients.keys()) {
    if (left === 0) return;
    clients.delete(client);
    left -= 1;
  }
}

/**
 * Whom to count a request for: its address, or the half of an IPv6 address that stands for one network,
 * because whoever has one such network can send from any address in it.
 */
export function clientOf(address: string | undefined): string {
  const plain = (address ?? "").replace(/^::ffff:(?=\d+\.)/i, "").replace(/%.*$/, "");
  return isIPv6(plain) ? groupsOf(plain).slice(0, 4).join(":") : plain;
}

/** The eight groups of an IPv6 address, "::" written out. */
function groupsOf(address: string): readonly string[] {
  const [head = "", tail] = new URL(`http://[${address}]`).hostname.slice(1, -1).split("::");
  const before = head === "" ? [] : head.split(":");
  const after = tail === undefined || tail === "" ? [] : tail.split(":");
  return [...before, ...Array<string>(8 - before.length - after.length).fill("0"), ...after];
}

/** Pages: ten colleagues behind one address do not notice it. */
const reading: Allowance = { burst: 300, perSecond: 20 };

/** Screenings, sheets, saves and what follows the typing: each takes milliseconds to seconds. */
const sending: Allowance = { burst: 400, perSecond: 20 };

/** Refuses a client that asks for more than the server can do for one and still serve the others. */
export function limitRate(now?: () => number): RequestHandler {
  const pages = tokenBuckets(reading, now);
  const work = tokenBuckets(sending, now);
  return (request, response, next) => {
    const buckets = request.method === "GET" || request.method === "HEAD" ? pages : work;
    const wait_s = buckets.take(clientOf(request.ip));
    if (wait_s === 0) return next();
    response.set("Retry-After", String(Math.ceil(wait_s)));
    refuse(request, response, {
      status: 429,
      title: "Too Many Requests",
      detail: "More requests came from this address than the server takes at once. Try again in a moment.",
      faults: [],
    });
  };
}
