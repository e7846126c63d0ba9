import type { SeriesResult } from "../../analysis/index.ts";
import { formatPlace } from "../../messages/index.ts";
import { notDetermined, readUnit } from "../../quantity/index.ts";
import { exclusions } from "../tables/index.ts";
import { bandDecimals } from "../text/band-decimals.ts";
import { fixed, measured } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";
import { table, words } from "./table.ts";

const isLength = (unit: string) => ["nm", "um"].includes(readUnit(unit) ?? "");

/** Bands as they were read beside the positions really used. */
export function bandsAsRead({ bands }: SeriesResult): string {
  const phases = bands.some(({ phase }) => phase !== null);
  const corrected = bands.some(({ twoLevels }) => twoLevels !== null);
  return table({
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "as read", align: "right" },
      { quantity: "σ as read", align: "right" },
      { quantity: "unit, medium", align: "left" },
      { quantity: "ν̃ vacuum", unit: "cm-1", align: "point" },
      ...(corrected ? [{ quantity: "ν̃ corrected", unit: "cm-1", align: "point" } as const] : []),
      ...(phases ? [{ quantity: "phase", align: "left" } as const] : []),
      { quantity: "used", align: "left" },
      { quantity: "place", align: "left" },
    ],
    rows: bands.map((band) => {
      const { asRead, observed, standardUncertainty: u, twoLevels: pair } = band;
      const cell = (value: number, sigma: number | null) =>
        sigma === null ? fixed(value, bandDecimals(band)) : measured(value, sigma);
      return {
        cells: [
          band.label,
          asRead.text,
          asRead.sigmaText ?? notDetermined,
          isLength(asRead.unit) ? `${unitSymbol(asRead.unit)}, ${asRead.medium}` : unitSymbol(asRead.unit),
          pair === null ? cell(observed, u) : cell(pair.measured, pair.measuredSigma),
          ...(corrected ? [pair === null ? "" : cell(observed, u)] : []),
          ...(phases ? [band.phase ?? notDetermined] : []),
          band.used ? "yes" : "no",
          formatPlace(band.place),
        ],
      };
    }),
    notes: bands.some(({ asRead }) => asRead.sigmaText === null)
      ? [
          "σ —: none beside the position; where ν̃ carries digits in parentheses they come from the position or from a setting.",
        ]
      : [],
  });
}

/** Which bands were left out, and why. */
export function excludedBands(series: SeriesResult): string {
  const out = exclusions(series);
  return out.length === 0 ? "Every band was used." : out.map((line) => `- ${words(line)}`).join("\n");
}
