import type { Criterion } from "../criterion.js";
import { completion } from "./completion.js";
import { cooling } from "./cooling.js";
import { hold } from "./hold.js";
import { mtsrMtt } from "./mtsrMtt.js";
import { mtsrTmr } from "./mtsrTmr.js";
import { stability } from "./stability.js";

/** Every criterion, in the order of the lanes. */
export const criteria: readonly Criterion[] = [completion, cooling, mtsrMtt, mtsrTmr, hold, stability];
