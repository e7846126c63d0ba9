import type { Band } from "../bands/index.ts";
import { type ErrorModel, fitValues, type Treatment, UndeterminedError } from "../fitting/index.ts";
import { morseDe } from "./dissociation/morse.ts";
import { errorModel } from "./error-model.ts";
import type { StabilityRow } from "./result.ts";
import { outsideWith, type Solution } from "./solution.ts";

/** The same model fitted to the lowest bands alone, one row for each number of bands that determines it, up to all of them. */
export function stabilityRows(solution: Solution): StabilityRow[] {
  const { model, used } = solution;
  if (model.well === undefined) return [];
  const ends = used.map((band) => model.levels(band.label));
  const rising = used
    .map((_, i) => i)
    .sort((a, b) => ends[a]!.upper - ends[b]!.upper || ends[a]!.lower - ends[b]!.lower);
  const valuesOf = lowestBands(solution, rising);
  const rows: StabilityRow[] = [];
  for (let count = 1; count <= rising.length; count++) {
    const last = rising[count - 1]!;
    // Repeats of one band come and go together.
    if (count < rising.length && used[rising[count]!]!.label === used[last]!.label) continue;
    const values = count === rising.length ? solution.fit.values : valuesOf(count);
    if (values === null) continue;
    const well = model.well(values);
    const de = morseDe(well, values);
    const next = ends[last]!.upper + 1;
    const [a, b] = well.leading;
    rows.push({
      bands: count,
      we: values[a]!,
      wexe: values[b]!,
      d0: de === null ? null : de.value - well.term(0),
      next: well.term(next) - well.term(0),
    });
  }
  return rows;
}

/** The constants from the first so many bands in an order, with the errors and the treatment of the whole fit; null when undetermined. */
function lowestBands(solution: Solution, order: readonly number[]): (count: number) => readonly number[] | null {
  const { model, options, used } = solution;
  const bands = order.map((i) => used[i]!);
  const { parameters, linear, evaluate } = model.prepare(bands, options);
  const { jacobian } = evaluate(parameters.map((p) => p.held ?? 0));
  const observed = bands.map((band) => band.position);
  const needed = parameters.filter((p) => p.held === undefined && p.prior === undefined).length;
  return (count) => {
    // Too few bands are seen beforehand: an exception costs more than a fit.
    if (options.sharing === null && new Set(bands.slice(0, count).map((band) => band.label)).size < needed) return null;
    const rows = { calculated: [], jacobian: jacobian.slice(0, count) };
    const errors = errorsOf(solution, bands.slice(0, count), order);
    try {
      const treatment = treatmentOf(solution, order);
      const lowest = { parameters, linear, evaluate: () => rows, observed: observed.slice(0, count), errors };
      return fitValues({ ...lowest, ...outsideWith(lowest, lowest.observed, errors, options, treatment) }, treatment);
    } catch (error) {
      if (error instanceof UndeterminedError) return null;
      throw error;
    }
  };
}

function errorsOf(
  { series, model, errors, sigmaKnown }: Solution,
  bands: readonly Band[],
  order: readonly number[],
): ErrorModel {
  if (errors.mixing !== null || errors.shared.length > 0) {
    const own = errorModel(series, bands, model);
    return sigmaKnown ? own : { ...own, sigmas: null };
  }
  return { ...errors, sigmas: errors.sigmas === null ? null : bands.map((_, at) => errors.sigmas![order[at]!]!) };
}

/** Robust weights follow their bands. */
function treatmentOf({ treatment }: Solution, order: readonly number[]): Treatment {
  const { weights } = treatment;
  return weights === undefined ? treatment : { ...treatment, weights: order.map((i) => weights[i]!) };
}
