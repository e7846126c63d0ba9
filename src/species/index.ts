export type * from "./bond.ts";
export * from "./isotopes.ts";
export * from "./read-atom.ts";
export * from "./read-bond.ts";
