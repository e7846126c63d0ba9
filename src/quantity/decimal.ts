/** A finite number by its shortest decimal digits: 0.digits × 10^point, as `String` would print it. */
interface Digits {
  readonly negative: boolean;
  readonly digits: string;
  readonly point: number;
}

function digitsOf(value: number): Digits {
  const [mantissa = "0", exponent = "0"] = Math.abs(value).toExponential().split("e");
  return { negative: value < 0, digits: mantissa.replace(".", ""), point: Number(exponent) + 1 };
}

/** Decimal exponent of the first digit: 2 for 345, −3 for 0.0012; 0 for zero. */
export function leadingExponent(value: number): number {
  return digitsOf(value).point - 1;
}

/**
 * Round to a number of decimals (negative: tens, hundreds …), halves away from zero, on the decimal digits and not on
 * the binary value behind them: 1.005 to two decimals is 1.01. Trailing zeros are written. No minus before zero.
 * With `power`, what is written is the rounded value divided by that power of ten.
 */
export function roundDecimal(value: number, decimals: number, power = 0): string {
  const { negative, digits, point } = digitsOf(value);
  const kept = point + decimals;
  const head = kept > 0 ? digits.slice(0, kept).padEnd(kept, "0") : "0";
  const up = kept >= 0 && (digits[kept] ?? "0") >= "5" ? 1n : 0n;
  const units = (BigInt(head) + up).toString();
  const places = decimals + power;
  const whole = places < 0 && units !== "0" ? units + "0".repeat(-places) : units;
  const padded = whole.padStart(Math.max(0, places) + 1, "0");
  const cut = padded.length - Math.max(0, places);
  const text = places > 0 ? `${padded.slice(0, cut)}.${padded.slice(cut)}` : padded;
  return negative && units !== "0" ? `-${text}` : text;
}
