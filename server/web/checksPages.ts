import { Router } from "express";
import { type CheckedGroup, checksLine, runChecks } from "../screening/checks/all.js";
import type { Checked } from "../screening/checks/check.js";
import { numberText, superscript } from "../words/numbers.js";

/** The checks of this build against figures from elsewhere, run by the process that answers. */
export function checksPages(run: () => readonly CheckedGroup[] = runChecks): Router {
  const router = Router();
  router.get("/checks", (_request, response) => {
    const groups = run();
    const failed = groups.flatMap((group) => group.checks).filter((check) => !check.agrees).length;
    response.render("checks", {
      page: {
        title: "Checks",
        line: checksLine(groups),
        failed,
        kinds: [
          {
            title: "Against published figures",
            groups: groups.filter((group) => group.kind === "published").map(shown),
          },
          {
            title: "Against an independent implementation",
            groups: groups.filter((group) => group.kind === "independent").map(shown),
          },
        ],
      },
    });
  });
  return router;
}

function shown({ title, source, fromMemory, checks }: CheckedGroup) {
  return { title, source, fromMemory, checks: checks.map(row) };
}

function row(check: Checked) {
  const { what, printed, unit, computed, difference, allowed, because, agrees } = check;
  const digits = printed.replace(/e.*$/iu, "").replace(/^-?0?\.?0*|\D/gu, "").length;
  return {
    what,
    unit,
    printed: printedText(printed),
    computed: Number.isFinite(computed) ? numberText(computed, Math.min(16, digits + 2)) : "no number",
    difference: Number.isFinite(difference) ? signed(difference) : "no number",
    allowed: `± ${numberText(allowed, 2)}, ${because}`,
    agrees,
  };
}

/** As it stands in the source: no digit more or less. */
function printedText(printed: string): string {
  const [mantissa = "", exponent] = printed.replace("-", "−").split("e");
  return exponent === undefined ? mantissa : `${mantissa}×10${superscript(Number(exponent))}`;
}

function signed(difference: number): string {
  return difference > 0 ? `+${numberText(difference, 2)}` : numberText(difference, 2);
}
