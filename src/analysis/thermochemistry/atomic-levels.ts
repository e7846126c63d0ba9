/**
 * Lowest levels of neutral atoms: energy in cm-1 above the ground level and 2J+1, all below 2000 cm-1 (NIST Atomic Spectra Database, from memory;
 * tests hold the enthalpies they give against the CODATA key values, Cox, Wagman & Medvedev 1989). Atoms with a single level that low have it alone.
 */
const MULTIPLETS: Readonly<Record<string, readonly (readonly [number, number])[]>> = {
  B: [
    [0, 2],
    [15.287, 4],
  ],
  C: [
    [0, 1],
    [16.417, 3],
    [43.414, 5],
  ],
  O: [
    [0, 5],
    [158.265, 3],
    [226.977, 1],
  ],
  F: [
    [0, 4],
    [404.141, 2],
  ],
  Al: [
    [0, 2],
    [112.061, 4],
  ],
  Si: [
    [0, 1],
    [77.115, 3],
    [223.157, 5],
  ],
  S: [
    [0, 5],
    [396.055, 3],
    [573.64, 1],
  ],
  Cl: [
    [0, 4],
    [882.353, 2],
  ],
  Ga: [
    [0, 2],
    [826.19, 4],
  ],
  Ge: [
    [0, 1],
    [557.134, 3],
    [1409.961, 5],
  ],
  Se: [
    [0, 5],
    [1989.497, 3],
  ],
};

/** Elements whose ground level stands alone below 2000 cm-1. */
const SINGLE = new Set(
  "H He Li Be N Ne Na Mg P Ar K Ca Mn Cu Zn As Br Kr Rb Sr Ag Cd In Sb I Xe Cs Ba Au Hg Tl Bi".split(" "),
);

/** Low levels of an atom, energy in cm-1 and degeneracy; null for elements whose levels are not in the table. */
export function atomicLevels(element: string): readonly (readonly [number, number])[] | null {
  return MULTIPLETS[element] ?? (SINGLE.has(element) ? [[0, 1]] : null);
}
