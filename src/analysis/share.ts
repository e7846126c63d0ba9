import type { Series } from "../bands/index.ts";
import { dot, fitLinear, type LinearFit, type Problem, UndeterminedError } from "../fitting/index.ts";
import { InputError } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { chiSquareUpperTail } from "../quantity/index.ts";
import { errorModel } from "./error-model.ts";
import type { AnalysisOptions, SharedConstant } from "./options.ts";
import { treat, trySolve } from "./solution.ts";

/** A constant that series have in common, or that varies between them by no more than `spread` (standard deviation, cm-1). */
export interface Share {
  readonly key: string;
  readonly spread: number;
}

/**
 * Options of each series when a constant is shared: what the other series say of it, each fitted alone, is one more observation. For independent
 * series with known σ that gives the constants and uncertainties of the joint fit of all of them (the others' own constants integrated out); with a spread
 * it is the fit of constants scattered about a common mean. A series that does not determine the constant by itself adds nothing to the others.
 * @throws InputError exit 2 for one series, a constant the model lacks, bands without σ; exit 3 where no other series determines it
 */
export function shareConstant(
  series: readonly Series[],
  model: Model,
  options: AnalysisOptions,
  { key, spread }: Share,
): ReadonlyMap<Series, AnalysisOptions> {
  const fault = (code: string, what: string, mend: string, exit: 2 | 3 = 2) =>
    new InputError([{ code, place: { source: "--share" }, what, mend }], exit);
  if (series.length < 2)
    throw fault(
      "share-one-series",
      "there is one series only, and nothing to share with",
      "name several in the column series",
    );
  const keys = model.constants.map((constant) => constant.key);
  if (!keys.includes(key))
    throw fault("unknown-constant", `there is no constant "${key}"`, `write one of ${keys.join(", ")}`);
  if (options.fixed[key] !== undefined)
    throw fault("share-and-fix", `${key} is fixed as well`, "leave one of --share and --fix out");
  const without = series.find(({ bands }) => bands.some(({ use, sigma }) => use && sigma === null));
  if (without !== undefined)
    throw fault(
      "share-without-sigma",
      `series "${without.name}" carries no σ, so its weight against the others is not known`,
      "give --sigma",
    );
  const terms = Math.max(options.terms ?? model.terms?.default ?? 0, keys.indexOf(key) + 1);
  const own: AnalysisOptions = { ...options, terms: model.terms === null ? options.terms : terms, autoTerms: false };
  const joint = jointTreatment(series, model, own, { key, spread });
  const known: SharedConstant = { key, value: 0, sigma: 0, spread, from: [], ...joint };
  const alone = series.map((one) => {
    const fit = trySolve(one, model, { ...own, shared: known })?.fit ?? null;
    const at = fit?.keys.indexOf(key) ?? -1;
    if (fit === null || fit.covariance === null || at < 0) return null;
    return { name: one.name, value: fit.values[at]!, variance: fit.covariance[at]![at]! + spread ** 2 };
  });
  return new Map(
    series.map((one, i) => {
      const others = alone.filter((other, j) => j !== i && other !== null) as NonNullable<(typeof alone)[number]>[];
      if (others.length === 0) {
        if (alone[i] !== null) return [one, { ...own, shared: known }] as const;
        throw fault(
          "share-undetermined",
          `no other series determines ${key} for "${one.name}"`,
          "one of them needs as many bands as constants",
          3,
        );
      }
      const weight = others.reduce((sum, { variance }) => sum + 1 / variance, 0);
      const value = others.reduce((sum, other) => sum + other.value / other.variance, 0) / weight;
      const sigma = Math.sqrt(1 / weight + spread ** 2);
      const shared: SharedConstant = { ...known, value, sigma, from: others.map(({ name }) => name) };
      return [one, { ...own, fixed: { ...own.fixed, [key]: { value, sigma } }, shared }] as const;
    }),
  );
}

