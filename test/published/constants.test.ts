import { expect, test } from "vitest";
import { avogadro, boltzmann, gasConstant, planck, zeroCelsius } from "../../server/numeric/constants.js";

// BIPM, The International System of Units (SI), 9th edition, 2019: exact by definition.
test("the defining constants are those of the SI of 2019", () => {
  expect(boltzmann).toBe(1.380649e-23);
  expect(planck).toBe(6.62607015e-34);
  expect(avogadro).toBe(6.02214076e23);
  expect(zeroCelsius).toBe(273.15);
});

test("the gas constant is the exact product of its defining constants", () => {
  const product = (1380649n * 602214076n).toString();
  // kB = 1380649e-29 J/K, NA = 602214076e15 1/mol: fourteen decimals.
  expect(`${product.slice(0, -14)}.${product.slice(-14)}`).toBe(String(gasConstant));
});
