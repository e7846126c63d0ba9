export { symmetricEigen } from "./eigen.ts";
export * from "./list.ts";
export type { Manifold } from "./manifold.ts";
export type * from "./model.ts";
