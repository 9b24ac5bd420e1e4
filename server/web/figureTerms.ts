import type { Findings } from "../screening/findings.js";
import { type Term, termNamed } from "../words/glossary.js";

const names: Readonly<Record<string, readonly string[]>> = {
  window: ["window", "lane", "ladder", "criticality class", "cautious side", "control band", "advisory"],
  ladder: ["ladder", "criticality class", "cautious side"],
  rate: ["rate constant", "fitted range", "extrapolation", "95 % interval"],
  "decomposition-rate": ["rate constant", "fitted range", "extrapolation", "95 % interval"],
  "rate-residuals": ["residual", "leverage"],
  "decomposition-residuals": ["residual", "leverage"],
  tmrad: ["TMRad", "T_D24", "closed form", "likelihood"],
  dosing: ["accumulation", "measured accumulation", "MTSR", "semibatch"],
  heat: [
    "cooling capacity",
    "temperature of no return",
    "tangency",
    "critical coolant temperature",
    "stability ratio",
  ],
  "feed-lever": ["accumulation", "window"],
  failures: [
    "cooling failure",
    "time to act",
    "lost",
    "response",
    "alarm temperature",
    "quench",
    "worst start",
  ],
  vulnerable: ["time to act", "worst start"],
};

/** What of a figure the glossary explains; of the window its lanes as well. */
export function figureTerms(id: string, { window }: Findings): readonly Term[] {
  const lanes = id === "window" ? (window?.criteria ?? []).map((criterion) => criterion.label) : [];
  const known = names[id] ?? names[id.replace(/-\d+$/u, "")] ?? [];
  return [...known, ...lanes].map(termNamed).filter((term) => term !== null);
}
