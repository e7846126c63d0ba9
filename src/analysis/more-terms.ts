import { fitLinear, UndeterminedError } from "../fitting/index.ts";
import { type Stated, type Step, stepTest, TERM_LEVEL } from "./choice-of-terms.ts";
import { outsideWith, type Solution } from "./solution.ts";

/** The fit with one more constant, and the test of it. */
export interface OneMore {
  readonly solution: Stated;
  readonly step: Step;
  readonly calledFor: boolean;
}

/** The fit with one more term beside the one given; null when there is none or nothing can test it. */
export function oneMoreTerm(solution: Solution): OneMore | null {
  const { model, options, stated, sigmaKnown, used, errors } = solution;
  const terms = stated.values.length;
  if (model.terms === null || terms >= model.terms.most || stated.degreesOfFreedom < 1) return null;
  const observed = used.map((band) => band.position);
  try {
    const prepared = model.prepare(used, { ...options, terms: terms + 1 });
    const more = fitLinear({ ...prepared, observed, errors, ...outsideWith(prepared, observed, errors, options) });
    const step = stepTest(solution, { stated: more, sigmaKnown });
    if (step === null) return null;
    const calledFor = step.probability < TERM_LEVEL[sigmaKnown ? "known" : "unknown"];
    return { solution: { stated: more, sigmaKnown }, step, calledFor };
  } catch (error) {
    if (error instanceof UndeterminedError) return null;
    throw error;
  }
}
