import { fitLinear, type LinearFit } from "./linear.ts";
import type { Problem } from "./problem.ts";
import { whiten, whitenTransposed } from "./whitening.ts";

/** The fit with τ added in quadrature to every independent error. */
export interface ScatterFit {
  readonly tau: number;
  readonly fit: LinearFit;
}

/**
 * The added scatter τ for which χ² equals the degrees of freedom (Mandel & Paule 1970), by Newton's method on 1/χ², which is
 * nearly straight in τ². Starts from the untreated fit; call only with χ² above the degrees of freedom.
 */
export function fitWithScatter(problem: Problem, untreated: LinearFit): ScatterFit {
  let fit = untreated;
  let tau2 = 0;
  for (let round = 0; round < 60; round++) {
    const ratio = fit.chiSquare / fit.degreesOfFreedom;
    if (Math.abs(ratio - 1) < 1e-10) break;
    const next = tau2 + (ratio - 1) * (fit.chiSquare / descent(problem, fit));
    tau2 = next > 0 ? next : tau2 / 4;
    fit = fitLinear(problem, { scatter: Math.sqrt(tau2), factor: 1 });
  }
  return { tau: Math.sqrt(tau2), fit };
}

/** -dχ²/dτ² = (V⁻¹r)ᵀ·M·Mᵀ·(V⁻¹r). */
function descent({ errors }: Problem, fit: LinearFit): number {
  const r = Float64Array.from(fit.residuals);
  whiten(fit.whitening, r);
  whitenTransposed(fit.whitening, r);
  if (errors.mixing === null) return r.reduce((sum, x) => sum + x * x, 0);
  const sources = errors.mixing[0]!.length;
  let sum = 0;
  for (let k = 0; k < sources; k++) {
    let part = 0;
    for (let i = 0; i < r.length; i++) part += errors.mixing[i]![k]! * r[i]!;
    sum += part * part;
  }
  return sum;
}

/** Birge's factor max(1, √(χ²/ν)): never shrinks (Birge 1932). */
export function birgeFactor(fit: LinearFit): number {
  return Math.max(1, Math.sqrt(fit.chiSquare / fit.degreesOfFreedom));
}
