import { lnRateConstant, type ModifiedArrhenius } from "../kinetics/rateConstant.js";
import { gasConstant } from "../numeric/constants.js";
import type { StiffSystem } from "../numeric/rosenbrockStep.js";
import { limitingAmount } from "../thermal/balance.js";
import {
  amountPower,
  amountPowerSlope,
  linearPart,
  overallOrder,
  volumePower,
} from "../thermal/reactionRate.js";
import type { Step } from "../thermal/step.js";
import { type Charge, inventoryOf } from "./charge.js";
import type { Conditions } from "./conditions.js";
import { continuedLaw, continuedLawSlope } from "./progressRate.js";

/** Where the unknowns of a state stand. */
interface Places {
  /** temperature of the contents less the reference, K */
  readonly temperature: 0;
  /** extent of the desired reaction, part of the limiting amount */
  readonly extent: 1;
  /** temperature of the jacket less the reference, K; null: it stays at the coolant's */
  readonly jacket: 2 | null;
  /** progress of the decomposition; null without one */
  readonly progress: 2 | 3 | null;
}

/**
 * Rate constants level off here, 1/s: no vessel is so well mixed that its contents could react within a nanosecond.
 * Far beyond the model, and below a millionth of a figure anywhere before; without it the end of a violent runaway
 * would drown in rounding.
 */
const fastest = 1e9;

/** Contents and jacket of a vessel that nothing controls, as a system of differential equations. */
export interface Contents {
  readonly step: Step;
  /** K, from which temperatures are counted, so that small departures are told as well as large ones */
  readonly reference: number;
  readonly places: Places;
  readonly system: StiffSystem;
  /**
   * Sets what acts from a time on, until the next call.
   *
   * @param time s after the failure
   * @param charge what is in the vessel then
   * @param mixing part of the contents that reacts
   * @param blur part of a recipe's amount that the integration cannot tell from nothing; powers below one fall
   * linearly over it
   */
  enter(time: number, charge: Charge, conditions: Conditions, mixing: number, blur?: number): void;
  /** Heat capacity C', J/K, of the contents and the walls that warm with them. */
  heatCapacity(time: number): number;
  /** Heat that would have to be taken out to hold the temperature, W: all but the exchange with the jacket. */
  heatToRemove(time: number, state: Float64Array): number;
}

/**
 * Heat and mass balances after a failure,
 *
 * C' dT/dt = mixing r V (-dHr) + m Q kd f(alpha) + feed cpfeed (Tfeed - T) + Pagitator
 *            - htf UA (T - Tj) + gain max(0, Tambient - T),
 * holdup cpc dTj/dt = htf UA (T - Tj) - flowfactor w (Tj - Tc),
 * d extent/dt = mixing r V/nlim,  d alpha/dt = kd f(alpha),
 *
 * with C' = C(t) + (phi - 1) m0 cp0 + quenches. Where the jacket stays at the coolant's temperature the exchange is
 * flowfactor htf UA (T - Tc). Both amounts follow from the extent and from what has been fed. Losses to the
 * surroundings are not credited, a gain is.
 *
 * @param step SI numbers
 * @param rate of the desired reaction
 * @param reference K
 * @see Stoessel 2008, Thermal Safety of Chemical Processes (heat balance); Levenspiel, Chemical Reaction
 * Engineering (mixed semibatch)
 */
