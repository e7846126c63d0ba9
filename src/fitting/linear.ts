import type { FitResult, Problem, Treatment } from "./problem.ts";
import { UNTREATED } from "./problem.ts";
import { inverseGram, type Triangle, triangularise } from "./qr.ts";
import { type Whitening, whiten, whitening, whitenTransposed } from "./whitening.ts";

/**
 * A linear fit with what diagnostics need of it. `gram`: (XᵀV⁻¹X + priors)⁻¹ over all constants, zero for held ones;
 * with unknown σ the covariance is `gram` times the residual variance.
 */
export interface LinearFit extends FitResult {
  readonly jacobian: readonly (readonly number[])[];
  readonly gram: readonly (readonly number[])[];
  readonly whitening: Whitening;
  readonly sigmaKnown: boolean;
  /** the residuals are no more than rounding: nothing can be learnt from their size */
  readonly exact: boolean;
}

/** The data leave a constant undetermined; `parameter` is its index. */
export class UndeterminedError extends RangeError {
  readonly parameter: number;

  constructor(parameter: number, message: string) {
    super(message);
    this.parameter = parameter;
  }
}

/** Roundings that a solution of this size may leave in a residual. */
const ROUNDINGS = 256;

/**
 * Generalised least squares of a model linear in its constants. With σ stated the covariance follows from it; without, from the
 * residual variance (null without a degree of freedom, or when the residuals are rounding), and a prior is weighed against that variance by iteration.
 * Throws UndeterminedError when the data leave a constant undetermined.
 */
export function fitLinear(problem: Problem, treatment: Treatment = UNTREATED): LinearFit {
  const { parameters, observed, errors } = problem;
  const { jacobian } = problem.evaluate(parameters.map(() => 0));
  const free = freeOf(parameters);
  const priors = free.filter((k) => parameters[k]!.prior !== undefined);
  const white = whitening(errors, treatment, observed.length);
  const sigmaKnown = errors.sigmas !== null;
  const degreesOfFreedom = observed.length + priors.length + (problem.outside?.rows.length ?? 0) - free.length;
  const solve = (unit: number) => solveWhitened(problem, jacobian, free, priors, white, unit);

  let triangle = solve(1);
  if (!sigmaKnown && priors.length > 0 && degreesOfFreedom > 0) {
    let unit = 1;
    for (let round = 0; round < 200; round++) {
      const next = Math.sqrt(triangle.sumOfSquares / degreesOfFreedom);
      if (!(next > 0) || Math.abs(next / unit - 1) < 1e-12) break;
      unit = next;
      triangle = solve(unit);
    }
  }
  const values = parameters.map((p) => p.held ?? 0);
  free.forEach((k, j) => {
    values[k] = triangle.solution[j]!;
  });
  const gram = spread(inverseGram(triangle), free, parameters.length);
  const residuals = new Array<number>(observed.length);
  for (let i = 0; i < residuals.length; i++) residuals[i] = observed[i]! - dot(jacobian[i]!, values);
  const exact = residuals.every((r, i) => Math.abs(r) <= ROUNDINGS * Number.EPSILON * Math.abs(observed[i]!));
  const scatters = degreesOfFreedom > 0 && !exact;
  const variance = sigmaKnown ? 1 : scatters ? triangle.sumOfSquares / degreesOfFreedom : null;
  const covariance = variance === null ? null : gram.map((row) => row.map((c) => c * variance));
  if (covariance !== null && !sigmaKnown) addShared(covariance, errors.shared, jacobian, gram, white);
  return {
    keys: parameters.map((p) => p.key),
    values,
    covariance,
    degreesOfFreedom,
    chiSquare: triangle.sumOfSquares,
    residuals,
    exact,
    converged: true,
    reason: "linear in its constants: solved directly by QR",
    iterations: 1,
    jacobian,
    gram,
    whitening: white,
    sigmaKnown,
  };
}

/** Places of the constants that are not held. */
function freeOf(parameters: Problem["parameters"]): number[] {
  const free: number[] = [];
  for (let k = 0; k < parameters.length; k++) if (parameters[k]!.held === undefined) free.push(k);
  return free;
}

/** The constants alone, without uncertainties and tests: for many small fits. Priors count as with σ known. Throws as fitLinear. */
export function fitValues(problem: Problem, treatment: Treatment): number[] {
  const { parameters, observed, errors } = problem;
  const values = parameters.map((p) => p.held ?? 0);
  const { jacobian } = problem.evaluate(values);
  const free = freeOf(parameters);
  const priors = free.filter((k) => parameters[k]!.prior !== undefined);
  const white = whitening(errors, treatment, observed.length);
  const { solution } = solveWhitened(problem, jacobian, free, priors, white, 1);
  for (let j = 0; j < free.length; j++) values[free[j]!] = solution[j]!;
  return values;
}

