import type { Findings } from "../screening/findings.js";

/** Characters of JSON that all remembered findings may have together: a few times as much in memory. */
const room = 8_000_000;

/**
 * Findings of the cases screened last, by digest: the same case has the same findings, so what was computed for a
 * page need not be computed again for its sheet.
 */
export function rememberedFindings() {
  const kept = new Map<string, { readonly findings: Findings; readonly size: number }>();
  let taken = 0;

  function forget(digest: string): void {
    taken -= kept.get(digest)?.size ?? 0;
    kept.delete(digest);
  }

  return {
    find(digest: string): Findings | null {
      const found = kept.get(digest);
      if (found === undefined) return null;
      kept.delete(digest);
      kept.set(digest, found);
      return found.findings;
    },
    keep(findings: Findings): Findings {
      forget(findings.digest);
      const size = JSON.stringify(findings).length;
      kept.set(findings.digest, { findings, size });
      taken += size;
      for (const digest of kept.keys()) {
        if (taken <= room || kept.size === 1) break;
        forget(digest);
      }
      return findings;
    },
  };
}
