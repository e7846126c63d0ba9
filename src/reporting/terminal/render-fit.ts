import type { FitDocument } from "../../analysis/index.ts";
import type { Notation } from "../../models/index.ts";
import type { Symbols } from "../symbols.ts";
import { constantsComparison, differencesTable } from "../tables/index.ts";
import { paintWith } from "./paint.ts";
import { renderSeries, renderSeriesBriefly } from "./render-series.ts";
import { section } from "./section.ts";

export interface FitTextOptions {
  readonly colour: boolean;
  readonly notation: Notation;
  /** only constants and the headline D0 */
  readonly quiet: boolean;
  /** what the constants are called, by key; see `constantSymbols` */
  readonly symbols: Symbols;
}

/**
 * The document of `fit` for a terminal: several series side by side first, then each in full. At most 80 columns with
 * ordinary numbers; ends with a newline. Warnings are not in it, see `renderWarnings`.
 */
export function renderFit(
  { series, comparisons }: Pick<FitDocument, "series" | "comparisons">,
  options: FitTextOptions,
): string {
  const paint = paintWith(options.colour);
  const write = options.quiet ? renderSeriesBriefly : renderSeries;
  const side =
    series.length > 1 && !options.quiet
      ? [section("Side by side", [constantsComparison(series, options.symbols)], paint)]
      : [];
  const differences = options.quiet ? null : differencesTable(comparisons, options.symbols);
  if (differences !== null) side.push(section("Differences", [differences], paint));
  return `${[...side, ...series.map((one) => write(one, options.symbols, paint))].join(options.quiet ? "\n" : "\n\n")}\n`;
}
