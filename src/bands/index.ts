export * from "./label.ts";
export type { RawRow } from "./raw.ts";
export { rowsFromBands, rowsFromSeries } from "./read-flags.ts";
export { formatOf, type InputFormat, readInput } from "./read-input.ts";
export { rowsFromPeaks, withoutLabels } from "./read-peaks.ts";
export type * from "./series.ts";
export { mergeSettings, type Setting, type Settings } from "./settings.ts";
export { toSeries, type Understood } from "./to-series.ts";
export type { TwoLevels } from "./two-levels.ts";
