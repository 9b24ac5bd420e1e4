import { type DrawnFindings, type DrawnOptions, drawnFindings } from "../../server/screening/drawn.js";
import { type KnownRates, knownRates } from "../../server/screening/known.js";
import type { CaseModel } from "../../server/screening/model.js";
import { estimates, realise } from "../../server/screening/realise.js";
import { td24 } from "../../server/thermal/td24.js";
import { type Study, studyOf } from "../../server/window/study.js";
import { type TemperatureWindow, temperatureWindow } from "../../server/window/window.js";
import { modelOf } from "./realised.js";

/** A case at its estimates, ready to be drawn. */
export interface DrawnCase {
  readonly model: CaseModel;
  readonly known: KnownRates;
  readonly study: Study;
  readonly window: TemperatureWindow;
  draw(options?: DrawnOptions): DrawnFindings;
}

/** Opens a case document for drawing. */
export function drawnCase(document: unknown): DrawnCase {
  const model = modelOf(document);
  const known = knownRates(model);
  const study = studyOf(realise(model, known, estimates), "draws");
  const window = temperatureWindow(study);
  const nominal = { study, window, td24: study.runaway === null ? null : td24(study.runaway) };
  return { model, known, study, window, draw: (options) => drawnFindings(model, known, nominal, options) };
}

/** The part of the criterion that holds at the planned temperature. */
export function probabilityOf({ window }: DrawnFindings, key: string): number | null {
  return window?.lanes.find((lane) => lane.key === key)?.probability ?? null;
}

/** Cautious spans of a criterion. */
export function cautiousOf({ window }: DrawnFindings, key: string) {
  return window?.lanes.find((lane) => lane.key === key)?.cautious ?? null;
}
