import type { Medium } from "../bands/index.ts";
import {
  airRange,
  chiSquareUpperTail,
  fromWavenumber,
  isWavelength,
  readUnit,
  toWavenumber,
} from "../quantity/index.ts";
import { IMPROBABLE, type Solution, trySolve } from "./solution.ts";

/** χ² must fall below this share before another medium is suspected. */
const SHARE = 0.1;

/**
 * Whether reading the wavelengths as if they were in the other medium would mend a bad fit: χ² then passes and falls below a tenth. Suspected only
 * where σ is known and at least two degrees of freedom are left. Air read as vacuum shifts a band near 700 nm by 4 cm-1.
 */
export function mediumMends(solution: Solution): { medium: Medium; chiSquare: number } | null {
  const { series, model, options, probability, stated } = solution;
  if (probability === null || probability >= IMPROBABLE || stated.degreesOfFreedom < 2) return null;
  for (const medium of ["air", "vacuum"] as const) {
    const bands = series.bands.map((band) => {
      const unit = readUnit(band.asRead.unit);
      if (unit === null || !isWavelength(unit) || band.asRead.medium === medium) return band;
      const nm = fromWavenumber(band.position, "nm", band.asRead.medium, options.air);
      if (airRange(nm) === "refused") return band;
      return { ...band, position: toWavenumber(nm, "nm", medium, options.air) };
    });
    if (bands.every((band, i) => band === series.bands[i])) continue;
    const other = trySolve({ ...series, bands }, model, { ...options, excess: "none", scatter: null, robust: null });
    if (other === null) continue;
    const { chiSquare, degreesOfFreedom } = other.stated;
    if (chiSquare < SHARE * stated.chiSquare && chiSquareUpperTail(chiSquare, degreesOfFreedom) > IMPROBABLE)
      return { medium, chiSquare };
  }
  return null;
}
