import { nonlinearCore } from "./core.ts";
import type { Whitened } from "./objective.ts";

/** Length given to each column of the scaled Jacobian, so that the damping stays far from the package's limits. */
const COLUMN_LENGTH = 1000;

/**
 * One Levenberg–Marquardt step by ml-levenberg-marquardt, which owns the linear algebra only: weights stay 1 (the data are whitened),
 * columns are scaled by `norms`, it runs for one iteration from the origin of the step, and the trial point is caught on its way,
 * since the package keeps or drops points by rules of its own. `damping` is relative to JᵀJ of the scaled columns.
 * `residuals` are those of the point, or what stands in their place for the second-order part of a step.
 * @returns the step in the constants, or null when it is not finite
 */
export function dampedStep(
  here: Whitened,
  residuals: Float64Array,
  norms: readonly number[],
  damping: number,
): number[] | null {
  const data = residuals.length;
  const constants = here.p.length;
  const jacobian = here.jacobian();
  const scale = norms.map((norm) => (norm > 0 ? COLUMN_LENGTH / norm : 1));
  // The package wants at least two points; a second one with no weight changes nothing.
  const rows = Math.max(2, data);
  const index = Array.from({ length: rows }, (_, i) => i);
  const residual = (i: number) => residuals[i] ?? 0;
  const row = (i: number) => scale.map((s, k) => (i < data ? jacobian[i * constants + k]! * s : 0));
  let trial: readonly number[] = [];
  try {
    nonlinearCore()(
      { x: index, y: index.map(residual) },
      (q) => {
        trial = [...q];
        const linear = index.map((i) => row(i).reduce((sum, x, k) => sum + x * q[k]!, 0));
        return (i) => linear[i]!;
      },
      {
        initialValues: new Array<number>(constants).fill(0),
        jacobianFunction: () => row,
        damping: damping * COLUMN_LENGTH ** 2,
        maxIterations: 1,
        errorTolerance: 0,
      },
    );
  } catch (error) {
    // An infinite derivative makes the package refuse its own matrix; anything else is ours.
    if (error instanceof Error && /symmetric|singular/i.test(error.message)) return null;
    throw error;
  }
  const step = scale.map((s, k) => s * trial[k]!);
  return step.every(Number.isFinite) ? step : null;
}
