export * from "./criteria.ts";
export * from "./diagnostics.ts";
export * from "./excess.ts";
export { dot, estimator, fitLinear, type LinearFit, UndeterminedError } from "./linear.ts";
export * from "./nonlinear/fit-nonlinear.ts";
export * from "./problem.ts";
export { inverseGram, triangularise } from "./qr.ts";
export { covarianceOf } from "./whitening.ts";
