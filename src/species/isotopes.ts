import { isotopeRows } from "./isotopes.data.ts";

/** One isotope of an element, as a neutral atom. */
export interface Isotope {
  /** mass number and symbol, `35Cl` */
  readonly name: string;
  readonly massNumber: number;
  /** u */
  readonly mass: number;
  /** share of the natural element, 0 to 1; 0 for one that is not natural */
  readonly abundance: number;
}

/** Whether the table has this element symbol, in exact case. */
export function isElement(symbol: string): boolean {
  return Object.hasOwn(isotopeRows, symbol);
}

/** Symbol of the element a word means apart from its case, `cl` → `Cl`; null if there is none. */
export function elementInAnyCase(word: string): string | null {
  const symbol = word.slice(0, 1).toUpperCase() + word.slice(1).toLowerCase();
  return isElement(symbol) ? symbol : null;
}

/** All isotopes of an element in the table, by mass number; empty for an unknown one. */
export function isotopesOf(element: string): readonly Isotope[] {
  const row = isElement(element) ? (isotopeRows[element] ?? []) : [];
  return Array.from({ length: row.length / 3 }, (_, i) => ({
    name: `${row[3 * i]!}${element}`,
    massNumber: row[3 * i]!,
    mass: row[3 * i + 1]!,
    abundance: row[3 * i + 2]!,
  }));
}

/** Isotopes of the natural element with their abundances, by mass number; empty for an unknown element. */
export function naturalIsotopes(element: string): readonly Isotope[] {
  return isotopesOf(element).filter((isotope) => isotope.abundance > 0);
}

/** Abundance-weighted mean mass of the natural element in u. */
export function meanMass(element: string): number {
  const isotopes = naturalIsotopes(element);
  const total = isotopes.reduce((sum, { abundance }) => sum + abundance, 0);
  return isotopes.reduce((sum, { mass, abundance }) => sum + mass * abundance, 0) / total;
}
