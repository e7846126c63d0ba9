import type { SeriesResult } from "../../analysis/index.ts";
import { coverageFactor } from "../../quantity/index.ts";

const KEYS = ["we", "wexe", "weye", "weze", "y5", "y6"];

/** A linear combination of the constants: its value and the half-width of its 95 % interval (null: not to be had). */
export interface Valued {
  readonly value: number;
  readonly half: number | null;
}

/** The fitted well of a series, G(v) = ωe(v+½) - ωexe(v+½)² + ωeye(v+½)³ + … cm-1. */
export interface FittedWell {
  term(v: number): number;
  /** G(upper) - G(lower) over `divisor`, for any real numbers */
  difference(upper: number, lower: number, divisor?: number): Valued;
  /** dG/dv over 1 */
  slope(v: number): Valued;
}

/** null when the model has other constants. */
export function fittedWell(series: SeriesResult): FittedWell | null {
  const { constants, correlation, covariance, quality } = series;
  if (constants.we === undefined || constants.wexe === undefined) return null;
  const keys = KEYS.filter((key) => constants[key] !== undefined);
  const order = KEYS.slice(0, KEYS.indexOf(keys.at(-1)!) + 1);
  const p = order.map((key) => constants[key]?.value ?? 0);
  const coverage = covariance === null ? 0 : coverageFactor(0.95, quality.intervalDegreesOfFreedom);
  const row = (v: number, derivative: 0 | 1) =>
    order.map((_, k) => (k === 1 ? -1 : 1) * (derivative === 0 ? (v + 0.5) ** (k + 1) : (k + 1) * (v + 0.5) ** k));
  const valued = (gradient: readonly number[]): Valued => {
    const value = gradient.reduce((sum, g, k) => sum + g * p[k]!, 0);
    if (correlation === null || covariance === null) return { value, half: null };
    const free = correlation.order.map((key) => gradient[order.indexOf(key)] ?? 0);
    const variance = free.reduce((sum, g, i) => sum + g * free.reduce((s, h, j) => s + h * covariance[i]![j]!, 0), 0);
    return { value, half: coverage * Math.sqrt(Math.max(0, variance)) };
  };
  return {
    term: (v) => valued(row(v, 0)).value,
    slope: (v) => valued(row(v, 1)),
    difference: (upper, lower, divisor = 1) => {
      const low = row(lower, 0);
      return valued(row(upper, 0).map((g, k) => (g - low[k]!) / divisor));
    },
  };
}
