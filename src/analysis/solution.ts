import type { Band, Series } from "../bands/index.ts";
import {
  birgeFactor,
  type Diagnostics,
  diagnose,
  type ErrorModel,
  fitLinear,
  fitRobust,
  fitWithScatter,
  type LinearFit,
  type Prepared,
  type Problem,
  type Treatment,
  UNTREATED,
  UndeterminedError,
} from "../fitting/index.ts";
import { InputError } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { chiSquareUpperTail } from "../quantity/index.ts";
import { type CurvedFit, fitCurved, settle } from "./curved-fit.ts";
import { errorModel as errorModelOf } from "./error-model.ts";
import { demandLevels } from "./near-limit/levels.ts";
import type { AnalysisOptions } from "./options.ts";
import type { Propagation } from "./propagation.ts";
import { determined } from "./undetermined.ts";

/** A fitted series before anything is derived from it. */
export interface Solution {
  readonly series: Series;
  readonly model: Model;
  readonly options: AnalysisOptions;
  readonly used: readonly Band[];
  readonly errors: ErrorModel;
  readonly sigmaKnown: boolean;
  /** the fit with the uncertainties as stated: χ² and residual tests */
  readonly stated: LinearFit;
  /** residual tests of `stated`, made when first asked for */
  readonly tests: () => Diagnostics;
  /** the fit after the excess treatment: constants and everything after */
  readonly fit: LinearFit;
  readonly treatment: Treatment;
  readonly excess: {
    readonly kind: "scatter" | "birge" | "none";
    readonly value: number | null;
    readonly applied: boolean;
  };
  /** probability of a larger χ² by chance; null without σ or degrees of freedom */
  readonly probability: number | null;
  /** residual tests of `fit`, made when first asked for */
  readonly treated: () => Diagnostics;
  readonly by: Propagation;
  /** weights of a robust fit, one a used band; null otherwise */
  readonly weights: readonly number[] | null;
  /** whether the model is linear in its constants */
  readonly linear: boolean;
}

/** χ² less probable than this is treated as excess (and more probable than 1 minus this is mentioned). */
export const IMPROBABLE = 0.05;

/** Fit the used bands of a series. Throws InputError with exit 3 when they do not determine the constants. */
export function solve(series: Series, model: Model, options: AnalysisOptions): Solution {
  const used = series.bands.filter((band) => band.use);
  const errors = errorModelOf(series, used, model);
  const prepared = model.prepare(used, options);
  const observed = used.map((band) => band.position);
  const problem: Problem = { ...prepared, observed, errors, ...outsideWith(prepared, observed, errors, options) };
  const curved = problem.linear ? null : curvedStart(series, model, used, problem, options);
  const stated = curved?.fit ?? determined(series, model, used, problem, options, () => fitLinear(problem));
  const sigmaKnown = errors.sigmas !== null;
  const dof = stated.degreesOfFreedom;
  const probability = sigmaKnown && dof > 0 ? chiSquareUpperTail(stated.chiSquare, dof) : null;
  const excess =
    curved === null
      ? treat(problem, stated, probability, options)
      : settle(problem, curved, (tangent, untreated) => treat(tangent, untreated, probability, options));
  const groups = repeats(used);
  // Residual tests cost as much as the fit, and many solutions are made only for their χ².
  const tests = once(() => diagnose(stated, groups));
  const treated = once(() => (excess.fit === stated ? tests() : diagnose(excess.fit, groups)));
  const estimated = !sigmaKnown || (excess.applied && options.scatter === null);
  return {
    series,
    model,
    options,
    used,
    errors,
    sigmaKnown,
    stated,
    tests,
    treated,
    fit: excess.fit,
    treatment: excess.treatment,
    excess: { kind: excess.kind, value: excess.value, applied: excess.applied },
    weights: excess.weights,
    linear: problem.linear,
    probability,
    by: {
      covariance: excess.fit.covariance,
      degreesOfFreedom: options.sharing !== null ? options.sharing.degreesOfFreedom : estimated ? dof : null,
      coverage: options.coverage,
    },
  };
}

/** A value made when it is first asked for. */
function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

/** As `solve`, but null when the bands do not determine the constants. */
export function trySolve(series: Series, model: Model, options: AnalysisOptions): Solution | null {
  try {
    return solve(series, model, options);
  } catch (error) {
    if (error instanceof InputError) return null;
    throw error;
  }
}

/** The untreated fit of a model that is not linear in its constants, from starts of the model's own. */
function curvedStart(
  series: Series,
  model: Model,
  used: readonly Band[],
  problem: Problem,
  options: AnalysisOptions,
): CurvedFit {
  demandLevels(series, used, model);
  return determined(series, model, used, problem, options, () => {
    const start = model.starts?.(used, problem.observed, options) ?? null;
    if (start === null) throw new UndeterminedError(0, "no first values follow from the bands");
    return fitCurved(problem, UNTREATED, start);
  });
}

export interface Treated {
  readonly fit: LinearFit;
  readonly treatment: Treatment;
  readonly kind: "scatter" | "birge" | "none";
  readonly value: number | null;
  readonly applied: boolean;
  readonly weights: readonly number[] | null;
}

/** The treatment of residuals larger than σ that the options ask for, and the fit with it. */
export function treat(
  problem: Problem,
  stated: LinearFit,
  probability: number | null,
  options: AnalysisOptions,
): Treated {
  const none = { kind: "none", value: null, applied: false, weights: null } as const;
  if (options.sharing !== null) {
    const { treatment, excess } = options.sharing;
    if (!excess.applied) return { ...excess, weights: null, treatment, fit: stated };
    const outside = outsideWith(problem, problem.observed, problem.errors, options, treatment);
    return { ...excess, weights: null, treatment, fit: fitLinear({ ...problem, ...outside }, treatment) };
  }
  if (options.robust !== null) return { ...none, ...fitRobust(problem, options.robust) };
  const treated = (treatment: Treatment, kind: "scatter" | "birge", value: number): Treated => ({
    fit: fitLinear(problem, treatment),
    treatment,
    kind,
    value,
    applied: true,
    weights: null,
  });
  if (options.scatter !== null && problem.errors.sigmas !== null)
    return treated({ scatter: options.scatter, factor: 1 }, "scatter", options.scatter);
  const idle = { ...none, fit: stated, treatment: UNTREATED, kind: options.excess };
  if (options.excess === "none" || probability === null || probability >= IMPROBABLE) return idle;
  const value = options.excess === "birge" ? birgeFactor(stated) : fitWithScatter(problem, stated).tau;
  return options.excess === "birge"
    ? treated({ scatter: 0, factor: value }, "birge", value)
    : treated({ scatter: value, factor: 1 }, "scatter", value);
}

/** What other series say, as part of a problem; nothing where no constant is shared. */
export function outsideWith(
  prepared: Prepared,
  observed: readonly number[],
  errors: ErrorModel,
  { sharing }: Pick<AnalysisOptions, "sharing">,
  treatment: Treatment = UNTREATED,
): Pick<Problem, "outside"> {
  if (sharing === null) return {};
  const { jacobian } = prepared.evaluate(prepared.parameters.map(() => 0));
  return { outside: sharing.outside({ jacobian, observed, errors }, treatment) };
}

/** Data that leave together: repeats of one band. */
function repeats(used: readonly Band[]): number[][] {
  const groups = new Map<string, number[]>();
  used.forEach((band, i) => {
    const group = groups.get(band.label);
    if (group === undefined) groups.set(band.label, [i]);
    else group.push(i);
  });
  return [...groups.values()];
}
