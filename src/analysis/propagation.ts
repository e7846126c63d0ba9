import { dot } from "../fitting/index.ts";
import { interval, type Quantity } from "../quantity/index.ts";

/** Covariance of the constants and what intervals are made with. */
export interface Propagation {
  /** null: uncertainties cannot be had */
  readonly covariance: readonly (readonly number[])[] | null;
  /** degrees of freedom of the standard deviations, or null when they are known */
  readonly degreesOfFreedom: number | null;
  readonly coverage: number | null;
}

/** Variance of a function with that gradient, by the law of propagation (JCGM 100:2008, 5.2.2). */
export function varianceOf(covariance: readonly (readonly number[])[], gradient: readonly number[]): number {
  return Math.max(
    0,
    gradient.reduce((sum, g, i) => sum + g * dot(covariance[i]!, gradient), 0),
  );
}

/** A quantity from its standard uncertainty (null: not to be had). */
export function quantityFrom(value: number, u: number | null, unit: string, by: Propagation): Quantity {
  const bounds = (level: number) => (u === null ? null : interval(value, u, level, by.degreesOfFreedom));
  const base = { value, standardUncertainty: u, interval95: bounds(0.95), unit };
  return by.coverage === null ? base : { ...base, interval: { coverage: by.coverage, bounds: bounds(by.coverage) } };
}

/** A quantity that is a function of the constants, to first order. */
export function propagate(value: number, gradient: readonly number[], unit: string, by: Propagation): Quantity {
  const u = by.covariance === null ? null : Math.sqrt(varianceOf(by.covariance, gradient));
  return quantityFrom(value, u, unit, by);
}

/** Sum of two gradients, the second times a factor. */
export function addScaled(a: readonly number[], b: readonly number[], factor = 1): number[] {
  return a.map((x, k) => x + factor * b[k]!);
}
