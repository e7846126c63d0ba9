export { renderAssignment } from "./render-assignment.ts";
export { renderCheck } from "./render-check.ts";
export { renderConstants } from "./render-constants.ts";
export { renderConversion } from "./render-conversion.ts";
export { renderDatasets } from "./render-datasets.ts";
export { type FitTextOptions, renderFit } from "./render-fit.ts";
export { renderPlan } from "./render-plan.ts";
export { renderPredictions } from "./render-predictions.ts";
export { renderWarnings } from "./render-warnings.ts";
