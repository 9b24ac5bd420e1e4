import { fitTable } from "../../kinetics/fit.js";
import { diffusionLimit, viscosityOfWater } from "../../kinetics/plausibility.js";
import { eyringAt, fromEyring, fromReference, lnRateConstant } from "../../kinetics/rateConstant.js";
import { avogadro, boltzmann, gasConstant, zeroCelsius } from "../../numeric/constants.js";
import { fitLine } from "../../numeric/leastSquares.js";
import type { CheckGroup } from "./check.js";
import { dithionate, ethaneCracking, solvolysis } from "./rateTables.js";

const published = { kind: "published", fromMemory: false } as const;

const constants: CheckGroup = {
  ...published,
  title: "Constants",
  source: "BIPM, The International System of Units (SI), 9th edition, 2019",
  checks: [
    {
      what: "gas constant, from the exact Boltzmann and Avogadro constants",
      printed: "8.31446261815324",
      unit: "J/(mol K)",
      compute: () => boltzmann * avogadro,
    },
  ],
};

/** T ln(k/T) against T: the same data along another straight line. */
function turnedLine() {
  const kelvin = dithionate.rows.map((row) => row.temperature);
  return fitLine(
    kelvin,
    dithionate.rows.map((row) => row.temperature * (row.lnRateConstant - Math.log(row.temperature))),
  );
}

/** ln(kB/h), with the concentration 1 mol/L of a second-order reaction. */
const entropyFree = (): number => fromEyring(0, 0, 1000, 1, 2).lnPreExponential;

const eyringFit: CheckGroup = {
  ...published,
  title: "Eyring fit of nine second-order rate constants (acid and dithionate)",
  source: "Lente, Fábián & Poë 2005, New J. Chem., supplement",
  checks: [
    {
      what: "activation enthalpy, ln(k/T) against 1/T",
      printed: "120.27",
      unit: "kJ/mol",
      compute: () => fitTable(dithionate).eyring.activationEnthalpy / 1000,
    },
    {
      what: "its standard error",
      printed: "0.15",
      unit: "kJ/mol",
      compute: () => fitTable(dithionate).eyring.activationEnthalpyError / 1000,
    },
    {
      what: "activation entropy for 1 mol/L",
      printed: "11.33",
      unit: "J/(mol K)",
      compute: () => fitTable(dithionate).eyring.activationEntropy,
    },
    {
      what: "its standard error",
      printed: "0.45",
      unit: "J/(mol K)",
      compute: () => fitTable(dithionate).eyring.activationEntropyError,
    },
    {
      what: "activation enthalpy, T ln(k/T) against T",
      printed: "120.25",
      unit: "kJ/mol",
      compute: () => (-gasConstant * turnedLine().intercept) / 1000,
    },
    {
      what: "its standard error",
      printed: "0.16",
      unit: "kJ/mol",
      compute: () => (gasConstant * turnedLine().interceptError) / 1000,
    },
    {
      what: "activation entropy, T ln(k/T) against T",
      printed: "11.29",
      unit: "J/(mol K)",
      compute: () => gasConstant * (turnedLine().slope - entropyFree()),
    },
    {
      what: "its standard error",
      printed: "0.46",
      unit: "J/(mol K)",
      compute: () => gasConstant * turnedLine().slopeError,
    },
  ],
};

const solvolysisLine = () => fitTable(solvolysis).arrhenius.line;

/** The Eyring pair at 25 degC from the slope as printed and the rate constant measured there. */
function printedPair() {
  const { temperature, lnRateConstant: measured } = solvolysis.rows[1];
  return eyringAt(fromReference(measured, temperature, 10_864 * gasConstant), temperature, 1000, 1, 1);
}
/** The book computes with R = 8.314 J/(mol K). */
const inTheirs = 8.314 / gasConstant;

