import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";
import { generator } from "./ladders.ts";
import { invert, normalEquations } from "./normal-equations.ts";

const file = (text: string) => ({ text, source: "bands.csv", format: "csv" as const });
const positions = (w: number, x: number, levels: readonly number[], noise: () => number = () => 0) =>
  levels.map((v) => [v, v * w - v * (v + 1) * x + noise()] as const);
const table = (series: Readonly<Record<string, readonly (readonly [number, number])[]>>, sigma = 0.1) =>
  [
    "series,band,position,sigma",
    ...Object.entries(series).flatMap(([name, bands]) =>
      bands.map(([v, position]) => `${name},${v}-0,${position},${sigma}`),
    ),
  ].join("\n");

describe("differences between series", () => {
  it("of independent series: the difference, and the root of the sum of squares", async () => {
    const text = table({ a: positions(3700, 80, [1, 2, 3, 4]), b: positions(3690, 81, [1, 2, 3]) });
    const { comparisons, series } = await fit({ input: file(text), terms: 2, excess: "none" });
    expect(comparisons.map(({ first, second }) => [first, second])).toEqual([["a", "b"]]);
    const [we, wexe, d0] = comparisons[0]!.differences;
    expect(Math.abs(we!.difference.value + 10)).toBeLessThan(1e-8);
    expect(Math.abs(wexe!.difference.value - 1)).toBeLessThan(1e-8);
    const u = (key: string) => Math.hypot(...series.map(({ constants }) => constants[key]!.standardUncertainty!));
    expect(Math.abs(we!.difference.standardUncertainty! / u("we") - 1)).toBeLessThan(1e-12);
    const [da, db] = series.map(({ dissociation }) => dissociation[0]!.d0!);
    expect(Math.abs(d0!.difference.value - (db!.value - da!.value))).toBeLessThan(1e-8);
    expect(
      Math.abs(
        d0!.difference.standardUncertainty! / Math.hypot(da!.standardUncertainty!, db!.standardUncertainty!) - 1,
      ),
    ).toBeLessThan(1e-12);
  });

  it("an error that grows with v, common to both, drops out: they differ as if it were not there", async () => {
    const text = table({ a: positions(3700, 80, [1, 2, 3, 4]), b: positions(3690, 81, [1, 2, 3, 4]) });
    const request: FitRequest = { input: file(text), terms: 2, excess: "none" };
    const plain = (await fit(request)).comparisons[0]!;
    const tied = (await fit({ ...request, perQuantumSigma: 5 })).comparisons[0]!;
    tied.differences.slice(0, 2).forEach(({ difference }, k) => {
      // Cholesky of V with a common part of two hundred σ keeps eight digits
      expect(
        Math.abs(difference.standardUncertainty! / plain.differences[k]!.difference.standardUncertainty! - 1),
      ).toBeLessThan(1e-5);
    });
    expect(tied.commonErrors).toEqual(["per-quantum"]);
  });

  it("an offset common to both: the variance of W_b·y_b - W_a·y_a under the covariance of all bands", async () => {
    const bands = { a: positions(3700, 80, [1, 2, 3, 4]), b: positions(3690, 81, [1, 2, 3]) };
    const { comparisons } = await fit({ input: file(table(bands)), terms: 2, excess: "none", sharedSigma: 0.2 });
    const weights = Object.values(bands).map((all) => {
      const x = all.map(([v]) => [v, -v * (v + 1)]);
      const v = all.map((_, i) => all.map((__, j) => (i === j ? 0.01 : 0) + 0.04));
      const inverse = invert(v);
      const xv = [0, 1].map((k) => inverse.map((row) => row.reduce((sum, c, j) => sum + c * x[j]![k]!, 0)));
      const gram = xv.map((row) => [0, 1].map((k) => row.reduce((sum, c, i) => sum + c * x[i]![k]!, 0)));
      const det = gram[0]![0]! * gram[1]![1]! - gram[0]![1]! ** 2;
      return xv[0]!.map((c, i) => (gram[1]![1]! * c - gram[0]![1]! * xv[1]![i]!) / det);
    });
    const [a, b] = weights;
    const own = [...a!, ...b!].reduce((sum, w) => sum + 0.01 * w * w, 0);
    const sums = [a!, b!].map((w) => w.reduce((sum, x) => sum + x, 0));
    const expected = Math.sqrt(own + 0.04 * (sums[1]! - sums[0]!) ** 2);
    expect(Math.abs(comparisons[0]!.differences[0]!.difference.standardUncertainty! / expected - 1)).toBeLessThan(1e-8);
  });

  it("probabilities are uniform where there is no difference: 400 pairs, Kolmogorov–Smirnov, σ known and unknown", async () => {
    for (const known of [true, false]) {
      const p: number[] = [];
      for (let seed = 1; seed <= 400; seed++) {
        const { normal: deviate } = generator(seed * 7919);
        const make = () => positions(3700, 80, [1, 2, 3, 4, 5], () => 0.1 * deviate());
        const text = known ? table({ a: make(), b: make() }) : table({ a: make(), b: make() }).replaceAll(",0.1", ",");
        const { comparisons } = await fit({ input: file(text), terms: 2, excess: "none" });
        p.push(comparisons[0]!.differences[0]!.probability!);
      }
      p.sort((a, b) => a - b);
      const distance = Math.max(
        ...p.map((x, i) => Math.max(Math.abs(x - i / p.length), Math.abs(x - (i + 1) / p.length))),
      );
      // 1.63/√400 is the 1 % point with σ known; Welch–Satterthwaite with three degrees of freedom each is conservative by up to 0.02
      expect(distance).toBeLessThan(1.63 / 20 + (known ? 0 : 0.02));
    }
  });

  it("against constants from elsewhere, with their uncertainties and correlation", async () => {
    const request: FitRequest = { series: "2885.98 5667.98 8346.78 10922.8", sigma: 0.05, terms: 2, excess: "none" };
    const { comparisons, series } = await fit({ ...request, compare: "we=2989.0(3) wexe=51.70(5)", correlation: 0.9 });
    const [one] = comparisons;
    expect([one!.first, one!.second]).toEqual(["given constants", "oscillator"]);
    const we = series[0]!.constants.we!;
    expect(Math.abs(one!.differences[0]!.difference.value - (we.value - 2989))).toBeLessThan(1e-9);
    expect(
      Math.abs(one!.differences[0]!.difference.standardUncertainty! / Math.hypot(we.standardUncertainty!, 0.3) - 1),
    ).toBeLessThan(1e-12);
    // dD0 = (ω/2ωx - ½)·dω - (ω²/4ωx² - ¼)·dωx
    const [a, b] = [2989 / (2 * 51.7) - 0.5, -((2989 / (2 * 51.7)) ** 2 - 0.25)];
    const given = Math.sqrt((a * 0.3) ** 2 + (b * 0.05) ** 2 + 2 * 0.9 * a * b * 0.3 * 0.05);
    const d0 = series[0]!.dissociation[0]!.d0!;
    expect(
      Math.abs(one!.differences[2]!.difference.standardUncertainty! / Math.hypot(given, d0.standardUncertainty!) - 1),
    ).toBeLessThan(1e-9);
  });

  it.each([
    ["no number", { compare: "we=x wexe=1" }, "compare"],
    ["an unknown constant", { compare: "w=1 wx=1" }, "compare"],
    ["one constant", { compare: "we=2990" }, "compare"],
    ["a gap", { compare: "we=2990 weye=0.1" }, "compare"],
    ["a constant twice", { compare: "we=2990 we=2991 wexe=52" }, "compare"],
    ["a correlation of nothing", { correlation: 0.9 }, "correlation-alone"],
    [
      "a correlation without uncertainties",
      { compare: "we=2990 wexe=52", correlation: 0.9 },
      "correlation-without-uncertainty",
    ],
    ["a correlation above one", { compare: "we=2990(1) wexe=52(1)", correlation: 2 }, "correlation"],
    ["a model whose constants are not compared", { compare: "d=1 vd=2", model: "near-limit", power: 5 }, "compare"],
  ])("refuses %s", async (_, more, code) => {
    const error = await fit({ series: "2885.98 5667.98 8346.78", ...more }).catch((wrong: unknown) => wrong);
    expect((error as InputError).faults[0]!.code).toBe(code);
  });
});

