import fc from "fast-check";
import { beforeAll, describe, expect, it } from "vitest";
import { fitNonlinear, loadNonlinearCore } from "../../../src/fitting/index.ts";

beforeAll(loadNonlinearCore);

const x = [0, 1, 2, 3, 4, 5, 6, 7];
/** a·exp(-b·x) + c */
const decay = {
  model: ([a, b, c]: number[]) => x.map((t) => a! * Math.exp(-b! * t) + c!),
  jacobian: ([a, b]: number[]) => x.map((t) => [Math.exp(-b! * t), -a! * t * Math.exp(-b! * t), 1]),
};
const truth = [10, 0.5, 1];
const noise = [0.11, -0.07, 0.02, 0.09, -0.12, 0.05, -0.03, 0.04];
const y = decay.model(truth).map((v, i) => v + noise[i]!);

describe("fitNonlinear says truly whether it converged", () => {
  it("at a minimum, with a gradient that is nothing beside its parts", () => {
    const fit = fitNonlinear({ y, ...decay, start: [1, 1, 0] });
    expect(fit.converged).toBe(true);
    expect(fit.reason).toMatch(/^converged/);
    const r = decay.model(fit.values).map((v, i) => y[i]! - v);
    const columns = decay.jacobian(fit.values);
    for (let k = 0; k < 3; k++) {
      const column = columns.map((row) => row[k]!);
      const size = Math.hypot(...column) * Math.hypot(...r);
      // the offset of the stop rule is 1e-8 in units of the standard deviations
      expect(Math.abs(column.reduce((sum, d, i) => sum + d * r[i]!, 0))).toBeLessThan(1e-7 * size);
    }
  });

  it("not where a constant has no influence, which is named, and no uncertainties are given", () => {
    const fit = fitNonlinear({
      y,
      model: ([a, b]) => x.map((t) => a! * Math.exp(-0.5 * t) + 0 * b!),
      jacobian: () => x.map((t) => [Math.exp(-0.5 * t), 0]),
      start: [1, 1],
    });
    expect(fit.converged).toBe(false);
    expect(fit.reason).toBe("not converged: the data do not determine constant 2");
    expect(fit.covariance).toBeNull();
    expect(fit.standardUncertainties).toBeNull();
  });

  it("not where two constants do the same", () => {
    const fit = fitNonlinear({
      y,
      model: ([a, b]) => x.map((t) => (a! + b!) * Math.exp(-0.5 * t)),
      jacobian: () => x.map((t) => [Math.exp(-0.5 * t), Math.exp(-0.5 * t)]),
      start: [1, 2],
    });
    expect(fit.converged).toBe(false);
    expect(fit.reason).toMatch(/do not determine constant [12]/);
  });

  it.each([
    ["a start that is no number", [Number.NaN, 1, 0]],
    ["a model that overflows at the start", [1, -1000, 0]],
  ])("not from %s: the start comes back", (_, start) => {
    const fit = fitNonlinear({ y, ...decay, start });
    expect(fit.converged).toBe(false);
    expect(fit.reason).toBe("not converged: the model is not finite at the start");
    expect(fit.values).toEqual(start);
    expect(fit.covariance).toBeNull();
  });

  it("although the model is not finite on the way", () => {
    // ln of a negative number for b > 0.9: steps there must be refused, not followed
    const bounded = (p: number[]) => decay.model(p).map((v) => v + 0 * Math.log(0.9 - p[1]!));
    const fit = fitNonlinear({ y, model: bounded, jacobian: decay.jacobian, start: [1, 0.89, 0] });
    const free = fitNonlinear({ y, ...decay, start: [1, 0.89, 0] });
    expect(fit.converged).toBe(true);
    fit.values.forEach((v, k) => {
      // both stop within 1e-8 standard deviations of the same minimum
      expect(Math.abs(v - free.values[k]!)).toBeLessThan(1e-7 * free.standardUncertainties![k]!);
    });
  });

  it("not with derivatives of the wrong sign", () => {
    const fit = fitNonlinear({
      y,
      ...decay,
      jacobian: (p) => decay.jacobian(p).map((row) => row.map((d) => -d)),
      start: [5, 1, 0],
    });
    expect(fit.converged).toBe(false);
  });

  it("not where χ² falls for ever: a minimum at infinity", () => {
    const fit = fitNonlinear({
      y: [-1, -2, -3],
      model: ([a]) => [1, 2, 3].map((k) => k * Math.exp(-a!)),
      jacobian: ([a]) => [1, 2, 3].map((k) => [-k * Math.exp(-a!)]),
      start: [1],
    });
    expect(fit.converged).toBe(false);
  });

  it.each([
    ["a datum that is no number", { y: [...y.slice(1), Number.NaN] }],
    ["a σ of zero", { y, sigma: y.map((_, i) => (i === 3 ? 0 : 1)) }],
    ["too few σ", { y, sigma: [1, 1] }],
    ["a covariance of another size", { y, covariance: [[1]] }],
    [
      "fewer data than constants",
      {
        y: y.slice(0, 2),
        model: () => [1, 2],
        jacobian: () => [
          [1, 1, 1],
          [1, 1, 1],
        ],
      },
    ],
    ["a model with fewer values than data", { y, model: () => [1, 2, 3] }],
    ["a jacobian with too few columns", { y, jacobian: () => x.map(() => [1]) }],
  ])("refuses %s", (_, wrong) => {
    expect(() => fitNonlinear({ ...decay, start: [1, 1, 0], ...wrong })).toThrow(RangeError);
  });
});

