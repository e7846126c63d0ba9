import { fitLinear, type LinearFit } from "./linear.ts";
import { type Problem, type Treatment, UNTREATED } from "./problem.ts";
import { covarianceOf } from "./whitening.ts";

export type RobustKind = "huber" | "tukey";

/** A robust fit: the weights stay for everything derived from it. */
export interface RobustFit {
  readonly fit: LinearFit;
  readonly treatment: Treatment;
  /** one a datum, 1 = full */
  readonly weights: readonly number[];
  readonly iterations: number;
  readonly settled: boolean;
}

/** Tuning constants for 95 % efficiency with normal errors (Huber 1981; Beaton & Tukey 1974). */
const HUBER = 1.345;
const TUKEY = 4.685;
/** A datum is never dropped altogether: its weight stays above this. */
const LEAST = 1e-8;

/** Weight of a residual u standard deviations long. */
const weightOf: Readonly<Record<RobustKind, (u: number) => number>> = {
  huber: (u) => Math.min(1, HUBER / Math.max(u, Number.MIN_VALUE)),
  tukey: (u) => (u < TUKEY ? (1 - (u / TUKEY) ** 2) ** 2 : 0),
};

/**
 * Iteratively reweighted least squares (Holland & Welsch 1977). Residuals are measured by the stated σ, or without σ by their median absolute
 * value over the n - p + 1 largest (divided by 0.6745). Tukey's biweight starts from Huber's solution, as it has several minima.
 */
export function fitRobust(problem: Problem, kind: RobustKind): RobustFit {
  const huber = iterate(problem, "huber", fitLinear(problem, UNTREATED));
  return kind === "huber" ? huber : iterate(problem, "tukey", huber.fit);
}

function iterate(problem: Problem, kind: RobustKind, start: LinearFit): RobustFit {
  const n = problem.observed.length;
  const v = covarianceOf(problem.errors, UNTREATED, n);
  let fit = start;
  let weights = new Array<number>(n).fill(1);
  let treatment = UNTREATED;
  for (let iterations = 1; ; iterations++) {
    const scale = problem.errors.sigmas === null ? medianScale(fit) : 1;
    const next = fit.residuals.map((r, i) => {
      const u = scale > 0 ? Math.abs(r) / (scale * Math.sqrt(v[i * n + i]!)) : 0;
      return Math.max(LEAST, weightOf[kind](u));
    });
    const change = Math.max(...next.map((w, i) => Math.abs(w - weights[i]!)));
    weights = next;
    treatment = { ...UNTREATED, weights };
    fit = fitLinear(problem, treatment);
    if (change < 1e-10 || iterations >= 500) return { fit, treatment, weights, iterations, settled: change < 1e-6 };
  }
}

/** Standard deviation of the residuals by their median, without the p - 1 smallest, which the fit itself makes small. */
function medianScale({ residuals, values }: LinearFit): number {
  const sizes = residuals.map(Math.abs).sort((a, b) => a - b);
  const kept = sizes.slice(Math.min(values.length - 1, sizes.length - 1));
  const middle = Math.floor(kept.length / 2);
  const median = kept.length % 2 === 1 ? kept[middle]! : (kept[middle - 1]! + kept[middle]!) / 2;
  return median / 0.6745;
}
