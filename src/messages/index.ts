export * from "./exit-codes.ts";
export * from "./fault.ts";
export * from "./nearest.ts";
export * from "./place.ts";
export type * from "./warning.ts";
