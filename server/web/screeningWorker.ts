import type { Findings } from "../screening/findings.js";
import { screen } from "../screening/screen.js";
import type { SheetInput } from "../sheet/render.js";
import type { Order } from "./pool.js";
import { reportTo } from "./poolControl.js";
import type { ScreeningOrder } from "./screener.js";

/** What a worker thread runs: one screening, from numbers to numbers. */
export function screenCase({ task: { model, digest, depth }, control }: Order<ScreeningOrder>): Findings {
  return screen(model, { digest, depth, onProgress: reportTo(control) });
}

/** Or one sheet. The PDF writer and its fonts are loaded with the first one. */
export async function drawSheet({ task }: Order<SheetInput>): Promise<Uint8Array> {
  const { renderSheet } = await import("../sheet/render.js");
  return renderSheet(task);
}

/** Or nothing, which shows that the thread works. */
export function respond(): void {}
