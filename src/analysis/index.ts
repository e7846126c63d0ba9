export { analyse } from "./analyse.ts";
export { type Assignment, assignPeaks } from "./assign/assign.ts";
export { labelsWithin } from "./near-limit/levels.ts";
export type { AnalysisOptions, ExcessKind, IntervalKind } from "./options.ts";
export { type Aim, type Plan, type PlanOptions, planNext } from "./plan/plan.ts";
export { predict } from "./predictions.ts";
export type { Propagation } from "./propagation.ts";
export type * from "./result.ts";
export { turningPoint } from "./turning-point.ts";
