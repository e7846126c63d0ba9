import { describe, expect, it } from "vitest";
import { birgeFactor, fitLinear, fitWithScatter, informationCriteria } from "../../src/fitting/index.ts";
import { linearProblem } from "./random.ts";

describe("residuals larger than the stated uncertainties", () => {
  it("the added scatter brings χ² to its degrees of freedom, also with unequal and shared errors", () => {
    const x = [1, 2, 3, 4, 5].map((v) => [v, -v * (v + 1)]);
    const y = [3707.467, 7250.519, 10631.683, 13853.629, 16920.02];
    for (const errors of [
      { sigmas: [0.001, 0.001, 0.002, 0.01, 0.1] },
      { sigmas: [0.01, 0.5, 0.01, 1, 0.01], shared: [[0.3, 0.3, 0.3, 0.3, 0.3]] },
    ]) {
      const problem = linearProblem(x, y, errors);
      const { fit, tau } = fitWithScatter(problem, fitLinear(problem));
      expect(tau).toBeGreaterThan(0.5);
      // the stop rule of the iteration
      expect(Math.abs(fit.chiSquare / fit.degreesOfFreedom - 1)).toBeLessThan(1e-9);
    }
  });

  it("Birge factor: 10 ± 4 and 30 ± 5 give 17.80 ± 3.12, b = 3.1235", () => {
    // COMPUTED worked example: weighted mean (10/16 + 30/25)/(1/16 + 1/25), χ² = 20²/(16 + 25), scaled u 9.756
    const fit = fitLinear(linearProblem([[1], [1]], [10, 30], { sigmas: [4, 5] }));
    const b = birgeFactor(fit);
    expect(fit.values[0]!).toBeCloseTo(730 / 41, 10);
    expect(Math.abs(b - 3.1235)).toBeLessThan(5e-5); // printed to five digits
    expect(Math.abs(Math.sqrt(fit.covariance![0]![0]!) * b - 9.756)).toBeLessThan(5e-4); // printed to four digits
  });

  it("the Birge factor never shrinks", () => {
    expect(birgeFactor(fitLinear(linearProblem([[1], [1], [1]], [10, 10.01, 9.99])))).toBe(1);
  });
});

describe("information criteria", () => {
  it("σ known: χ² + 2p, with no small-sample term", () => {
    expect(informationCriteria(true, 3.5, 5, 2)).toEqual({ aic: 7.5, aicc: null });
  });

  it("σ unknown: n ln(RSS/n) + 2K with K = p + 1, and the small-sample term where n > K + 1", () => {
    const { aic, aicc } = informationCriteria(false, 2, 6, 2);
    // the definition, evaluated by hand: 6 ln(1/3) + 6 and + 2·3·4/2
    expect(aic).toBeCloseTo(6 * Math.log(1 / 3) + 6, 12);
    expect(aicc).toBeCloseTo(6 * Math.log(1 / 3) + 18, 12);
    expect(informationCriteria(false, 2, 4, 2).aicc).toBeNull();
  });
});
