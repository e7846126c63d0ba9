import fc from "fast-check";
import jstat from "jstat";
import { describe, expect, test } from "vitest";
import {
  chiSquareUpperTail,
  coverageFactor,
  fUpperTail,
  interval,
  normalQuantile,
  normalUpperTail,
  studentT,
  studentUpperTail,
} from "../../src/quantity/index.ts";

const seeded = { seed: 20261206, numRuns: 200 };
const relative = (got: number, expected: number) => Math.abs(got / expected - 1);

// Reference values COMPUTED with 40-digit arithmetic from the incomplete beta and gamma functions, printed to 16 digits.
// The error documented is 1e-13 up to 30 degrees of freedom and 1e-12 up to 1000.
const exact = (dof: number | null) => (dof !== null && dof > 30 ? 1e-12 : 1e-13);

describe("coverage factors", () => {
  test.each([
    [0.5, 3, 0.7648923284043453],
    [0.6826894921370859, 4, 1.141626629090954],
    [0.99, 7, 3.499483297350493],
    [0.9973, 30, 3.270304796818602],
    [0.95, 1000, 1.962339080826408],
    [0.5, null, 0.6744897501960817],
    [0.9, null, 1.644853626951473],
    [0.99, null, 2.5758293035489],
    [0.999999, null, 4.891638475692932],
  ])("a level of %d with %d degrees of freedom needs %d", (level, dof, factor) => {
    expect(relative(coverageFactor(level, dof), factor)).toBeLessThan(exact(dof));
    // asked again it is the same number
    expect(coverageFactor(level, dof)).toBe(coverageFactor(level, dof));
  });

  const level = fc.double({ min: 0.01, max: 0.9999, noNaN: true });
  const dof = fc.option(fc.integer({ min: 1, max: 200 }), { nil: null });

  test("twice the upper tail beyond the factor is what the level leaves", () => {
    fc.assert(
      fc.property(level, dof, (covered, nu) => {
        const tail = 2 * studentUpperTail(coverageFactor(covered, nu), nu);
        // the tail is up to a hundred times as sensitive as the factor; 1 − level itself is good to 1e-12 at 0.9999
        expect(relative(tail, 1 - covered)).toBeLessThan(1e-11);
      }),
      seeded,
    );
  });

  test("they fall with the degrees of freedom, towards the normal one, and grow with the level", () => {
    fc.assert(
      fc.property(level, fc.integer({ min: 1, max: 200 }), (covered, nu) => {
        const factor = coverageFactor(covered, nu);
        expect(coverageFactor(covered, nu + 1)).toBeLessThan(factor);
        expect(factor).toBeGreaterThan(coverageFactor(covered, null));
        expect(coverageFactor((covered + 1) / 2, nu)).toBeGreaterThan(factor);
      }),
      seeded,
    );
  });

  test("levels outside 0 to 1 and degrees of freedom that are not positive are refused", () => {
    for (const bad of [0, 1, -0.5, 95, Number.NaN]) expect(() => coverageFactor(bad, 5)).toThrow(RangeError);
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => coverageFactor(0.95, bad)).toThrow(RangeError);
    }
    for (const bad of [0, 1, Number.NaN]) expect(() => normalQuantile(bad)).toThrow(RangeError);
  });

  test("an interval is the value ± factor × uncertainty", () => {
    expect(interval(10, 2, 0.95, null)).toEqual([
      10 - 2 * coverageFactor(0.95, null),
      10 + 2 * coverageFactor(0.95, null),
    ]);
    const [lo, hi] = interval(0, 1, 0.95, 1);
    // Student t, one degree of freedom, printed to 14 digits
    expect(relative(hi, 12.706204736175)).toBeLessThan(1e-13);
    expect(lo).toBe(-hi);
  });

  test("quantiles are odd about the median", () => {
    expect(normalQuantile(0.5)).toBe(0);
    // 0.1 and 1 − 0.9 differ by 3e-17
    expect(relative(-normalQuantile(0.1), normalQuantile(0.9))).toBeLessThan(1e-15);
    expect(relative(-studentT(0.1, 4), studentT(0.9, 4))).toBeLessThan(1e-14);
  });
});

describe("upper tails", () => {
  test.each([
    [0.001, 1, 0.9747728793699604],
    [3.8, 1, 0.05125258285736951],
    [2.5, 3, 0.4752910833430206],
    [40, 5, 1.493367900050395e-7],
    [900, 1000, 0.9892827619087103],
  ])("χ² exceeds %d with %d degrees of freedom in %d of cases", (x, dof, tail) => {
    expect(relative(chiSquareUpperTail(x, dof), tail)).toBeLessThan(exact(dof));
  });

  test.each([
    [0.5, 1, 2, 0.5527864045000421],
    [6.5, 1, 5, 0.05129663454101184],
    [3, 2, 10, 0.095367431640625],
    [25, 3, 4, 0.004725006242694196],
    [1.1, 5, 300, 0.3604361311886135],
  ])("F exceeds %d with %d and %d degrees of freedom in %d of cases", (x, above, below, tail) => {
    expect(relative(fUpperTail(x, above, below), tail)).toBeLessThan(exact(below));
  });

  test("χ² with two degrees of freedom is exponential", () => {
    for (const x of [0.01, 1, 5, 50]) expect(relative(chiSquareUpperTail(x, 2), Math.exp(-x / 2))).toBeLessThan(1e-13);
  });

  test("t with one degree of freedom is Cauchy's", () => {
    for (const x of [0.01, 1, 5, 50]) {
      expect(relative(studentUpperTail(x, 1), Math.atan(1 / x) / Math.PI)).toBeLessThan(1e-13);
    }
  });

  test("the ends are exact: nothing below zero, everything at infinity", () => {
    expect([chiSquareUpperTail(0, 3), fUpperTail(0, 2, 3), studentUpperTail(0, 4), normalUpperTail(0)]).toEqual([
      1, 1, 0.5, 0.5,
    ]);
    const far = Number.POSITIVE_INFINITY;
    expect([chiSquareUpperTail(far, 3), fUpperTail(far, 2, 3), studentUpperTail(far, 4), normalUpperTail(far)]).toEqual(
      [0, 0, 0, 0],
    );
    expect(studentUpperTail(-far, 4)).toBe(1);
  });

  test("they agree with a general library of statistics", () => {
    // jstat's own incomplete beta function stops at 3e-7 of the value
    const { jStat } = jstat;
    const x = fc.double({ min: 0.05, max: 12, noNaN: true });
    const dof = fc.integer({ min: 1, max: 60 });
    fc.assert(
      fc.property(x, dof, dof, (value, a, b) => {
        expect(Math.abs(chiSquareUpperTail(value, a) - 1 + jStat.chisquare.cdf(value, a))).toBeLessThan(3e-7);
        expect(Math.abs(fUpperTail(value, a, b) - 1 + jStat.centralF.cdf(value, a, b))).toBeLessThan(3e-7);
        expect(Math.abs(studentUpperTail(value, a) - 1 + jStat.studentt.cdf(value, a))).toBeLessThan(3e-7);
      }),
      seeded,
    );
  });
});
