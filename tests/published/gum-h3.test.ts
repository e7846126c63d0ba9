import { describe, expect, it } from "vitest";
import { fitLinear } from "../../src/fitting/index.ts";
import { linearProblem } from "../fitting/random.ts";

// JCGM 100:2008 (GUM), example H.3: calibration of a thermometer, b = y1 + y2 (t - 20). Status READ (table H.6).
const t = [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.01, 26.511];
const b = [-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.16];

describe("GUM example H.3", () => {
  const fit = fitLinear(
    linearProblem(
      t.map((x) => [1, x - 20]),
      b,
      { sigmas: null },
    ),
  );
  const [[v1, cov], [, v2]] = fit.covariance as [[number, number], [number, number]];

  it("gives the full intercept, slope, uncertainties and correlation (COMPUTED to ten digits)", () => {
    // half a unit of the last digit of the values stated
    expect(Math.abs(fit.values[0]! + 0.17120379013)).toBeLessThan(5e-12);
    expect(Math.abs(Math.sqrt(v1) - 0.00287759784)).toBeLessThan(5e-12);
    expect(Math.abs(fit.values[1]! - 0.00218269774)).toBeLessThan(5e-12);
    expect(Math.abs(Math.sqrt(v2) - 0.00066793877)).toBeLessThan(5e-12);
    expect(Math.abs(cov / Math.sqrt(v1 * v2) + 0.9304296)).toBeLessThan(5e-8);
    expect(Math.abs(Math.sqrt(fit.chiSquare / fit.degreesOfFreedom) - 0.00349756396)).toBeLessThan(5e-12);
    expect(fit.degreesOfFreedom).toBe(9);
  });

  it("predicts b(30) with the covariance, -0.1494(41) as printed", () => {
    const value = fit.values[0]! + 10 * fit.values[1]!;
    const u = Math.sqrt(v1 + 20 * cov + 100 * v2);
    expect(Math.abs(value + 0.14937681273)).toBeLessThan(5e-12); // COMPUTED digits
    expect(Math.abs(u - 0.00413859575)).toBeLessThan(5e-12);
    expect(value.toFixed(4)).toBe("-0.1494");
    expect(u.toFixed(4)).toBe("0.0041");
  });
});
