import type { SeriesResult } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { bandDecimals } from "../text/band-decimals.ts";
import { fixed, measured } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";

/** Bands corrected for the repulsion of a companion, before and after; null without any. */
export function companionsTable({ bands }: Pick<SeriesResult, "bands">): TableData | null {
  const pairs = bands.flatMap((band) => (band.twoLevels === null ? [] : [{ band, pair: band.twoLevels }]));
  if (pairs.length === 0) return null;
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "companion as read", align: "right", reportOnly: true },
      { quantity: "measured", unit: "cm-1", align: "point" },
      { quantity: "companion", unit: "cm-1", align: "point" },
      { quantity: "ratio", align: "point" },
      { quantity: "coupling", unit: "cm-1", align: "point" },
      { quantity: "shift", unit: "cm-1", align: "point" },
      { quantity: "corrected", unit: "cm-1", align: "point" },
    ],
    rows: pairs.map(({ band, pair }) => {
      // Without σ to the digits that were typed.
      const cell = (value: number, u: number | null) =>
        u === null ? fixed(value, bandDecimals(band)) : measured(value, u);
      return {
        cells: [
          band.label,
          `${pair.asRead.companion} ${unitSymbol(band.asRead.unit)}`,
          cell(pair.measured, pair.measuredSigma),
          cell(pair.companion, pair.companionSigma),
          pair.ratioSigma === null ? pair.asRead.ratio : measured(pair.ratio, pair.ratioSigma),
          cell(pair.coupling, pair.couplingSigma),
          cell(pair.shift, pair.shiftSigma),
          cell(pair.corrected, pair.sigma),
        ],
      };
    }),
    notes: [
      "Two levels, the companion dark by itself: with R the ratio of intensities the band stood at (R·ν̃ + ν̃ companion)/(R + 1); the corrected position is fitted.",
      ...(pairs.some(({ pair }) => pair.ratioSigma === null)
        ? ["A ratio without digits in parentheses counts as exact."]
        : []),
    ],
  };
}
