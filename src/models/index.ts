export { symmetricEigen } from "./eigen.ts";
export * from "./list.ts";
export { fitLocalMode } from "./local-mode-fit.ts";
export type { Manifold } from "./manifold.ts";
export type * from "./model.ts";
