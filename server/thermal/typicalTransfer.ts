/** W/(m^2 K), lowest and highest. */
export type Range = readonly [number, number];

export type JacketMedium = "steam" | "brine" | "heatTransferOil";
export type WallMaterial = "stainless" | "glassLined";
export type Contents = "water" | "aqueous" | "organics" | "lightOil" | "heavyOil";

/**
 * Typical overall coefficients of jacketed vessels, W/(m^2 K). A mark of what is plausible, no design figure.
 *
 * Stainless steel, brine, water: the print has 230 to 1625 beside its own 40 to 180 Btu/(h ft^2 degF); 180 of
 * them are 1022 W/(m^2 K), so that 1625 is taken as a misprint. The narrower range marks more, the careful side.
 *
 * @see Perry's Chemical Engineers' Handbook, Table 11-7
 */
const ranges: Readonly<Record<WallMaterial, Record<JacketMedium, Record<Contents, Range>>>> = {
  stainless: {
    steam: {
      water: [850, 1700],
      aqueous: [450, 1140],
      organics: [285, 850],
      lightOil: [340, 910],
      heavyOil: [57, 285],
    },
    brine: {
      water: [230, 1022],
      aqueous: [200, 850],
      organics: [170, 680],
      lightOil: [200, 740],
      heavyOil: [57, 170],
    },
    heatTransferOil: {
      water: [285, 1140],
      aqueous: [230, 965],
      organics: [170, 680],
      lightOil: [200, 740],
      heavyOil: [57, 230],
    },
  },
  glassLined: {
    steam: {
      water: [400, 570],
      aqueous: [285, 480],
      organics: [170, 400],
      lightOil: [230, 425],
      heavyOil: [57, 230],
    },
    brine: {
      water: [170, 450],
      aqueous: [140, 400],
      organics: [115, 340],
      lightOil: [140, 370],
      heavyOil: [57, 170],
    },
    heatTransferOil: {
      water: [170, 450],
      aqueous: [140, 400],
      organics: [140, 370],
      lightOil: [115, 400],
      heavyOil: [57, 200],
    },
  },
};

/**
 * The handbook's typical range of the overall coefficient of a jacketed vessel.
 *
 * @param wall stainless or glass-lined steel
 * @param jacket medium in the jacket
 * @param contents of the vessel
 * @returns W/(m^2 K)
 */
export function typicalTransfer(wall: WallMaterial, jacket: JacketMedium, contents: Contents): Range {
  return ranges[wall][jacket][contents];
}

/**
 * From the lowest to the highest coefficient in the whole table, whatever wall, medium and contents.
 *
 * @returns W/(m^2 K)
 */
export function typicalTransferSpan(): Range {
  const all = Object.values(ranges).flatMap((byMedium) =>
    Object.values(byMedium).flatMap((byContents) => Object.values(byContents).flat()),
  );
  return [Math.min(...all), Math.max(...all)];
}
