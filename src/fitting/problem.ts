/**
 * What is known of the errors of the data: V = M·diag(s²)·Mᵀ + Σ c·cᵀ.
 * s: standard deviation of each independent source of error (null: unknown, all alike);
 * M: rows data, columns sources (null: one source a datum); c: fully correlated parts, one signed entry a datum.
 */
export interface ErrorModel {
  readonly sigmas: readonly number[] | null;
  readonly mixing: readonly (readonly number[])[] | null;
  readonly shared: readonly (readonly number[])[];
}

/** A constant of a model. `held`: kept at that value; `prior`: one more observation of it. */
export interface Parameter {
  readonly key: string;
  readonly symbol: string;
  readonly unit: string;
  readonly start: number;
  readonly typical: number;
  readonly held?: number;
  readonly prior?: { readonly value: number; readonly sigma: number };
  /** no datum depends on its sign: free, it is given as positive */
  readonly even?: true;
}

/** Calculated data and their derivatives, one row a datum. */
export interface Evaluation {
  readonly calculated: readonly number[];
  readonly jacobian: readonly (readonly number[])[];
}

/** A model made ready for a given list of data. `linear`: the Jacobian does not depend on p and calculated(0) = 0. */
export interface Prepared {
  readonly parameters: readonly Parameter[];
  readonly linear: boolean;
  readonly evaluate: (p: readonly number[]) => Evaluation;
}

/** What data outside the problem say of its constants: rows·p = right, independent, each with a standard deviation of one. No treatment touches them. */
export interface Outside {
  readonly rows: readonly (readonly number[])[];
  readonly right: readonly number[];
}

/** Everything a fit needs; no model is seen here. */
export interface Problem extends Prepared {
  readonly observed: readonly number[];
  readonly errors: ErrorModel;
  /** only with known σ; none when left out */
  readonly outside?: Outside;
}

/** How residuals larger than the stated uncertainties are described: τ added in quadrature, a factor on every s, or weights. */
export interface Treatment {
  readonly scatter: number;
  readonly factor: number;
  /** of a robust fit, one a source of error: its variance is divided by it */
  readonly weights?: readonly number[];
}

export const UNTREATED: Treatment = { scatter: 0, factor: 1 };

/** The outcome of a fit; arrays in the order of `keys`, held constants included (their covariance is zero). */
export interface FitResult {
  readonly keys: readonly string[];
  readonly values: readonly number[];
  /** null when no uncertainty was stated and no degree of freedom is left */
  readonly covariance: readonly (readonly number[])[] | null;
  readonly degreesOfFreedom: number;
  /** of the whitened residuals, priors included; with unknown σ the residual sum of squares */
  readonly chiSquare: number;
  /** observed - calculated, priors not included */
  readonly residuals: readonly number[];
  readonly converged: boolean;
  readonly reason: string;
  readonly iterations: number;
}
