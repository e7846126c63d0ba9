import type { Shared } from "../../bands/index.ts";
import { timesInverse } from "../../fitting/index.ts";
import { isWavelength, type UnitName, wavenumberPerUnit } from "../../quantity/index.ts";
import type { Solution } from "../solution.ts";

/** A band that could be measured: where it is predicted, with σ and the derivatives by the constants. */
export interface NewBand {
  readonly label: string;
  readonly position: number;
  readonly sigma: number;
  readonly row: readonly number[];
}

/** What a new datum adds when what the others tell of it is taken away. */
export interface Datum {
  readonly row: readonly number[];
  readonly variance: number;
}

/** Row and variance of a new band given the bands there are: errors they share are known in part already (Aitken 1936). */
export function newDatum(solution: Solution, band: NewBand): Datum {
  const { fit, errors, treatment, sigmaKnown, series } = solution;
  // Without stated σ the residuals say what a band is worth, and a new one will be no better than that.
  if (!sigmaKnown) return { row: band.row, variance: Math.max(band.sigma ** 2, fit.chiSquare / fit.degreesOfFreedom) };
  const own = series.shared.map((shared) => effectOn(shared, solution, band));
  const variance =
    (band.sigma * treatment.factor) ** 2 + treatment.scatter ** 2 + own.reduce((sum, x) => sum + x * x, 0);
  if (own.every((x) => x === 0)) return { row: band.row, variance };
  const tie = fit.residuals.map((_, i) => errors.shared.reduce((sum, parts, k) => sum + parts[i]! * own[k]!, 0));
  const weighted = timesInverse(fit.whitening, tie);
  return {
    row: band.row.map((x, k) => x - fit.jacobian.reduce((sum, other, i) => sum + weighted[i]! * other[k]!, 0)),
    variance: variance - tie.reduce((sum, x, i) => sum + x * weighted[i]!, 0),
  };
}

/** What one standard uncertainty of a cause that all bands share does to the new band; a group is one of its own, of which nothing is known. */
function effectOn(
  { kind, sigma, parts }: Shared,
  { options, model, series: { shared } }: Solution,
  { label, position }: NewBand,
): number {
  const { upper, lower } = model.levels(label);
  if (kind === "per-quantum") return sigma.value * (upper - lower);
  if (kind === "laser") return parts[0] ?? 0;
  if (kind !== "calibration") return 0;
  const unit = sigma.unit as UnitName;
  if (isWavelength(unit) && shared.some((other) => other.kind === "laser")) return 0;
  return sigma.value * wavenumberPerUnit(position, unit, "vacuum", options.air);
}
