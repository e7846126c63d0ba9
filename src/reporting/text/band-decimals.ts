import type { BandResult } from "../../analysis/index.ts";
import { decimalsFor, readMeasurement, readUnit, wavenumberPerUnit } from "../../quantity/index.ts";

/**
 * Decimals (cm-1) at which a band is shown: those of its uncertainty, else those it was typed with, carried over into cm-1
 * where it was typed in another unit.
 */
export function bandDecimals({ observed, standardUncertainty, asRead }: BandResult): number {
  if (standardUncertainty !== null && standardUncertainty > 0) return Math.max(0, decimalsFor(standardUncertainty));
  const read = readMeasurement(asRead.text);
  const typed = read.ok ? read.decimals : 2;
  const unit = readUnit(asRead.unit);
  if (unit === null || unit === "cm-1") return typed;
  const lastDigit = Math.abs(wavenumberPerUnit(observed, unit)) * 10 ** -typed;
  return Math.min(6, Math.max(0, Math.ceil(-Math.log10(lastDigit))));
}
