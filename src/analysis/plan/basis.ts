import { InputError } from "../../messages/index.ts";
import type { Model, ModelOptions } from "../../models/index.ts";
import type { AirConditions } from "../../quantity/index.ts";
import type { Propagation } from "../propagation.ts";
import type { Solution } from "../solution.ts";
import { type Datum, type NewBand, newDatum } from "./new-datum.ts";

/** What is known before a band is added. */
export interface Basis {
  readonly name: string;
  /** for messages */
  readonly place: string;
  readonly model: Model;
  readonly options: ModelOptions & { readonly air: AirConditions };
  readonly keys: readonly string[];
  readonly values: readonly number[];
  readonly by: Propagation;
  /** labels of the bands there are */
  readonly used: readonly string[];
  readonly lastBandOut: number | null;
  /** σ of a new band where none is given, cm-1; null: nothing says */
  readonly usualSigma: number | null;
  readonly datum: (band: NewBand) => Datum;
}

/** A fit as the basis of a plan. */
export function basisOf(solution: Solution): Basis {
  const { series, model, options, fit, by, used, treated, sigmaKnown } = solution;
  const top = Math.max(...used.map(({ label }) => model.levels(label).upper));
  const miss = treated.leftOut[used.findIndex(({ label }) => model.levels(label).upper === top)] ?? null;
  const stated = used.flatMap(({ sigma }) => sigma ?? []).sort((a, b) => a - b);
  return {
    name: series.name,
    place: series.bands[0]?.place.source ?? series.name,
    model,
    options,
    keys: fit.keys,
    values: fit.values,
    by,
    used: used.map(({ label }) => label),
    lastBandOut: miss === null ? null : Math.abs(miss),
    usualSigma: sigmaKnown
      ? stated[Math.floor(stated.length / 2)]!
      : fit.degreesOfFreedom > 0
        ? Math.sqrt(fit.chiSquare / fit.degreesOfFreedom)
        : null,
    datum: (band) => newDatum(solution, band),
  };
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
