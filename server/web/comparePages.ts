import { type Request, type Response, Router } from "express";
import { compareWindows } from "../charts/compareWindows.js";
import { drawSvg } from "../charts/svg.js";
import { abandoned } from "./abandoned.js";
import { cautionsApart, failurePairs, findingDifferences } from "./compareFindings.js";
import { inputDifferences } from "./compareInputs.js";
import { type ScreenedPair, screenPair } from "./compareScreening.js";
import { compareChoices, type Side, sideOf } from "./compareSides.js";
import type { Services } from "./services.js";

/** Two cases side by side: chosen by their addresses, such as `cases/abc` or `demos/ring-closure`. */
export function comparePages(services: Services): Router {
  const router = Router();

  router.get("/compare", async (request, response) => {
    const choices = await compareChoices(services);
    const chosen = { first: addressIn(request, "first"), second: addressIn(request, "second") };
    const shared = { title: "Two cases side by side", wide: true, choices, chosen };
    const missing = Object.values(chosen).filter((address) => address === "").length;
    if (missing > 0) {
      const fault = missing === 1 ? "Choose two cases to hold against each other." : null;
      return render(response, missing === 1 ? 400 : 200, { ...shared, fault });
    }
    const [first, second] = await Promise.all([
      sideOf(services, chosen.first),
      sideOf(services, chosen.second),
    ]);
    if (first === null || second === null) {
      return render(response, 404, {
        ...shared,
        fault: `There is no ${first === null ? "first" : "second"} case at this address.`,
      });
    }
    const quick = request.query.parts === "quick";
    const screened = await screenPair(services, first, second, quick, abandoned(response));
    if (response.closed) return;
    return render(response, 200, {
      ...shared,
      fault: null,
      ...(screened.kind === "running" ? { running: true, script: "/compare.js" } : {}),
      compared: comparedOf(first, second, screened),
    });
  });

  return router;
}

function addressIn(request: Request, which: "first" | "second"): string {
  const value = request.query[which];
  return typeof value === "string" ? value : "";
}

function render(response: Response, status: number, page: Readonly<Record<string, unknown>>): void {
  response.status(status).render("compare", { page: { compared: null, ...page } });
}

/** What the page says about the two. */
function comparedOf(first: Side, second: Side, screened: ScreenedPair) {
  const inputs = inputDifferences(first.document, second.document);
  const about = { sides: [first, second], same: first.address === second.address, inputs };
  if (screened.kind === "faults") return { ...about, screened };
  const [one, other] = screened.findings;
  const figure = compareWindows(
    { title: first.title, findings: one },
    { title: second.title, findings: other },
  );
  return {
    ...about,
    screened,
    figure: { ...figure, svg: drawSvg(figure) },
    findings: findingDifferences(one, other),
    failures: screened.full ? failurePairs(one, other) : [],
    cautions: cautionsApart(one, other),
  };
}