const arrheniusLine: CheckGroup = {
  ...published,
  title: "Arrhenius line of a unimolecular solvolysis, and the Eyring pair from it",
  source: "Shillady, Essentials of Physical Chemistry, ch. 8, pp. 161–163; k at 35 °C from memory",
  checks: [
    {
      what: "slope of ln k against 1/T",
      printed: "-10864",
      unit: "K",
      within: { apart: 1, because: "the printed slope carries the rounding of its own table" },
      compute: () => solvolysisLine().slope,
    },
    { what: "intercept", printed: "28.336", unit: "", compute: () => solvolysisLine().intercept },
    {
      what: "R squared",
      printed: "0.9998",
      unit: "",
      compute: () => {
        const line = solvolysisLine();
        const explained = line.slope ** 2 * line.spread;
        return explained / (explained + line.residualSumOfSquares);
      },
    },
    {
      what: "activation enthalpy at 25 °C, from the printed slope",
      printed: "87.844",
      unit: "kJ/mol",
      compute: () => (printedPair().activationEnthalpy * inTheirs) / 1000,
    },
    {
      what: "activation entropy at 25 °C, from the printed slope",
      printed: "-17.208822",
      unit: "J/(mol K)",
      within: { apart: 2e-5, because: "its kB and h are those of 2002" },
      compute: () => printedPair().activationEntropy * inTheirs,
    },
  ],
};

/** ln k and 1000/T rounded to three decimals, as in the printed solution. */
function roundedCracking() {
  const rounded = (value: number): number => Math.round(1e3 * value) / 1e3;
  return fitLine(
    ethaneCracking.rows.map((row) => rounded(1e3 / row.temperature) / 1e3),
    ethaneCracking.rows.map((row) => rounded(row.lnRateConstant)),
  );
}

const cracking: CheckGroup = {
  ...published,
  title: "Arrhenius fit of the thermal cracking of ethane",
  source: "Froment, Bischoff & De Wilde, Chemical Reactor Analysis and Design, solution of problem 1.1",
  checks: [
    {
      what: "slope, table rounded as printed",
      printed: "-28497",
      unit: "K",
      compute: () => roundedCracking().slope,
    },
    {
      what: "intercept, table rounded as printed",
      printed: "27.245",
      unit: "",
      compute: () => roundedCracking().intercept,
    },
    {
      what: "activation energy, table unrounded",
      printed: "237",
      unit: "kJ/mol",
      compute: () => fitTable(ethaneCracking).arrhenius.activationEnergy / 1000,
    },
    {
      what: "pre-exponential factor, table rounded as printed",
      printed: "6.8e11",
      unit: "s⁻¹",
      compute: () => Math.exp(roundedCracking().intercept),
    },
  ],
};

const frequency: CheckGroup = {
  kind: "published",
  fromMemory: true,
  title: "Frequency factor of Eyring's equation",
  source: "Laidler, Chemical Kinetics",
  checks: [
    {
      what: "kB T/h at 25 °C",
      printed: "6.21e12",
      unit: "s⁻¹",
      compute: () => Math.exp(lnRateConstant(fromEyring(0, 0, 1000, 1, 1), 298.15)),
    },
  ],
};

const diffusion: CheckGroup = {
  kind: "published",
  fromMemory: true,
  title: "Diffusion limit",
  source: "Atkins & de Paula, Physical Chemistry; viscosities: IAPWS 2008",
  checks: [
    {
      what: "8 R T/(3 η) in water at 25 °C",
      printed: "7.4e9",
      unit: "L/(mol s)",
      compute: () => diffusionLimit(298.15, 0.89e-3) * 1000,
    },
    ...(
      [
        [0, "1.792"],
        [20, "1.002"],
        [25, "0.890"],
        [50, "0.547"],
        [80, "0.354"],
        [100, "0.282"],
      ] as const
    ).map(([celsius, printed]) => ({
      what: `viscosity of water at ${celsius} °C`,
      printed,
      unit: "mPa s",
      within: { apart: 0.025 * Number(printed), because: "the short form used is good to 2.5 %" },
      compute: () => viscosityOfWater(celsius + zeroCelsius) * 1000,
    })),
  ],
};

/** Constants, fits of rate constants, and what they are judged by. */
export const rateConstants: readonly CheckGroup[] = [
  constants,
  eyringFit,
  arrheniusLine,
  cracking,
  frequency,
  diffusion,
];
