import { sentence } from "./table.ts";
import { escape } from "./typeset.ts";

/** A drawn figure as the report shows it. */
export interface ReportFigure {
  readonly name: string;
  /** path relative to report.md */
  readonly file: string;
  readonly caption: string;
  readonly alt: string;
}

/** Pictures with alternative text, each with its numbered caption below. */
export function figuresSection(figures: readonly ReportFigure[]): string {
  return figures
    .map(({ file, caption, alt }, i) => {
      const path = encodeURI(file).replace(/[()]/gu, (bracket) => (bracket === "(" ? "%28" : "%29"));
      return `![${escape(alt)}](${path})\n\nFigure ${i + 1}. ${sentence(caption)}`;
    })
    .join("\n\n");
}
