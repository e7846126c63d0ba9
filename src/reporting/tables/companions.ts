import type { SeriesResult } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { measured } from "../text/cells.ts";

/** Bands corrected for the repulsion of a companion, before and after; null without any. */
export function companionsTable({ bands }: Pick<SeriesResult, "bands">): TableData | null {
  const rows = bands.flatMap(({ label, twoLevels: pair }) =>
    pair === null
      ? []
      : [
          {
            cells: [
              label,
              measured(pair.measured, pair.measuredSigma),
              measured(pair.companion, null),
              measured(pair.ratio, pair.ratioSigma),
              measured(pair.coupling, pair.couplingSigma),
              measured(pair.corrected, pair.sigma),
            ],
          },
        ],
  );
  if (rows.length === 0) return null;
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "measured", unit: "cm-1", align: "point" },
      { quantity: "companion", unit: "cm-1", align: "point" },
      { quantity: "ratio", align: "point" },
      { quantity: "coupling", unit: "cm-1", align: "point" },
      { quantity: "corrected", unit: "cm-1", align: "point" },
    ],
    rows,
    notes: [
      "Two levels, the companion dark by itself: with R the ratio of intensities the band stood at (R·ν̃ + ν̃ companion)/(R + 1); the corrected position is fitted.",
    ],
  };
}
