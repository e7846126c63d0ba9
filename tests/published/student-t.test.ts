import { expect, test } from "vitest";
import { coverageFactor, normalQuantile, studentT } from "../../src/quantity/index.ts";

/** Two-sided 95 % factors of Student's t, printed to 14 digits (COMPUTED by an independent calculation). */
const twoSided95: readonly (readonly [number, number])[] = [
  [1, 12.706204736175],
  [2, 4.3026527297495],
  [3, 3.1824463052837],
  [5, 2.5705818356363],
  [10, 2.2281388519863],
];

test.each(twoSided95)("with %d degrees of freedom 95 %% are covered by ±%d standard uncertainties", (dof, factor) => {
  // half a unit of the 14th digit, with room for the rounding of 1 − 0.95
  expect(Math.abs(coverageFactor(0.95, dof) / factor - 1)).toBeLessThan(1e-13);
  // 0.975 as a double is off by 1e-16, which the tail of 0.025 sees as 4e-15
  expect(Math.abs(studentT(0.975, dof) / factor - 1)).toBeLessThan(1e-13);
});

test.each([
  [11, 0.99, 3.11, 2],
  [1, 0.9973, 235.8, 1],
])("table G.2 of JCGM 100:2008: %d degrees of freedom, level %d, factor %d", (dof, level, factor, decimals) => {
  // half a unit of the last decimal printed; the table's 99.73 % is exactly 2Φ(3) − 1 = 0.9973002
  const exact = level === 0.9973 ? 0.99730020393674 : level;
  expect(Math.abs(coverageFactor(exact, dof) - factor)).toBeLessThan(0.5 * 10 ** -decimals);
});

test("±3.92 covers 95 % of a sum of four standard normal quantities (JCGM 101:2008, 9.2)", () => {
  // printed to two decimals; the sum has standard deviation 2
  expect(Math.abs(2 * coverageFactor(0.95, null) - 3.92)).toBeLessThan(0.005);
});

test("the normal quantile at 97.5 % is 1.959963984540054", () => {
  // Abramowitz & Stegun (1964), table 26.5, and any later table: 16 digits; two roundings
  expect(Math.abs(normalQuantile(0.975) - 1.959963984540054)).toBeLessThan(1e-14);
});
