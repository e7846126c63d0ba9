import { stepTest, TERM_LEVEL } from "./choice-of-terms.ts";
import { type Solution, trySolve } from "./solution.ts";

/** Evidence that one more constant is called for. */
export interface MoreTerms {
  readonly terms: number;
  /** probability that chance alone improves the fit as much */
  readonly probability: number;
  readonly test: "χ²-difference" | "F";
}

/** Whether the bands call for one more term than was fitted; null when they do not, or cannot tell. */
export function moreTermsCalledFor(solution: Solution): MoreTerms | null {
  const { model, series, options, stated, sigmaKnown } = solution;
  const terms = stated.values.length;
  if (model.terms === null || terms >= model.terms.most) return null;
  const more = trySolve(series, model, { ...options, terms: terms + 1, excess: "none", scatter: null });
  const step = more === null ? null : stepTest(solution, more);
  if (step === null || step.probability >= TERM_LEVEL[sigmaKnown ? "known" : "unknown"]) return null;
  return { terms: terms + 1, probability: step.probability, test: step.kind };
}
