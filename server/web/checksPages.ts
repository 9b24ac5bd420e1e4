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
            theirs: "Published",
            groups: groups.filter((group) => group.kind === "published").map(shown),
          },
          {
            title: "Against an independent implementation",
            theirs: "Independent",
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
  return {
    what,
    unit,
    printed: printedText(printed),
    computed: computedText(computed, printed),
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

/** Beside the printed figure: the same power of ten, two digits more, as far as there are any. */
function computedText(computed: number, printed: string): string {
  if (!Number.isFinite(computed)) return "no number";
  if (Number.isInteger(computed) && !printed.includes(".")) return String(computed).replace("-", "−");
  const [mantissa = "", exponent] = printed.split("e");
  const scaled = computed / 10 ** Number(exponent ?? 0);
  const before = Math.max(1, Math.ceil(Math.log10(Math.abs(scaled))));
  const decimals = Math.min((mantissa.split(".")[1]?.length ?? 0) + 2, 16 - before);
  const text = scaled.toFixed(decimals).replace("-", "−");
  return exponent === undefined ? text : `${text}×10${superscript(Number(exponent))}`;
}

function signed(difference: number): string {
  return difference > 0 ? `+${numberText(difference, 2)}` : numberText(difference, 2);
}
