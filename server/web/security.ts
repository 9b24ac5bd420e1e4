import type { RequestHandler } from "express";
import helmet from "helmet";
import { refuse } from "./problems.js";

/**
 * Headers: scripts, styles and fonts from this server only, nothing inline, no frames.
 * The referrer policy must not be "no-referrer": browsers then send `Origin: null` with
 * this server's own forms, and the check of origins below would refuse them.
 */
export function headers(): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'"],
        fontSrc: ["'self'"],
        imgSrc: ["'self'"],
        connectSrc: ["'self'"],
        formAction: ["'self'"],
        baseUri: ["'none'"],
        frameAncestors: ["'none'"],
      },
    },
    referrerPolicy: { policy: "same-origin" },
    strictTransportSecurity: false,
  });
}

const loopback: ReadonlySet<string> = new Set(["localhost", "127.0.0.1", "[::1]"]);

/** Every address of the machine; no address that a page could be called by. */
const wildcards: ReadonlySet<string> = new Set(["0.0.0.0", "::"]);

/**
 * Refuses a request for any name but the loopback ones, those configured, and the very address that the request
 * came to. A foreign site can make its own name resolve to this address (DNS rebinding) and would then count as
 * the same origin; its name in the Host header gives it away.
 */
export function ownHostOnly(configured: readonly string[]): RequestHandler {
  const names = configured.map((name) => name.toLowerCase()).filter((name) => !wildcards.has(name));
  const allowed = new Set([...loopback, ...names.flatMap((name) => [name, `[${name}]`])]);
  return (request, response, next) => {
    const host = hostNameOf(request.headers.host);
    const address = (request.socket.localAddress ?? "").replace(/^::ffff:(?=\d+\.)/, "");
    if (allowed.has(host) || host === address || host === `[${address}]`) return next();
    refuse(request, response, {
      status: 421,
      title: "Misdirected Request",
      detail:
        "This server does not answer under that host name. Whoever runs it can allow a name by PUBLIC_HOST.",
      faults: [],
    });
  };
}

/**
 * Refuses a write that another site's page sends. Browsers say where a write comes from in
 * Origin, newer ones in Sec-Fetch-Site as well; programs send neither.
 */
export function ownOriginWrites(): RequestHandler {
  return (request, response, next) => {
    if (request.method === "GET" || request.method === "HEAD") return next();
    const { origin, host } = request.headers;
    const site = request.headers["sec-fetch-site"];
    const foreign = origin !== undefined && hostOf(origin) !== host?.toLowerCase();
    if (!foreign && (site === undefined || site === "same-origin" || site === "none")) return next();
    refuse(request, response, {
      status: 403,
      title: "Forbidden",
      detail: "A page of another site sent this. Open the case here and send it from its own page.",
      faults: [],
    });
  };
}

function hostOf(origin: string): string | null {
  return URL.canParse(origin) ? new URL(origin).host : null;
}

/** The name without its port, lower case; "" where there is none. */
function hostNameOf(host: string | undefined): string {
  return (host ?? "").toLowerCase().replace(/:\d*$/, "");
}
