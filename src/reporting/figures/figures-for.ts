import type { Comparison, SeriesResult } from "../../analysis/index.ts";
import { birgeSponerFigure } from "./birge-sponer.ts";
import { compositionFigure } from "./composition.ts";
import { d0IntervalFigure } from "./d0-interval.ts";
import { differencesFigure } from "./differences.ts";
import type { FigureSpec } from "./figure-spec.ts";
import { levelResidualsFigure } from "./level-residuals.ts";
import { limitsFigure } from "./limits.ts";
import { mixedLevelsFigure } from "./mixed-levels.ts";
import type { FigureOptions } from "./options.ts";
import { positionsFigure } from "./positions.ts";
import { potentialFigure } from "./potential.ts";
import { residualsFigure } from "./residuals.ts";
import { splittingsFigure } from "./splittings.ts";

/** The figures of a report, in order; those that cannot be drawn are left out. */
export function figuresFor(
  series: readonly SeriesResult[],
  options: FigureOptions,
  comparisons: readonly Comparison[] = [],
): FigureSpec[] {
  const together = [
    birgeSponerFigure,
    residualsFigure,
    potentialFigure,
    positionsFigure,
    limitsFigure,
    d0IntervalFigure,
  ].flatMap((build) => build(series, options) ?? []);
  // Levels that mix fill a figure by themselves: one a series.
  const each = series.flatMap((one, i) => {
    const name = (base: string) => (series.length > 1 ? `${base}-${i + 1}` : base);
    return [
      mixedLevelsFigure(one, options, name("levels")),
      levelResidualsFigure(one, options, name("level-residuals")),
      splittingsFigure(one, options, name("splittings")),
      compositionFigure(one, options, name("composition")),
    ].flatMap((figure) => figure ?? []);
  });
  return [...together, ...[differencesFigure(comparisons, options)].flatMap((figure) => figure ?? []), ...each];
}
