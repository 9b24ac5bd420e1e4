import { type Request, Router } from "express";
import { readCase } from "../case/read.js";
import type { DemoCase } from "../files/demos.js";
import { answerParts, statuses } from "./interfaceWords.js";
import { problemDetails, refusedCase } from "./problems.js";
import type { Screener } from "./screener.js";
import type { Services } from "./services.js";

const example = "acylation";

/** A case document with faults, short enough for one line of a shell. */
const broken = {
  format: "thermal-window/case-1",
  title: "Half a case",
  mixture: { mass: "1450 L", density: "0.94 kg/L", heatCapacity: "1.95 kJ/(kg K)" },
};

/** The page for those who write programs: examples that run, and answers that were computed for them. */
export function interfacePage({ demos, screener }: Pick<Services, "demos" | "screener">): Router {
  const router = Router();
  const demo = demos.find(({ name }) => name === example) ?? demos[0];
  let answer: Promise<string> | null = null;

  router.get("/interface", async (request, response) => {
    answer ??= answerFor(screener, demo).catch((error: unknown) => {
      answer = null;
      throw error;
    });
    response.render("interface", {
      page: {
        title: "Interface for programs",
        ...commandsFor(originOf(request)),
        example: demo?.title ?? "",
        answer: await answer,
        problem: JSON.stringify(problemOfBroken(), null, 2),
        parts: answerParts,
        statuses,
      },
    });
  });

  router.get("/interface/example.json", (_request, response) => {
    response.json(demo?.document ?? null);
  });

  return router;
}

/** As the caller sees this server; its name was held against the allowed ones before. */
function originOf(request: Request): string {
  return `${request.protocol}://${request.headers.host ?? "localhost"}`;
}

function commandsFor(origin: string) {
  const json = 'curl -s -H "Content-Type: application/json"';
  return {
    fetchExample: `curl -s -o case.json ${origin}/interface/example.json`,
    screen: `${json} --data-binary @case.json "${origin}/api/screen?parts=quick"`,
    sheet: `${json} --data-binary @case.json -o sheet.pdf "${origin}/api/sheet?paper=A4"`,
    refused: `${json} --data '${JSON.stringify(broken)}' ${origin}/api/screen`,
  };
}

async function answerFor(screener: Screener, demo: DemoCase | undefined): Promise<string> {
  const read = readCase(demo?.document);
  if (!read.ok) return "";
  const { model, digest } = read;
  const findings = await screener.screen({ model, digest, depth: "quick" });
  return JSON.stringify(shortened(findings), null, 2);
}

function problemOfBroken(): object {
  const read = readCase(broken);
  return problemDetails(refusedCase(read.ok ? [] : read.faults));
}

/** A list of several things by its first one; pairs of numbers stay whole. */
function shortened(value: unknown): unknown {
  if (Array.isArray(value)) {
    if (value.length <= 2 && value.every((each) => typeof each === "number")) return value;
    const [first] = value;
    return value.length <= 1 ? value.map(shortened) : [shortened(first), `… ${value.length - 1} more`];
  }
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, shortened(each)]));
}
