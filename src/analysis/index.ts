export { analyse } from "./analyse.ts";
export { type Assignment, assignPeaks, type Decider, type Hypothesis } from "./assign/assign.ts";
export { labelsWithin } from "./near-limit/levels.ts";
export type { AnalysisOptions, ExcessKind, IntervalKind } from "./options.ts";
export { predict } from "./predictions.ts";
export type { Propagation } from "./propagation.ts";
export type * from "./result.ts";
export { turningPoint } from "./turning-point.ts";
