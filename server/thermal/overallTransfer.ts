/** Everything that heat passes on its way through a jacketed wall, from the contents outwards. */
export interface WallInSeries {
  /** film coefficient of the contents, W/(m^2 K) */
  readonly insideFilm: number;
  /** film coefficient of the jacket, W/(m^2 K) */
  readonly outsideFilm: number;
  /** m */
  readonly wallThickness: number;
  /** W/(m K) */
  readonly wallConductivity: number;
  /** m and W/(m K); null without a lining */
  readonly lining: {
    readonly thickness: number;
    readonly conductivity: number;
  } | null;
  /** fouling resistances, m^2 K/W; 0 for a clean wall */
  readonly insideFouling: number;
  readonly outsideFouling: number;
}

/** The resistances of a wall, m^2 K/W, in the order in which heat passes them. */
export interface Resistances {
  readonly insideFilm: number;
  readonly insideFouling: number;
  readonly lining: number;
  readonly wall: number;
  readonly outsideFouling: number;
  readonly outsideFilm: number;
}

/**
 * Resistances to heat transfer of each layer, 1/h of a film and s/k of a solid, on one and the same area: the
 * wall counts as flat, which for a thickness of 1 % of the diameter shifts its share by about 1 %.
 *
 * @param wall SI numbers, films, thickness of the wall and conductivities > 0
 * @returns m^2 K/W each
 * @see Perry's Chemical Engineers' Handbook, section 5, resistances in series
 */
export function resistancesOf(wall: WallInSeries): Resistances {
  return {
    insideFilm: 1 / wall.insideFilm,
    insideFouling: wall.insideFouling,
    lining: wall.lining === null ? 0 : wall.lining.thickness / wall.lining.conductivity,
    wall: wall.wallThickness / wall.wallConductivity,
    outsideFouling: wall.outsideFouling,
    outsideFilm: 1 / wall.outsideFilm,
  };
}

/**
 * Overall heat transfer coefficient of resistances in series, 1/U = sum of R.
 *
 * @param resistances m^2 K/W
 * @returns W/(m^2 K)
 */
export function overallCoefficient(resistances: Resistances): number {
  const { insideFilm, insideFouling, lining, wall, outsideFouling, outsideFilm } = resistances;
  return 1 / (insideFilm + insideFouling + lining + wall + outsideFouling + outsideFilm);
}
