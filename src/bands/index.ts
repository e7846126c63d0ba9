export type * from "./series.ts";