/** Solve for the free constants; with unknown σ a prior weighs unit/σ, where `unit` is the present residual deviation. */
function solveWhitened(
  { parameters, observed, errors, outside }: Problem,
  jacobian: readonly (readonly number[])[],
  free: readonly number[],
  priors: readonly number[],
  white: Whitening,
  unit: number,
): Triangle {
  const n = observed.length;
  const columns = free.length;
  const stride = columns + 1;
  const rows = n + priors.length + (outside?.rows.length ?? 0);
  const augmented = new Float64Array(rows * stride);
  for (let i = 0; i < n; i++) {
    let y = observed[i]!;
    for (let k = 0; k < parameters.length; k++) y -= jacobian[i]![k]! * (parameters[k]!.held ?? 0);
    for (let j = 0; j < columns; j++) augmented[i * stride + j] = jacobian[i]![free[j]!]!;
    augmented[i * stride + columns] = y;
  }
  for (let j = 0; j < stride; j++) whiten(white, augmented, stride, j);
  priors.forEach((k, m) => {
    const { value, sigma } = parameters[k]!.prior!;
    const weight = (errors.sigmas === null ? unit : 1) / sigma;
    augmented[(n + m) * stride + free.indexOf(k)] = weight;
    augmented[(n + m) * stride + columns] = weight * value;
  });
  outside?.rows.forEach((row, m) => {
    const at = (n + priors.length + m) * stride;
    for (let j = 0; j < columns; j++) augmented[at + j] = row[free[j]!]!;
    augmented[at + columns] = parameters.reduce((y, { held }, k) => y - row[k]! * (held ?? 0), outside.right[m]!);
  });
  if (rows < columns) throw new UndeterminedError(free.at(-1) ?? 0, `${n} data cannot determine ${columns} constants`);
  const triangle = triangularise({ rows, columns, augmented });
  if (triangle.dependent >= 0)
    throw new UndeterminedError(free[triangle.dependent]!, "the data do not determine every constant");
  return triangle;
}

/** Sum of products of two rows of equal length. */
export function dot(a: readonly number[], b: readonly number[]): number {
  let sum = 0;
  for (let k = 0; k < a.length; k++) sum += a[k]! * b[k]!;
  return sum;
}

/** A matrix over the free constants as one over all, zero elsewhere. */
function spread(matrix: number[][], free: readonly number[], size: number): number[][] {
  if (free.length === size) return matrix;
  const full = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  free.forEach((k, i) => {
    free.forEach((l, j) => {
      full[k]![l] = matrix[i]![j]!;
    });
  });
  return full;
}

/** V⁻¹·X, column by column. */
export function weightedJacobian(jacobian: readonly (readonly number[])[], white: Whitening): number[][] {
  const { diagonal } = white;
  if (diagonal !== null) return jacobian.map((row, i) => row.map((x) => x * diagonal[i]! * diagonal[i]!));
  const columns = jacobian[0]?.length ?? 0;
  const weighted = jacobian.map(() => new Array<number>(columns));
  for (let k = 0; k < columns; k++) {
    const x = Float64Array.from(jacobian, (row) => row[k]!);
    whiten(white, x);
    whitenTransposed(white, x);
    x.forEach((value, i) => {
      weighted[i]![k] = value;
    });
  }
  return weighted;
}

/** Add what a fully correlated error of the data does to the constants: (C·Xᵀ·V⁻¹·c)(…)ᵀ. */
function addShared(
  covariance: number[][],
  shared: readonly (readonly number[])[],
  jacobian: readonly (readonly number[])[],
  gram: readonly (readonly number[])[],
  white: Whitening,
): void {
  if (shared.length === 0) return;
  const weighted = weightedJacobian(jacobian, white);
  for (const c of shared) {
    const pull = gram.map((row) =>
      row.reduce((sum, g, k) => sum + g * weighted.reduce((s, x, i) => s + x[k]! * c[i]!, 0), 0),
    );
    covariance.forEach((row, i) => {
      pull.forEach((p, j) => {
        row[j]! += pull[i]! * p;
      });
    });
  }
}

/** C·Xᵀ·V⁻¹: how each constant (row) follows from each datum (column). */
export function estimator(fit: LinearFit): number[][] {
  const weighted = weightedJacobian(fit.jacobian, fit.whitening);
  return fit.gram.map((row) => weighted.map((x) => dot(row, x)));
}
