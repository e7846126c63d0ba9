export * from "./air.ts";
export * from "./constants.ts";
export * from "./coverage.ts";
export * from "./distributions.ts";
export * from "./format.ts";
export * from "./measurement.ts";
export type * from "./quantity.ts";
export * from "./unit-text.ts";
export * from "./units.ts";
