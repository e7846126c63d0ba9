import type { Well } from "../models/index.ts";
import { forceConstantFactor, kappa } from "../quantity/index.ts";
import { type Propagation, propagate, quantityFrom, varianceOf } from "./propagation.ts";
import type { Derived } from "./result.ts";
import { turningPoint } from "./turning-point.ts";

const unitVector = (size: number, at: number, value: number) => {
  const gradient = new Array<number>(size).fill(0);
  gradient[at] = value;
  return gradient;
};

/**
 * Numbers that follow from the constants alone. `reducedMass` in u or null; `y00` in cm-1 with the gradient by the constants, or null.
 * Force constant and a are those of the bond as a pair of masses.
 */
export function derivedNumbers(
  well: Well,
  p: readonly number[],
  by: Propagation,
  reducedMass: number | null,
  y00: { readonly value: number; readonly gradient: readonly number[] } | null,
): Derived {
  const [a, b] = well.leading;
  const we = p[a]!;
  const wexe = p[b]!;
  const zero = well.termGradient(0);
  // ν̃/v against v has its tangent at v = 0 from dG/dv and d²G/dv²/2 there; ΔG(v+½) against v+½ at 0 from G(½) - G(-½).
  const spacing = (gradient: (v: number) => number[]) => {
    const low = gradient(-0.5);
    return gradient(0.5).map((x, k) => x - low[k]!);
  };
  const value = (gradient: readonly number[]) => gradient.reduce((sum, g, k) => sum + g * p[k]!, 0);
  const linear = (gradient: readonly number[], unit = "cm-1") => propagate(value(gradient), gradient, unit, by);
  return {
    zeroPointEnergy: propagate(
      well.term(0) + (y00?.value ?? 0),
      zero.map((g, k) => g + (y00?.gradient[k] ?? 0)),
      "cm-1",
      by,
    ),
    forceConstant:
      reducedMass === null
        ? null
        : propagate(
            forceConstantFactor * reducedMass * we ** 2,
            unitVector(p.length, a, 2 * forceConstantFactor * reducedMass * we),
            "N/m",
            by,
          ),
    morseA:
      reducedMass === null || !(wexe > 0)
        ? null
        : propagate(
            Math.sqrt((wexe * reducedMass) / kappa),
            unitVector(p.length, b, Math.sqrt(reducedMass / (kappa * wexe)) / 2),
            "1/Å",
            by,
          ),
    y00: y00 === null ? null : propagate(y00.value, y00.gradient, "cm-1", by),
    highestLevel: highestLevel(well, by),
    positionPlotIntercept: linear(well.slopeGradient(0)),
    positionPlotSlope: linear(well.curvatureGradient(0).map((g) => g / 2)),
    spacingPlotIntercept: linear(spacing(well.termGradient)),
    spacingPlotSlope: linear(spacing(well.slopeGradient)),
  };
}

/**
 * The highest bound level: the largest integer below the v at which dG/dv vanishes (for two terms ωe/(2ωexe) - ½), and its range
 * over the 95 % interval of that v. null when the spacings do not vanish.
 */
export function highestLevel(well: Well, by: Propagation): Derived["highestLevel"] {
  const limit = turningPoint(well, 0);
  if (limit === null) return null;
  const below = (v: number) => Math.max(0, Math.ceil(v - 1e-9) - 1);
  if (by.covariance === null) return { value: below(limit), range: null };
  const slope = well.slopeGradient(limit);
  const u = Math.sqrt(varianceOf(by.covariance, slope)) / Math.abs(well.curvature(limit));
  const { interval95 } = quantityFrom(limit, u, "", by);
  return { value: below(limit), range: interval95 === null ? null : [below(interval95[0]), below(interval95[1])] };
}
