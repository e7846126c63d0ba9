import type { Bond } from "../../species/index.ts";
import type { WellClass } from "./reference-well.ts";

/** The two element symbols of a bond, isotopes forgotten (D and T are hydrogen), in alphabetical order; null without atoms. */
export function bondElements(bond: Pick<Bond, "atoms"> | null): readonly [string, string] | null {
  if (bond === null || bond.atoms === null) return null;
  const [a, b] = bond.atoms.map((atom) => atom.replace(/^\d+/, "").replace(/^[DT]$/, "H")) as [string, string];
  return a <= b ? [a, b] : [b, a];
}

/** A hydride has hydrogen, of any mass, at one end or both. */
export function bondClass(elements: readonly [string, string]): WellClass {
  return elements.includes("H") ? "hydride" : "other";
}
