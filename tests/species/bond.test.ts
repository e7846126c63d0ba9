import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  isElement,
  isotopesOf,
  meanMass,
  naturalIsotopes,
  readAtom,
  readBond,
  reducedMassBond,
  reducedMassOf,
} from "../../src/species/index.ts";
import { isotopeRows } from "../../src/species/isotopes.data.ts";

const seeded = { seed: 20261205, numRuns: 200 };
const symbols = Object.keys(isotopeRows);
const isotope = fc.constantFrom(...symbols.flatMap((symbol) => isotopesOf(symbol)));

describe("reading a bond", () => {
  test.each([
    ["1H 35Cl", "1H", "35Cl"],
    ["1H,35Cl", "1H", "35Cl"],
    ["1H-35Cl", "1H", "35Cl"],
    ["1H–35Cl", "1H", "35Cl"],
    ["1H35Cl", "1H", "35Cl"],
    ["¹H³⁵Cl", "1H", "35Cl"],
    ["  35Cl   1H ", "35Cl", "1H"],
    ["H Cl", "1H", "Cl"],
    ["HCl", "1H", "Cl"],
    ["D Br", "2H", "Br"],
    ["T 127I", "3H", "127I"],
    ["C-H", "C", "1H"],
    ["CO", "C", "O"],
    ["CsI", "Cs", "I"],
    ["12C16O", "12C", "16O"],
    ["NO", "N", "O"], // not nobelium
    ["79Br 81Br", "79Br", "81Br"],
  ])("%j joins %s and %s", (text, first, second) => {
    expect(readBond(text)).toMatchObject({ text: text.trim(), atoms: [first, second] });
  });

  test.each([
    ["", "the bond is missing", "write two atoms such as 1H 35Cl"],
    ["35Cl", '"35Cl" names one atom', "write two atoms such as 1H 35Cl"],
    ["Co", '"Co" names one atom', "write two atoms such as 1H 35Cl"],
    ["H C N", '"H C N" names 3 atoms', "write two atoms such as 1H 35Cl"],
    ["HCN", '"HCN" names 3 atoms', "write two atoms such as 1H 35Cl"],
    ["H cl", '"cl" is not an element', "write Cl"],
    ["1h 35Cl", '"1h" is not an element', "write 1H"],
    ["d Cl", '"d" is not an element', "write D"],
    ["H Xx", '"Xx" is not an element', "write an isotope such as 35Cl, or give the reduced mass"],
    ["H constructor", '"constructor" is not an element', "write an isotope such as 35Cl, or give the reduced mass"],
    ["H 36Cl", '"36Cl" is not in the table of isotopes', "Cl has 35Cl, 37Cl; or give the reduced mass"],
    ["4H Cl", '"4H" is not in the table of isotopes', "H has 1H, 2H, 3H; or give the reduced mass"],
    ["2D Cl", '"2D" names a mass number twice', "write D or 2H"],
    ["H Br79", '"Br79" is not an atom', "write an isotope such as 79Br"],
    ["OH-", '"OH-" carries a charge', "write neutral atoms such as 1H 35Cl, or give the reduced mass"],
    ["1H 35Cl+", '"1H 35Cl+" carries a charge', "write neutral atoms such as 1H 35Cl, or give the reduced mass"],
  ])("%j is explained", (text, what, mend) => {
    expect(readBond(text)).toEqual({ what, mend });
  });

  test("any two isotopes of the table are read by their names, in either order, with the same reduced mass", () => {
    fc.assert(
      fc.property(isotope, isotope, (a, b) => {
        const one = readBond(`${a.name} ${b.name}`);
        const other = readBond(`${b.name}-${a.name}`);
        const together = readBond(a.name + b.name);
        expect(one).toMatchObject({ atoms: [a.name, b.name], reducedMass: reducedMassOf(a, b) });
        expect(other).toMatchObject({ atoms: [b.name, a.name] });
        expect(together).toMatchObject({ atoms: [a.name, b.name] });
        const mu = reducedMassOf(a, b);
        expect(mu).toBe(reducedMassOf(b, a));
        // below the lighter atom, at least half of it; one rounding
        expect(mu).toBeLessThan(Math.min(a.mass, b.mass));
        expect(mu).toBeGreaterThanOrEqual((Math.min(a.mass, b.mass) / 2) * (1 - 1e-15));
      }),
      seeded,
    );
  });
});

describe("a bond known by its reduced mass", () => {
  test("it has no atoms", () => {
    expect(reducedMassBond("0.9796")).toEqual({ text: "reduced mass 0.9796 u", atoms: null, reducedMass: 0.9796 });
    expect(reducedMassBond("0.9796 u")).toMatchObject({ reducedMass: 0.9796 });
  });

  test.each([
    ["0", 'the reduced mass "0" is not positive'],
    ["-1", 'the reduced mass "-1" is not positive'],
    ["0.98(1)", 'the reduced mass "0.98(1)" carries an uncertainty'],
    ["0,98", '"0,98" has a decimal comma'],
    ["x", '"x" is not a number'],
  ])("%j is explained", (text, what) => {
    expect(reducedMassBond(text)).toMatchObject({ what, mend: expect.stringContaining("0.9796") });
  });
});

describe("the table of isotopes", () => {
  test("every natural element is complete: its abundances make 1", () => {
    for (const symbol of symbols) {
      const sum = naturalIsotopes(symbol).reduce((total, { abundance }) => total + abundance, 0);
      // abundances are given to 1e-6 at best
      expect(Math.abs(sum - 1), symbol).toBeLessThan(1e-6);
    }
  });

  test("every mass lies near its mass number", () => {
    for (const symbol of symbols) {
      for (const { name, massNumber, mass } of isotopesOf(symbol)) {
        // the binding energy of nuclei never reaches 0.11 u on the scale where 12C is 12
        expect(Math.abs(mass - massNumber), name).toBeLessThan(0.11);
      }
    }
  });

  test("it holds the natural elements from hydrogen to uranium and none without natural isotopes", () => {
    expect(symbols).toHaveLength(84);
    expect([symbols[0], symbols.at(-1)]).toEqual(["H", "U"]);
    expect(["Tc", "Pm", "Po", "Rn", "Ac", "Pu", "D"].filter(isElement)).toEqual([]);
  });

  test("isotopes that are not natural are listed but belong to no natural sample", () => {
    expect(isotopesOf("C").map(({ name }) => name)).toEqual(["12C", "13C", "14C"]);
    expect(naturalIsotopes("C").map(({ name }) => name)).toEqual(["12C", "13C"]);
    expect(naturalIsotopes("Xx")).toEqual([]);
  });

  test("an element without a mass number has the mean mass, hydrogen the mass of 1H", () => {
    expect(readAtom("Cl")).toEqual({ name: "Cl", element: "Cl", massNumber: null, mass: meanMass("Cl") });
    expect(readAtom("H")).toMatchObject({ name: "1H", massNumber: 1 });
  });
});
