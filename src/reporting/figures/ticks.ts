import type { Axis, Run } from "./figure-spec.ts";

export interface Ticks {
  readonly values: readonly number[];
  /** digits after the point, the same for all */
  readonly decimals: number;
  readonly step: number;
}

/**
 * Round values between `min` and `max`, about `wanted` of them, in steps of 1, 2 or 5 times a power of ten; `least` is the
 * smallest step allowed (1 for quantum numbers). Each value is a whole multiple written in decimals, so 0.3 is 0.3 and not
 * 0.1 + 0.2.
 */
export function niceTicks(min: number, max: number, wanted: number, least = 0): Ticks {
  const span = max - min;
  if (!(span > 0) || !Number.isFinite(span)) throw new RangeError(`no ticks between ${min} and ${max}`);
  const rough = Math.max(span / Math.max(1, wanted), least);
  let exponent = Math.floor(Math.log10(rough) + 1e-9);
  const mantissa = rough / 10 ** exponent;
  let multiple = 10;
  for (const [border, choice] of [
    [1.0001, 1],
    [2.2, 2],
    [5.5, 5],
  ] as const) {
    if (mantissa <= border) {
      multiple = choice;
      break;
    }
  }
  if (multiple === 10) {
    multiple = 1;
    exponent += 1;
  }
  const at = (i: number) => Number(`${i * multiple}e${exponent}`);
  const step = at(1);
  // 1e-9 of a step: a range that ends on a tick keeps it despite rounding
  const first = Math.ceil(min / step - 1e-9);
  const last = Math.floor(max / step + 1e-9);
  const values: number[] = [];
  for (let i = first; i <= last; i++) values.push(i === 0 ? 0 : at(i));
  return { values, decimals: Math.max(0, -exponent), step };
}

/** A tick as printed: fixed decimals, a true minus, no thousands separators. */
export function tickText(value: number, decimals: number): string {
  const digits = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(digits) !== 0 ? `−${digits}` : digits;
}

/** The smallest range over all values, widened by a share of its span on either side; equal values get a range of their own. */
export function paddedRange(values: readonly number[], share = 0.06): readonly [number, number] {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  if (low > high) return [-1, 1];
  const span = high - low;
  // below 1e-12 of the size nothing but rounding tells the values apart
  if (span <= 1e-12 * Math.max(Math.abs(low), Math.abs(high))) {
    const half = low === 0 ? 1 : Math.abs(low) * 0.05;
    return [low - half, high + half];
  }
  return [low - share * span, high + share * span];
}

/** An axis from `min` to `max` with about `wanted` ticks. */
export function axis(label: readonly Run[], min: number, max: number, wanted: number, least = 0): Axis {
  const { values, decimals } = niceTicks(min, max, wanted, least);
  return { label, min, max, ticks: values, decimals };
}

/** The text of every tick of an axis. */
export function tickTexts({ ticks, decimals, tickLabels }: Axis): readonly string[] {
  return tickLabels ?? ticks.map((value) => tickText(value, decimals));
}

/** With so many round numbers on an axis, 810 or 1300 between them would only disturb. */
const ENOUGH = 4;

/**
 * Places for a second axis that is no linear function of the first: rounder numbers first (1, 2, 5, then whole multiples of
 * powers of ten, and so on), each where it keeps `apart` from those already set. `place` maps a number to its place.
 */
export function scatteredTicks(
  range: readonly [number, number],
  place: (value: number) => number,
  apart: number,
): readonly number[] {
  const [low, high] = range;
  const top = Math.floor(Math.log10(high));
  const bottom = Math.floor(Math.log10(low)) - 2;
  const tiers: number[][] = [];
  for (const mantissas of [
    [1, 2, 5],
    [3, 4, 6, 7, 8, 9],
    [1.5, 2.5],
  ]) {
    const tier: number[] = [];
    for (let e = top; e >= bottom; e--) for (const m of mantissas) tier.push(Number(`${m}e${e}`));
    tiers.push(tier);
  }
  for (let e = top - 1; e >= bottom; e--) {
    const step = Number(`1e${e}`);
    if ((high - low) / step > 2000) break;
    const tier: number[] = [];
    for (let i = Math.ceil(low / step); i * step <= high; i++) tier.push(Number(`${i}e${e}`));
    tiers.push(tier);
  }
  const chosen: number[] = [];
  for (const [i, tier] of tiers.entries()) {
    if (i > 2 && chosen.length >= ENOUGH) break;
    for (const value of tier) {
      if (value < low || value > high) continue;
      if (chosen.every((other) => Math.abs(place(other) - place(value)) >= apart)) chosen.push(value);
    }
  }
  return chosen.sort((a, b) => a - b);
}
