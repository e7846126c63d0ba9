export type * from "./bond.ts";
