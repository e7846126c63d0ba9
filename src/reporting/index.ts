export { bandsCsv, constantsCsv, predictionsCsv } from "./csv.ts";
export { renderJson } from "./json.ts";
export { type ReportOptions, renderReport } from "./markdown/index.ts";
export { formatReference, isReference, type ReferenceKey, references } from "./references.ts";
export { constantSymbols } from "./symbols.ts";
export { renderTable } from "./table.ts";
export type { TableData } from "./table-data.ts";
export { type FitTextOptions, renderFit, renderPredictions, renderWarnings } from "./terminal/index.ts";
