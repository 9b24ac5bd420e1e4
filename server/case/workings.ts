import { areaWorking } from "../screening/workingsArea.js";
import { boilingWorking } from "../screening/workingsBoiling.js";
import { coefficientWorking } from "../screening/workingsCoefficient.js";
import type { Working } from "../screening/workingsOutline.js";
import type { Kind } from "./dimensions.js";
import { pathOf, pointerOf } from "./faults.js";
import { memberOf, valueAt } from "./outline.js";
import type { ReportAt } from "./rules.js";
import { workingFieldRules } from "./ruleWorkings.js";
import { figureTyped } from "./typed.js";
import { isGroup } from "./typedParts.js";
import { limits, vessel } from "./vesselSchema.js";
import { areaInputs, boilingInputs, coefficientInputs } from "./workingInputs.js";

/** Pointers of what the workings are given, by the field that each of them fills. */
export const workingGroups = {
  "/vessel/heatTransferCoefficient": "/vessel/heatTransferCoefficientFrom",
  "/vessel/heatTransferArea": "/vessel/heatTransferAreaFrom",
  "/limits/maximumTechnicalTemperature": "/limits/maximumTechnicalTemperatureFrom",
} as const;

/** Pointer of a field that a working can fill. */
export type WorkedField = keyof typeof workingGroups;

/**
 * The workings of a document in which the rest may still be missing or wrong. One that cannot be read whole
 * is left out; its faults are told elsewhere.
 *
 * @param document as typed
 */
export function workingsIn(document: unknown): Working[] {
  const broken: string[] = [];
  workingFieldRules(document, (path) => broken.push(pointerOf(path)));
  const read = <Read>(
    field: WorkedField,
    kind: Kind,
    parsed: { readonly data?: Read | undefined },
    work: (given: Read, typed: number | null) => Working,
  ): Working[] => {
    const isBroken = broken.some((pointer) => pointer.startsWith(`${workingGroups[field]}/`));
    if (parsed.data === undefined || isBroken) return [];
    return [work(parsed.data, typedAt(document, field, kind))];
  };
  const group = (field: WorkedField) => valueAt(document, ...pathOf(workingGroups[field]));
  const given = {
    coefficient: vessel.shape.heatTransferCoefficientFrom.safeParse(group("/vessel/heatTransferCoefficient")),
    area: vessel.shape.heatTransferAreaFrom.safeParse(group("/vessel/heatTransferArea")),
    boiling: limits.shape.maximumTechnicalTemperatureFrom.safeParse(
      group("/limits/maximumTechnicalTemperature"),
    ),
  };
  return [
    ...read(
      "/vessel/heatTransferCoefficient",
      "heatTransferCoefficient",
      given.coefficient,
      (figures, typed) => coefficientWorking(coefficientInputs(figures), typed),
    ),
    ...read("/vessel/heatTransferArea", "area", given.area, (figures, typed) =>
      areaWorking(areaInputs(figures), typed, startVolume(document)),
    ),
    ...read("/limits/maximumTechnicalTemperature", "temperature", given.boiling, (figures, typed) =>
      boilingWorking(boilingInputs(figures), typed),
    ),
  ];
}

/** What stands against a working: it would give no area, or no boiling point. */
export function workingRules(document: unknown, report: ReportAt): void {
  for (const { faults } of workingsIn(document)) {
    for (const { pointer, message } of faults) report(pathOf(pointer), message);
  }
}

/** The SI figure of a field that a working fills, in whichever shape it was typed; null where it cannot be read. */
function typedAt(document: unknown, field: WorkedField, kind: Kind): number | null {
  const typed = valueAt(document, ...pathOf(field));
  const inner = memberOf(typed, "value");
  return figureTyped(isGroup(inner) ? inner : typed, kind);
}

/** Volume of the mixture before any feed, m^3; null where it cannot be read. */
function startVolume(document: unknown): number | null {
  const mixture = memberOf(document, "mixture");
  const mass = figureTyped(memberOf(mixture, "mass"), "mass");
  const density = figureTyped(memberOf(mixture, "density"), "density");
  return mass === null || density === null || !(mass > 0 && density > 0) ? null : mass / density;
}