/** How the residuals of the joint fit are treated: constants of each series, the shared one once (or, with a spread, once each and tied to a mean). */
function jointTreatment(
  series: readonly Series[],
  model: Model,
  options: AnalysisOptions,
  { key, spread }: Share,
): Pick<SharedConstant, "treatment" | "excess" | "degreesOfFreedom"> {
  const parts = series.map((one) => {
    const used = one.bands.filter(({ use }) => use);
    return { used, prepared: model.prepare(used, options), errors: errorModel(one, used, model) };
  });
  if (!parts.every(({ prepared }) => prepared.linear) || parts.some(({ errors }) => errors.mixing !== null))
    throw new InputError([
      {
        code: "share-not-possible",
        place: { source: "--share" },
        what: `constants of the model ${model.name}${parts.some(({ errors }) => errors.mixing !== null) ? " from subtracted spacings" : ""} cannot be shared`,
        mend: "leave --share out, or fit band positions with --model oscillator",
      },
    ]);
  const keys = parts[0]!.prepared.parameters.map((parameter) => parameter.key);
  const at = keys.indexOf(key);
  const { parameters: all } = parts[0]!.prepared;
  const tied = spread > 0;
  const size = keys.length;
  /** Column of constant k of series i in the joint fit; the shared one is last. */
  const column = (i: number, k: number) => (!tied && k === at ? series.length * size : i * size + k);
  const width = series.length * size + 1;
  const rows = parts.flatMap(({ used, prepared }, i) => {
    const { jacobian } = prepared.evaluate(prepared.parameters.map(() => 0));
    return used.map((_, b) => {
      const row = new Array<number>(width).fill(0);
      jacobian[b]!.forEach((x, k) => {
        row[column(i, k)]! += x;
      });
      return row;
    });
  });
  const observed = parts.flatMap(({ used }) => used.map(({ position }) => position));
  const sigmas = parts.flatMap(({ errors }) => errors.sigmas!);
  const lengths = parts.map(({ used }) => used.length);
  const before = (i: number) => lengths.slice(0, i).reduce((sum, n) => sum + n, 0);
  const shared = parts.flatMap(({ errors }, i) =>
    errors.shared.map((effect) => observed.map((_, n) => effect[n - before(i)] ?? 0)),
  );
  if (tied)
    series.forEach((_, i) => {
      // s_i - mean = 0 within the spread
      const row = new Array<number>(width).fill(0);
      row[column(i, at)] = 1;
      row[width - 1] = -1;
      rows.push(row);
      observed.push(0);
      sigmas.push(spread);
      for (const effect of shared) effect.push(0);
    });
  const problem: Problem = {
    parameters: Array.from({ length: width }, (_, j) => {
      const of = all[j === width - 1 ? at : j % size]!;
      const unused = !tied && j < width - 1 && j % size === at;
      return { ...of, ...(unused ? { held: 0 } : {}) };
    }),
    linear: true,
    evaluate: (p) => ({ calculated: rows.map((row) => dot(row, p)), jacobian: rows }),
    observed,
    errors: { sigmas, mixing: null, shared },
  };
  let stated: LinearFit;
  try {
    stated = fitLinear(problem);
  } catch (error) {
    if (!(error instanceof UndeterminedError)) throw error;
    throw new InputError(
      [
        {
          code: "share-undetermined",
          place: { source: "--share" },
          what: `the bands of all series together do not determine ${problem.parameters[error.parameter]!.symbol} of each`,
          mend: "add a band to the shortest series, or share another constant",
        },
      ],
      3,
    );
  }
  const dof = stated.degreesOfFreedom;
  const probability = dof > 0 ? chiSquareUpperTail(stated.chiSquare, dof) : null;
  const { treatment, kind, value, applied } = treat(problem, stated, probability, {
    ...options,
    shared: null,
    robust: null,
  });
  return {
    treatment,
    excess: { kind, value, applied },
    degreesOfFreedom: applied && options.scatter === null ? dof : null,
  };
}
