import { type Request, type Response, Router, urlencoded } from "express";
import type { PasswordCheck } from "./accessPassword.js";
import { type Sessions, session_s } from "./accessSessions.js";
import { clientOf } from "./rateLimit.js";

const cookieName = "thermal-window-access";

/** The session that a browser carries. */
export function sessionOf(request: Request): string | undefined {
  const cookies = (request.headers.cookie ?? "").split(";").map((each) => each.trim());
  return cookies.find((each) => each.startsWith(`${cookieName}=`))?.slice(cookieName.length + 1);
}

/**
 * Not sent along with anything that another site's page asks for, but with links to a case: they come from
 * messages and notebooks, and reading changes nothing.
 */
function cookieOptions(request: Request) {
  return { httpOnly: true, sameSite: "lax", secure: request.secure, path: "/" } as const;
}

interface SignInPage {
  /** where to go afterwards */
  readonly to: string;
  readonly fault?: string;
  /** something was sent that must not be lost: sign in beside it */
  readonly sent?: boolean;
}

/** Signing in and out. */
export function signInPages(check: PasswordCheck, sessions: Sessions): Router {
  const router = Router();
  const form = urlencoded({ extended: false, limit: "8kb", parameterLimit: 8 });

  router.get("/sign-in", (request, response) => {
    const to = placeIn(request.query.to);
    if (response.locals.signedIn === true) return response.redirect(303, to);
    render(response, { to });
  });

  router.post("/sign-in", form, async (request, response) => {
    const body: Record<string, unknown> = request.body ?? {};
    const to = placeIn(body.to);
    const password = typeof body.password === "string" ? body.password : "";
    if (password === "") return render(response.status(422), { to, fault: "Type the access password." });
    const answer = await check(password, clientOf(request.ip));
    if (answer.kind === "right") {
      const options = { ...cookieOptions(request), maxAge: 1000 * session_s };
      response.cookie(cookieName, sessions.begin(), options).redirect(303, to);
      return;
    }
    if (answer.kind === "wrong") {
      return render(response.status(403), { to, fault: "That is not the access password." });
    }
    const seconds = Math.ceil(answer.wait_s);
    response.status(429).set("Retry-After", String(seconds));
    render(response, {
      to,
      fault: `Too many passwords were tried. The next one can be tried in ${seconds} s.`,
    });
  });

  router.post("/sign-out", (request, response) => {
    sessions.end(sessionOf(request));
    // Otherwise going back would show pages that the browser keeps.
    response.set("Clear-Site-Data", '"cache"');
    response.clearCookie(cookieName, cookieOptions(request)).redirect(303, "/sign-in");
  });

  return router;
}

/** Answers a request for a page by someone who has not signed in. */
export function askToSignIn(request: Request, response: Response): void {
  const reads = request.method === "GET" || request.method === "HEAD";
  if (reads) {
    const query = request.originalUrl === "/" ? "" : `?to=${encodeURIComponent(request.originalUrl)}`;
    response.redirect(303, `/sign-in${query}`);
  } else {
    render(response.status(403), { to: "/", sent: true });
  }
}

function render(response: Response, { to, fault = "", sent = false }: SignInPage): void {
  response.set("Cache-Control", "no-store");
  response.render("signIn", { page: { title: sent ? "Signed out meanwhile" : "Sign in", to, fault, sent } });
}

const nowhere = "http://server.invalid";

/** A page of this server, whatever was written; the first page where it is none. */
function placeIn(text: unknown): string {
  if (typeof text !== "string" || !text.startsWith("/") || !URL.canParse(text, nowhere)) return "/";
  const { origin, pathname, search } = new URL(text, nowhere);
  // "//name" would lead to another server, and so would what a browser reads as that.
  return origin === nowhere && !/^\/[/\\]/.test(pathname) ? pathname + search : "/";
}
