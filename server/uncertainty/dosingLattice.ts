import type { RateCourse } from "../thermal/dosing.js";
import type { Step } from "../thermal/step.js";
import { type Isothermal, integrated } from "../window/study.js";
import { dosingTable } from "./dosingTable.js";
import { type RecipeForm, recipeForm, recipeWith } from "./recipeForm.js";

/** Distances of the tabulated recipes in ln excess and in ln dilution. */
const spacing = { excess: 0.02, dilution: 0.1 } as const;

/**
 * Between recipes a cell is used only where it errs by less than this, parts of the value: an end then moves by less
 * than 0.01 K. The rate at the end of the feed (a part of the largest one) decides only where it is nearly that.
 */
const allowedError = { figures: 1e-5, endRate: 3e-3, completion: 1e-3 } as const;

/** A tabulated recipe, and how much of it is in a draw. */
interface Share {
  readonly weight: number;
  readonly recipe: Recipe;
}

interface Recipe {
  readonly form: RecipeForm;
  readonly step: Step;
  readonly isothermalOf: (step: Step) => Isothermal;
}

interface CellTest {
  readonly figures: boolean;
  readonly completion: boolean;
}

/**
 * The isothermal step of draws that change the recipe as well, but not the orders: amounts, masses, densities and
 * the duration of the feed. In dimensionless form what they change is a factor of k, the excess and the dilution; it
 * is read from tables of neighbouring recipes, cubic in the logarithms of the two, never across the excess of 1 at
 * which the limiting reactant changes.
 *
 * Between recipes each cell is tested before it is used: for the recipe in its middle it must agree with integrations
 * at the lowest, the planned and the highest temperature. Where it does not, each draw is integrated.
 *
 * @param nominal the step at its estimates, a semibatch with a rate constant
 * @param form of that step
 */
export function dosingLattice(nominal: Step, form: RecipeForm): (step: Step) => Isothermal {
  const recipes = new Map<string, Recipe>();
  const tests = new Map<string, CellTest>();
  const turn = nominal.reaction.b === null ? Number.POSITIVE_INFINITY : -form.lnExcess / spacing.excess;

  function recipeAt(i: number, j: number): Recipe {
    const key = `${i},${j}`;
    let recipe = recipes.get(key);
    if (recipe === undefined) {
      const step = recipeWith(nominal, Math.exp(spacing.excess * i), Math.exp(spacing.dilution * j));
      recipe = { step, form: recipeForm(step) ?? form, isothermalOf: dosingTable(step) };
      recipes.set(key, recipe);
    }
    return recipe;
  }

  function sharesAt(excess: number, dilution: number): Share[] | null {
    const across = sharesAlong(excess, turn);
    const along = sharesAlong(dilution, Number.POSITIVE_INFINITY);
    if (across === null || along === null) return null;
    return across.flatMap(([i, weight]) =>
      along.map(([j, other]) => ({ weight: weight * other, recipe: recipeAt(i, j) })),
    );
  }

  function tested(excess: number, dilution: number): CellTest {
    const middle = [excess, dilution].map((at) => (Number.isInteger(at) ? at : Math.floor(at) + 0.5));
    const key = middle.join();
    let test = tests.get(key);
    if (test === undefined) {
      const [i, j] = middle;
      test = testOf(recipeWith(nominal, Math.exp(spacing.excess * i), Math.exp(spacing.dilution * j)), i, j);
      tests.set(key, test);
    }
    return test;
  }

  function testOf(step: Step, i: number, j: number): CellTest {
    const shares = sharesAt(i, j);
    const own = recipeForm(step);
    if (shares === null || own === null) return { figures: false, completion: false };
    if (shares.length === 1) return { figures: true, completion: true };
    const between = blended(step, own, shares, { figures: true, completion: true });
    const { lowestTemperature, highestTemperature } = nominal.limits;
    const at = [lowestTemperature, nominal.reaction.temperature, highestTemperature];
    const whole = integrated(step);
    return {
      figures: at.every((temperature) => figuresAgree(between, whole, temperature)),
      completion: at.every((temperature) =>
        close(between.completionAt(temperature), whole.completionAt(temperature), allowedError.completion),
      ),
    };
  }

  return (step) => {
    const own = recipeForm(step);
    if (own === null) return integrated(step);
    const excess = (own.lnExcess - form.lnExcess) / spacing.excess;
    const dilution = (own.lnDilution - form.lnDilution) / spacing.dilution;
    const shares = sharesAt(excess, dilution);
    if (shares === null) return integrated(step);
    const unchanged =
      shares.length === 1 &&
      own.lnFactor === form.lnFactor &&
      own.limiting === form.limiting &&
      step.mixture.mass === nominal.mixture.mass;
    if (unchanged) return shares[0].recipe.isothermalOf(step);
    return blended(step, own, shares, tested(excess, dilution));
  };
}

/** Weights of the cubic through the whole numbers about a place, none of them beyond `turn`; null across it. */
function sharesAlong(place: number, turn: number): (readonly [index: number, weight: number])[] | null {
  if (Number.isInteger(place)) return [[place, 1]];
  const cell = Math.floor(place);
  if (turn > cell && turn < cell + 1) return null;
  let first = cell - 1;
  if (turn > cell - 1 && turn <= cell) first = cell;
  else if (turn >= cell + 1 && turn < cell + 2) first = cell - 2;
  return [0, 1, 2, 3].map((i) => {
    let weight = 1;
    for (let j = 0; j < 4; j += 1) if (j !== i) weight *= (place - first - j) / (i - j);
    return [first + i, weight];
  });
}

