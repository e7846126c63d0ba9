export type {
  BandResult,
  Derived,
  DissociationRow,
  FitDocument,
  Prediction,
  Quality,
  SeriesResult,
  StabilityRow,
} from "./analysis/index.ts";
export { type AssignDocument, type AssignRequest, assign } from "./commands/assign.ts";
export { type CheckDocument, type CheckRequest, check, type Difference } from "./commands/check.ts";
export { type ConvertDocument, type ConvertRequest, convert } from "./commands/convert.ts";
export {
  type ConvertConstantsDocument,
  type ConvertConstantsRequest,
  convertConstants,
} from "./commands/convert-constants.ts";
export { fit } from "./commands/fit.ts";
export { fitNonlinear, type NonlinearRequest, type NonlinearResult } from "./commands/fit-nonlinear.ts";
export { type PlanDocument, type PlanRequest, plan } from "./commands/plan.ts";
export { type PredictDocument, type PredictRequest, predict } from "./commands/predict.ts";
export { type Report, type ReportFile, type ReportRequest, report } from "./commands/report.ts";
export type { FitRequest, InputText } from "./commands/request.ts";
export { type Fault, InputError, type Warning } from "./messages/index.ts";
export type { Quantity } from "./quantity/index.ts";
