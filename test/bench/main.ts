import { cpus } from "node:os";
import { dosingBench } from "./dosing.js";
import { drawsBench, driversBench } from "./draws.js";
import { failuresBench } from "./failures.js";
import type { Bench } from "./measure.js";
import { registerBench } from "./register.js";
import { runawayBench } from "./runaway.js";
import { screeningBench } from "./screening.js";
import { sheetBench } from "./sheet.js";

const benches: readonly Bench[] = [
  runawayBench,
  dosingBench,
  screeningBench,
  drawsBench,
  driversBench,
  failuresBench,
  sheetBench,
  registerBench,
];

/** Prints the bench page; the exit status tells whether every bound was met. */
async function main(): Promise<void> {
  process.stdout.write(
    `node ${process.version}, ${cpus().length} processors, ${cpus()[0]?.model ?? "unknown"}\n`,
  );
  let missed = 0;
  for (const bench of benches) {
    process.stdout.write(`\n${bench.title}\n`);
    for (const { what, figure, bound } of await bench.run()) {
      const verdict = bound === undefined ? "" : `  (${bound.text}: ${bound.met ? "met" : "MISSED"})`;
      process.stdout.write(`  ${what.padEnd(78)} ${figure}${verdict}\n`);
      if (bound?.met === false) missed += 1;
    }
  }
  process.exitCode = missed === 0 ? 0 : 1;
}

await main();
