import type { Band, Series } from "../../bands/index.ts";
import { InputError } from "../../messages/index.ts";
import type { Model, ModelOptions } from "../../models/index.ts";

/** The different levels above v = 0 that bands begin or end at, rising. */
export function levelsOf(bands: readonly Pick<Band, "label">[], model: Model): number[] {
  const ends = bands.flatMap(({ label }) => {
    const { upper, lower } = model.levels(label);
    return [upper, lower];
  });
  return [...new Set(ends)].filter((v) => v > 0).sort((a, b) => a - b);
}

/** The bands that touch no level from v = 1 to below `lowest`. */
export function bandsFrom(bands: readonly Band[], lowest: number, model: Model): Band[] {
  return bands.filter(({ label }) => reaches(label, lowest, model));
}

function reaches(label: string, lowest: number, model: Model): boolean {
  const { upper, lower } = model.levels(label);
  return upper >= lowest && (lower === 0 || lower >= lowest);
}

/** The labels among which a law of the limit may predict: none of a level below the lowest used one, and no energy below v = 0. */
export function labelsWithin(
  labels: readonly string[],
  used: readonly Pick<Band, "label">[],
  model: Model,
  options: ModelOptions,
  p: readonly number[],
): string[] {
  const lowest = levelsOf(used, model)[0] ?? 0;
  const inside = labels.filter((label) => reaches(label, lowest, model));
  const transitions = inside.map((label) => ({ label, isotopologue: null }));
  const { calculated } = model.prepare(transitions, options).evaluate(p);
  return inside.filter((_, i) => calculated[i]! > 0);
}

/** Refuse a series with too few levels for a law of the limit, or with none that is tied to v = 0. */
export function demandLevels(series: Series, used: readonly Band[], model: Model): void {
  const least = model.limit?.leastLevels ?? 0;
  const levels = levelsOf(used, model);
  const place = { source: series.bands[0]?.place.source ?? series.name };
  const refuse = (what: string, mend: string) =>
    new InputError([{ code: "not-determined", place, what: `series "${series.name}": ${what}`, mend }], 3);
  if (levels.length < least)
    throw refuse(
      `${levels.length} used level${levels.length === 1 ? "" : "s"} cannot show where they converge: ${model.title} needs at least ${least}`,
      `give at least ${least} levels close under the limit`,
    );
  if (!used.some(({ label }) => model.levels(label).lower === 0))
    throw refuse(
      "no used band begins at v = 0, so the energy of the limit above it is left open",
      "add the position of one v-0 band, or count the levels from v = 0 and label them v-0",
    );
}
