import { normalUpperTail, studentUpperTail } from "./distributions.ts";
import { logGamma } from "./special-functions.ts";

/** Factors already computed, by level and degrees of freedom (0 for the normal distribution). */
const remembered = new Map<number, Map<number, number>>();

/**
 * Factor k such that ±k standard uncertainties cover `level` (0.95, say): Student's t for `degreesOfFreedom` ≥ 1, the
 * normal distribution for null (standard deviations known). JCGM 100:2008, annex G. Relative error against 40-digit
 * arithmetic below 1e-13 up to 30 degrees of freedom, 1e-12 up to 1000.
 * @throws RangeError for a level outside 0…1 (both excluded) or degrees of freedom that are not positive.
 */
export function coverageFactor(level: number, degreesOfFreedom: number | null): number {
  const known = remembered.get(level)?.get(degreesOfFreedom ?? 0);
  if (known !== undefined) return known;
  if (!(level > 0 && level < 1)) throw new RangeError(`a level of coverage lies between 0 and 1, not ${level}`);
  const factor = twoSidedQuantile(1 - level, degreesOfFreedom);
  // a run meets a handful of pairs; the cap is for a long-lived program
  if (remembered.size > 100) remembered.clear();
  const ofLevel = remembered.get(level) ?? new Map<number, number>();
  if (ofLevel.size > 1000) ofLevel.clear();
  remembered.set(level, ofLevel.set(degreesOfFreedom ?? 0, factor));
  return factor;
}

/** Standard normal quantile: z with P(Z ≤ z) = `probability`, 0 < probability < 1. */
export function normalQuantile(probability: number): number {
  return quantile(probability, null);
}

/** Quantile of Student's t: x with P(T ≤ x) = `probability`, 0 < probability < 1. */
export function studentT(probability: number, degreesOfFreedom: number): number {
  return quantile(probability, degreesOfFreedom);
}

function quantile(probability: number, degreesOfFreedom: number | null): number {
  if (!(probability > 0 && probability < 1)) {
    throw new RangeError(`a probability lies between 0 and 1, not ${probability}`);
  }
  if (probability === 0.5) return 0;
  const lower = probability < 0.5;
  const magnitude = twoSidedQuantile(2 * (lower ? probability : 1 - probability), degreesOfFreedom);
  return lower ? -magnitude : magnitude;
}

/** x > 0 with P(|T| > x) = `alpha`. Closed forms for 1 and 2 degrees of freedom, otherwise Newton's method. */
function twoSidedQuantile(alpha: number, degreesOfFreedom: number | null): number {
  const nu = degreesOfFreedom;
  if (nu === 1) return 1 / Math.tan((Math.PI * alpha) / 2);
  if (nu === 2) return ((1 - alpha) * Math.SQRT2) / Math.sqrt(alpha * (2 - alpha));
  // ln P(|T| > x) as a function of ln x is concave and falls, so Newton's steps converge from any start, at the end
  // from above; it is nearly straight in the tail, which makes them few
  let x = 1;
  for (let step = 0; step < 60; step++) {
    const tail = 2 * (nu === null ? normalUpperTail(x) : studentUpperTail(x, nu));
    const move = (Math.log(tail / alpha) * tail) / (2 * x * density(x, nu));
    const limited = Math.max(-3, Math.min(3, move));
    x *= Math.exp(limited);
    // the error after a step is about the square of that step
    if (Math.abs(limited) < 1e-9) break;
  }
  return x;
}

/** Probability density of Student's t, or of the standard normal distribution for null. */
function density(x: number, nu: number | null): number {
  if (nu === null) return Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
  const front = Math.exp(logGamma((nu + 1) / 2) - logGamma(nu / 2)) / Math.sqrt(nu * Math.PI);
  return front * (1 + (x * x) / nu) ** (-(nu + 1) / 2);
}

/** Interval [lo, hi] of that level about a value with standard uncertainty `u`; null degrees of freedom: normal. */
export function interval(
  value: number,
  u: number,
  level: number,
  degreesOfFreedom: number | null,
): readonly [number, number] {
  const half = coverageFactor(level, degreesOfFreedom) * u;
  return [value - half, value + half];
}
