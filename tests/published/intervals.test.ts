import { describe, expect, it } from "vitest";
import {
  fitNonlinear,
  loadNonlinearCore,
  profileInterval,
  propagateDistributions,
  shortestInterval,
  symmetricInterval,
} from "../../src/fitting/index.ts";
import { coverageFactor } from "../../src/quantity/index.ts";

// The package behind the core is loaded on request.
await loadNonlinearCore();

describe("profile likelihood, Puromycin (treated), Bates & Watts 1988 (READ)", () => {
  const c = [0.02, 0.02, 0.06, 0.06, 0.11, 0.11, 0.22, 0.22, 0.56, 0.56, 1.1, 1.1];
  const y = [76, 47, 97, 107, 123, 139, 159, 152, 191, 201, 207, 200];
  const model = (p: readonly number[]) => c.map((x) => (p[0]! * x) / (p[1]! + x));
  const jacobian = (p: readonly number[]) => c.map((x) => [x / (p[1]! + x), (-p[0]! * x) / (p[1]! + x) ** 2]);
  const fit = fitNonlinear({ y, model, jacobian, start: [200, 0.1] });

  it("fit: 212.684(6.947), 0.0641213(0.008281), RSS 1195.4488", () => {
    // half a unit of the last printed digit
    expect(Math.abs(fit.values[0]! - 212.684)).toBeLessThan(5e-4);
    expect(Math.abs(fit.values[1]! - 0.0641213)).toBeLessThan(5e-8);
    expect(Math.abs(fit.standardUncertainties![0]! - 6.947)).toBeLessThan(5e-4);
    expect(Math.abs(fit.standardUncertainties![1]! - 0.008281)).toBeLessThan(5e-7);
    expect(Math.abs(fit.residualSumOfSquares - 1195.4488)).toBeLessThan(5e-5);
  });

  it("95 % profile limits: Vm [197.301933, 229.289055], K [0.0469203, 0.0861569]", () => {
    const variance = fit.chiSquare / fit.degreesOfFreedom;
    const request = {
      y,
      model,
      jacobian,
      best: fit.values,
      deviations: fit.standardUncertainties!,
      chiSquare: fit.chiSquare,
      variance,
    };
    const factor = coverageFactor(0.95, fit.degreesOfFreedom);
    const expected = [
      [197.301933, 229.289055],
      [0.0469203, 0.0861569],
    ];
    expected.forEach(([low, high], k) => {
      const unit = [0, 1].map((j) => Number(j === k));
      const { low: lo, high: hi } = profileInterval(request, { value: (p) => p[k]!, gradient: () => unit }, factor);
      // 2e-4 relative is asked; the stated digits are half a unit
      expect(Math.abs(lo! / low! - 1)).toBeLessThan(2e-6);
      expect(Math.abs(hi! / high! - 1)).toBeLessThan(2e-6);
    });
  });
});

describe("propagation of distributions", () => {
  const trials = 200_000;

  it("JCGM 101:2008, 9.2: the sum of four normals has ±3.92, of four rectangular ones ±3.88 (READ; analytic 3.879406741)", () => {
    const four = (draw: () => number) => draw() + draw() + draw() + draw();
    const half = Math.sqrt(3);
    const gauss = propagateDistributions(
      (r) => four(r.normal),
      (x) => x,
      trials,
      1,
    );
    const rectangular = propagateDistributions(
      (r) => four(() => half * (2 * r.uniform() - 1)),
      (x) => x,
      trials,
      1,
    );
    const [lo, hi] = symmetricInterval(gauss, 0.95)!;
    const [low, high] = symmetricInterval(rectangular, 0.95)!;
    // standard error of a 2.5 % quantile of 2e5 trials: √(0.025·0.975/2e5)/density(0.03) ≈ 0.012; three of them
    for (const [value, exact] of [
      [-lo, 3.919927969],
      [hi, 3.919927969],
      [-low, 3.879406741],
      [high, 3.879406741],
    ] as const)
      expect(Math.abs(value - exact)).toBeLessThan(0.036);
  });

  it("NPL report DEM-ES-011: y = ln x, x uniform on (0.1, 1.1): -0.664900, 0.606227, shortest interval (-1.895, 0.095) (READ)", () => {
    const y = propagateDistributions((r) => 0.1 + r.uniform(), Math.log, trials, 2);
    // three standard errors of the mean: 3·0.606/√2e5
    expect(Math.abs(y.mean + 0.6649)).toBeLessThan(0.0041);
    expect(Math.abs(y.standardUncertainty - 0.606227)).toBeLessThan(0.004);
    const [low, high] = shortestInterval(y, 0.95);
    // ends of shortest intervals vary like quantiles; density at the lower end e^-1.895 = 0.15
    expect(Math.abs(low + 1.895)).toBeLessThan(0.02);
    expect(Math.abs(high - 0.095)).toBeLessThan(0.005);
  });

  it("is the same for the same seed and another for another", () => {
    const draw = (seed: number) =>
      propagateDistributions(
        (r) => r.normal(),
        (x) => x,
        100,
        seed,
      ).mean;
    expect(draw(7)).toBe(draw(7));
    expect(draw(7)).not.toBe(draw(8));
  });
});
