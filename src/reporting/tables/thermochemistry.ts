import type { SeriesResult } from "../../analysis/index.ts";
import { notDetermined } from "../../quantity/index.ts";
import type { TableData } from "../table-data.ts";
import { fixed, quantity } from "../text/cells.ts";
import { methodNames } from "../text/method-names.ts";

/** Enthalpies of dissociation at 298.15 K by method; null where they were not asked for. */
export function thermochemistryTable({ thermochemistry }: SeriesResult): TableData | null {
  if (thermochemistry === null) return null;
  const { rows, accepted, atoms, molecule } = thermochemistry;
  const empirical = rows.some(({ empiricalRange }) => empiricalRange !== null);
  const parts = atoms.map(({ element, enthalpy }) => `${element} ${fixed(enthalpy, 3)}`).join(", ");
  return {
    columns: [
      { quantity: "method", align: "left" },
      { quantity: "ΔH°(298.15 K)", unit: "kJ/mol", align: "point" },
      ...(empirical ? [{ quantity: "empirical 80 %", unit: "kJ/mol", align: "interval" } as const] : []),
      ...(accepted === null ? [] : [{ quantity: "less accepted", unit: "kJ/mol", align: "point" } as const]),
    ],
    rows: [
      ...rows.map(({ method, enthalpy, empiricalRange: range, lessAccepted }) => ({
        cells: [
          methodNames[method],
          quantity(enthalpy),
          ...(empirical ? [range === null ? notDetermined : `${fixed(range[0], 0)} to ${fixed(range[1], 0)}`] : []),
          ...(accepted === null ? [] : [quantity(lessAccepted)]),
        ],
      })),
      ...(accepted === null
        ? []
        : [{ cells: ["accepted", quantity(accepted), ...(empirical ? [""] : []), ""], muted: true }]),
    ],
    notes: [
      `Of A–B → A + B, ideal gases: D0 plus H°(298.15 K) − H°(0) of the atoms (${parts} kJ mol⁻¹) less that of the molecule (${fixed(molecule, 3)} kJ mol⁻¹).`,
      "The molecule counts with one electronic state without structure; its uncertainty is that of D0.",
    ],
  };
}