/** A draw's isothermal step from those of its neighbouring recipes, each with the draw's rate constant and heats. */
function blended(step: Step, own: RecipeForm, shares: readonly Share[], test: CellTest): Isothermal {
  const direct = integrated(step);
  const { rate, measuredExcess } = step.reaction;
  if (rate === null) return direct;
  const parts = shares.map(({ weight, recipe }) => {
    const { form } = recipe;
    return {
      weight,
      form,
      isothermal: recipe.isothermalOf(equivalent(step, own, recipe)),
      rate: own.limiting / own.duration / (form.limiting / form.duration),
      time: own.duration / form.duration,
      rise:
        own.limiting /
        own.capacity /
        (form.limiting / (form.capacity * (step.mixture.heatCapacity / recipe.step.mixture.heatCapacity))),
    };
  });
  return {
    figuresAt(temperature) {
      if (!test.figures) return direct.figuresAt(temperature);
      let [rise, lnFastest, at, endRate] = [0, 0, 0, 0];
      for (const part of parts) {
        const figures = part.isothermal.figuresAt(temperature);
        if (figures === null) return direct.figuresAt(temperature);
        rise += part.weight * part.rise * figures.rise;
        lnFastest += part.weight * Math.log(part.rate * figures.fastest.value);
        at += part.weight * part.time * figures.fastest.at;
        endRate += part.weight * part.rate * figures.endRate;
      }
      return {
        rise: rise + measuredExcess,
        fastest: { value: Math.exp(lnFastest), at: Math.min(Math.max(at, 0), own.duration) },
        endRate: Math.max(endRate, 0),
      };
    },
    completionAt(temperature) {
      if (!test.completion) return direct.completionAt(temperature);
      let lnTime = 0;
      for (const part of parts) {
        lnTime += part.weight * Math.log(part.time * part.isothermal.completionAt(temperature));
      }
      return Number.isFinite(lnTime) ? Math.exp(lnTime) : direct.completionAt(temperature);
    },
    courseAt(temperature) {
      if (!test.figures) return direct.courseAt(temperature);
      const courses: RateCourse[] = [];
      for (const part of parts) {
        const course = part.isothermal.courseAt(temperature);
        if (course === null) return direct.courseAt(temperature);
        courses.push(stretched(course, part.form, own, part.rate));
      }
      return summed(courses, shares);
    },
  };
}

/** A tabulated recipe with the rate constant, heat and heat capacities of a draw. */
function equivalent(step: Step, own: RecipeForm, { step: recipe, form }: Recipe): Step {
  const { rate, heat } = step.reaction;
  const { feed } = recipe.reaction;
  const { heatCapacity } = step.mixture;
  if (rate === null || feed === null) return recipe;
  const lnPreExponential = rate.lnPreExponential + own.lnFactor - form.lnFactor;
  const ofFeed = (own.heatRatio * recipe.mixture.mass * heatCapacity) / feed.mass;
  return {
    ...recipe,
    mixture: { ...recipe.mixture, heatCapacity },
    reaction: {
      ...recipe.reaction,
      heat,
      rate: { ...rate, lnPreExponential },
      feed: { ...feed, heatCapacity: ofFeed },
      measuredExcess: 0,
    },
  };
}

/** A course of one recipe on the times of another: both turn where the fed reactant reaches its amount. */
function stretched(course: RateCourse, from: RecipeForm, to: RecipeForm, rate: number): RateCourse {
  return {
    times: course.times.map((at) => moved(at, from, to)),
    rates: Array.from(course.rates, (value) => value * rate),
    rateAt: (at) => rate * course.rateAt(moved(at, to, from)),
  };
}

function moved(at: number, from: RecipeForm, to: RecipeForm): number {
  const part = at / from.duration;
  if (part <= from.turn) return (part / from.turn) * to.turn * to.duration;
  return (to.turn + ((part - from.turn) / (1 - from.turn)) * (1 - to.turn)) * to.duration;
}

function summed(courses: readonly RateCourse[], shares: readonly Share[]): RateCourse {
  const { times } = courses[0];
  const rateAt = (at: number): number =>
    courses.reduce((sum, course, i) => sum + shares[i].weight * course.rateAt(at), 0);
  return { times, rates: courses.length === 1 ? courses[0].rates : times.map(rateAt), rateAt };
}

function figuresAgree(between: Isothermal, whole: Isothermal, temperature: number): boolean {
  const [ours, theirs] = [between.figuresAt(temperature), whole.figuresAt(temperature)];
  if (ours === null || theirs === null) return false;
  const { figures: allowed, endRate } = allowedError;
  return (
    close(ours.rise, theirs.rise, allowed) &&
    close(ours.fastest.value, theirs.fastest.value, allowed) &&
    Math.abs(ours.endRate - theirs.endRate) <= endRate * theirs.fastest.value
  );
}

function close(one: number, other: number, allowed: number): boolean {
  return Math.abs(one - other) <= allowed * Math.abs(other);
}
