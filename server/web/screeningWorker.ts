import type { Findings } from "../screening/findings.js";
import { screen } from "../screening/screen.js";
import type { ScreeningOrder } from "./screener.js";

/** What a worker thread runs: one screening, from numbers to numbers. */
export default function work({ model, digest, depth }: ScreeningOrder): Findings {
  return screen(model, { digest, depth });
}
