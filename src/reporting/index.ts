export { bandsCsv, constantsCsv, predictionsCsv } from "./csv.ts";
export { renderJson } from "./json.ts";
export { type ReportFigure, type ReportOptions, renderReport } from "./markdown/index.ts";
export { formatReference, isReference, type Reference, type ReferenceKey, references } from "./references.ts";
export { constantSymbols, type Symbols } from "./symbols.ts";
export { renderTable, type TableOptions } from "./table.ts";
export type { Column, Row, TableData } from "./table-data.ts";
export {
  type Conversions,
  type DatasetEntry,
  type FitTextOptions,
  type PredictedSeries,
  renderConversion,
  renderDatasets,
  renderFit,
  renderPredictions,
  renderWarnings,
} from "./terminal/index.ts";
