/** Criticality class of a cooling failure; "none": the process temperature is itself above a limit. */
export type Criticality = 1 | 2 | 3 | 4 | 5 | "none";

/**
 * Criticality class from the order of four temperatures, ties to the worse side:
 * none: Tp >= min(MTT, T_D24). 1: MTSR < MTT < T_D24. 2: MTSR < T_D24 <= MTT.
 * 3: MTT <= MTSR < T_D24. 4: MTT < T_D24 <= MTSR. 5: T_D24 <= MTT and T_D24 <= MTSR.
 *
 * @param process Tp, K
 * @param mtsr maximum temperature of the synthesis reaction, K
 * @param mtt maximum temperature for technical reasons, K
 * @param td24 K
 * @see Stoessel 1993, Chem. Eng. Prog. 89(10):68; Stoessel 2008
 */
export function criticalityClass(process: number, mtsr: number, mtt: number, td24: number): Criticality {
  if (process >= Math.min(mtt, td24)) return "none";
  if (td24 <= mtt) return td24 <= mtsr ? 5 : 2;
  if (mtsr < mtt) return 1;
  return mtsr < td24 ? 3 : 4;
}

/**
 * Likelihood of a runaway from its time to maximum rate: high up to 8 h, medium up to 24 h, low beyond.
 *
 * @param time TMRad at MTSR, s
 * @see Gygax 1988; Stoessel 2008
 */
export function likelihoodOf(time: number): "high" | "medium" | "low" {
  if (time <= 8 * 3600) return "high";
  return time <= 24 * 3600 ? "medium" : "low";
}
