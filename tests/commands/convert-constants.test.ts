import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { changeForm, forms } from "../../src/analysis/index.ts";
import { convertConstants } from "../../src/commands/convert-constants.ts";
import { fit } from "../../src/commands/fit.ts";
import { predict } from "../../src/commands/predict.ts";
import { InputError } from "../../src/messages/index.ts";

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const constants = fc.tuple(
  number(500, 4000),
  number(5, 100),
  number(-1, 1),
  number(-0.1, 0.1),
  number(-0.01, 0.01),
  number(-1e-3, 1e-3),
);

describe("forms of constants", () => {
  it("there and back give the same constants and covariance to 1e-12", () => {
    fc.assert(
      fc.property(
        constants,
        fc.integer({ min: 2, max: 6 }),
        fc.constantFrom(...forms),
        fc.array(number(-1, 1), { minLength: 36, maxLength: 36 }),
        (all, terms, form, random) => {
          const values = all.slice(0, terms);
          // any A·Aᵀ is a covariance; the diagonal keeps every uncertainty of one size
          const a = values.map((_, i) => values.map((__, j) => random[6 * i + j]! + (i === j ? 2 : 0)));
          const covariance = a.map((row) => a.map((other) => row.reduce((sum, x, k) => sum + x * other[k]!, 0)));
          const there = changeForm(values, covariance, forms[0]!, form);
          const back = changeForm(there.values, there.covariance, form, forms[0]!);
          back.values.forEach((value, k) => {
            // the bound of the issue, relative; a constant is mixed with those of higher powers only, and rounds with them
            const size = values.slice(k).reduce((sum, x) => sum + Math.abs(x), 0);
            expect(Math.abs(value - values[k]!)).toBeLessThanOrEqual(1e-12 * size);
          });
          back.covariance!.forEach((row, i) =>
            row.forEach((c, j) => {
              // the same bound, relative to the two uncertainties: an element itself may be next to nothing
              const size = Math.sqrt(covariance[i]![i]! * covariance[j]![j]!);
              expect(Math.abs(c - covariance[i]![j]!)).toBeLessThanOrEqual(1e-12 * size);
            }),
          );
        },
      ),
      { seed: 21, numRuns: 300 },
    );
  });

  it("every form gives the same positions, each by its own formula", () => {
    const p = [2990.95, 52.82, 0.224, -0.012];
    const g = (v: number) => p.reduce((sum, c, k) => sum + (k === 1 ? -c : c) * (v + 0.5) ** (k + 1), 0);
    const of = (name: string) => changeForm(p, null, forms[0]!, forms.find((form) => form.name === name)!).values;
    for (let v = 1; v <= 6; v++) {
      const position = g(v) - g(0);
      const polynomial = of("polynomial").reduce((sum, c, k) => sum + c * v ** (k + 1), 0);
      const plot = of("position-plot").reduce((sum, a, k) => sum + a * v ** k, 0);
      const spacing = of("spacing-plot").reduce((sum, b, k) => sum + b * (v + 0.5) ** k, 0);
      // rounding of numbers near 1e4
      expect(Math.abs(polynomial - position)).toBeLessThan(1e-10);
      expect(Math.abs(plot * v - position)).toBeLessThan(1e-10);
      expect(Math.abs(spacing - (g(v + 1) - g(v)))).toBeLessThan(1e-10);
    }
  });

  it("two constants: c1 = ω - ωx, c2 = -ωx; the Birge–Sponer line ω - ωx and -2ωx (Herzberg 1950)", () => {
    const of = (to: string) =>
      Object.values(convertConstants({ constants: "we=3000 wexe=50", to }).constants[0]!.constants).map(
        ({ value }) => value,
      );
    expect(of("polynomial")).toEqual([2950, -50]);
    expect(of("position-plot")).toEqual([2950, -50]);
    expect(of("spacing-plot")).toEqual([2950, -100]);
    expect(of("local")).toEqual([3000, 50]);
  });

  it("intercepts and slopes of a result are those the fit derives, uncertainties and all", async () => {
    const document = await fit({ series: "2885.98 5667.98 8346.78 10922.8", sigma: 0.05, terms: 2 });
    const stored = { text: JSON.stringify(document), source: "result.json" };
    const { derived } = document.series[0]!;
    const position = convertConstants({ stored, to: "position-plot" }).constants[0]!;
    const spacing = convertConstants({ stored, to: "spacing-plot" }).constants[0]!;
    const pairs = [
      [position.constants.a0!, derived!.positionPlotIntercept],
      [position.constants.a1!, derived!.positionPlotSlope],
      [spacing.constants.b0!, derived!.spacingPlotIntercept],
      [spacing.constants.b1!, derived!.spacingPlotSlope],
    ] as const;
    for (const [converted, derivedOne] of pairs) {
      expect(Math.abs(converted.value - derivedOne.value)).toBeLessThan(1e-9);
      expect(Math.abs(converted.standardUncertainty! / derivedOne.standardUncertainty! - 1)).toBeLessThan(1e-9);
    }
  });

  it("a correlation given is used, in conversion and in prediction", async () => {
    const both = "we=2990.95(10) wexe=52.82(3)";
    const {
      constants: [one],
    } = convertConstants({ constants: both, correlation: 0.98, to: "polynomial" });
    // u² of ω - ωx
    const expected = Math.sqrt(0.1 ** 2 + 0.03 ** 2 - 2 * 0.98 * 0.1 * 0.03);
    expect(Math.abs(one!.constants.c1!.standardUncertainty! / expected - 1)).toBeLessThan(1e-12);
    const { predictions, warnings } = await predict({ constants: both, correlation: 0.98, upTo: 3 });
    const third = Math.sqrt((3 * 0.1) ** 2 + (12 * 0.03) ** 2 - 2 * 0.98 * 3 * 0.1 * 12 * 0.03);
    expect(Math.abs(predictions[2]!.position.standardUncertainty! / third - 1)).toBeLessThan(1e-12);
    expect(warnings).toEqual([]);
  });

  it.each([
    [{ constants: "we=2990 wexe=52", to: "nm" }, "unknown-form"],
    [{ constants: "", to: "local" }, "constants"],
    [{ constants: "we=2990 c2=52", to: "local" }, "constants"],
    [{ constants: "wexe=52", to: "local" }, "constants"],
    [{ constants: "we=2990 we=2991", to: "local" }, "constants"],
    [{ constants: "we=x wexe=52", to: "local" }, "constants"],
    [{ constants: "we=2990 wexe=52", correlation: 0.9, to: "local" }, "correlation-without-uncertainty"],
    [{ constants: "we=2990(1) wexe=52(1)", correlation: 1.2, to: "local" }, "correlation"],
    [{ constants: "we=2990(1) wexe=52(1) weye=1(1)", correlation: "0.9", to: "local" }, "correlation"],
    [{ constants: "we=2990(1) wexe=52(1) weye=1(1)", correlation: "0.9 0.9 -0.9", to: "local" }, "correlation"],
    [{ stored: { text: "{}", source: "x.json" }, to: "local" }, "not-a-result"],
    [{ stored: { text: "x", source: "x.json" }, to: "local" }, "not-a-result"],
  ])("refuses %j", (request, code) => {
    let error: unknown = null;
    try {
      convertConstants(request);
    } catch (wrong) {
      error = wrong;
    }
    expect(error).toBeInstanceOf(InputError);
    expect((error as InputError).faults[0]!.code).toBe(code);
  });
});

describe("constants to predict from", () => {
  it.each([
    ["a constant twice", { constants: "we=2990 we=2991 wexe=52" }, "constants"],
    ["a correlation of bands", { series: "2885.98 5667.98 8346.78", correlation: 0.9 }, "correlation-alone"],
    [
      "a correlation without uncertainties",
      { constants: "we=2990 wexe=52", correlation: 0.9 },
      "correlation-without-uncertainty",
    ],
  ])("are refused with %s", async (_, request, code) => {
    const error = await predict(request).catch((wrong: unknown) => wrong);
    expect((error as InputError).faults[0]!.code).toBe(code);
  });

  it("a correlation is refused where a result.json carries its own", () => {
    const stored = { text: "{}", source: "result.json" };
    expect(() => convertConstants({ stored, correlation: 0.5, to: "local" })).toThrow(InputError);
  });
});
