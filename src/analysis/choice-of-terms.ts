import type { Series } from "../bands/index.ts";
import { informationCriteria } from "../fitting/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { chiSquareUpperTail, fUpperTail } from "../quantity/index.ts";
import type { AnalysisOptions } from "./options.ts";
import type { ComparisonRow } from "./result.ts";
import { IMPROBABLE, type Solution, trySolve } from "./solution.ts";

/** Significance at which one more constant is called for: χ²-difference at 1 % (σ known), F test at 5 % (σ unknown). */
export const TERM_LEVEL = { known: 0.01, unknown: 0.05 } as const;
/**
 * A band left out must better a further constant by this much in χ² before it is blamed instead. Set by simulation on five bands with
 * known σ: with 5, a cubic term of five standard errors is taken in 97 % and a band off by ten σ (v = 1–4) is blamed in at least 96 %.
 */
const BAND_MARGIN = 5;

/** A number of terms with the evidence for it. */
export interface Choice {
  readonly terms: number;
  readonly comparison: readonly ComparisonRow[];
  /** a band whose removal explains the misfit better than a further constant */
  readonly suspect: string | null;
  readonly warnings: readonly Warning[];
}

/** One step from a number of terms to the next. */
interface Step {
  readonly statistic: number;
  readonly probability: number;
  readonly kind: "χ²-difference" | "F";
}

/**
 * Compare 2 to 6 terms and choose: one more is taken while the test calls for it, unless leaving one band out explains the misfit
 * better, so that a single perturbed band does not buy a term. null when the bands do not determine the least number.
 */
export function chooseTerms(series: Series, model: Model, options: AnalysisOptions): Choice | null {
  const { least, most } = model.terms!;
  const fits: Solution[] = [];
  for (let terms = least; terms <= most; terms++) {
    const solution = trySolve(series, model, { ...options, terms, excess: "none", scatter: null });
    if (solution === null || solution.stated.degreesOfFreedom < 0) break;
    fits.push(solution);
  }
  if (fits.length === 0) return null;
  const steps = fits.map((fit, i) => (i === 0 ? null : stepTest(fits[i - 1]!, fit)));
  let chosen = 0;
  let suspect: string | null = null;
  while (chosen + 1 < fits.length) {
    const step = steps[chosen + 1];
    const here = fits[chosen]!;
    if (step == null) break;
    suspect = suspectBand(here, fits[chosen + 1]!);
    if (suspect !== null) break;
    if (step.probability >= (here.sigmaKnown ? TERM_LEVEL.known : TERM_LEVEL.unknown)) break;
    chosen++;
  }
  const comparison = fits.map((fit, i) => rowOf(fit, steps[i] ?? null, i === chosen));
  return { terms: least + chosen, comparison, suspect, warnings: verdict(fits, chosen, suspect, model) };
}

/** The test of one more constant; null when nothing is left to test it with. */
export function stepTest(fewer: Solution, more: Solution): Step | null {
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

/** The band whose removal lowers χ² more than the further constant does, by the margin; null when there is none or nothing can tell. */
function suspectBand(here: Solution, more: Solution): string | null {
  const { stated, tests, used, sigmaKnown } = here;
  // With one degree of freedom every band and the constant explain the same.
  if (!sigmaKnown || stated.degreesOfFreedom < 2) return null;
  let worst = -1;
  tests.studentized.forEach((t, i) => {
    if (Math.abs(t ?? 0) > Math.abs(tests.studentized[worst] ?? 0)) worst = i;
  });
  const drop = (tests.studentized[worst] ?? 0) ** 2;
  if (worst < 0 || chiSquareUpperTail(drop, 1) * used.length >= TERM_LEVEL.known) return null;
  const gain = stated.chiSquare - more.stated.chiSquare;
  return drop > gain + BAND_MARGIN ? used[worst]!.label : null;
}

function rowOf(fit: Solution, step: Step | null, chosen: boolean): ComparisonRow {
  const { stated, sigmaKnown, probability, tests, used } = fit;
  const left = tests.leftOut.filter((e) => e !== null);
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

function verdict(fits: readonly Solution[], chosen: number, suspect: string | null, model: Model): Warning[] {
  const here = fits[chosen]!;
  const terms = here.stated.values.length;
  const warnings: Warning[] = [];
  if (suspect !== null)
    warnings.push({
      code: "band-or-term",
      message: `leaving ${suspect} out explains the misfit of ${terms} terms better than a further constant does: ${suspect} is a candidate for a resonance, a misread position or a wrong label; check it, or set use: no for it`,
      about: suspect,
    });
  else if (here.probability !== null && here.probability < IMPROBABLE)
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
