import { words } from "./table.ts";
import { verbatim } from "./typeset.ts";

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
      return `![${verbatim(alt)}](${path})\n\nFigure ${i + 1}. ${words(caption)}`;
    })
    .join("\n\n");
}
