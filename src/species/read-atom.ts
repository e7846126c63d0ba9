import type { Explanation } from "../quantity/index.ts";
import { elementInAnyCase, isElement, isotopesOf, meanMass } from "./isotopes.ts";

/** An atom of a bond: one isotope, or the natural element (`massNumber` null, mass the mean over its abundances). */
export interface Atom {
  /** `35Cl`, or `Cl` for the natural element */
  readonly name: string;
  readonly element: string;
  readonly massNumber: number | null;
  /** u */
  readonly mass: number;
}

/** Symbols that name an isotope by themselves. A bare H is the isotope, not the natural mixture. */
const ofHydrogen: Readonly<Record<string, number>> = { H: 1, D: 2, T: 3 };

/**
 * Read one atom: `35Cl`, `³⁵Cl`, `Cl` (natural mean), `H` (1H), `D` (2H), `T` (3H). Anything else is explained, with the
 * isotopes there are or the spelling that is probably meant.
 */
export function readAtom(text: string): Atom | Explanation {
  const [, number = "", letters = ""] = /^(\d*)([A-Za-z]+)$/u.exec(text.trim().normalize("NFKC")) ?? [];
  if (letters === "") {
    const [, symbol, after] = /^([A-Za-z]+)-?(\d+)$/u.exec(text.trim()) ?? [];
    return { what: `"${text}" is not an atom`, mend: `write an isotope such as ${after ?? 35}${symbol ?? "Cl"}` };
  }
  const isotopeOfHydrogen = Object.hasOwn(ofHydrogen, letters) ? ofHydrogen[letters] : undefined;
  if (isotopeOfHydrogen !== undefined && letters !== "H" && number !== "") {
    return { what: `"${text}" names a mass number twice`, mend: `write ${letters} or ${isotopeOfHydrogen}H` };
  }
  const element = isotopeOfHydrogen === undefined ? letters : "H";
  if (!isElement(element)) return unknownElement(text, number, letters);
  if (number === "" && isotopeOfHydrogen === undefined) {
    return { name: element, element, massNumber: null, mass: meanMass(element) };
  }
  const wanted = number === "" ? isotopeOfHydrogen : Number(number);
  const isotopes = isotopesOf(element);
  const found = isotopes.find(({ massNumber }) => massNumber === wanted);
  if (found === undefined) {
    const names = isotopes.map(({ name }) => name).join(", ");
    return {
      what: `"${text}" is not in the table of isotopes`,
      mend: `${element} has ${names}; or give the reduced mass`,
    };
  }
  return { name: found.name, element, massNumber: found.massNumber, mass: found.mass };
}

function unknownElement(text: string, number: string, letters: string): Explanation {
  const meant = elementInAnyCase(letters) ?? (/^[dt]$/u.test(letters) ? letters.toUpperCase() : null);
  return {
    what: `"${text}" is not an element`,
    mend: meant === null ? "write an isotope such as 35Cl, or give the reduced mass" : `write ${number}${meant}`,
  };
}
