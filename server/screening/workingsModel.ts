import type { pressureUnits } from "../thermal/boilingPoint.js";
import type { Contents, JacketMedium, WallMaterial } from "../thermal/typicalTransfer.js";

/** What the workings behind three fields of a case were given, SI; null where the field was typed outright. */
export interface WorkingsModel {
  readonly area: AreaInputs | null;
  readonly coefficient: CoefficientInputs | null;
  readonly maximumTechnicalTemperature: BoilingInputs | null;
}

/** Vessel, contents and jacket; heights above the lowest point of the bottom, m. */
export type AreaInputs = {
  /** m */
  readonly innerDiameter: number;
  /** m^3 */
  readonly fillVolume: number;
  /** m^3 up to the flange; null where not told */
  readonly vesselVolume: number | null;
  readonly jacketLower: number;
  readonly jacketUpper: number;
} & (
  | { readonly bottom: "flat" }
  | { readonly bottom: "ellipsoidal" }
  | { readonly bottom: "torispherical"; readonly dishRadius: number; readonly knuckleRadius: number }
  | { readonly bottom: "kloepper" | "korbbogen"; readonly wallThickness: number }
);

/** Films, W/(m^2 K), solids, m and W/(m K), and fouling, m^2 K/W. */
export interface CoefficientInputs {
  readonly insideFilm: number;
  readonly outsideFilm: number;
  readonly wallThickness: number;
  readonly wallConductivity: number;
  readonly lining: { readonly thickness: number; readonly conductivity: number } | null;
  readonly insideFouling: number;
  readonly outsideFouling: number;
  readonly jacketMedium: JacketMedium | null;
  readonly wall: WallMaterial | null;
  readonly contents: Contents | null;
}

/** A boiling point at an absolute pressure, Pa; temperatures in K. */
export type BoilingInputs =
  | {
      readonly method: "clausius-clapeyron";
      readonly normalBoilingPoint: number;
      /** J/mol */
      readonly heatOfVaporisation: number;
      readonly pressure: number;
    }
  | {
      readonly method: "antoine";
      /** as tabulated, in the two units below */
      readonly a: number;
      readonly b: number;
      readonly c: number;
      readonly pressureUnit: keyof typeof pressureUnits;
      readonly temperatureUnit: "degC" | "K";
      /** range over which the constants hold */
      readonly lowest: number;
      readonly highest: number;
      readonly pressure: number;
    };
