import { type Whitening, whiten } from "../whitening.ts";

/** Residuals and derivatives at one point, whitened: independent data of unit variance. */
export interface Whitened {
  readonly p: readonly number[];
  /** L⁻¹(y - model) */
  readonly residuals: Float64Array;
  readonly sumOfSquares: number;
  /** L⁻¹·∂model/∂p, row by row */
  readonly jacobian: () => Float64Array;
}

/** A model as whitened residuals of its free constants. `at` is null where the model or its derivatives are not finite. */
export interface Objective {
  readonly data: number;
  readonly constants: number;
  /** ‖L⁻¹y‖, the size rounding is measured against */
  readonly scale: number;
  at(p: readonly number[]): Whitened | null;
}

/** Whiten a model. `model` and `jacobian` take and give plain arrays. */
export function objective(
  y: readonly number[],
  white: Whitening,
  model: (p: number[]) => readonly number[],
  jacobian: (p: number[]) => readonly (readonly number[])[],
  constants: number,
): Objective {
  const data = y.length;
  const target = Float64Array.from(y);
  whiten(white, target);
  return {
    data,
    constants,
    scale: Math.hypot(...target),
    at(p) {
      const calculated = model([...p]);
      if (calculated.length !== data)
        throw new RangeError(`the model gave ${calculated.length} values for ${data} data`);
      const residuals = Float64Array.from(y, (value, i) => value - calculated[i]!);
      whiten(white, residuals);
      const sumOfSquares = residuals.reduce((sum, r) => sum + r * r, 0);
      if (!Number.isFinite(sumOfSquares)) return null;
      let memory: Float64Array | null = null;
      return {
        p,
        residuals,
        sumOfSquares,
        jacobian() {
          if (memory !== null) return memory;
          const flat = Float64Array.from(jacobian([...p]).flat());
          if (flat.length !== data * constants)
            throw new RangeError(`the jacobian has ${flat.length} entries for ${data} data and ${constants} constants`);
          for (let k = 0; k < constants; k++) whiten(white, flat, constants, k);
          memory = flat;
          return flat;
        },
      };
    },
  };
}

/** Lengths of the columns of a Jacobian. */
export function columnNorms(jacobian: Float64Array, data: number, constants: number): number[] {
  return Array.from({ length: constants }, (_, k) => {
    let norm = 0;
    for (let i = 0; i < data; i++) norm = Math.hypot(norm, jacobian[i * constants + k]!);
    return norm;
  });
}
