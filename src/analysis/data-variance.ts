import { covarianceOf } from "../fitting/index.ts";
import type { Solution } from "./solution.ts";

/** Variance of a linear function of the used bands, shared errors included; null when no uncertainty can be had. */
export function dataVariance({ errors, treatment, fit, used }: Solution, gradient: readonly number[]): number | null {
  const n = used.length;
  const v = covarianceOf(errors, treatment, n);
  let sum = 0;
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) sum += gradient[i]! * gradient[j]! * v[i * n + j]!;
  if (errors.sigmas !== null) return Math.max(0, sum);
  if (fit.degreesOfFreedom < 1 || fit.exact) return null;
  sum *= fit.chiSquare / fit.degreesOfFreedom;
  for (const c of errors.shared) sum += c.reduce((total, x, i) => total + x * gradient[i]!, 0) ** 2;
  return Math.max(0, sum);
}
