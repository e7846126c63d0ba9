export type { ReportFigure } from "./figures-section.ts";
export { type ReportOptions, renderReport } from "./render-report.ts";