describe("fitNonlinear with what is known of the data", () => {
  it("correlated errors and constants held: the fit of the constants left, with the others at their start", () => {
    const covariance = x.map((_, i) => x.map((_, j) => (i === j ? 0.01 : 0) + 0.0025));
    const held = fitNonlinear({ y, covariance, ...decay, start: [1, 0.5, 0], held: [false, true, false] });
    expect(held.converged).toBe(true);
    expect(held.values[1]).toBe(0.5);
    expect(held.covariance![1]).toEqual([0, 0, 0]);
    expect(held.degreesOfFreedom).toBe(6);
    // With b at its place the rest is linear: normal equations with the inverse of the covariance by Sherman-Morrison.
    const rows = x.map((t) => [Math.exp(-0.5 * t), 1]);
    const inverse = x.map((_, i) =>
      x.map((_, j) => (i === j ? 100 : 0) - (100 * 0.0025 * 100) / (1 + 0.0025 * 100 * x.length)),
    );
    const weighted = (a: number[], b: number[]) =>
      a.reduce((sum, u, i) => sum + u * b.reduce((part, w, j) => part + inverse[i]![j]! * w, 0), 0);
    const [p, q] = [rows.map((row) => row[0]!), rows.map((row) => row[1]!)];
    const [pp, pq, qq, py, qy] = [weighted(p, p), weighted(p, q), weighted(q, q), weighted(p, y), weighted(q, y)];
    const determinant = pp * qq - pq * pq;
    const a = (qq * py - pq * qy) / determinant;
    const c = (pp * qy - pq * py) / determinant;
    // normal equations in double precision are good to some 1e-12 here
    expect(Math.abs(held.values[0]! / a - 1)).toBeLessThan(1e-10);
    expect(Math.abs(held.values[2]! / c - 1)).toBeLessThan(1e-10);
    expect(Math.abs(held.covariance![0]![0]! / (qq / determinant) - 1)).toBeLessThan(1e-10);
    expect(Math.abs(held.covariance![0]![2]! / (-pq / determinant) - 1)).toBeLessThan(1e-10);
  });

  it("a diagonal covariance is the same as σ", () => {
    const sigma = x.map((t) => 0.05 + 0.01 * t);
    const one = fitNonlinear({ y, sigma, ...decay, start: [1, 1, 0] });
    const other = fitNonlinear({
      y,
      covariance: sigma.map((s, i) => sigma.map((_, j) => (i === j ? s * s : 0))),
      ...decay,
      start: [1, 1, 0],
    });
    one.values.forEach((v, k) => {
      // the stop rule leaves 1e-8 standard deviations
      expect(Math.abs(v - other.values[k]!)).toBeLessThan(1e-7 * one.standardUncertainties![k]!);
    });
  });

  it("the order and the unit of the data do not matter", () => {
    fc.assert(
      fc.property(
        fc.shuffledSubarray([0, 1, 2, 3, 4, 5, 6, 7], { minLength: 8 }),
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        (order, unit) => {
          const fit = fitNonlinear({
            y: order.map((i) => y[i]! * unit),
            model: (p) => order.map((i) => decay.model(p)[i]!),
            jacobian: (p) => order.map((i) => decay.jacobian(p)[i]!),
            start: [unit, 1, 0],
            typical: [unit, 1, unit],
          });
          const plain = fitNonlinear({ y, ...decay, start: [1, 1, 0] });
          expect(fit.converged).toBe(true);
          // twice the stop rule's 1e-8 standard deviations, with room for rounding
          expect(Math.abs(fit.values[1]! - plain.values[1]!)).toBeLessThan(1e-6 * plain.standardUncertainties![1]!);
        },
      ),
      { seed: 4, numRuns: 50 },
    );
  });
});
