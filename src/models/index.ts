export * from "./list.ts";
export type * from "./model.ts";
