import type { LevelResult, Prediction } from "../../analysis/index.ts";
import { LASER_LINE, levelsTable, predictionsTable } from "../tables/index.ts";
import { paintWith } from "./paint.ts";
import { section } from "./section.ts";

/** What `predict` found: every band, those observed too. */
export interface PredictedSeries {
  readonly series: readonly {
    readonly name: string;
    readonly predictions: readonly Prediction[];
    readonly levels: readonly LevelResult[] | null;
  }[];
}

/** Predicted positions for a terminal, one table a series; ends with a newline. */
export function renderPredictions({ series }: PredictedSeries, { colour }: { readonly colour: boolean }): string {
  const paint = paintWith(colour);
  const blocks = series.map(({ name, predictions, levels }) =>
    section(
      name,
      levels !== null
        ? [levelsTable(levels), LASER_LINE]
        : predictions.length === 0
          ? ["No bands to predict."]
          : [predictionsTable(predictions, true), LASER_LINE],
      paint,
    ),
  );
  return `${blocks.join("\n\n")}\n`;
}
