import { dot, type LinearFit, weightedJacobian } from "./linear.ts";
import { triangularise } from "./qr.ts";
import { timesInverse, whiten, whitenTransposed } from "./whitening.ts";

/** A share of the weight below which a datum is fitted by constants of its own: nothing is left to test. */
const NOTHING_LEFT = 1e-9;

/** Residual tests of a fit, one entry a datum. */
export interface Diagnostics {
  /**
   * (V⁻¹r)_i / √(V⁻¹ - V⁻¹XCXᵀV⁻¹)_ii, independent of the order of rows; with unknown σ externally studentised
   * (Cook & Weisberg 1982). null where the datum alone determines a constant or too few degrees of freedom are left.
   */
  readonly studentized: readonly (number | null)[];
  /** observed - predicted from the data outside the datum's group (given the errors they share); null where that is undetermined */
  readonly leftOut: readonly (number | null)[];
  /** diagonal of X·C·Xᵀ·V⁻¹: how much each datum determines its own calculated value; independent of the order of rows */
  readonly leverage: readonly number[];
}

/** Residual tests; `groups` lists the data that leave together (repeats of one band). */
export function diagnose(fit: LinearFit, groups: readonly (readonly number[])[]): Diagnostics {
  const n = fit.residuals.length;
  const weighted = weightedJacobian(fit.jacobian, fit.whitening);
  const inverse = inverseCovariance(fit);
  const weightedResiduals = timesInverse(fit.whitening, fit.residuals);
  const pulled = weighted.map((row) => fit.gram.map((g) => dot(g, row)));
  const q = (i: number, j: number) => inverse(i, j) - dot(weighted[i]!, pulled[j]!);
  const free = (i: number) => q(i, i) > NOTHING_LEFT * inverse(i, i);

  const studentized = fit.residuals.map((_, i) => {
    if (fit.degreesOfFreedom < 1 || !free(i)) return null;
    const t = weightedResiduals[i]! / Math.sqrt(q(i, i));
    return fit.sigmaKnown ? t : external(t, fit.chiSquare, fit.degreesOfFreedom);
  });
  const leftOut = new Array<number | null>(n).fill(null);
  for (const group of groups) {
    const errors = leaveOut(group, q, free, weightedResiduals);
    group.forEach((i, m) => {
      leftOut[i] = errors === null ? null : errors[m]!;
    });
  }
  return { studentized, leftOut, leverage: fit.jacobian.map((row, i) => dot(row, pulled[i]!)) };
}

/** From a residual over the deviation of one datum (σ counted 1) to the externally studentised one. */
function external(t: number, residualSumOfSquares: number, degreesOfFreedom: number): number | null {
  if (degreesOfFreedom < 2 || residualSumOfSquares === 0) return null;
  const internal = t / Math.sqrt(residualSumOfSquares / degreesOfFreedom);
  const rest = degreesOfFreedom - internal ** 2;
  return rest > 0 ? internal * Math.sqrt((degreesOfFreedom - 1) / rest) : null;
}

/** Q_gg⁻¹ (V⁻¹r)_g; null when the data left do not determine the constants. */
function leaveOut(
  group: readonly number[],
  q: (i: number, j: number) => number,
  free: (i: number) => boolean,
  weightedResiduals: Float64Array,
): readonly number[] | null {
  if (!group.every(free)) return null;
  const size = group.length;
  if (size === 1) return [weightedResiduals[group[0]!]! / q(group[0]!, group[0]!)];
  const augmented = new Float64Array(size * (size + 1));
  group.forEach((i, a) => {
    group.forEach((j, b) => {
      augmented[a * (size + 1) + b] = q(i, j);
    });
    augmented[a * (size + 1) + size] = weightedResiduals[i]!;
  });
  const { dependent, solution, r } = triangularise({ rows: size, columns: size, augmented });
  const undetermined = dependent >= 0 || Math.abs(r.at(-1)!) < NOTHING_LEFT;
  return undetermined ? null : [...solution];
}

function inverseCovariance({ whitening, residuals }: LinearFit): (i: number, j: number) => number {
  const { diagonal } = whitening;
  if (diagonal !== null) return (i, j) => (i === j ? diagonal[i]! ** 2 : 0);
  const columns = residuals.map((_, j) => {
    const unit = new Float64Array(residuals.length);
    unit[j] = 1;
    whiten(whitening, unit);
    whitenTransposed(whitening, unit);
    return unit;
  });
  return (i, j) => columns[j]![i]!;
}
