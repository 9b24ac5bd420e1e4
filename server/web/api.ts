import { Router, text } from "express";
import { caseJsonSchema } from "../case/jsonSchema.js";
import { largestCase, type ReadCase, readCaseText } from "../case/read.js";
import { abandoned } from "./abandoned.js";
import { notJson, type Problem, refuse, refusedCase, tooLarge, wrongType } from "./problems.js";
import type { Services } from "./services.js";

/** The JSON interface: a case goes in, findings or a sheet come out, faults are problem details. */
export function jsonInterface({ screener }: Services): Router {
  const router = Router();
  const body = text({ type: "application/json", limit: largestCase });

  router.post("/screen", body, async (request, response) => {
    const parts = request.query.parts;
    if (parts !== undefined && parts !== "quick") return refuse(request, response, unknownParts);
    const read = readBody(request.body);
    if (!read?.ok) return refuse(request, response, problemOf(read));
    const depth = parts === "quick" ? "quick" : "full";
    const order = { model: read.model, digest: read.digest, depth } as const;
    response.json(await screener.screen(order, abandoned(response)));
  });

  router.post("/sheet", body, async (request, response) => {
    const paper = request.query.paper ?? "A4";
    if (paper !== "A4" && paper !== "Letter") return refuse(request, response, unknownPaper);
    const read = readBody(request.body);
    if (!read?.ok) return refuse(request, response, problemOf(read));
    const { document, model, digest } = read;
    const signal = abandoned(response);
    const findings = await screener.screen({ model, digest, depth: "full" }, signal);
    const sheet = await screener.sheet({ document, model, findings, paper }, signal);
    response.type("application/pdf").send(sheet);
  });

  router.get("/case-schema", (_request, response) => {
    response.type("application/schema+json").send(JSON.stringify(caseJsonSchema(), null, 2));
  });

  for (const [path, allowed] of [
    ["/screen", "POST"],
    ["/sheet", "POST"],
    ["/case-schema", "GET, HEAD"],
  ] as const) {
    router.all(path, (request, response) => {
      response.set("Allow", allowed);
      refuse(request, response, wrongMethod(allowed));
    });
  }
  return router;
}

/** Null stands for a body of another type, which the parser leaves alone. */
function readBody(body: unknown): ReadCase | null {
  return typeof body === "string" ? readCaseText(body) : null;
}

function problemOf(read: Extract<ReadCase, { ok: false }> | null): Problem {
  if (read === null) return wrongType;
  if (read.kind === "json") return { ...notJson, faults: read.faults };
  return read.kind === "size" ? tooLarge : refusedCase(read.faults);
}

const unknownParts: Problem = {
  status: 400,
  title: "Bad Request",
  detail: "parts can only be quick; leave it out for all parts.",
  faults: [],
};

const unknownPaper: Problem = {
  status: 400,
  title: "Bad Request",
  detail: "paper can be A4 or Letter; A4 unless given.",
  faults: [],
};

function wrongMethod(allowed: string): Problem {
  return { status: 405, title: "Method Not Allowed", detail: `This address takes ${allowed}.`, faults: [] };
}
