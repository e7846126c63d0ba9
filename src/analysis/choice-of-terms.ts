import type { Series } from "../bands/index.ts";
import { informationCriteria } from "../fitting/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { chiSquareUpperTail, fUpperTail } from "../quantity/index.ts";
import type { AnalysisOptions } from "./options.ts";
import type { ComparisonRow } from "./result.ts";
import { IMPROBABLE, type Solution, trySolve } from "./solution.ts";
import { betterThanTerm, standsOut } from "./stands-out.ts";

/** Significance at which one more constant is called for: χ²-difference at 1 % (σ known), F test at 5 % (σ unknown). */
export const TERM_LEVEL = { known: 0.01, unknown: 0.05 } as const;
/** A number of terms with the evidence for it. */
export interface Choice {
  readonly terms: number;
  readonly comparison: readonly ComparisonRow[];
  readonly warnings: readonly Warning[];
}

/** One step from a number of terms to the next. */
export interface Step {
  readonly statistic: number;
  readonly probability: number;
  readonly kind: "χ²-difference" | "F";
}

/**
 * Compare 2 to 6 terms and choose: one more is taken while the test calls for it, unless leaving one band out explains the misfit
 * better, so that a single perturbed band does not buy a term. null when the bands do not determine the least number.
 */
export function chooseTerms(series: Series, model: Model, options: AnalysisOptions): Choice | null {
  // Constants held or known from elsewhere are in any case among the terms.
  const least = model.prepare([], { ...options, terms: model.terms!.least }).parameters.length;
  const { most } = model.terms!;
  const fits: Solution[] = [];
  for (let terms = least; terms <= most; terms++) {
    const solution = trySolve(series, model, { ...options, terms, excess: "none", scatter: null, robust: null });
    if (solution === null || solution.stated.degreesOfFreedom < 0) break;
    fits.push(solution);
  }
  if (fits.length === 0) return null;
  const steps = fits.map((fit, i) => (i === 0 ? null : stepTest(fits[i - 1]!, fit)));
  let chosen = 0;
  while (chosen + 1 < fits.length) {
    const step = steps[chosen + 1];
    const here = fits[chosen]!;
    if (step == null) break;
    if (betterThanTerm(standsOut(here), here, fits[chosen + 1]!)) break;
    if (step.probability >= (here.sigmaKnown ? TERM_LEVEL.known : TERM_LEVEL.unknown)) break;
    chosen++;
  }
  const comparison = fits.map((fit, i) => rowOf(fit, steps[i] ?? null, i === chosen));
  return { terms: least + chosen, comparison, warnings: verdict(fits, chosen, model) };
}

/** What the tests need of a solution. */
export type Stated = Pick<Solution, "stated" | "sigmaKnown">;

/** The test of one more constant; null when nothing is left to test it with. */
export function stepTest(fewer: Stated, more: Stated): Step | null {
  if (!fewer.sigmaKnown && fewer.stated.exact) return null;
  const gain = Math.max(0, fewer.stated.chiSquare - more.stated.chiSquare);
  if (fewer.sigmaKnown) {
    if (fewer.stated.degreesOfFreedom < 1) return null;
    return { statistic: gain, probability: chiSquareUpperTail(gain, 1), kind: "χ²-difference" };
  }
  const dof = more.stated.degreesOfFreedom;
  if (dof < 1) return null;
  const statistic = gain / (more.stated.chiSquare / dof);
  return { statistic, probability: fUpperTail(statistic, 1, dof), kind: "F" };
}

function rowOf(fit: Solution, step: Step | null, chosen: boolean): ComparisonRow {
  const { stated, sigmaKnown, probability, tests, used } = fit;
  const left = tests().leftOut.filter((e) => e !== null);
  return {
    terms: stated.values.length,
    degreesOfFreedom: stated.degreesOfFreedom,
    chiSquare: sigmaKnown ? stated.chiSquare : null,
    probability,
    rms: Math.sqrt(stated.residuals.reduce((sum, r) => sum + r * r, 0) / used.length),
    ...informationCriteria(sigmaKnown, stated.chiSquare, used.length, stated.values.length),
    leaveOneOutRms: left.length < used.length ? null : Math.sqrt(left.reduce((sum, e) => sum + e * e, 0) / left.length),
    step: step === null ? null : { ...step },
    chosen,
  };
}

function verdict(fits: readonly Solution[], chosen: number, model: Model): Warning[] {
  const here = fits[chosen]!;
  const terms = here.stated.values.length;
  const warnings: Warning[] = [];
  if (standsOut(here) === null && here.probability !== null && here.probability < IMPROBABLE)
    warnings.push({
      code: "no-terms-pass",
      message: `${terms} terms were chosen, but their χ² is still improbable (${here.probability.toPrecision(2)}) and no further term mends it; the bands or their σ deserve a look`,
    });
  if (here.stated.degreesOfFreedom < 2 && terms < model.terms!.most)
    warnings.push({
      code: "terms-undecided",
      message: `with ${here.used.length} bands nothing can decide whether more than ${terms} terms are needed; add a band to test it`,
    });
  return warnings;
}
