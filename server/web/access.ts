import { type Request, type RequestHandler, Router } from "express";
import type { PasswordHash } from "../password.js";
import { type PasswordAnswer, type PasswordCheck, passwordCheck } from "./accessPassword.js";
import { createSessions } from "./accessSessions.js";
import { refuse } from "./problems.js";
import { clientOf } from "./rateLimit.js";
import { askToSignIn, sessionOf, signInPages } from "./signIn.js";

/** How to set a password, for whoever runs the server. */
const how =
  "Whoever runs it: make a password with `npm run --silent access-hash`, start the server with the ACCESS_HASH " +
  "that it prints, and name the host that people call in PUBLIC_HOST.";

/**
 * Guards a server without a password: what something on the way has passed on may come from anyone, though it
 * arrives from this very machine.
 */
export function unforwardedOnly(): RequestHandler {
  return (request, response, next) => {
    if (!isForwarded(request)) return next();
    refuse(request, response, {
      status: 403,
      title: "Forbidden",
      detail: `This request was forwarded, so others can reach this server, and it has no access password. ${how}`,
      faults: [],
    });
  };
}

function isForwarded({ headers }: Request): boolean {
  return Object.keys(headers).some((name) => /^(forwarded|via|x-real-ip|x-forwarded-.*)$/.test(name));
}

/**
 * Guards a server with a password: people sign in on a page and carry a cookie, programs send the password with each
 * request by HTTP Basic (RFC 7617), under any user name.
 */
export function signedInOnly(hash: PasswordHash): Router {
  const router = Router();
  const sessions = createSessions();
  const check = passwordCheck(hash);

  router.use((request, response, next) => {
    // Nothing on the way may keep a case; browsers may, so that going back shows what was typed.
    response.set("Cache-Control", "private, no-cache");
    response.locals.signedIn = sessions.holds(sessionOf(request));
    next();
  });
  router.use(signInPages(check, sessions));
  router.use(async (request, response, next) => {
    if (response.locals.signedIn === true) return next();
    const answer = await byHeader(request, check);
    if (answer?.kind === "right") return next();
    if (answer?.kind === "wait") {
      response.set("Retry-After", String(Math.ceil(answer.wait_s)));
      return refuse(request, response, {
        status: 429,
        title: "Too Many Requests",
        detail: "Too many passwords were tried. Wait before trying the next one.",
        faults: [],
      });
    }
    if (answer === null && !request.path.startsWith("/api/")) return askToSignIn(request, response);
    response.set("WWW-Authenticate", 'Basic realm="Thermal Window", charset="UTF-8"');
    return refuse(request, response, {
      status: 401,
      title: "Unauthorized",
      detail:
        "This server has an access password. Send it by HTTP Basic authentication; the user name can be any.",
      faults: [],
    });
  });
  return router;
}

/** @returns null where no password stands in the headers */
async function byHeader(request: Request, check: PasswordCheck): Promise<PasswordAnswer | null> {
  const header = request.headers.authorization;
  if (header === undefined) return null;
  const credentials = /^basic +([\w+/]+=*) *$/i.exec(header)?.[1];
  const text = Buffer.from(credentials ?? "", "base64").toString();
  const colon = text.indexOf(":");
  return colon < 0 ? { kind: "wrong" } : check(text.slice(colon + 1), clientOf(request.ip));
}
