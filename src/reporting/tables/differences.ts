import type { Comparison } from "../../analysis/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import type { TableData } from "../table-data.ts";
import { probability, quantity } from "../text/cells.ts";

/** Differences between series, one constant a row; null where nothing was compared. */
export function differencesTable(comparisons: readonly Comparison[], symbols: Symbols): TableData | null {
  if (comparisons.length === 0) return null;
  const common = [...new Set(comparisons.flatMap(({ commonErrors }) => commonErrors))];
  return {
    columns: [
      { quantity: "second less first", align: "left" },
      { quantity: "of", align: "left" },
      { quantity: "difference", unit: "cm-1", align: "point" },
      { quantity: "P by chance", align: "point" },
    ],
    rows: comparisons.flatMap(({ first, second, differences }) =>
      differences.map(({ key, difference, probability: p }, i) => ({
        cells: [
          i === 0 ? `${second} − ${first}` : "",
          key === "d0" ? "D0, Morse" : symbolOf(symbols, key),
          quantity(difference),
          probability(p),
        ],
      })),
    ),
    notes: [
      "P by chance: two-sided probability of so large a difference between equal constants.",
      common.length === 0
        ? "The series are taken as independent."
        : `Taken as the same error in both: ${common.join(", ")}; otherwise the series are independent.`,
    ],
  };
}
