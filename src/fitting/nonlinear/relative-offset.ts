import { type Triangle, triangularise } from "../qr.ts";
import type { Whitened } from "./objective.ts";

/** The undamped step at a point and how far from stationary it is. */
export interface Offset {
  /** ‖component of the residuals along the derivatives‖ / ‖residuals‖: 0 at a minimum (Bates & Watts 1981) */
  readonly value: number;
  /** Gauss–Newton step by QR */
  readonly step: readonly number[];
  readonly triangle: Triangle;
}

/** The relative offset and the Gauss–Newton step, by QR of the scaled Jacobian. */
export function relativeOffset(here: Whitened, data: number): Offset {
  const constants = here.p.length;
  const jacobian = here.jacobian();
  const stride = constants + 1;
  const augmented = new Float64Array(data * stride);
  for (let i = 0; i < data; i++) {
    for (let k = 0; k < constants; k++) augmented[i * stride + k] = jacobian[i * constants + k]!;
    augmented[i * stride + constants] = here.residuals[i]!;
  }
  const triangle = triangularise({ rows: data, columns: constants, augmented });
  // The part along the derivatives, taken from the triangle and not as a difference of squares, keeps its digits.
  let along = 0;
  for (let k = 0; k < constants; k++) along += augmented[k * stride + constants]! ** 2;
  const value = here.sumOfSquares > 0 ? Math.sqrt(along / here.sumOfSquares) : 0;
  return { value, step: [...triangle.solution], triangle };
}
