import type { Findings } from "../screening/findings.js";

const kept = 40;

/**
 * The full findings of the cases screened last, by digest: the same case has the same findings,
 * so what was computed for a page need not be computed again for its sheet.
 */
export function fullest() {
  const findings = new Map<string, Findings>();
  return {
    find(digest: string): Findings | null {
      return findings.get(digest) ?? null;
    },
    keep(fresh: Findings): Findings {
      findings.delete(fresh.digest);
      findings.set(fresh.digest, fresh);
      const oldest = findings.keys().next().value;
      if (findings.size > kept && oldest !== undefined) findings.delete(oldest);
      return fresh;
    },
  };
}
