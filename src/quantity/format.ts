import { leadingExponent, roundDecimal } from "./decimal.ts";

/** `plain`: ASCII, for data and terminals; `print`: minus U+2212 and powers of ten as × 10ⁿ, for pages. */
export type NumberStyle = "plain" | "print";

/** What stands for a number that is not to be had. */
export const notDetermined = "—";

/** Numbers from 1e9 upwards and below 1e-4 are written with a power of ten. */
const plainExponents = { largest: 8, smallest: -4 };

/**
 * Decimals at which a standard uncertainty (positive) keeps two significant digits once rounded: 0.02 → 3 (0.020),
 * 0.0995 → 2 (0.10), 12.3 → 0, 145.1 → −1 (150).
 */
export function decimalsFor(u: number): number {
  const leading = leadingExponent(u);
  // rounding may carry into a new first digit: 0.0995 → 0.100, which is one digit too many
  const carried = leadingExponent(Number(roundDecimal(u, 1 - leading))) > leading;
  return (carried ? 0 : 1) - leading;
}

/**
 * A value with its standard uncertainty (k = 1) in concise form, `2990.946(53)`: the digits in parentheses count units of
 * the last digits printed (JCGM 100:2008, 7.2.2). The uncertainty keeps two significant digits and the value ends at the
 * same place; halves are rounded away from zero. An uncertainty that reaches across the decimal point keeps the point,
 * `-1.2(3.4)`; from 100 upwards both are rounded to tens or more and written out, `46510(150)`. Very large and very small
 * numbers carry one power of ten for both, `1.234(12)e-7`. `readMeasurement` reads all of it back.
 *
 * Without an uncertainty (null or zero) the value stands alone with six significant digits and no trailing zeros. A value
 * that is not finite is `—`; so is an uncertainty that is none, in parentheses.
 */
export function formatMeasured(
  value: number,
  u: number | null,
  { style = "plain" }: { readonly style?: NumberStyle } = {},
): string {
  if (!Number.isFinite(value)) return notDetermined;
  if (u === null || u === 0) return withPower(style, powerFor(value), (power) => sixDigits(value, power));
  if (!(u > 0 && u < Number.POSITIVE_INFINITY)) return `${formatMeasured(value, null, { style })}(${notDetermined})`;
  return withPower(style, powerFor(Math.max(Math.abs(value), u)), (power) => concise(value, u, power));
}

/** The power of ten a number of this size is written with; 0 for none. */
function powerFor(size: number): number {
  const leading = leadingExponent(size);
  return leading > plainExponents.largest || leading < plainExponents.smallest ? leading : 0;
}

function concise(value: number, u: number, power: number): string {
  const decimals = decimalsFor(u);
  // the value is shifted by its digits, not by a multiplication that would round it
  const head = roundDecimal(value, decimals, power);
  const uncertainty = roundDecimal(u, decimals, power);
  return `${head}(${Number(uncertainty) >= 1 ? uncertainty : uncertainty.replace(/^0\.0*/u, "")})`;
}

function sixDigits(value: number, power: number): string {
  const text = roundDecimal(value, 5 - leadingExponent(value), power);
  return text.includes(".") ? text.replace(/\.?0+$/u, "") : text;
}

function withPower(style: NumberStyle, power: number, write: (power: number) => string): string {
  const mantissa = write(power);
  if (style === "plain") return power === 0 ? mantissa : `${mantissa}e${power}`;
  const printed = mantissa.replace("-", "−");
  return power === 0 ? printed : `${printed} × 10${superscript(power)}`;
}

function superscript(power: number): string {
  return String(power).replace(/./gu, (c) => (c === "-" ? "⁻" : "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(c)]!));
}

/** A number with that many decimals, halves rounded away from zero, no minus before zero; `—` if it is not finite. */
export function formatFixed(
  value: number,
  decimals: number,
  { minus = "-" }: { readonly minus?: "-" | "−" } = {},
): string {
  return Number.isFinite(value) ? roundDecimal(value, decimals).replace("-", minus) : notDetermined;
}
