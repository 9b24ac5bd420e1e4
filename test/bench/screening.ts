import { readFileSync } from "node:fs";
import { readCaseText } from "../../server/case/read.js";
import { screen } from "../../server/screening/screen.js";
import { demo } from "./cases.js";
import { type Bench, below, ms, time } from "./measure.js";

/** Reading and screening of the demo cases at both depths. */
export const screeningBench: Bench = {
  title: "Reading and screening",
  run() {
    const text = readFileSync("scenarios/acylation.json", "utf8");
    const quick = (name: string) => {
      const { model, digest } = demo(name);
      return time(() => screen(model, { digest, depth: "quick" }));
    };
    const full = (name: string) => {
      const { model, digest } = demo(name);
      return time(() => screen(model, { digest, depth: "full" }), 2);
    };
    return [
      { what: "reading a case document", figure: ms(time(() => readCaseText(text)).median) },
      below("quick screening, batch (hydrolysis)", quick("hydrolysis"), 5),
      below(
        "quick screening, batch with an autocatalytic decomposition (ring closure)",
        quick("ring-closure"),
        5,
      ),
      below("quick screening, dosed (acylation)", quick("acylation"), 30),
      { what: "full screening, batch (ring closure)", figure: ms(full("ring-closure").median) },
      below("full screening, dosed (acylation)", full("acylation"), 4000),
    ];
  },
};
