import type { ModifiedArrhenius } from "../../kinetics/rateConstant.js";
import { fromArrhenius, fromEyring } from "../../kinetics/rateConstant.js";
import type { RateLaw } from "../../kinetics/rateLaw.js";
import type { Runaway } from "../../thermal/runaway.js";

/** A decomposition with its time to maximum rate from one start. */
export interface TmradRow {
  readonly name: string;
  readonly runaway: Runaway;
  readonly start_K: number;
  readonly tmrad_s: number;
  readonly alphaAtMaximum: number;
  readonly zeroOrder_s: number;
  readonly td24_K: number;
}

function order(of: number): RateLaw {
  return { autocatalytic: false, order: of, productOrder: 1, initiation: 0 };
}

function autocatalytic(of: number, productOrder: number, initiation: number): RateLaw {
  return { autocatalytic: true, order: of, productOrder, initiation };
}

function arrhenius(preExponential_s: number, activationEnergy_J_mol: number): ModifiedArrhenius {
  return fromArrhenius(Math.log(preExponential_s), activationEnergy_J_mol);
}

function eyring(activationEnthalpy_J_mol: number, activationEntropy_J_molK: number): ModifiedArrhenius {
  return fromEyring(activationEnthalpy_J_mol, activationEntropy_J_molK, 1000, 1, 1);
}

/** Start in K, TMRad in s, progress at the maximum, closed form in s. */
type Start = readonly [number, number, number, number];

interface Kinetics {
  readonly name: string;
  readonly law: RateLaw;
  readonly rate: ModifiedArrhenius;
  readonly heat_J_kg: number;
  readonly heatCapacity_J_kgK: number;
  readonly td24_K: number;
  readonly starts: readonly Start[];
}

/**
 * Seven kinetics, by a 30-digit quadrature and by an implicit Runge-Kutta integration with event location that
 * agree to 1e-9: independent implementation. No publication gives these figures to so many digits.
 */
const kinetics: readonly Kinetics[] = [
  {
    name: "first order, high barrier",
    law: order(1),
    rate: arrhenius(6.3e15, 157300),
    heat_J_kg: 400000,
    heatCapacity_J_kgK: 2000,
    td24_K: 371.13417101579137,
    starts: [
      [350, 1655950.583531332, 0.9243890608385481, 1535155.1622897794],
      [390, 8162.374118897799, 0.9133282182439045, 7454.598312550272],
      [430, 110.71151739309882, 0.9015583646756781, 99.41660077855862],
    ],
  },
  {
    name: "zero order",
    law: order(0),
    rate: arrhenius(1e10, 110000),
    heat_J_kg: 250000,
    heatCapacity_J_kgK: 1800,
    td24_K: 357.5601715077197,
    starts: [
      [340, 526535.2769085304, 1, 498705.5740475662],
      [380, 11017.534055886696, 1, 10365.724107021722],
      [420, 491.7702657131878, 1, 459.73378266850824],
    ],
  },
  {
    name: "second order, small rise",
    law: order(2),
    rate: arrhenius(2e9, 95000),
    heat_J_kg: 110000,
    heatCapacity_J_kgK: 2100,
    td24_K: 336.0018902978281,
    starts: [
      [330, 156230.1927439587, 0.5675661621317102, 99057.26213901467],
      [370, 4135.714867732069, 0.4784489255417271, 2948.801492180454],
      [410, 196.12018049630535, 0.3820805612679114, 177.98642757739034],
    ],
  },
  {
    name: "first order, eyring",
    law: order(1),
    rate: eyring(118000, -12),
    heat_J_kg: 550000,
    heatCapacity_J_kgK: 1900,
    td24_K: 329.5893132372982,
    starts: [
      [340, 23915.334715710218, 0.9146149070395378, 22062.52699947688],
      [370, 890.1108887191057, 0.9067792226565223, 812.1445692226382],
      [400, 54.72886394760349, 0.8986413181906202, 49.34306259193371],
    ],
  },
  {
    name: "order 0.6",
    law: order(0.6),
    rate: eyring(131000, 22),
    heat_J_kg: 800000,
    heatCapacity_J_kgK: 1700,
    td24_K: 329.88136510627703,
    starts: [
      [340, 21522.661696385625, 0.9521370010195853, 20392.39535522964],
      [370, 549.0473640032515, 0.9487144426495985, 517.1311834852993],
      [400, 24.452778615337085, 0.9451860844041828, 22.889558551671254],
    ],
  },
  {
    name: "autocatalytic, weak initiation",
    law: autocatalytic(1, 1, 0.02),
    rate: eyring(121000, -8),
    heat_J_kg: 610000,
    heatCapacity_J_kgK: 2050,
    td24_K: 361.3098496620783,
    starts: [
      [340, 1059834.382726992, 0.9231096345287301, 1870498.6977908202],
      [361.31, 86398.5618726796, 0.9186032051585425, 158986.46948769593],
      [400, 1801.3414968793934, 0.9102393771254932, 3568.1145688755128],
    ],
  },
  {
    name: "autocatalytic, very weak initiation",
    law: autocatalytic(1.3, 0.8, 0.0001),
    rate: arrhenius(8e12, 125000),
    heat_J_kg: 900000,
    heatCapacity_J_kgK: 1800,
    td24_K: 369.8346756942547,
    starts: [
      [340, 2917326.6406787145, 0.8995425430227592, 307155873.10142714],
      [370, 84866.23768950651, 0.8931685495590114, 10086974.265607066],
      [400, 4210.3659879123725, 0.8866744581934789, 559745.2941014577],
    ],
  },
];

export const tmradTable: readonly TmradRow[] = kinetics.flatMap(
  ({ name, law, rate, heat_J_kg, heatCapacity_J_kgK, td24_K, starts }) =>
    starts.map(([start_K, tmrad_s, alphaAtMaximum, zeroOrder_s]) => ({
      name,
      runaway: { law, rate, rise: heat_J_kg / heatCapacity_J_kgK },
      start_K,
      tmrad_s,
      alphaAtMaximum,
      zeroOrder_s,
      td24_K,
    })),
);
