import type { Term } from "./glossary.js";

const arrhenius = "Arrhenius 1889, Z. Phys. Chem. 4:226; IUPAC Gold Book";
const eyring = "Eyring 1935, J. Chem. Phys. 3:107; Laidler & King 1983, J. Phys. Chem. 87:2657";

export const rateTerms: readonly Term[] = [
  {
    id: "rate-constant",
    name: "rate constant",
    also: ["k"],
    meaning:
      "The factor between the rate of a reaction and the concentrations raised to their orders. It counts moles of reactant A that disappear, and its unit follows from the overall order.",
    formula: "r = k c_{A}^{a} c_{B}^{b}",
    source: "IUPAC Gold Book",
  },
  {
    id: "order",
    name: "order of reaction",
    also: ["order"],
    meaning:
      "The power to which a concentration stands in the rate law. The overall order n is their sum and decides the unit of the rate constant.",
    source: "IUPAC Gold Book",
  },
  {
    id: "eyring",
    name: "Eyring parameters",
    also: ["eyring", "activation enthalpy", "activation entropy"],
    meaning:
      "Activation enthalpy and activation entropy, the two numbers of Eyring's equation. The entropy depends on the standard concentration it is quoted for, so that the two are always shown together.",
    formula: "k = κ (k_{B} T/h) c_{0}^{1−n} exp(ΔS‡/R) exp(−ΔH‡/(R T))",
    source: eyring,
  },
  {
    id: "arrhenius",
    name: "Arrhenius parameters",
    also: ["arrhenius", "activation energy", "pre-exponential factor"],
    meaning:
      "Pre-exponential factor and activation energy, the two numbers of Arrhenius' equation. They turn into Eyring's at one temperature, where both give the same rate constant and the same slope.",
    formula: "k = A exp(−E_{a}/(R T)); E_{a} = ΔH‡ + R T",
    source: arrhenius,
  },
  {
    id: "standard-concentration",
    name: "standard concentration",
    meaning:
      "The concentration for which an activation entropy is quoted, 1 mol/L unless said. Read for 1 mol/m³ instead, an entropy of a second-order reaction is wrong by 57.4 J/(mol K) and the rate constant by a factor of 1 000.",
    formula: "c_{0}^{1−n}",
    source: eyring,
  },
  {
    id: "transmission-coefficient",
    name: "transmission coefficient",
    meaning: "The part of the activated complexes that go on to the product. It is taken as 1 unless said.",
    source: eyring,
  },
  {
    id: "correlation",
    name: "correlation",
    meaning:
      "How much two fitted parameters err together, between −1 and 1. Those of a rate constant are close to 1: without it the interval of k would come out many times too wide, or could not be given at all.",
    formula: "var(ln k) = (s_{S}/R)² + (s_{H}/(R T))² − 2 ρ s_{S} s_{H}/(R² T)",
    source: "propagation of error of the fitted line",
  },
  {
    id: "fitted-range",
    name: "fitted range",
    meaning:
      "The temperatures between which the rate constants behind a fit were measured. Inside it the fit is supported by data, outside it extrapolates.",
    source: "common practice",
  },
  {
    id: "extrapolation",
    name: "extrapolation",
    meaning:
      "Using a rate constant outside the range in which it was measured; the page says by how many kelvin. A change of mechanism there would not be noticed, and no interval covers it.",
    source: "common practice",
  },
  {
    id: "confidence-interval",
    name: "95 % interval",
    also: ["interval"],
    meaning:
      "The range that covers the rate constant in 95 of 100 such fits as long as one rate law holds. It is wider for few data, because it takes Student's t with two degrees of freedom less than there are points.",
    formula: "k exp(±t s), s² = var(ln k)",
    source: "Draper & Smith, Applied Regression Analysis",
  },
  {
    id: "residual",
    name: "residual",
    meaning:
      "How far a measured rate constant lies off the fitted line, as a difference of logarithms. Residuals that bend say that one rate law does not hold over the whole range.",
    formula: "ln(k/k_{fitted})",
    source: "Draper & Smith, Applied Regression Analysis",
  },
  {
    id: "leverage",
    name: "leverage",
    meaning:
      "How strongly one row of a table pulls the fitted line towards itself. The two ends of the range have the highest, so that a slip there turns the whole line.",
    source: "Draper & Smith, Applied Regression Analysis",
  },
];

export const decompositionTerms: readonly Term[] = [
  {
    id: "decomposition",
    name: "decomposition",
    also: ["secondary reaction"],
    meaning:
      "What the mixture does when it gets too hot: a reaction of its own that nobody wants. It is counted per kilogram of the mixture as it is.",
    formula: "dα/dt = k_{d}(T) f(α)",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "tmrad",
    name: "TMRad",
    also: ["time to maximum rate"],
    meaning:
      "The time from the loss of all cooling to the moment at which the decomposition is fastest. It is found by quadrature of the heat balance, from the temperature named beside it.",
    formula: "TMRad = ∫ dα/(k_{d}(T) f(α)) from α_{0} to α*, T = T_{0} + ΔT_{ad,d} (α − α_{0})",
    source:
      "Townsend & Tou 1980, Thermochim. Acta 37:1; Keller et al. 1997, J. Loss Prev. Process Ind. 10:31",
  },
  {
    id: "closed-form",
    name: "closed form, zero order",
    also: ["closed form", "zero order"],
    meaning:
      "The TMRad of a reaction that does not slow down as it goes, from one temperature, its heat release rate and its activation energy. It is on the careful side only for order laws of high heat; for an autocatalytic law it can be a hundred times too long.",
    formula: "TMR_{ad,0} = c R T_{0}²/(q′ E_{a})",
    source: "Semenov 1928, Z. Phys. 48:571; Townsend & Tou 1980, Thermochim. Acta 37:1",
  },
  {
    id: "likelihood",
    name: "likelihood",
    meaning:
      "How likely a runaway is once cooling has failed, judged by TMRad at MTSR: high up to 8 h, medium up to 24 h, low beyond. Less time leaves less to be done about it.",
    source: "Gygax 1988, Chem. Eng. Sci. 43:1759; Stoessel 2008",
  },
  {
    id: "order-law",
    name: "order law",
    meaning:
      "A decomposition that is fastest when it is fresh and slows down as it is used up. Heat alone makes it run away.",
    formula: "f(α) = (1 − α)^{n}",
    source: "common practice",
  },
  {
    id: "autocatalytic-law",
    name: "autocatalytic law",
    also: ["autocatalytic"],
    meaning:
      "A decomposition that its own product speeds up, so that it can begin unnoticed and then accelerate even at constant temperature. Time spent hot counts against such a material.",
    formula: "f(α) = (1 − α)^{n} (w + α^{m})",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "initiation",
    name: "initiation",
    meaning:
      "The part w of an autocatalytic law that runs without any product being there. A small one means a long quiet time followed by a sharp runaway.",
    formula: "f(0) = w",
    source: "common practice",
  },
  {
    id: "thermal-history",
    name: "thermal history",
    also: ["hold"],
    meaning:
      "What the decomposition has already done while the batch was held at its temperature. It shortens the TMRad of what is left, most of all for an autocatalytic law.",
    source: "Stoessel 2008, Thermal Safety of Chemical Processes",
  },
  {
    id: "heat-release-rate",
    name: "heat release rate",
    meaning:
      "The heat that a kilogram of mixture gives off per second at a stated temperature, as a calorimeter shows it. For an order law it is that of fresh material, for an autocatalytic one the largest at that temperature.",
    formula: "q′ = k_{d} f Q",
    source: "common practice",
  },
];
