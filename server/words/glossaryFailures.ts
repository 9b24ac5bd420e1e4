import type { Term } from "./glossary.js";

export const failureTerms: readonly Term[] = [
  {
    id: "cooling-failure",
    name: "cooling failure",
    also: ["failure", "cooling failures"],
    meaning:
      "A timed list of what stops working: coolant, agitator, feed, or a part of them. Until it begins the batch is held at its temperature, from then on nothing controls it.",
    formula:
      "C′ dT/dt = r V (−ΔH_{r}) + m Q k_{d} f(α) + feed c_{p} (T_{feed} − T) + P_{agitator} − UA (T − T_{j}) + heat gain",
    source: "heat balance; Hairer & Wanner, Solving Ordinary Differential Equations II",
  },
  {
    id: "time-to-act",
    name: "time to act",
    meaning:
      "The longest delay up to which full cooling, restored at any moment before, still keeps the batch. Past it, restoring the cooling is too late.",
    source: "this program",
  },
  {
    id: "lost",
    name: "lost",
    meaning:
      "The temperature reaches MTT, or more has decomposed than is allowed, or at the end the contents are above the process temperature and still warming. Passing T_D24 alone is no loss; its time is reported.",
    source: "this program; 5 % decomposed unless said (common practice)",
  },
  {
    id: "holds",
    name: "holds",
    also: ["act", "verdict"],
    meaning:
      "The verdict on a failure that is not lost although nobody does anything. The other two are “act”, where cooling restored in time keeps the batch, and “lost”, where no delay is short enough.",
    source: "this program",
  },
  {
    id: "response",
    name: "response",
    also: ["response time"],
    meaning:
      "The time that people and equipment need: detection, decision and action. What is left of the time to act after it is the margin.",
    formula: "margin = time to act − (detection + decision + action)",
    source: "common practice",
  },
  {
    id: "alarm-temperature",
    name: "alarm temperature",
    also: ["alarm"],
    meaning:
      "The highest temperature at which an alarm still leaves time for decision and action. It is read from the simulated course of the failure.",
    source: "this program",
  },
  {
    id: "quench",
    name: "quench",
    meaning:
      "Cold liquid let into the vessel to bring the temperature down at once. It adds its heat capacity and its volume, and takes no part in the decomposition.",
    formula: "T′ = (C T + m_{q} c_{q} T_{q})/(C + m_{q} c_{q})",
    source: "heat balance",
  },
  {
    id: "worst-start",
    name: "worst start",
    also: ["worst"],
    meaning:
      "The moment of the feed at which a failure does the most harm: lost sooner, or else hotter at its peak. Where the feed stops with the failure it is the moment of MTSR.",
    source: "this program",
  },
  {
    id: "mixing-lost",
    name: "agitator off",
    also: ["mixed", "unmixed"],
    meaning:
      "Without stirring, what is fed may react at once or pile up and meet later. Both are run, and the worse of the two is reported and named.",
    source: "this program",
  },
  {
    id: "horizon",
    name: "horizon",
    meaning:
      "How long a failure is followed: at least 24 hours beyond the last change. A batch that still warms at the end counts as lost.",
    source: "this program",
  },
];

export const uncertaintyTerms: readonly Term[] = [
  {
    id: "standard-error",
    name: "standard error",
    meaning:
      "How far a measured or fitted value is typically off. Inputs without one are taken as exact, and the page lists them.",
    source: "BIPM, Guide to the Expression of Uncertainty in Measurement",
  },
  {
    id: "draws",
    name: "draws",
    also: ["draw", "Latin hypercube"],
    meaning:
      "The case computed many times over, each time with inputs that vary within their standard errors. Every input is spread evenly over its distribution, and the seed is printed, so that the same case gives the same draws.",
    source: "McKay, Beckman & Conover 1979, Technometrics 21:239",
  },
  {
    id: "percentile",
    name: "percentile",
    also: ["5th percentile", "95th percentile", "median"],
    meaning:
      "The value below which that many of a hundred draws lie. Between two draws it is interpolated on a straight line.",
    source: "common practice (linear interpolation, type 7)",
  },
  {
    id: "cautious-side",
    name: "cautious side",
    also: ["cautious window", "cautious set"],
    meaning:
      "Where a figure lies in all but the worst twentieth of the draws: the 5th percentile of T_D24 and of the time to act, the 95th of MTSR. Of a criterion it is the temperatures at which it holds in at least 95 % of them.",
    source: "this program",
  },
  {
    id: "basis",
    name: "basis",
    also: ["measured", "estimated", "assumed"],
    meaning:
      "Whether a value was measured, estimated or merely assumed. Assumed ones stand first on the sheet, because everything rests on them.",
    source: "common practice",
  },
  {
    id: "drivers",
    name: "drivers",
    meaning:
      "The inputs whose uncertainty makes up most of that of a result. Each is drawn alone, and its spread squared is compared with the sum.",
    formula: "(p_{95} − p_{5})²/sum",
    source: "common practice",
  },
];
