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
  type Problem,
  type Treatment,
  UNTREATED,
  UndeterminedError,
} from "../fitting/index.ts";
import { InputError } from "../messages/index.ts";
import { type Model, symmetricEigen } from "../models/index.ts";
import { chiSquareUpperTail } from "../quantity/index.ts";
import { type CurvedFit, fitCurved, settle } from "./curved-fit.ts";
import { errorModel as errorModelOf } from "./error-model.ts";
import { demandLevels } from "./near-limit/levels.ts";
import type { AnalysisOptions } from "./options.ts";
import type { Propagation } from "./propagation.ts";

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
  readonly tests: Diagnostics;
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
  /** residual tests of `fit` */
  readonly treated: Diagnostics;
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
  const problem: Problem = { ...model.prepare(used, options), observed: used.map((band) => band.position), errors };
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
    get tests() {
      return tests();
    },
    get treated() {
      return treated();
    },
    fit: excess.fit,
    treatment: excess.treatment,
    excess: { kind: excess.kind, value: excess.value, applied: excess.applied },
    weights: excess.weights,
    linear: problem.linear,
    probability,
    by: {
      covariance: excess.fit.covariance,
      degreesOfFreedom: options.shared !== null ? options.shared.degreesOfFreedom : estimated ? dof : null,
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

function determined<T>(
  series: Series,
  model: Model,
  used: readonly Band[],
  problem: Problem,
  options: AnalysisOptions,
  fit: () => T,
): T {
  try {
    return fit();
  } catch (error) {
    if (!(error instanceof UndeterminedError)) throw error;
    const free = problem.parameters.filter((p) => p.held === undefined);
    const distinct = new Set(used.map((band) => band.label)).size;
    const place = { source: series.bands[0]?.place.source ?? series.name };
    const few = `${distinct} different used band${distinct === 1 ? "" : "s"} cannot determine ${free.length} constants (${free.map((p) => p.symbol).join(", ")})`;
    const more = `give at least ${free.length} different bands, ${model.terms === null ? "or" : "ask for fewer --terms, or"} hold a constant with --fix`;
    const at = model.starts?.(used, problem.observed, options) ?? null;
    const unseen = unseenConstants(problem, model, at);
    const mend = [
      ...(distinct < free.length ? [more] : []),
      ...unseen,
      ...(distinct < free.length || unseen.length > 0 ? [] : [openConstants(problem, error.parameter, at)]),
    ].join("; ");
    throw new InputError([{ code: "not-determined", place, what: `series "${series.name}": ${few}`, mend }], 3);
  }
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
  if (options.shared !== null) {
    const { treatment, excess } = options.shared;
    return { ...excess, weights: null, treatment, fit: excess.applied ? fitLinear(problem, treatment) : stated };
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

/** What to do about each free constant that no datum depends on. */
function unseenConstants({ parameters, evaluate }: Problem, model: Model, at: readonly number[] | null): string[] {
  if (at === null) return [];
  const { jacobian } = evaluate(at);
  return parameters.flatMap(({ key, symbol, typical, held, prior, even }, k) => {
    if (held !== undefined || prior !== undefined || even === true) return [];
    // Nothing, beyond rounding of energies, over the whole size of the constant.
    if (jacobian.some((row) => Math.abs(row[k]!) * typical > 1e-9)) return [];
    const seenIn = model.constants.find((constant) => constant.key === key)?.seenIn ?? "a band that does";
    return [`no band depends on ${symbol}: add ${seenIn}, or hold it with --fix "${key}=…"`];
  });
}

/** What to do where each constant is seen, but not apart from the others. */
function openConstants(problem: Problem, parameter: number, at: readonly number[] | null): string {
  const { key, symbol, even } = problem.parameters[parameter]!;
  if (even === true)
    return `they are met best with ${symbol} = 0, where they say nothing of its size; add a band that shows the mixing, or hold it with --fix "${key}=0"`;
  return `they leave ${openDirection(problem, at) ?? symbol} open; add a band from another level or hold a constant of these with --fix`;
}

/** A direction among the constants that no datum depends on, such as `ω̃ : ω̃x = 2 : 1`; null where it is one constant alone. */
function openDirection(problem: Problem, at: readonly number[] | null): string | null {
  const { parameters } = problem;
  const { jacobian } = problem.evaluate(at ?? parameters.map(() => 0));
  const free = parameters.flatMap(({ held }, k) => (held === undefined ? [k] : []));
  const scaled = jacobian.map((row) => free.map((k) => row[k]! * parameters[k]!.typical));
  if (!scaled.flat().every(Number.isFinite)) return null;
  const gram = free.map((_, i) => free.map((__, j) => scaled.reduce((sum, row) => sum + row[i]! * row[j]!, 0)));
  const direction = symmetricEigen(gram).vectors[0]!.map((x, i) => x * parameters[free[i]!]!.typical);
  const largest = Math.max(...direction.map((x, i) => Math.abs(x) / parameters[free[i]!]!.typical));
  const parts = direction.flatMap((x, i) => {
    const { symbol, typical } = parameters[free[i]!]!;
    return Math.abs(x) / typical > 1e-3 * largest ? [{ symbol, x }] : [];
  });
  if (parts.length < 2) return parts[0]?.symbol ?? null;
  const unit = Math.min(...parts.map(({ x }) => Math.abs(x))) * Math.sign(parts[0]!.x);
  return `the direction ${parts.map(({ symbol }) => symbol).join(" : ")} = ${parts.map(({ x }) => Number((x / unit).toPrecision(3))).join(" : ")}`;
}
