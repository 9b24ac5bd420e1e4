import type { Term } from "./glossary.js";

const gygax = "Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008, Thermal Safety of Chemical Processes";

export const temperatureTerms: readonly Term[] = [
  {
    id: "process-temperature",
    name: "Tp",
    also: ["process temperature", "planned process temperature"],
    meaning:
      "The temperature at which the step is planned to run. Every other temperature of a case is judged from it, together with the control band about it.",
    source: "common practice",
  },
  {
    id: "mtsr",
    name: "MTSR",
    also: ["maximum temperature of the synthesis reaction"],
    meaning:
      "The temperature that the desired reaction alone reaches when cooling fails at the worst moment and the feed stops with it. It is the process temperature plus the rise that the reactant accumulated by then still holds.",
    formula: "MTSR = T_{p} + max over the feed of n_{acc}(t) (−ΔH_{r})/C(t)",
    source: gygax,
  },
  {
    id: "mtt",
    name: "MTT",
    also: ["maximum temperature for technical reasons", "technical limit"],
    meaning:
      "The temperature that the equipment must not pass for technical reasons, most often the boiling point or what the relief system is set to. Above it the figures of this program mean nothing, because boiling, venting and failure of the vessel are not computed.",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "td24",
    name: "T_D24",
    also: ["TD24"],
    meaning:
      "The temperature from which fresh material, left without cooling, takes 24 hours to the maximum rate of its decomposition. A lower T_D24 is the more cautious one.",
    formula: "TMRad(T_{D24}) = 24 h",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "all-at-once",
    name: "all at once",
    also: ["all-at-once bound"],
    meaning:
      "The temperature that the whole recipe would reach if everything met unreacted and nothing were cooled. It bounds what MTSR does not cover: a failure during which the feed runs on.",
    formula: "T_{all} = [m_{0} c_{p,0} T + m_{feed} c_{p,feed} T_{feed} + n_{lim} (−ΔH_{r})]/C(end)",
    source: "heat balance",
  },
  {
    id: "criticality-class",
    name: "criticality class",
    also: ["class", "criticality"],
    meaning:
      "A number from 1 to 5 for the order in which process temperature, MTSR, MTT and T_D24 follow each other. In class 1 and 2 the desired reaction cannot trigger the decomposition, in 5 it does, and a step that already runs above MTT or T_D24 has no class.",
    formula:
      "1: MTSR < MTT < T_{D24}; 2: MTSR < T_{D24} ≤ MTT; 3: MTT ≤ MTSR < T_{D24}; 4: MTT < T_{D24} ≤ MTSR; 5: T_{D24} ≤ MTT and T_{D24} ≤ MTSR",
    source: "Stoessel 1993, Chem. Eng. Prog. 89(10):68; Stoessel 2008; ties go to the worse side",
  },
];

export const heatTerms: readonly Term[] = [
  {
    id: "adiabatic-rise",
    name: "adiabatic rise",
    also: ["adiabatic temperature rise"],
    meaning:
      "By how much the contents warm when a reaction runs to its end and nothing carries the heat away. Walls are left out, which is the cautious side.",
    formula: "ΔT_{ad} = n_{lim} (−ΔH_{r})/C(end), ΔT_{ad,d} = Q/c",
    source: gygax,
  },
  {
    id: "severity",
    name: "severity",
    meaning:
      "What a runaway would do, judged by its adiabatic rise: low below 50 K, medium, high from 200 K on. Gas and pressure can raise it, and they are not assessed here.",
    source: gygax,
  },
  {
    id: "accumulation",
    name: "accumulation",
    meaning:
      "Reactant that has been fed and could react, but has not yet; here as a part of the limiting amount. Its heat is still to come when cooling fails.",
    formula: "n_{acc} = min(n_{A}, n_{B}/ν)",
    source: gygax,
  },
  {
    id: "measured-accumulation",
    name: "measured accumulation",
    meaning:
      "The accumulation of a run in a reaction calorimeter, from the heat released so far. Where it exceeds what the kinetics say, it is the one that is used.",
    formula: "X_{fed}(t) − q(t)/q(end), q the heat released up to t",
    source: "common practice",
  },
  {
    id: "limiting-amount",
    name: "limiting amount",
    meaning:
      "The amount of reaction that the whole recipe allows, counted in moles of reactant A. The reactant that is used up first sets it.",
    formula: "n_{lim} = min(n_{A}, n_{B}/ν)",
    source: "common practice",
  },
  {
    id: "batch",
    name: "batch",
    meaning:
      "Everything is in the vessel before the reaction begins. The accumulation then starts at 100 %, so that MTSR is the process temperature plus the whole adiabatic rise.",
    source: "common practice",
  },
  {
    id: "semibatch",
    name: "semibatch",
    also: ["dosing", "feed"],
    meaning:
      "One reactant is fed at a constant rate into the other at constant temperature. A slow feed of a fast reaction keeps the accumulation, and with it MTSR, low.",
    source: "common practice",
  },
  {
    id: "thermal-inertia",
    name: "thermal inertia",
    also: ["phi", "phi factor"],
    meaning:
      "How many times the heat capacity of the contents has to be warmed because the walls warm with them. Only the simulated failures use it; everything else takes 1, the cautious case.",
    formula: "φ = 1 + C_{walls}/(m c_{p})",
    source: "Townsend & Tou 1980, Thermochim. Acta 37:1",
  },
];
