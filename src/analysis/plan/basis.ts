import type { Light } from "../../bands/index.ts";
import { InputError, type Warning } from "../../messages/index.ts";
import type { Model, ModelOptions } from "../../models/index.ts";
import type { Propagation } from "../propagation.ts";
import type { Solution } from "../solution.ts";
import { type Datum, type NewBand, newDatum } from "./new-datum.ts";

/** What is known before a band is added. */
export interface Basis {
  readonly name: string;
  /** for messages */
  readonly place: string;
  readonly model: Model;
  readonly options: ModelOptions;
  readonly light: Light;
  readonly keys: readonly string[];
  readonly values: readonly number[];
  readonly by: Propagation;
  /** the bands there are */
  readonly used: readonly { readonly label: string }[];
  readonly lastBandOut: number | null;
  /** σ of a new band where none is given, cm-1; null: nothing says */
  readonly usualSigma: number | null;
  /** no new band counts for better than this, cm-1 */
  readonly leastSigma: number;
  readonly datum: (band: NewBand) => Datum;
  readonly warnings: readonly Warning[];
}

/** A fit as the basis of a plan. */
export function basisOf(solution: Solution, warnings: readonly Warning[]): Basis {
  const { series, model, options, fit, by, used, treated, sigmaKnown } = solution;
  const top = Math.max(...used.map(({ label }) => model.levels(label).upper));
  const miss = treated().leftOut[used.findIndex(({ label }) => model.levels(label).upper === top)] ?? null;
  // Without stated σ the residuals say what a band is worth, and a new one will be no better than that.
  const estimated = sigmaKnown || fit.degreesOfFreedom === 0 ? null : Math.sqrt(fit.chiSquare / fit.degreesOfFreedom);
  return {
    name: series.name,
    place: series.bands[0]?.place.source ?? series.name,
    model,
    options,
    light: series.light,
    keys: fit.keys,
    values: fit.values,
    by,
    used,
    lastBandOut: miss === null ? null : Math.abs(miss),
    usualSigma: sigmaKnown ? median(used.flatMap(({ sigma }) => sigma ?? [])) : estimated,
    leastSigma: estimated ?? 0,
    datum: newDatum(solution),
    warnings,
  };
}

function median(values: readonly number[]): number {
  const rising = [...values].sort((a, b) => a - b);
  const middle = rising.length / 2;
  return (rising[Math.ceil(middle) - 1]! + rising[Math.floor(middle)]!) / 2;
}

/** A fault that names the series. */
export function planFault(
  { place, name }: Pick<Basis, "place" | "name">,
  code: string,
  what: string,
  mend: string,
  exit: 2 | 3,
): InputError {
  return new InputError([{ code, place: { source: place }, what: `series "${name}": ${what}`, mend }], exit);
}
