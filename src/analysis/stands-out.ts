import { studentUpperTail } from "../quantity/index.ts";
import type { Solution } from "./solution.ts";

/** A band that stands out from the rest. */
export interface Outlier {
  readonly label: string;
  readonly studentized: number;
  /** χ² (or the residual sum of squares) without it */
  readonly remaining: number;
}

/** Two-sided residual test with Bonferroni's correction: a band is named below this probability. */
const LEVEL = 0.01;
/**
 * A band left out must better a further constant by this much in χ² before it is blamed instead. Set by simulation on five bands with
 * known σ: with 5, a cubic term of five standard errors is taken in 97 % and a band off by ten σ (v = 1–4) is blamed in at least 96 %.
 */
const BAND_MARGIN = 5;

/** The band that stands out most, or null. With one degree of freedom all bands look alike, and none is named. */
export function standsOut({ used, tests, stated, sigmaKnown }: Solution): Outlier | null {
  if (stated.degreesOfFreedom < 2 || (!sigmaKnown && stated.exact)) return null;
  const { studentized } = tests();
  let worst = -1;
  studentized.forEach((t, i) => {
    if (t !== null && Math.abs(t) > Math.abs(studentized[worst] ?? 0)) worst = i;
  });
  const t = studentized[worst];
  if (t == null) return null;
  const dof = sigmaKnown ? null : stated.degreesOfFreedom - 1;
  if (2 * studentUpperTail(Math.abs(t), dof) * used.length > LEVEL) return null;
  // Leaving the band out lowers χ² by t²; without σ, t² is that drop over the variance that is left.
  const remaining = sigmaKnown ? stated.chiSquare - t * t : stated.chiSquare / (1 + (t * t) / dof!);
  return { label: used[worst]!.label, studentized: t, remaining: Math.max(0, remaining) };
}

/** Whether leaving the band out explains the misfit better than a further constant does. */
export function betterThanTerm(band: Outlier | null, here: Solution, more: Pick<Solution, "stated">): boolean {
  if (band === null) return false;
  const { sigmaKnown, stated } = here;
  if (sigmaKnown) return band.remaining + BAND_MARGIN < more.stated.chiSquare;
  return band.remaining * (1 + BAND_MARGIN / Math.max(1, stated.degreesOfFreedom - 1)) < more.stated.chiSquare;
}
