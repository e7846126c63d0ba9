import { type Step, stepTest, TERM_LEVEL } from "./choice-of-terms.ts";
import { type Solution, trySolve } from "./solution.ts";

/** The fit with one more constant, and the test of it. */
export interface OneMore {
  readonly solution: Solution;
  readonly step: Step;
  readonly calledFor: boolean;
}

/** The fit with one more term beside the one given; null when there is none or nothing can test it. */
export function oneMoreTerm(solution: Solution): OneMore | null {
  const { model, series, options, stated, sigmaKnown } = solution;
  const terms = stated.values.length;
  if (model.terms === null || terms >= model.terms.most) return null;
  const more = trySolve(series, model, { ...options, terms: terms + 1, excess: "none", scatter: null, robust: null });
  const step = more === null ? null : stepTest(solution, more);
  if (more === null || step === null) return null;
  return { solution: more, step, calledFor: step.probability < TERM_LEVEL[sigmaKnown ? "known" : "unknown"] };
}
