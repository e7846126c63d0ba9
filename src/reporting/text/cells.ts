import { decimalsFor, formatFixed, formatMeasured, notDetermined, type Quantity } from "../../quantity/index.ts";

/** Most decimals a table shows; finer digits stand in the CSV and JSON files. */
const MOST_DECIMALS = 12;

/** Value with standard uncertainty in concise form; `—` for null. */
export function measured(value: number | null, u: number | null): string {
  return value === null ? notDetermined : formatMeasured(value, u, { style: "print" });
}

/** A quantity in concise form; `—` for null. */
export function quantity(q: Quantity | null): string {
  return q === null ? notDetermined : measured(q.value, q.standardUncertainty);
}

/** A number with that many decimals (never rounded to tens); `—` for null. */
export function fixed(value: number | null, decimals: number): string {
  if (value === null) return notDetermined;
  return formatFixed(value, Math.min(MOST_DECIMALS, Math.max(0, decimals)), { minus: "−" });
}

/** A positive size (a margin, a rms) with two significant digits, three from 100 upwards; `—` for null. */
export function size(value: number | null): string {
  if (value === null) return notDetermined;
  return value === 0 ? "0" : value >= 100 ? fixed(value, 0) : fixed(value, decimalsFor(value));
}

/** A number exactly as it was given: the shortest digits that stand for it. */
export function exact(value: number): string {
  return String(value).replace("e-", " × 10^−").replace("e+", " × 10^").replace(/^-/, "−");
}

/** χ² and its like: two decimals, from 1000 upwards none; `—` for null. */
export function statistic(value: number | null): string {
  return fixed(value, value !== null && Math.abs(value) >= 1000 ? 0 : 2);
}

/** A probability: two significant digits, `< 0.0001` below; `—` for null. */
export function probability(value: number | null): string {
  if (value === null) return notDetermined;
  if (value < 1e-4) return "< 0.0001";
  return value > 0.9999 ? "> 0.9999" : fixed(value, value >= 0.1 ? 2 : decimalsFor(value));
}

/** Both ends of an interval at the place where the uncertainty ends; null where there is none. */
export function ends(q: Quantity | null, bounds: readonly [number, number] | null): readonly [string, string] | null {
  if (q === null || bounds === null) return null;
  const u = q.standardUncertainty;
  const decimals = u !== null && u > 0 ? decimalsFor(u) : 2;
  return [fixed(bounds[0], decimals), fixed(bounds[1], decimals)];
}
