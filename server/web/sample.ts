import { readCase } from "../case/read.js";
import { ladder } from "../charts/ladder.js";
import { drawSvgAt } from "../charts/svg.js";
import type { DemoCase } from "../files/demos.js";
import type { Screener } from "./screener.js";

/** A picture of what comes out, for the first page. */
export interface Sample {
  readonly name: string;
  readonly title: string;
  readonly svg: string;
}

/** Screens demo cases, without failures and draws, until one has a window to show. */
export async function sampleOf(demos: readonly DemoCase[], screener: Screener): Promise<Sample | null> {
  for (const { name, title, document } of demos) {
    const read = readCase(document);
    if (!read.ok) continue;
    const { model, digest } = read;
    const findings = await screener.screen({ model, digest, depth: "quick" });
    if (findings.window === null || findings.window.lower_K === null) continue;
    return { name, title, svg: drawSvgAt(ladder(findings), "narrow") };
  }
  return null;
}
