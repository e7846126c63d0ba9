import { describe, expect, it } from "vitest";
import { diagnose, fitLinear } from "../../src/fitting/index.ts";
import { linearProblem, normal, seeded } from "./random.ts";

const next = normal(seeded(11));
const v = [1, 2, 3, 4, 5, 6];
const line = v.map((x) => [x, -x * (x + 1)]);
const data = v.map((x) => 3870 * x - 83 * x * (x + 1) + next());
const single = (n: number) => Array.from({ length: n }, (_, i) => [i]);

describe("residual tests", () => {
  it("leaving one band out is what a refit without it says", () => {
    const sigmas = [1, 0.5, 2, 1, 1, 3];
    const { leftOut } = diagnose(fitLinear(linearProblem(line, data, { sigmas })), single(6));
    v.forEach((_, i) => {
      const keep = v.flatMap((_, k) => (k === i ? [] : [k]));
      const rest = fitLinear(
        linearProblem(
          keep.map((k) => line[k]!),
          keep.map((k) => data[k]!),
          { sigmas: keep.map((k) => sigmas[k]!) },
        ),
      );
      const predicted = line[i]!.reduce((sum, x, k) => sum + x * rest.values[k]!, 0);
      // two QR solutions of condition ~50
      expect(Math.abs(leftOut[i]! - (data[i]! - predicted))).toBeLessThan(1e-7);
    });
  });

  it("repeats of a band leave together", () => {
    const x = [...line, line[5]!];
    const y = [...data, data[5]! + 0.7];
    const { leftOut } = diagnose(fitLinear(linearProblem(x, y)), [[0], [1], [2], [3], [4], [5, 6]]);
    const rest = fitLinear(linearProblem(line.slice(0, 5), data.slice(0, 5)));
    const predicted = line[5]!.reduce((sum, a, k) => sum + a * rest.values[k]!, 0);
    expect(Math.abs(leftOut[5]! - (y[5]! - predicted))).toBeLessThan(1e-7);
    expect(Math.abs(leftOut[6]! - (y[6]! - predicted))).toBeLessThan(1e-7);
  });

  it("with unknown σ the studentised residual is the left-out one over its own deviation", () => {
    const problem = linearProblem(line, data, { sigmas: null });
    const { studentized } = diagnose(fitLinear(problem), single(6));
    const keep = [0, 1, 2, 3, 5];
    const rest = fitLinear(
      linearProblem(
        keep.map((k) => line[k]!),
        keep.map((k) => data[k]!),
        { sigmas: null },
      ),
    );
    const x = line[4]!;
    const predicted = x.reduce((sum, a, k) => sum + a * rest.values[k]!, 0);
    const s2 = rest.chiSquare / rest.degreesOfFreedom;
    const variance =
      s2 + x.reduce((sum, a, k) => sum + a * rest.covariance![k]!.reduce((t, c, l) => t + c * x[l]!, 0), 0);
    // the textbook identity of deletion residuals (Cook & Weisberg 1982); rounding only
    expect(Math.abs(studentized[4]! - (data[4]! - predicted) / Math.sqrt(variance))).toBeLessThan(1e-7);
  });

  it("do not change with the order of rows under a shared error", () => {
    const order = [4, 2, 0, 5, 1, 3];
    const shared = [v.map((x) => 0.2 * x)];
    const a = diagnose(fitLinear(linearProblem(line, data, { shared })), single(6));
    const b = diagnose(
      fitLinear(
        linearProblem(
          order.map((i) => line[i]!),
          order.map((i) => data[i]!),
          { shared: [order.map((i) => shared[0]![i]!)] },
        ),
      ),
      single(6),
    );
    order.forEach((i, at) => {
      // rounding of a different order of sums
      expect(Math.abs(b.studentized[at]! - a.studentized[i]!)).toBeLessThan(1e-7);
      expect(Math.abs(b.leftOut[at]! - a.leftOut[i]!)).toBeLessThan(1e-7);
      expect(Math.abs(b.leverage[at]! - a.leverage[i]!)).toBeLessThan(1e-9);
    });
  });

  it("has nothing to test where a datum alone determines a constant", () => {
    const { studentized, leftOut } = diagnose(fitLinear(linearProblem(line.slice(0, 2), data.slice(0, 2))), single(2));
    expect(studentized).toEqual([null, null]);
    expect(leftOut).toEqual([null, null]);
  });

  it("with one degree of freedom and known σ all studentised residuals are equal in size", () => {
    const { studentized } = diagnose(fitLinear(linearProblem(line.slice(0, 3), data.slice(0, 3))), single(3));
    const sizes = studentized.map((t) => Math.abs(t!));
    // one direction of residual space is left: equal up to rounding
    expect(Math.max(...sizes) - Math.min(...sizes)).toBeLessThan(1e-7);
  });
});
