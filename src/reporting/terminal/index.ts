export { type Conversions, renderConversion } from "./render-conversion.ts";
export { type DatasetEntry, renderDatasets } from "./render-datasets.ts";
export { type FitTextOptions, renderFit } from "./render-fit.ts";
export { type PredictedSeries, renderPredictions } from "./render-predictions.ts";
export { renderWarnings } from "./render-warnings.ts";
