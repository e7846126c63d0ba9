import { lightOf, offsetEffect, type Shared } from "../../bands/index.ts";
import { timesInverse } from "../../fitting/index.ts";
import type { UnitName } from "../../quantity/index.ts";
import { pullOf } from "../mixture.ts";
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

/** Row and variance of new bands given the bands there are: errors they share are known in part already (Aitken 1936). */
export function newDatum(solution: Solution): (band: NewBand) => Datum {
  const { fit, errors, treatment, sigmaKnown, series } = solution;
  // Errors in common are carried with stated σ only.
  if (!sigmaKnown || series.shared.length === 0)
    return ({ row, sigma }) => ({
      row,
      variance: sigmaKnown ? (sigma * treatment.factor) ** 2 + treatment.scatter ** 2 : sigma ** 2,
    });
  const effects = series.shared.map((shared) => effectOf(shared, solution));
  return (band) => {
    const own = effects.map((effect) => effect(band));
    const tie = fit.residuals.map((_, i) => errors.shared.reduce((sum, parts, k) => sum + parts[i]! * own[k]!, 0));
    const weighted = timesInverse(fit.whitening, tie);
    const alone = (band.sigma * treatment.factor) ** 2 + treatment.scatter ** 2;
    return {
      row: band.row.map((x, k) => x - fit.jacobian.reduce((sum, other, i) => sum + weighted[i]! * other[k]!, 0)),
      variance: own.reduce((sum, x) => sum + x * x, alone) - tie.reduce((sum, x, i) => sum + x * weighted[i]!, 0),
    };
  };
}

/** What one standard uncertainty of a cause that bands share does to a new one. A new band belongs to no group: of a further group nothing is known. */
function effectOf(
  { kind, sigma, parts }: Shared,
  { options, model, series }: Solution,
): (band: Pick<NewBand, "label" | "position">) => number {
  switch (kind) {
    case "calibration":
      return ({ position }) =>
        offsetEffect(sigma.value, sigma.unit as UnitName, lightOf(position, series.light), series.light);
    case "laser":
      return () => parts[0]!;
    case "per-quantum":
      return ({ label }) => {
        const { upper, lower } = model.levels(label);
        return sigma.value * (upper - lower);
      };
    case "mixture": {
      const pull = pullOf(series, model, options);
      return ({ label }) => pull?.on(label) ?? 0;
    }
    case "group":
      return () => 0;
  }
}