describe("a constant shared between series", () => {
  it("gives what one fit of all bands with that constant in common gives (normal equations), also for a bond with one band", () => {
    return fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1e6 }), async (seed) => {
        const { normal: deviate } = generator(seed);
        const noise = () => 0.1 * deviate();
        const bonds = {
          a: positions(3700, 80, [1, 2, 3], noise),
          b: positions(3650, 80, [1, 2], noise),
          c: positions(3600, 80, [1], noise),
        };
        const { series } = await fit({ input: file(table(bonds)), share: "wexe", excess: "none" });
        const rows: number[][] = [];
        const right: number[] = [];
        Object.values(bonds).forEach((bands, i) => {
          for (const [v, position] of bands) {
            rows.push([0, 1, 2].map((k) => (k === i ? v / 0.1 : 0)).concat((-v * (v + 1)) / 0.1));
            right.push(position / 0.1);
          }
        });
        const { solution, inverse } = normalEquations(rows, right);
        series.forEach(({ constants }, i) => {
          // normal equations with condition numbers near 1e6 keep nine digits
          expect(Math.abs(constants.we!.value - solution[i]!)).toBeLessThan(1e-6);
          expect(Math.abs(constants.wexe!.value - solution[3]!)).toBeLessThan(1e-6);
          expect(Math.abs(constants.we!.standardUncertainty! / Math.sqrt(inverse[i]![i]!) - 1)).toBeLessThan(1e-6);
          expect(Math.abs(constants.wexe!.standardUncertainty! / Math.sqrt(inverse[3]![3]!) - 1)).toBeLessThan(1e-6);
        });
      }),
      { seed: 8, numRuns: 20 },
    );
  });

  it("and so do the differences of the other constants", async () => {
    const { normal: deviate } = generator(5);
    const bonds = {
      a: positions(3700, 80, [1, 2, 3], () => 0.1 * deviate()),
      b: positions(3650, 80, [1], () => 0.1 * deviate()),
    };
    const { comparisons } = await fit({ input: file(table(bonds)), share: "wexe", excess: "none" });
    const rows = [
      ...bonds.a.map(([v]) => [v / 0.1, 0, (-v * (v + 1)) / 0.1]),
      ...bonds.b.map(([v]) => [0, v / 0.1, (-v * (v + 1)) / 0.1]),
    ];
    const { inverse } = normalEquations(
      rows,
      [...bonds.a, ...bonds.b].map(([, position]) => position / 0.1),
    );
    const expected = Math.sqrt(inverse[0]![0]! + inverse[1]![1]! - 2 * inverse[0]![1]!);
    expect(comparisons[0]!.differences.map(({ key }) => key)).toEqual(["we", "d0"]);
    expect(Math.abs(comparisons[0]!.differences[0]!.difference.standardUncertainty! / expected - 1)).toBeLessThan(1e-6);
  });

  it("is one number in all series even where they disagree: the scatter is that of all of them together", async () => {
    const text = table({
      a: positions(3700, 80, [1, 2, 3]),
      b: positions(3650, 84, [1, 2, 3]),
      c: positions(3600, 82, [1]),
    });
    const { series } = await fit({ input: file(text), share: "wexe" });
    const [a, b, c] = series.map(({ constants, quality }) => [constants.wexe!.value, quality.excess.value!] as const);
    // both are the same joint estimate, reached over different bands
    expect(Math.abs(a![0] - b![0])).toBeLessThan(1e-6);
    expect(Math.abs(a![0] - c![0])).toBeLessThan(1e-6);
    expect([b![1], c![1]]).toEqual([a![1], a![1]]);
    expect(a![1]).toBeGreaterThan(1);
  });

  it("with a spread lies between its own value and that of the others", async () => {
    const text = table({ a: positions(3700, 80, [1, 2, 3]), b: positions(3650, 81, [1, 2, 3]) });
    const wexe = async (share: string) =>
      (await fit({ input: file(text), share, excess: "none" })).series.map(({ constants }) => constants.wexe!.value);
    const [tight, loose] = [await wexe("wexe±0.01"), await wexe("wexe±10")];
    expect(Math.abs(tight[0]! - tight[1]!)).toBeLessThan(0.1);
    expect(Math.abs(loose[0]! - 80)).toBeLessThan(0.01);
    expect(Math.abs(loose[1]! - 81)).toBeLessThan(0.01);
  });

  const two = table({ a: positions(3700, 80, [1, 2, 3]), b: positions(3650, 80, [1, 2]) });
  it.each<[string, FitRequest, string, 2 | 3]>([
    ["one series", { series: "2885.98 5667.98", sigma: 0.1, share: "wexe" }, "share-one-series", 2],
    ["a constant there is not", { input: file(two), share: "wx" }, "unknown-constant", 2],
    ["no constant", { input: file(two), share: "±0.5" }, "share", 2],
    ["a word that is no constant", { input: file(two), share: "wexe and we" }, "unknown-constant", 2],
    ["a constant twice", { input: file(two), share: "wexe wexe" }, "share", 2],
    ["a spread of nothing", { input: file(two), share: "wexe±0" }, "share", 2],
    ["a number of terms left to the bands", { input: file(two), share: "wexe", terms: "auto" }, "share-not-with", 2],
    ["robust weights", { input: file(two), share: "wexe", robust: "tukey" }, "share-not-with", 2],
    ["shifts of groups", { input: file(two), share: "wexe", groups: "fitted" }, "share-not-with", 2],
    [
      "a model that is not linear in its constants",
      { input: file(two), share: "d", model: "near-limit", power: 5 },
      "share-not-possible",
      2,
    ],
    ["one that is fixed", { input: file(two), share: "wexe", fix: "wexe=80" }, "share-and-fix", 2],
    ["bands without σ", { input: file(two.replaceAll(",0.1", ",")), share: "wexe" }, "share-without-sigma", 2],
    [
      "bands that do not determine it",
      { input: file(table({ a: positions(3700, 80, [1]), b: positions(3650, 80, [1]) })), share: "wexe" },
      "share-undetermined",
      3,
    ],
  ])("refuses %s", async (_, request, code, exit) => {
    const error = await fit(request).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect([(error as InputError).faults[0]!.code, (error as InputError).exit]).toEqual([code, exit]);
  });
});
