import { fromWavenumber, type Quantity } from "../../quantity/index.ts";
import type { DissociationMethod, DissociationRow } from "../result.ts";

const UNITS = ["kJ/mol", "kcal/mol", "eV"] as const;

/** A row with D0 also in the units energies are quoted in. */
export function row(
  method: DissociationMethod,
  de: Quantity | null,
  d0: Quantity | null,
  note: string | null,
): DissociationRow {
  if (d0 === null) return { method, de, d0, converted: null, note };
  const convert = (unit: (typeof UNITS)[number]): readonly [number, number | null] => [
    fromWavenumber(d0.value, unit),
    d0.standardUncertainty === null ? null : fromWavenumber(d0.standardUncertainty, unit),
  ];
  return {
    method,
    de,
    d0,
    converted: { "kJ/mol": convert("kJ/mol"), "kcal/mol": convert("kcal/mol"), eV: convert("eV") },
    note,
  };
}
