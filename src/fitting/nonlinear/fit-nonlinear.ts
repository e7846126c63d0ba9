import { inverseGram } from "../qr.ts";
import { choleskyWhitening, type Whitening } from "../whitening.ts";
import { type Descent, descend, type Strategy } from "./descend.ts";
import { type Objective, objective } from "./objective.ts";

/** A nonlinear least-squares problem. */
export interface NonlinearRequest {
  readonly y: readonly number[];
  /** standard uncertainty of each datum */
  readonly sigma?: readonly number[];
  /** covariance of the data, in place of sigma */
  readonly covariance?: readonly (readonly number[])[];
  readonly model: (p: number[]) => readonly number[];
  /** ∂model_i/∂p_j */
  readonly jacobian: (p: number[]) => readonly (readonly number[])[];
  readonly start: readonly number[];
  /** size of each constant that still counts as zero beside it; @default the start */
  readonly typical?: readonly number[];
  /** true: the constant stays at its start; @default none held */
  readonly held?: readonly boolean[];
}

/** Why a fit ended. */
export type NonlinearReason =
  | "converged: the residuals are orthogonal to every derivative"
  | "converged: the model goes through the data to rounding"
  | "not converged: no step leads downhill any more"
  | `not converged: ${string}`;

/** The outcome; plain arrays in the order of `start`. Uncertainties are null where they cannot be had. */
export interface NonlinearResult {
  readonly values: number[];
  readonly standardUncertainties: number[] | null;
  readonly covariance: number[][] | null;
  /** of the whitened residuals; equal to the residual sum of squares without sigma */
  readonly chiSquare: number;
  readonly residualSumOfSquares: number;
  readonly degreesOfFreedom: number;
  readonly converged: boolean;
  readonly reason: NonlinearReason;
  readonly iterations: number;
  /** ∂(χ²/2)/∂p */
  readonly gradient: number[];
}

/** Tried one after the other until one converges. */
const STRATEGIES: readonly Strategy[] = [
  { damping: 1e-3, growingScales: true },
  { damping: 1e-3, growingScales: false },
  { damping: 100, growingScales: true },
  { damping: 100, growingScales: false },
];

/** A minimum is accepted when the offset is below 1e-8: the constants are then within 1e-8 of their standard deviations of it. */
const CONVERGED = 1e-8;
/** Residuals this small against the data are rounding; orthogonality cannot be asked of them. */
const EXACT = 1e-12;

/**
 * Weighted nonlinear least squares around ml-levenberg-marquardt: whitened data, scaled constants, gain-ratio damping, worse points never
 * kept, QR for the last steps and the covariance, and several starts of the damping. Without sigma or covariance the uncertainties
 * come from the residual variance.
 * @throws RangeError when lengths do not fit or there are fewer data than free constants
 */
export function fitNonlinear(request: NonlinearRequest): NonlinearResult {
  const { y, start } = request;
  const free = start.flatMap((_, k) => (request.held?.[k] === true ? [] : [k]));
  const whole = (q: readonly number[]) => {
    const p = [...start];
    free.forEach((k, j) => {
      p[k] = q[j]!;
    });
    return p;
  };
  if (!y.every(Number.isFinite)) throw new RangeError("the data must be finite numbers");
  if (y.length < free.length) throw new RangeError(`${y.length} data cannot determine ${free.length} constants`);
  const problem = objective(
    y,
    whiteningOf(request),
    (q) => request.model(whole(q)),
    (q) => request.jacobian(whole(q)).map((row) => columnsOf(row, free, start.length)),
    free.length,
  );
  const known = request.sigma !== undefined || request.covariance !== undefined;
  const { descent, reason } = best(
    problem,
    free.map((k) => start[k]!),
    free,
    request.typical ?? start,
  );
  return finish(request, problem, descent, reason, whole, free, known);
}

function columnsOf(row: readonly number[], free: readonly number[], constants: number): number[] {
  if (row.length !== constants)
    throw new RangeError(`a row of the jacobian has ${row.length} entries for ${constants} constants`);
  return free.map((k) => row[k]!);
}

