import { describe, expect, it } from "vitest";
import { fitNonlinear, loadNonlinearCore } from "../../src/fitting/index.ts";
import { nistSets } from "./nist-sets.ts";

// The package behind the core is loaded on request.
await loadNonlinearCore();

/** Matching significant digits, the measure NIST recommends. */
const digits = (value: number, certified: number) =>
  value === certified ? 15 : -Math.log10(Math.abs(value / certified - 1));

describe("NIST StRD nonlinear regression", () => {
  for (const set of nistSets)
    set.starts.forEach((start, which) => {
      it(`${set.name} (${set.status}), start ${which + 1}: at least ten certified digits`, () => {
        const fit = fitNonlinear({
          y: set.y,
          model: (p) => set.x.map((x) => set.model(p, x)),
          jacobian: (p) => set.x.map((x) => set.derivatives(p, x)),
          start,
        });
        expect(fit.converged).toBe(true);
        // the certified values are printed to 11 digits
        const least = (values: readonly number[], certified: readonly number[]) =>
          Math.min(...certified.map((c, k) => digits(values[k]!, c)));
        expect(least(fit.values, set.certified)).toBeGreaterThan(9.9);
        if (set.deviations !== null) expect(least(fit.standardUncertainties!, set.deviations)).toBeGreaterThan(9.9);
        if (set.residualSumOfSquares !== null)
          expect(digits(fit.residualSumOfSquares, set.residualSumOfSquares)).toBeGreaterThan(9.9);
      });
    });
});
