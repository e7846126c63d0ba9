import { expect, test } from "vitest";
import { isotopesOf, meanMass, naturalIsotopes, readBond } from "../../src/species/index.ts";

/** AME2020: Huang et al., Chinese Phys. C 45, 030002; Wang et al., Chinese Phys. C 45, 030003 (2021); u. */
const ame2020: readonly (readonly [string, number, number])[] = [
  ["H", 1, 1.007825031898],
  ["H", 2, 2.014101777844],
  ["H", 3, 3.01604928132],
  ["B", 11, 11.009305166],
  ["Br", 79, 78.918337574],
  ["Br", 81, 80.916288197],
  ["Cl", 35, 34.968852694],
  ["Cl", 37, 36.965902573],
  ["I", 127, 126.904472592],
];

test.each(ame2020)("%s-%d weighs %d u (AME2020)", (element, massNumber, mass) => {
  expect(isotopesOf(element).find((isotope) => isotope.massNumber === massNumber)?.mass).toBe(mass);
});

test("12C weighs 12 u by definition", () => {
  expect(isotopesOf("C")[0]).toMatchObject({ name: "12C", mass: 12 });
});

/** COMPUTED from published masses, in u, printed to eight decimals. */
const reduced: readonly (readonly [string, number])[] = [
  ["1H 35Cl", 0.97959254],
  ["1H 37Cl", 0.98107729],
  ["D 35Cl", 1.90441325],
  ["12C 16O", 6.85620864],
  ["13C 16O", 7.1724125],
  ["16O H", 0.94808694],
  ["16O D", 1.78884761],
  ["12C H", 0.9297404],
  ["12C D", 1.72463578],
];

test.each(reduced)("the reduced mass of %s is %d u", (bond, mass) => {
  // half a unit of the eighth decimal, and 3e-10 between mass evaluations
  const read = readBond(bond);
  expect(Math.abs(("reducedMass" in read ? read.reducedMass : Number.NaN) - mass)).toBeLessThan(5.5e-9);
});

test.each([
  ["Cl", 35.45],
  ["Br", 79.904],
  ["C", 12.011],
  ["S", 32.06],
])(
  "the natural element %s weighs %d u on average (abridged standard atomic weight, IUPAC, from memory)",
  (symbol, mass) => {
    // natural variation of these elements is up to 0.01 u around the abridged value
    expect(Math.abs(meanMass(symbol) - mass)).toBeLessThan(0.01);
  },
);

test("natural chlorine is three parts 35Cl and one part 37Cl (IUPAC 75.76 and 24.24 %)", () => {
  expect(naturalIsotopes("Cl").map(({ name, abundance }) => [name, abundance])).toEqual([
    ["35Cl", 0.7576],
    ["37Cl", 0.2424],
  ]);
});
