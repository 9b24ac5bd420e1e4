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

/**
 * Refuses a request for any name but the loopback ones and the one configured. A foreign
 * site can make its own name resolve to this address (DNS rebinding) and would then count as
 * the same origin; its name in the Host header gives it away.
 */
export function ownHostOnly(configured: string): RequestHandler {
  const allowed = new Set([...loopback, configured.toLowerCase(), `[${configured.toLowerCase()}]`]);
  return (request, response, next) => {
    if (allowed.has(hostNameOf(request.headers.host))) return next();
    refuse(request, response, {
      status: 421,
      title: "Misdirected Request",
      detail: "This server does not answer under that host name.",
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
