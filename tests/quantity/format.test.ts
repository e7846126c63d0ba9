import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decimalsFor, formatFixed, formatMeasured, readMeasurement } from "../../src/quantity/index.ts";

const seeded = { seed: 20261204, numRuns: 1000 };

describe("a value with its standard uncertainty", () => {
  test.each([
    // JCGM 100:2008, 7.2.2: 100.021 47 g, u 0.35 mg
    [100.02147, 0.00035, "100.02147(35)"],
    // JCGM 100:2008, H.3: −0.1712(29), 0.002 18(67), −0.1494(41)
    [-0.17120379013, 0.00287759784, "-0.1712(29)"],
    [0.00218269774, 0.00066793877, "0.00218(67)"],
    [-0.14937681273, 0.00413859575, "-0.1494(41)"],
    [2990.9463, 0.0529, "2990.946(53)"],
    [2990.9463, 0.02, "2990.946(20)"],
    // the digits cross the point: it is kept
    [-1.23, 3.4, "-1.2(3.4)"],
    [12.34, 1.2, "12.3(1.2)"],
    [1.23, 0.999, "1.2(1.0)"],
    // halves away from zero, on the decimal digits
    [0.3, 0.0995, "0.30(10)"],
    [1.005, 0.1, "1.01(10)"],
    [-1.005, 0.1, "-1.01(10)"],
    [2.5, 10, "3(10)"],
    [3.5, 10, "4(10)"],
    [0.45, 1.25, "0.5(1.3)"],
    // no decimals left
    [46506.4, 12.3, "46506(12)"],
    [46506, 99.6, "46510(100)"],
    [46506, 145.1, "46510(150)"],
    [46506, 9960, "47000(10000)"],
    // larger than the value
    [0.001, 340, "0(340)"],
    [0, 0.5, "0.00(50)"],
    [-0.004, 1, "0.0(1.0)"],
    // huge and tiny: one power of ten for both
    [86500123456789, 2e6, "8.65001235(20)e13"],
    [1.2345e-7, 1.2e-9, "1.235(12)e-7"],
    [0, 1e-9, "0.0(1.0)e-9"],
    [1.7e308, 1e307, "1.70(10)e308"],
  ])("%d, %d is %s", (value, u, text) => {
    expect(formatMeasured(value, u)).toBe(text);
  });

  test.each([
    [2990.94631, null, "2990.95"],
    [100, null, "100"],
    [-0.5, 0, "-0.5"],
    [0, null, "0"],
    [1234567, null, "1234570"],
    [1e-320, null, "1e-320"],
    [Number.NaN, 1, "—"],
    [Number.POSITIVE_INFINITY, null, "—"],
    [5, Number.NaN, "5(—)"],
    [5, -1, "5(—)"],
  ])("%d without a usable uncertainty (%d) is %s", (value, u, text) => {
    expect(formatMeasured(value, u)).toBe(text);
  });

  test.each([
    [-1.23, 3.4, "−1.2(3.4)"],
    [-1.2345e-7, 1.2e-9, "−1.235(12) × 10⁻⁷"],
    [86500123456789, 2e6, "8.65001235(20) × 10¹³"],
  ])("%d, %d is printed as %s", (value, u, text) => {
    expect(formatMeasured(value, u, { style: "print" })).toBe(text);
  });

  test("what is written is read back within the rounding of the last digit printed", () => {
    const size = fc.integer({ min: -9, max: 12 });
    fc.assert(
      fc.property(
        fc.double({ min: -10, max: 10, noNaN: true }),
        size,
        fc.double({ min: 1, max: 9.99, noNaN: true }),
        size,
        (m, e, w, f) => {
          const value = m * 10 ** e;
          const u = w * 10 ** f;
          const last = 10 ** -decimalsFor(u);
          const read = readMeasurement(formatMeasured(value, u));
          if (!read.ok) throw new Error(read.what);
          // half a unit of the last digit, with room for the rounding of doubles
          expect(Math.abs(read.value - value)).toBeLessThanOrEqual(last * 0.5 + Math.abs(value) * 1e-15);
          expect(Math.abs(read.sigma! - u)).toBeLessThanOrEqual(last * 0.5 * (1 + 1e-9));
          // in the printed style too, once its power of ten is typed
          expect(formatMeasured(value, u, { style: "print" }).split(" × ")[0]).toBe(
            formatMeasured(value, u).split("e")[0]!.replace("-", "−"),
          );
        },
      ),
      seeded,
    );
  });
});

test.each([
  [0.02, 3],
  [0.0994, 3],
  [0.0995, 2],
  [0.999, 1],
  [9.94, 1],
  [9.95, 0],
  [12.3, 0],
  [99.5, -1],
  [145.1, -1],
])("an uncertainty of %d keeps two digits with %d decimals", (u, decimals) => {
  expect(decimalsFor(u)).toBe(decimals);
});

describe("a fixed number of decimals", () => {
  test.each([
    [12, 3, "12.000"],
    [1.005, 2, "1.01"],
    [0.095, 2, "0.10"],
    [0.995, 2, "1.00"],
    [2.5, 0, "3"],
    [3.5, 0, "4"],
    [-2.5, 0, "-3"],
    [0.04, 0, "0"],
    [-0.001, 2, "0.00"],
    [-0, 1, "0.0"],
    [99.999, 2, "100.00"],
    [1e21, 1, "1000000000000000000000.0"],
    [1e-7, 3, "0.000"],
    [Number.NaN, 2, "—"],
  ])("%d to %d is %s", (value, decimals, text) => {
    expect(formatFixed(value, decimals)).toBe(text);
  });

  test("the minus may be the typographic one", () => {
    expect(formatFixed(-1.5, 1, { minus: "−" })).toBe("−1.5");
  });

  test("the text is the nearest decimal: never further off than half a unit of the last place", () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.integer({ min: 0, max: 8 }), (x, decimals) => {
        const text = formatFixed(x, decimals);
        expect(text).toMatch(decimals === 0 ? /^-?\d+$/ : new RegExp(`^-?\\d+\\.\\d{${decimals}}$`));
        expect(Math.abs(Number(text) - x)).toBeLessThanOrEqual(0.5 * 10 ** -decimals + Math.abs(x) * 1e-15);
      }),
      seeded,
    );
  });
});
