import type { Term } from "./glossary.js";

export const coolingTerms: readonly Term[] = [
  {
    id: "ua",
    name: "UA",
    also: ["heat transfer coefficient", "overall heat transfer coefficient"],
    meaning:
      "Overall heat transfer coefficient times wetted area: the watts that pass through the wall per kelvin of difference. Fouling, a thicker mixture and a lower level make it smaller in practice.",
    formula: "UA_{e} = UA w/(UA + w), w = flow × c_{p}",
    source: "heat balance of a mixed jacket (common practice)",
  },
  {
    id: "cooling-capacity",
    name: "cooling capacity",
    also: ["capacity"],
    meaning:
      "The heat that full cooling takes out of the vessel at a temperature. It is zero where the contents are as cold as the coolant.",
    formula: "UA_{e} (T − T_{c})",
    source: "heat balance of a mixed jacket (common practice)",
  },
  {
    id: "cooling-duty",
    name: "cooling duty",
    also: ["duty"],
    meaning:
      "The largest heat that has to be taken out during the feed, or at the start of a batch, to hold the temperature. Losses to the surroundings are not credited.",
    formula: "largest of r V (−ΔH_{r}) + m Q k_{d} f(α) − feed c_{p} (T − T_{feed}), plus the agitator",
    source: "heat balance (common practice)",
  },
  {
    id: "cooling-use",
    name: "cooling use",
    meaning:
      "Duty over capacity at the process temperature. Above the allowed use nothing is left for a feed that runs a little faster or a wall that has fouled.",
    formula: "duty/capacity",
    source: "common practice",
  },
  {
    id: "stability-ratio",
    name: "stability ratio",
    also: ["steadies itself"],
    meaning:
      "How much faster the heat released grows with temperature than the heat removed, at constant coolant. Below 1 the vessel steadies itself, from 1 on it relies on its controller alone.",
    formula: "(dq_{net}/dT)/UA_{e}",
    source: "Semenov 1928, Z. Phys. 48:571; van Heerden 1953, Ind. Eng. Chem. 45:1242",
  },
  {
    id: "no-return",
    name: "temperature of no return",
    also: ["no return"],
    meaning:
      "The lowest temperature above the planned one at which the heat released overtakes full cooling. Beyond it the contents run away although everything works.",
    formula: "q_{net} = UA_{e} (T − T_{c}), dq_{net}/dT > UA_{e}",
    source: "Semenov 1928, Z. Phys. 48:571; van Heerden 1953, Ind. Eng. Chem. 45:1242",
  },
  {
    id: "tangency",
    name: "tangency",
    meaning:
      "The temperature at which the curve of heat released is just as steep as the line of heat removed. At the critical coolant temperature the two touch there.",
    formula: "dq_{net}/dT = UA_{e}",
    source: "Semenov 1928, Z. Phys. 48:571",
  },
  {
    id: "critical-coolant",
    name: "critical coolant temperature",
    meaning:
      "The warmest coolant that still has a temperature at which heat released and heat removed balance. A coolant warmer than that cannot hold the batch at any temperature.",
    formula: "T_{c,crit} = T* − q_{net}(T*)/UA_{e}",
    source: "Semenov 1928, Z. Phys. 48:571",
  },
];

export const windowTerms: readonly Term[] = [
  {
    id: "window",
    name: "window",
    also: ["temperature window"],
    meaning:
      "The span of process temperature that every assessed criterion allows. A criterion without its data leaves it marked incomplete, and never widens it.",
    source: "this program; criteria after Gygax 1988 and Stoessel 2008",
  },
  {
    id: "lane",
    name: "lane",
    meaning:
      "One criterion of the window, drawn along the temperature axis: what it allows at the estimates and, narrower, on the cautious side. A hatched lane was not assessed.",
    source: "this program",
  },
  {
    id: "ladder",
    name: "ladder",
    also: ["temperature ladder"],
    meaning:
      "The temperatures of a case on one axis: planned, MTSR, MTT and T_D24. Their order makes the criticality class.",
    source: "this program",
  },
  {
    id: "control-band",
    name: "control band",
    meaning:
      "How far the real temperature strays from the planned one in either direction. A criterion has to hold over the whole band.",
    formula: "T ± band",
    source: "common practice",
  },
  {
    id: "done-in-time",
    name: "done in time",
    also: ["completion"],
    meaning:
      "The criterion that the target conversion is reached at constant temperature within the available time. It gives the window a lower end, because cold reactions are slow.",
    source: "common practice",
  },
  {
    id: "cooling-suffices",
    name: "cooling suffices",
    also: ["cooling"],
    meaning:
      "The criterion that the cooling duty stays within the part of the capacity that may be used. It is asked without a division, so that a capacity of nothing never passes.",
    formula: "duty ≤ allowed use × capacity",
    source: "common practice",
  },
  {
    id: "mtsr-below-mtt",
    name: "MTSR below MTT",
    meaning:
      "The criterion that the desired reaction alone cannot reach the technical limit after a cooling failure. Too cold can break it as well, because slow kinetics let reactant accumulate.",
    formula: "MTSR < MTT",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "tmrad-from-mtsr",
    name: "TMRad from MTSR",
    meaning:
      "The criterion that the decomposition still takes the minimum time to its maximum rate once the desired reaction has reached MTSR. The shorter time counts, of fresh material and of material with its thermal history.",
    formula: "TMRad(MTSR) ≥ minimum",
    source: "Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008",
  },
  {
    id: "tmrad-from-tp",
    name: "TMRad from Tp",
    meaning:
      "The criterion that the batch, left alone at its own temperature, takes the minimum time to the maximum rate of its decomposition. The shorter time counts, of fresh material and of material with its thermal history.",
    formula: "TMRad(T_{p}) ≥ minimum",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "advisory",
    name: "advisory",
    meaning:
      "A criterion that has its lane and its caution but takes no part in the window. Stability is one: a dosed vessel may run above it on its controller alone.",
    source: "this program",
  },
];

export const paperTerms: readonly Term[] = [
  {
    id: "case",
    name: "case",
    meaning:
      "One step that is to run in a larger vessel: mixture, kinetics, vessel, limits and failures, as they were typed. Its text with its units is kept as it stands.",
    source: "this program",
  },
  {
    id: "findings",
    name: "findings",
    meaning:
      "What the screening computed from a case, in SI units and with all its digits. What is shown is rounded towards caution, the findings are not.",
    source: "this program",
  },
  {
    id: "caution",
    name: "caution",
    also: ["stop", "warning", "note"],
    meaning:
      "A sentence with a code that says what a reader must know before using a result. A stop forbids its use as it is, a warning is for a reviewer to decide, a note is worth knowing.",
    source: "this program",
  },
  {
    id: "digest",
    name: "digest",
    meaning:
      "A fingerprint of the case document, which every change of it turns into another one. Two cases with the same digest are the same case.",
    source: "SHA-256 (FIPS 180-4) of the document in canonical JSON (RFC 8785)",
  },
  {
    id: "sheet",
    name: "sheet",
    meaning:
      "The PDF of a screening, with its inputs, its working and its cautions. It carries the case inside, so that anyone can compute it again and see whether it still follows.",
    source: "this program",
  },
  {
    id: "register",
    name: "register",
    meaning:
      "The list of the sheets that were filed, with what reviewers said of them. Each entry holds the digest of the one before, so that a change of an old one shows.",
    source: "this program",
  },
];
