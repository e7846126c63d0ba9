import { inverse, Matrix } from "ml-matrix";
import { describe, expect, it } from "vitest";
import { fitLinear, UndeterminedError } from "../../src/fitting/index.ts";
import { linearProblem, normal, seeded } from "./random.ts";

const line = [1, 2, 3, 4, 5, 6].map((x) => [x, -x * (x + 1)]);
const data = [3700, 7240, 10610, 13820, 16880, 19770];

/** Textbook generalised least squares with explicit inverses (ml-matrix), as an independent path. */
function textbook(jacobian: number[][], y: number[], v: number[][]) {
  const x = new Matrix(jacobian);
  const w = inverse(new Matrix(v));
  const c = inverse(x.transpose().mmul(w).mmul(x));
  return { p: c.mmul(x.transpose()).mmul(w).mmul(Matrix.columnVector(y)).to1DArray(), c: c.to2DArray() };
}

describe("linear fit", () => {
  it("is generalised least squares: independent, tridiagonal and shared errors against explicit inverses", () => {
    const sigmas = [1, 2, 1.5, 0.5, 1, 3];
    const mixing = line.map((_, i) => line.map((_, k) => (k === i ? 1 : k === i - 1 ? -1 : 0)));
    const shared = [[0.7, 0.7, 0.7, -0.3, -0.3, -0.3]];
    const v = (m: number[][] | null) =>
      line.map((_, i) =>
        line.map((_, j) => {
          const independent = sigmas.reduce((sum, s, k) => {
            const mi = m === null ? Number(i === k) : m[i]![k]!;
            const mj = m === null ? Number(j === k) : m[j]![k]!;
            return sum + mi * mj * s * s;
          }, 0);
          return independent + shared[0]![i]! * shared[0]![j]!;
        }),
      );
    for (const m of [null, mixing]) {
      const fit = fitLinear(linearProblem(line, data, { sigmas, mixing: m, shared }));
      const expected = textbook(line, data, v(m));
      // explicit inverses lose about three digits at this condition
      fit.values.forEach((p, k) => {
        expect(Math.abs(p / expected.p[k]! - 1)).toBeLessThan(1e-9);
      });
      fit.covariance!.flat().forEach((c, k) => {
        expect(Math.abs(c / expected.c.flat()[k]! - 1)).toBeLessThan(1e-8);
      });
    }
  });

  it("holds a constant by leaving it out of the fit", () => {
    const fit = fitLinear(linearProblem(line, data, {}, [{}, { held: 80 }]));
    const one = fitLinear(
      linearProblem(
        line.map(([x]) => [x!]),
        data.map((y, i) => y - 80 * line[i]![1]!),
      ),
    );
    expect(fit.values[1]).toBe(80);
    // the same arithmetic, one column: rounding only
    expect(Math.abs(fit.values[0]! - one.values[0]!)).toBeLessThan(1e-9);
    expect(fit.covariance![1]).toEqual([0, 0]);
    expect(fit.degreesOfFreedom).toBe(5);
  });

  it("counts a prior as one more observation", () => {
    const withPrior = fitLinear(linearProblem(line, data, {}, [{}, { prior: { value: 81, sigma: 0.5 } }]));
    const extended = fitLinear(linearProblem([...line, [0, 1]], [...data, 81], { sigmas: [1, 1, 1, 1, 1, 1, 0.5] }));
    // two ways to build the same system: rounding only
    withPrior.values.forEach((p, k) => {
      expect(Math.abs(p - extended.values[k]!)).toBeLessThan(1e-8);
    });
    expect(withPrior.degreesOfFreedom).toBe(5);
    expect(Math.abs(withPrior.chiSquare / extended.chiSquare - 1)).toBeLessThan(1e-9);
  });

  it("weighs a prior against the residual variance when σ is unknown", () => {
    const fit = fitLinear(linearProblem(line, data, { sigmas: null }, [{}, { prior: { value: 81, sigma: 0.5 } }]));
    const s = Math.sqrt(fit.chiSquare / fit.degreesOfFreedom);
    const known = fitLinear(
      linearProblem(line, data, { sigmas: data.map(() => s) }, [{}, { prior: { value: 81, sigma: 0.5 } }]),
    );
    // the iteration stops at a relative change of 1e-12 in s; the constants follow it smoothly
    fit.values.forEach((p, k) => {
      expect(Math.abs(p - known.values[k]!)).toBeLessThan(1e-7);
    });
    expect(Math.abs(known.chiSquare / known.degreesOfFreedom - 1)).toBeLessThan(1e-8);
  });

  it("a shared error is a nuisance offset known to its σ: same constants, same covariance", () => {
    const sigmas = data.map(() => 0.3);
    const shared = fitLinear(linearProblem(line, data, { sigmas, shared: [data.map(() => 2)] }));
    const offset = fitLinear(
      linearProblem(
        line.map((row) => [...row, 1]),
        data,
        { sigmas },
        [{}, {}, { prior: { value: 0, sigma: 2 } }],
      ),
    );
    for (const k of [0, 1]) {
      // an identity of generalised least squares; rounding of two routes at this condition
      expect(Math.abs(shared.values[k]! / offset.values[k]! - 1)).toBeLessThan(1e-9);
      expect(Math.abs(shared.covariance![k]![k]! / offset.covariance![k]![k]! - 1)).toBeLessThan(1e-8);
    }
    expect(Math.abs(shared.chiSquare / offset.chiSquare - 1)).toBeLessThan(1e-8);
  });

  it("scales with the data: twice the positions, twice the constants", () => {
    const once = fitLinear(linearProblem(line, data));
    const twice = fitLinear(
      linearProblem(
        line,
        data.map((y) => 2 * y),
      ),
    );
    // a factor of two is exact in binary
    expect(twice.values).toEqual(once.values.map((p) => 2 * p));
  });

  it("does not depend on the order of rows, also under correlated errors", () => {
    const order = [3, 1, 5, 0, 2, 4];
    const next = normal(seeded(3));
    const noisy = data.map((y) => y + next());
    const shared = [data.map((_, i) => 0.4 + 0.1 * i)];
    const a = fitLinear(linearProblem(line, noisy, { shared }));
    const b = fitLinear(
      linearProblem(
        order.map((i) => line[i]!),
        order.map((i) => noisy[i]!),
        { shared: [order.map((i) => shared[0]![i]!)] },
      ),
    );
    // rounding of a different order of sums
    a.values.forEach((p, k) => {
      expect(Math.abs(p / b.values[k]! - 1)).toBeLessThan(1e-10);
    });
  });

  it("has no covariance when it is exactly determined and σ is unknown", () => {
    const fit = fitLinear(linearProblem(line.slice(0, 2), data.slice(0, 2), { sigmas: null }));
    expect(fit.covariance).toBeNull();
    expect(fit.degreesOfFreedom).toBe(0);
  });

  it("says which constant the data leave open", () => {
    const twice = linearProblem([line[0]!, line[0]!, line[0]!], [3700, 3701, 3699]);
    expect(() => fitLinear(twice)).toThrow(UndeterminedError);
    try {
      fitLinear(twice);
    } catch (error) {
      expect((error as UndeterminedError).parameter).toBe(1);
    }
  });
});
