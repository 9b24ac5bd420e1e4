import { screen } from "../../server/screening/screen.js";
import { renderSheet } from "../../server/sheet/render.js";
import { verifySheet } from "../../server/sheet/verify.js";
import { demo } from "./cases.js";
import type { Bench } from "./measure.js";
import { ms } from "./measure.js";

/** Times a call that ends later: the median of a few runs after one that warms up. */
async function timeLater(call: () => Promise<unknown>): Promise<number> {
  await call();
  const times: number[] = [];
  for (let i = 0; i < 7; i += 1) {
    const start = performance.now();
    await call();
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[3] ?? 0;
}

/** The sheet of the acylation demo after its findings, and its verification, screening included. */
export const sheetBench: Bench = {
  title: "The sheet (acylation demo)",
  async run() {
    const { document, model, digest } = demo("acylation");
    const findings = screen(model, { digest, depth: "full" });
    const sheet = () => renderSheet({ document, model, findings, paper: "A4" });
    const pdf = await sheet();
    const drawn = await timeLater(sheet);
    const verified = await timeLater(() =>
      verifySheet(pdf, (read, its) => screen(read, { digest: its, depth: "full" })),
    );
    return [
      {
        what: "drawing it from its findings",
        figure: ms(drawn),
        bound: { text: "below 400 ms", met: drawn < 400 },
      },
      {
        what: "verifying it: screened again, drawn again, compared",
        figure: ms(verified),
        bound: { text: "below 2 s", met: verified < 2000 },
      },
    ];
  },
};
