import { type Request, type Response, Router, urlencoded } from "express";
import { canonicalJson } from "../case/canonical.js";
import {
  beforeOf,
  blankCase,
  documentFromForm,
  editForm,
  isPasting,
  isWorking,
  pastedIn,
  pasteRows,
  workField,
} from "../case/form.js";
import { titleOf } from "../files/cases.js";
import { type Origin, renderCase, renderOutcome } from "./casePage.js";
import { fileName } from "./fileName.js";
import { refuse } from "./problems.js";
import { renderScreened } from "./progressPages.js";
import type { Services } from "./services.js";
import { waitingRows } from "./waitingRows.js";

/** Pages of single cases. The form carries the whole case, so every action starts from what was typed. */
export function casePages(services: Services): Router {
  const { cases, demos } = services;
  const router = Router();
  const form = urlencoded({ extended: false, limit: "1mb", parameterLimit: 20_000 });

  router.get("/cases/new", (_request, response) =>
    renderCase(services, response, {
      document: blankCase(),
      origin: { kind: "new" },
      faultsShown: false,
    }),
  );

  router.get("/demos/:name", async (request, response) => {
    const demo = demos.find((each) => each.name === request.params.name);
    if (demo === undefined) return missing(request, response);
    return renderCase(services, response, { document: demo.document, origin: { kind: "demo", demo } });
  });

  router.get("/cases/:id", async (request, response) => {
    const saved = await cases.read(request.params.id);
    if (saved === null) return missing(request, response);
    return renderCase(services, response, { document: saved.document, origin: { kind: "saved", saved } });
  });

  router.post("/cases/new", form, (request, response) => act(request, response, { kind: "new" }));

  router.post("/cases/:id", form, async (request, response) => {
    const saved = await cases.read(String(request.params.id));
    if (saved === null) return missing(request, response);
    return act(request, response, { kind: "saved", saved });
  });

  router.post("/findings", form, (request, response) => {
    const { parts } = request.query;
    const asked = parts === "quick" || parts === "rest" ? parts : "full";
    return renderOutcome(services, response, documentFromForm(request.body ?? {}), asked);
  });

  for (const [action, archived] of [
    ["archive", true],
    ["restore", false],
  ] as const) {
    router.post(`/cases/:id/${action}`, async (request, response) => {
      const saved = await cases.read(request.params.id);
      if (saved === null) return missing(request, response);
      await cases.save(saved.id, saved.revision, { archived });
      response.redirect(303, "/");
    });
  }

  /** What the button that was pressed asks for. */
  async function act(request: Request, response: Response, origin: Origin): Promise<void> {
    const body: Record<string, unknown> = request.body ?? {};
    const action = typeof body.do === "string" ? body.do : "screen";
    const document = documentFromForm(body);
    const before = beforeOf(body);
    const pasted = pastedIn(body);
    const kept = { origin, before, pasted };
    const waiting = leavesPage(action) ? waitingRows(document, body) : null;
    if (waiting !== null) {
      response.status(422);
      return renderCase(services, response, { ...kept, ...waiting, document, changed: true });
    }
    if (action === "save") return save(response, document, origin, Number(body.revision));
    if (action === "copy") {
      const made = await cases.create(withTitle(document, `${titleOf(document)}, copy`));
      return response.redirect(303, `/cases/${made.id}`);
    }
    if (action === "case") {
      response.attachment(`${fileName(titleOf(document))}.json`);
      response.type("application/json").send(`${JSON.stringify(document, null, 2)}\n`);
      return;
    }
    if (action === "update" || /^(add|add-failure|remove):/.test(action)) {
      const edited = editForm(document, action);
      return renderCase(services, response, { ...kept, document: edited, faultsShown: false, changed: true });
    }
    if (isPasting(action)) {
      const { list: faultsUnder, ...taken } = pasteRows(document, action, pasted);
      return renderCase(services, response, { ...kept, ...taken, faultsUnder, changed: true });
    }
    if (isWorking(action)) {
      const { group: faultsUnder, ...worked } = workField(document, action, before);
      return renderCase(services, response, { ...kept, ...worked, faultsUnder, changed: true });
    }
    const shown = { ...kept, document, changed: isChanged(document, origin), paper: body.paper };
    const file = action === "sheet" || action === "findings" ? action : null;
    return renderScreened(services, response, shown, file);
  }

  async function save(response: Response, document: unknown, origin: Origin, over: number): Promise<void> {
    if (origin.kind !== "saved") {
      const made = await cases.create(document);
      return response.redirect(303, `/cases/${made.id}`);
    }
    const { id } = origin.saved;
    const outcome = await cases.save(id, over, { document, archived: false });
    if (outcome === null || outcome.saved) return response.redirect(303, `/cases/${id}`);
    response.status(409);
    return renderCase(services, response, { document, origin, conflict: outcome.current });
  }

  return router;
}

/** Whether an action takes the case somewhere else, and so would leave behind what was only pasted. */
function leavesPage(action: string): boolean {
  return ["save", "copy", "case", "sheet", "findings"].includes(action);
}

function missing(request: Request, response: Response): void {
  refuse(request, response, {
    status: 404,
    title: "Not Found",
    detail: "There is no case at this address.",
    faults: [],
  });
}

function withTitle(document: unknown, title: string): unknown {
  return typeof document === "object" && document !== null ? { ...document, title } : document;
}

function isChanged(document: unknown, origin: Origin): boolean {
  if (origin.kind !== "saved") return false;
  return canonicalJson(document) !== canonicalJson(origin.saved.document);
}