function whiteningOf({ y, sigma, covariance }: NonlinearRequest): Whitening {
  const n = y.length;
  if (covariance !== undefined) {
    if (covariance.length !== n || covariance.some((row) => row.length !== n))
      throw new RangeError(`the covariance must be ${n} by ${n}`);
    return choleskyWhitening(Float64Array.from(covariance.flat()), n);
  }
  if (sigma === undefined) return { diagonal: new Float64Array(n).fill(1), lower: null, size: n };
  if (sigma.length !== n || sigma.some((s) => !(s > 0))) throw new RangeError(`sigma must hold ${n} positive numbers`);
  return { diagonal: Float64Array.from(sigma, (s) => 1 / s), lower: null, size: n };
}

interface Best {
  readonly descent: Descent | null;
  readonly reason: NonlinearReason;
}

function best(problem: Objective, start: readonly number[], free: readonly number[], typical: readonly number[]): Best {
  const first = start.every(Number.isFinite) ? problem.at(start) : null;
  if (first === null) return { descent: null, reason: "not converged: the model is not finite at the start" };
  let kept: Best | null = null;
  for (const strategy of STRATEGIES) {
    const descent = descend(problem, first, strategy);
    const reason = judge(problem, descent, free, typical);
    const won = reason.startsWith("converged");
    if (kept === null || won || descent.point.sumOfSquares < kept.descent!.point.sumOfSquares)
      kept = { descent, reason };
    if (won) break;
  }
  return kept!;
}

function judge(
  problem: Objective,
  { point, offset }: Descent,
  free: readonly number[],
  typical: readonly number[],
): NonlinearReason {
  if (offset === null) return "not converged: the derivatives are not finite at the point reached";
  const { dependent } = offset.triangle;
  if (dependent >= 0) return `not converged: the data do not determine constant ${free[dependent]! + 1}`;
  const exact = Math.sqrt(point.sumOfSquares) <= EXACT * problem.scale;
  const still = offset.step.every(
    (d, k) => Math.abs(d) <= 1e-7 * Math.max(Math.abs(point.p[k]!), Math.abs(typical[free[k]!]!)),
  );
  if (exact && still) return "converged: the model goes through the data to rounding";
  if (offset.value <= CONVERGED) return "converged: the residuals are orthogonal to every derivative";
  return "not converged: no step leads downhill any more";
}

function finish(
  { y, model, start }: NonlinearRequest,
  problem: Objective,
  descent: Descent | null,
  reason: NonlinearReason,
  whole: (q: readonly number[]) => number[],
  free: readonly number[],
  known: boolean,
): NonlinearResult {
  const values = descent === null ? [...start] : whole(descent.point.p);
  const degreesOfFreedom = y.length - free.length;
  const chiSquare = descent?.point.sumOfSquares ?? Number.NaN;
  const determined = descent?.offset != null && descent.offset.triangle.dependent < 0;
  const variance = known ? 1 : degreesOfFreedom > 0 ? chiSquare / degreesOfFreedom : null;
  let covariance: number[][] | null = null;
  if (determined && variance !== null) {
    covariance = start.map(() => start.map(() => 0));
    inverseGram(descent.offset.triangle).forEach((row, i) => {
      row.forEach((c, j) => {
        covariance![free[i]!]![free[j]!] = c * variance;
      });
    });
  }
  const gradient = start.map(() => 0);
  if (descent?.offset != null) {
    const jacobian = descent.point.jacobian();
    free.forEach((k, j) => {
      for (let i = 0; i < problem.data; i++)
        gradient[k]! -= jacobian[i * free.length + j]! * descent.point.residuals[i]!;
    });
  }
  const calculated = descent === null ? null : model([...values]);
  return {
    values,
    standardUncertainties: covariance?.map((row, i) => Math.sqrt(row[i]!)) ?? null,
    covariance,
    chiSquare,
    residualSumOfSquares:
      calculated === null ? Number.NaN : y.reduce((sum, v, i) => sum + (v - calculated[i]!) ** 2, 0),
    degreesOfFreedom,
    converged: reason.startsWith("converged"),
    reason,
    iterations: descent?.iterations ?? 0,
    gradient,
  };
}
