import {
  covarianceOf,
  dot,
  fitLinear,
  fitNonlinear,
  type LinearFit,
  type NonlinearResult,
  type Parameter,
  type Problem,
  type Treatment,
  UNTREATED,
  UndeterminedError,
} from "../fitting/index.ts";

/** A fit that is not linear in its constants, with the linear problem that touches it at the minimum. */
export interface CurvedFit {
  /** the minimum, with the covariance and everything diagnostics need from the tangent */
  readonly fit: LinearFit;
  readonly tangent: Problem;
}

/**
 * Least squares by the nonlinear core; covariance, leverage and residual tests are those of the linear problem that touches it at the minimum.
 * @throws UndeterminedError when the data leave a constant undetermined
 */
export function fitCurved(problem: Problem, treatment: Treatment, start: readonly number[]): CurvedFit {
  const { parameters, observed } = problem;
  const free = parameters.flatMap(({ held }, k) => (held === undefined ? [k] : []));
  const priors = parameters.filter(({ prior }) => prior !== undefined).length;
  if (observed.length + priors < free.length)
    throw new UndeterminedError(free.at(-1) ?? 0, `${observed.length} data cannot determine ${free.length} constants`);
  const found = positive(minimum(problem, treatment, start), parameters);
  const { calculated, jacobian } = problem.evaluate(found.values);
  const undetermined = /do not determine constant (\d+)/.exec(found.reason);
  if (undetermined !== null || ![calculated, ...jacobian].flat().every(Number.isFinite))
    throw new UndeterminedError(Number(undetermined?.[1] ?? 1) - 1, found.reason);
  const tangent: Problem = {
    ...problem,
    linear: true,
    evaluate: (p) => ({ calculated: jacobian.map((row) => dot(row, p)), jacobian }),
    observed: observed.map((y, i) => y - calculated[i]! + dot(jacobian[i]!, found.values)),
  };
  const fit = fitLinear(tangent, treatment);
  const lost = parameters.findIndex(
    (parameter, k) => freeEven(parameter) && found.values[k]! <= NONE * Math.sqrt(fit.covariance?.[k]?.[k] ?? 0),
  );
  if (lost >= 0) throw new UndeterminedError(lost, "the data are met best without it");
  return {
    tangent,
    fit: {
      ...fit,
      values: found.values,
      residuals: observed.map((y, i) => y - calculated[i]!),
      ...ending(found),
      iterations: found.iterations,
    },
  };
}

/** Share of its standard deviation below which a constant of no sign has gone to 0, where no datum depends on it to first order. */
const NONE = 0.01;

const freeEven = ({ even, held, prior }: Parameter) => even === true && held === undefined && prior === undefined;

function positive(found: NonlinearResult, parameters: readonly Parameter[]): NonlinearResult {
  return { ...found, values: found.values.map((x, k) => (freeEven(parameters[k]!) ? Math.abs(x) : x)) };
}

/**
 * A treatment that depends on the fit, such as an added scatter, and the fit that depends on the treatment, in turn until both stand still.
 * `treat` sees the linear problem that touches the fit so far, and the untreated fit of it.
 */
export function settle<T extends { readonly fit: LinearFit; readonly treatment: Treatment }>(
  problem: Problem,
  first: CurvedFit,
  treat: (tangent: Problem, untreated: LinearFit) => T,
): T {
  let treated = treat(first.tangent, first.fit);
  if (treated.fit === first.fit) return treated;
  let curved = first;
  for (let round = 0; round < ROUNDS; round++) {
    const before = curved.fit.values;
    curved = fitCurved(problem, treated.treatment, before);
    const { values, covariance } = curved.fit;
    const still = values.every((x, k) => Math.abs(x - before[k]!) <= STILL * Math.sqrt(covariance?.[k]?.[k] ?? 0));
    if (still) break;
    treated = treat(curved.tangent, fitLinear(curved.tangent, UNTREATED));
  }
  return { ...treated, fit: curved.fit };
}

const ROUNDS = 30;
/** Share of a standard deviation within which the constants stand still. */
const STILL = 1e-6;

/** Share of a standard deviation that a step may still be where rounding hides whether it leads downhill. */
const NEGLIGIBLE = 1e-3;

/** How a search ended: where data agree to rounding no step leads downhill, and a step that changes nothing is convergence too. */
function ending({ converged, reason, covariance, gradient, chiSquare, degreesOfFreedom }: NonlinearResult) {
  if (converged || covariance === null) return { converged, reason };
  const unit = degreesOfFreedom > 0 ? Math.sqrt(chiSquare / degreesOfFreedom) : 1;
  const small = covariance.every((row, k) => Math.abs(dot(row, gradient)) <= NEGLIGIBLE * unit * Math.sqrt(row[k]!));
  return small
    ? { converged: true, reason: "converged: to a thousandth of every standard deviation" }
    : { converged, reason };
}

/** The minimum of χ², priors as further data; with unknown σ a prior is weighed against the residual variance by iteration. */
function minimum(problem: Problem, treatment: Treatment, start: readonly number[]): NonlinearResult {
  const { parameters, errors } = problem;
  const priors = parameters.flatMap((p, k) => (p.prior === undefined ? [] : [k]));
  let unit = 1;
  let from = start;
  for (let round = 0; ; round++) {
    const result = once(problem, treatment, priors, from, unit);
    const next = Math.sqrt(result.chiSquare / result.degreesOfFreedom);
    const settled = !(next > 0 && Number.isFinite(next)) || Math.abs(next - 1) < 1e-10;
    if (errors.sigmas !== null || priors.length === 0 || settled || round >= 50) return result;
    unit *= next;
    from = result.values;
  }
}

function once(
  { parameters, observed, errors, evaluate }: Problem,
  treatment: Treatment,
  priors: readonly number[],
  start: readonly number[],
  unit: number,
): NonlinearResult {
  const n = observed.length;
  const v = covarianceOf(errors, treatment, n);
  const scale = errors.sigmas === null ? unit ** 2 : 1;
  const size = n + priors.length;
  const covariance = Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (_, j) => {
      if (i < n && j < n) return v[i * n + j]! * scale;
      return i === j ? parameters[priors[i - n]!]!.prior!.sigma ** 2 : 0;
    }),
  );
  const row = (at: number) => parameters.map((_, k) => Number(k === at));
  return fitNonlinear({
    y: [...observed, ...priors.map((k) => parameters[k]!.prior!.value)],
    covariance,
    model: (p) => [...evaluate(p).calculated, ...priors.map((k) => p[k]!)],
    jacobian: (p) => [...evaluate(p).jacobian, ...priors.map(row)],
    start: start.map((x, k) => parameters[k]!.held ?? x),
    typical: parameters.map(({ typical }) => typical),
    held: parameters.map(({ held }) => held !== undefined),
  });
}
