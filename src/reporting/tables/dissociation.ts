import type { DissociationMethod, SeriesResult } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { measured, quantity } from "../text/cells.ts";

/** What text calls each way to the limit. */
export const methodNames: Readonly<Record<DissociationMethod, string>> = {
  morse: "Morse",
  "morse-refit": "two-term Morse",
  "turning-point": "turning point",
  "spacing-sum": "spacing sum",
  "near-limit": "near limit",
};

/** Near dissociation energies, once a section. */
export const SAFETY_LINE = "Dissociation energies: not for safety-critical use without an independent value.";

const UNITS = ["kJ/mol", "kcal/mol", "eV"] as const;

/** De and D0 by method, D0 also in the units energies are quoted in; the caution of each row stands below. */
export function dissociationTable({ dissociation }: SeriesResult): TableData {
  return {
    columns: [
      { quantity: "method", align: "left" },
      { quantity: "De", unit: "cm-1", align: "point" },
      { quantity: "D0", unit: "cm-1", align: "point" },
      ...UNITS.map((unit) => ({ quantity: "D0", unit, align: "point" }) as const),
    ],
    rows: dissociation.map(({ method, de, d0, converted }) => ({
      cells: [
        methodNames[method],
        quantity(de),
        quantity(d0),
        ...UNITS.map((unit) => measured(converted?.[unit][0] ?? null, converted?.[unit][1] ?? null)),
      ],
    })),
    notes: dissociation.flatMap(({ method, d0, note }) =>
      note === null ? [] : [`${methodNames[method]}${d0 === null ? " —" : ""}: ${note}`],
    ),
  };
}
