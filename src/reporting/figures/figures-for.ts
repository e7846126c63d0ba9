import type { SeriesResult } from "../../analysis/index.ts";
import { birgeSponerFigure } from "./birge-sponer.ts";
import { d0IntervalFigure } from "./d0-interval.ts";
import type { FigureSpec } from "./figure-spec.ts";
import { limitsFigure } from "./limits.ts";
import type { FigureOptions } from "./options.ts";
import { positionsFigure } from "./positions.ts";
import { potentialFigure } from "./potential.ts";
import { residualsFigure } from "./residuals.ts";

/** The figures of a report, in order; those that cannot be drawn are left out. */
export function figuresFor(series: readonly SeriesResult[], options: FigureOptions): FigureSpec[] {
  return [birgeSponerFigure, residualsFigure, potentialFigure, positionsFigure, limitsFigure, d0IntervalFigure].flatMap(
    (build) => build(series, options) ?? [],
  );
}
