import type { ErrorModel, Treatment } from "./problem.ts";

/** Turns residuals with covariance V into independent ones of unit variance: `apply` multiplies by L⁻¹, V = L·Lᵀ. */
export interface Whitening {
  readonly diagonal: Float64Array | null;
  /** lower triangle L of V, row by row; null when V is diagonal */
  readonly lower: Float64Array | null;
  readonly size: number;
}

/** Variance of each independent source after the treatment; with unknown σ every source counts 1. */
function variances(errors: ErrorModel, treatment: Treatment, size: number): Float64Array {
  const sources = errors.mixing?.[0]?.length ?? size;
  // Plain loops here and in the solver: a fit is a few dozen numbers, and there are many fits.
  const s2 = new Float64Array(sources);
  for (let k = 0; k < sources; k++) {
    const sigma = errors.sigmas === null ? 1 : errors.sigmas[k]!;
    s2[k] = (sigma * treatment.factor) ** 2 / (treatment.weights?.[k] ?? 1) + treatment.scatter ** 2;
  }
  return s2;
}

/** The covariance matrix V of `size` data, row by row. With unknown σ only its shape is meant, and the shared part is left out. */
export function covarianceOf(errors: ErrorModel, treatment: Treatment, size: number): Float64Array {
  const v = new Float64Array(size * size);
  const s2 = variances(errors, treatment, size);
  for (let i = 0; i < size; i++) {
    if (errors.mixing === null) {
      v[i * size + i] = s2[i]!;
      continue;
    }
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let k = 0; k < s2.length; k++) sum += errors.mixing[i]![k]! * errors.mixing[j]![k]! * s2[k]!;
      v[i * size + j] = sum;
      v[j * size + i] = sum;
    }
  }
  if (errors.sigmas !== null)
    for (const c of errors.shared)
      for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) v[i * size + j]! += c[i]! * c[j]!;
  return v;
}

/** Prepare whitening; by Cholesky when errors are correlated. Throws RangeError when V is not positive definite. */
export function whitening(errors: ErrorModel, treatment: Treatment, size: number): Whitening {
  if (errors.mixing === null && (errors.sigmas === null || errors.shared.length === 0)) {
    const diagonal = variances(errors, treatment, size);
    for (let i = 0; i < size; i++) diagonal[i] = 1 / Math.sqrt(diagonal[i]!);
    return { diagonal, lower: null, size };
  }
  return choleskyWhitening(covarianceOf(errors, treatment, size), size);
}

/** Whitening by V = L·Lᵀ; V row by row, overwritten. Throws RangeError when V is not positive definite. */
export function choleskyWhitening(v: Float64Array, size: number): Whitening {
  for (let j = 0; j < size; j++) {
    for (let i = j; i < size; i++) {
      let sum = v[i * size + j]!;
      for (let k = 0; k < j; k++) sum -= v[i * size + k]! * v[j * size + k]!;
      if (i === j) {
        if (!(sum > 0)) throw new RangeError("the covariance of the data is not positive definite");
        v[j * size + j] = Math.sqrt(sum);
      } else v[i * size + j] = sum / v[j * size + j]!;
    }
  }
  return { diagonal: null, lower: v, size };
}

/** L⁻¹·x for one column x, in place. */
export function whiten({ diagonal, lower, size }: Whitening, x: Float64Array, stride = 1, offset = 0): void {
  for (let i = 0; i < size; i++) {
    const at = i * stride + offset;
    if (diagonal !== null) {
      x[at]! *= diagonal[i]!;
      continue;
    }
    let sum = x[at]!;
    for (let k = 0; k < i; k++) sum -= lower![i * size + k]! * x[k * stride + offset]!;
    x[at] = sum / lower![i * size + i]!;
  }
}

/** L⁻ᵀ·x in place, so that whitenTransposed(whiten(x)) = V⁻¹·x. */
export function whitenTransposed({ diagonal, lower, size }: Whitening, x: Float64Array): void {
  for (let i = size - 1; i >= 0; i--) {
    if (diagonal !== null) {
      x[i]! *= diagonal[i]!;
      continue;
    }
    let sum = x[i]!;
    for (let k = i + 1; k < size; k++) sum -= lower![k * size + i]! * x[k]!;
    x[i] = sum / lower![i * size + i]!;
  }
}

/** V⁻¹·x. */
export function timesInverse(whitening: Whitening, x: readonly number[]): Float64Array {
  const column = Float64Array.from(x);
  whiten(whitening, column);
  whitenTransposed(whitening, column);
  return column;
}
