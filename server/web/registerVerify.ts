import { type Request, type Response, Router, raw } from "express";
import type { ChainCheck } from "../files/registerChain.js";
import { type SheetStanding, standingOf } from "../files/registerStanding.js";
import { parseRecord } from "../records/extract.js";
import { type Verification, verifySheet } from "../sheet/verify.js";
import { abandoned } from "./abandoned.js";
import { renderCase } from "./casePage.js";
import { refuse } from "./problems.js";
import { addressOfSheet, numberIn } from "./registerView.js";
import type { Services } from "./services.js";
import { readForm } from "./upload.js";

/** Many times the size of a sheet; what is longer is not read. */
const largestUpload = { bytes: 4 * 1024 * 1024, words: "4 MB" };

/** One thing that was checked, in one plain sentence. */
interface ShownCheck {
  readonly name: string;
  /** null: neither for nor against the sheet */
  readonly passed: boolean | null;
  readonly sentence: string;
}

interface Verdict {
  readonly title: string;
  readonly good: boolean;
  readonly checks: readonly ShownCheck[];
  readonly address: string | null;
}

/** The page that verifies a sheet, and the check of the whole register. */
export function registerVerify(services: Services): Router {
  const { register, screener } = services;
  const router = Router();
  let checking: Promise<ChainCheck> | null = null;

  router.get("/verify", (_request, response) => render(response, null));

  const form = raw({ type: "multipart/form-data", limit: largestUpload.bytes });
  router.post("/verify", form, async (request, response) => {
    const file = (await readForm(request))?.get("file");
    if (!(file instanceof File) || file.size === 0) {
      return render(response.status(400), null, "Choose a sheet (PDF), or the record of one (JSON).");
    }
    return render(response, await verdictOn(Buffer.from(await file.arrayBuffer()), response));
  });

  router.post("/register/check", async (_request, response) => {
    checking ??= register.check({ sheet: "all" }).finally(() => {
      checking = null;
    });
    const { upTo, faults } = await checking;
    return render(response, wholeVerdict(upTo, faults));
  });

  router.post("/register/:number/verify", async (request, response, next) => {
    const filed = await sheetIn(request);
    const pdf = filed === null ? null : await register.pdf(filed.sheet);
    if (filed === null) return next();
    if (pdf !== null) return render(response, await verdictOn(pdf, response));
    const { number } = filed.sheet;
    const { faults } = await register.check({ upTo: number, sheet: number });
    return render(response, {
      title: notVerified,
      good: false,
      checks: faults.map((sentence) => ({ name: "Register", passed: false, sentence })),
      address: addressOfSheet(number),
    });
  });

  router.get("/register/:number/case", async (request, response, next) => {
    const filed = await sheetIn(request);
    if (filed === null) return next();
    const record = await register.record(filed.sheet);
    const read = record === null ? null : parseRecord(record);
    if (!read?.ok) return refuse(request, response, noRecord);
    return renderCase(services, response, { document: read.record.case, origin: { kind: "opened" } });
  });

  async function sheetIn(request: Request) {
    const number = numberIn(request.params.number);
    return number === null ? null : (await register.fresh()).sheet(number);
  }

  async function verdictOn(file: Buffer, response: Response): Promise<Verdict> {
    const signal = abandoned(response);
    const verification = await verifySheet(
      file,
      (model, digest) => screener.screen({ model, digest, depth: "full" }, signal),
      (input) => screener.sheet(input, signal),
    );
    return verdict(verification, await standingOf(register, file));
  }

  return router;
}

function render(response: Response, verdict: Verdict | null, fault: string | null = null): void {
  response.render("registerVerify", {
    page: { title: "Verify", verdict, fault, largest: largestUpload.words },
  });
}

const notVerified = "NOT verified: do not rely on this sheet.";

const checkNames = { record: "Record", inputs: "Inputs", findings: "Findings", pages: "Pages" } as const;

function verdict({ verified, checks }: Verification, standing: SheetStanding): Verdict {
  const good = verified && standing.state !== "against" && standing.faults.length === 0;
  return {
    title: good ? goodTitle(standing) : notVerified,
    good,
    checks: [
      ...checks.map(({ name, passed, sentence }) => ({ name: checkNames[name], passed, sentence })),
      {
        name: "Register",
        passed: standing.state === "out" ? null : standing.state === "in",
        sentence: standing.sentence,
      },
      ...chainChecks(standing),
    ],
    address: standing.filed === null ? null : addressOfSheet(standing.filed.sheet.number),
  };
}

function goodTitle({ state, filed }: SheetStanding): string {
  const follows = "Verified: the sheet follows from its own inputs";
  const place =
    state === "out"
      ? ", but it is not in this register"
      : filed?.supersededBy == null
        ? " and stands in this register"
        : ` and is in this register, superseded by No. ${filed.supersededBy}`;
  return `${follows}${place}. That does not make the step safe.`;
}

function chainChecks({ filed, faults }: SheetStanding): readonly ShownCheck[] {
  return faults.length === 0 && filed !== null
    ? [
        {
          name: "Chain",
          passed: true,
          sentence: `The register is whole from its first entry to entry ${filed.sheet.number}.`,
        },
      ]
    : faults.map((sentence) => ({ name: "Chain", passed: false, sentence }));
}

function wholeVerdict(upTo: number, faults: readonly string[]): Verdict {
  const good = faults.length === 0;
  const whole =
    upTo === 0
      ? "The register is empty."
      : `All ${upTo} entries follow from each other, and every sheet is the one that was filed.`;
  return {
    title: good ? "The register is whole." : "The register is NOT whole.",
    good,
    checks: good
      ? [{ name: "Chain", passed: true, sentence: whole }]
      : faults.map((sentence) => ({ name: "Chain", passed: false, sentence })),
    address: null,
  };
}

const noRecord = {
  status: 500,
  title: "Not the sheet that was filed",
  detail: "The record of this sheet is missing or was changed since it was filed. A backup may hold it.",
  faults: [],
};