export function createContents(step: Step, rate: ModifiedArrhenius, reference: number): Contents {
  const { reaction, decomposition, vessel } = step;
  const { b, feed, orderA, amountA: totalA } = reaction;
  const { flowing, gain } = vessel;
  const law = decomposition?.law;
  const decay = decomposition?.rate;
  const jacketAt = flowing === null ? null : 2;
  const progressAt = decomposition === null ? null : flowing === null ? 2 : 3;
  const size = 2 + (flowing === null ? 0 : 1) + (decomposition === null ? 0 : 1);

  const limiting = limitingAmount(step);
  const heatPerExtent = -reaction.heat * limiting;
  const heatPerMass = decomposition?.heat ?? 0;
  const totalB = b?.amount ?? 0;
  const orderB = b?.order ?? 0;
  const perA = b?.perA ?? 0;
  const volumeOrder = 1 - overallOrder(reaction);
  const jacketCapacity = flowing === null ? 1 : flowing.holdup * flowing.heatCapacity;
  const coolantCapacityRate = flowing === null ? 0 : flowing.flow * flowing.heatCapacity;
  const gainCoefficient = gain?.coefficient ?? 0;
  const ambient = gain === null ? 0 : gain.ambient - reference;
  const feedTemperature = feed === null ? 0 : feed.temperature - reference;

  // What `enter` sets: constants of the leg, and what is in the vessel at its origin.
  let origin = 0;
  let mixing = 1;
  let exchange = 0;
  let coolantExchange = 0;
  let coolant = 0;
  let power = 0;
  let inside = inventoryOf(step, { fed: 0, quenchCapacity: 0, quenchVolume: 0 }, false);
  let slowest = 0;
  let [blurredA, blurredB, blurredProgress] = [totalA, totalB, 1];

  // What `prepare` computes at one place, shared by the slope and its derivatives.
  let [temperature, capacity, volume] = [0, 1, 1];
  let factor = 0;
  let [ofA, ofB, sign] = [0, 0, 1];
  let [amountA, amountB] = [0, 0];
  let reacting = 0;
  let reactionLevelling = 1;
  let decaying = 0;
  let decayConstant = 0;
  let decayLevelling = 1;
  let decayHeat = 0;
  let input = 0;

  const prepare = (time: number, y: Float64Array): void => {
    const elapsed = time - origin;
    const above = y[0];
    const extent = y[1];
    temperature = reference + above;
    capacity = inside.heatCapacity + inside.heatCapacityRate * elapsed;
    reacting = 0;
    if (mixing > 0) {
      volume = inside.volume + inside.volumeRate * elapsed;
      amountA = inside.amountA + inside.rateA * elapsed - extent * limiting;
      ofA = amountPower(amountA, orderA, blurredA);
      sign = 1;
      if (b === null) ofB = 1;
      else {
        amountB = inside.amountB + inside.rateB * elapsed - perA * extent * limiting;
        ofB = amountPower(amountB, orderB, blurredB);
        // Both used up: odd times odd must not come out positive.
        if (amountA < 0 && amountB < 0) sign = -1;
      }
      const k = Math.exp(lnRateConstant(rate, temperature));
      reactionLevelling = 1 / (1 + k * slowest);
      factor = (((mixing * sign) / limiting) * volumePower(reaction, volume)) / (1 / k + slowest);
      reacting = factor * ofA * ofB;
    }
    input = heatPerExtent * reacting + inside.heatCapacityRate * (feedTemperature - above) + power;
    if (above < ambient) input += gainCoefficient * (ambient - above);
    if (law !== undefined && decay !== undefined && progressAt !== null) {
      const k = Math.exp(lnRateConstant(decay, temperature));
      decayLevelling = 1 / (1 + k / fastest);
      decayConstant = 1 / (1 / k + 1 / fastest);
      decaying = decayConstant * continuedLaw(law, y[progressAt], blurredProgress);
      decayHeat = (inside.mass + inside.massRate * elapsed) * heatPerMass;
      input += decayHeat * decaying;
    }
  };

  const removal = (y: Float64Array): number =>
    exchange * (y[0] - (jacketAt === null ? coolant : y[jacketAt]));

  const derivative = (time: number, y: Float64Array, out: Float64Array): void => {
    prepare(time, y);
    const removed = removal(y);
    out[0] = (input - removed) / capacity;
    out[1] = reacting;
    if (jacketAt !== null)
      out[jacketAt] = (removed - coolantExchange * (y[jacketAt] - coolant)) / jacketCapacity;
    if (progressAt !== null) out[progressAt] = decaying;
  };

  /** d ln k/dT, 1/K. */
  const steepness = (of: ModifiedArrhenius): number =>
    of.activationEnergy / (gasConstant * temperature * temperature) + of.temperaturePower / temperature;

  const jacobian = (time: number, y: Float64Array, out: Float64Array): void => {
    prepare(time, y);
    out.fill(0);
    const gaining = y[0] < ambient ? gainCoefficient : 0;
    let heatPerKelvin = -inside.heatCapacityRate - gaining - exchange;
    if (mixing > 0) {
      const perKelvin = reacting * reactionLevelling * steepness(rate);
      const slopeA = amountPowerSlope(amountA, orderA, blurredA);
      const slopeB = b === null ? 0 : amountPowerSlope(amountB, orderB, blurredB);
      const perExtent = -factor * limiting * (slopeA * ofB + perA * ofA * slopeB);
      heatPerKelvin += heatPerExtent * perKelvin;
      out[1] = (heatPerExtent * perExtent) / capacity;
      out[size] = perKelvin;
      out[size + 1] = perExtent;
    }
    if (jacketAt !== null) {
      out[jacketAt] = exchange / capacity;
      out[jacketAt * size] = exchange / jacketCapacity;
      out[jacketAt * size + jacketAt] = -(exchange + coolantExchange) / jacketCapacity;
    }
    if (law !== undefined && decay !== undefined && progressAt !== null) {
      const perKelvin = decaying * decayLevelling * steepness(decay);
      const perProgress = decayConstant * continuedLawSlope(law, y[progressAt], blurredProgress);
      heatPerKelvin += decayHeat * perKelvin;
      out[progressAt] = (decayHeat * perProgress) / capacity;
      out[progressAt * size] = perKelvin;
      out[progressAt * size + progressAt] = perProgress;
    }
    out[0] = heatPerKelvin / capacity;
  };

  const timeDerivative = (time: number, y: Float64Array, out: Float64Array): void => {
    out.fill(0);
    if (inside.massRate === 0) return;
    prepare(time, y);
    const slope = (input - removal(y)) / capacity;
    let heat = inside.massRate * heatPerMass * decaying;
    if (mixing > 0) {
      const fromA = inside.rateA === 0 ? 0 : inside.rateA * amountPowerSlope(amountA, orderA, blurredA) * ofB;
      const fromB = inside.rateB === 0 ? 0 : inside.rateB * ofA * amountPowerSlope(amountB, orderB, blurredB);
      out[1] = (reacting * volumeOrder * inside.volumeRate) / volume + factor * (fromA + fromB);
      heat += heatPerExtent * out[1];
    }
    out[0] = (heat - inside.heatCapacityRate * slope) / capacity;
  };

  return {
    step,
    reference,
    places: { temperature: 0, extent: 1, jacket: jacketAt, progress: progressAt },
    system: { size, derivative, jacobian, timeDerivative },
    enter(time, charge, conditions, mixed, blur = linearPart) {
      const scale = Math.max(1, blur / linearPart);
      blurredA = scale * totalA;
      blurredB = scale * totalB;
      blurredProgress = scale;
      origin = time;
      mixing = mixed;
      coolant = conditions.coolantTemperature - reference;
      exchange = conditions.heatTransfer * vessel.ua * (flowing === null ? conditions.coolantFlow : 1);
      coolantExchange = conditions.coolantFlow * coolantCapacityRate;
      power = conditions.agitating ? vessel.agitatorPower : 0;
      inside = inventoryOf(step, charge, conditions.feeding);
      slowest =
        (totalA ** orderA * totalB ** orderB * volumePower(reaction, inside.volume)) / limiting / fastest;
    },
    heatCapacity: (time) => inside.heatCapacity + inside.heatCapacityRate * (time - origin),
    heatToRemove(time, state) {
      prepare(time, state);
      return input;
    },
  };
}
