export { type ReportOptions, renderReport } from "./render-report.ts";
