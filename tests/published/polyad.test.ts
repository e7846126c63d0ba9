import fc from "fast-check";
import { EigenvalueDecomposition, Matrix } from "ml-matrix";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { predict } from "../../src/commands/predict.ts";
import { InputError } from "../../src/messages/index.ts";
import { findModel, type Model } from "../../src/models/index.ts";
import { couplingElement } from "../../src/models/polyad/blocks.ts";
import { generator } from "../analysis/ladders.ts";
import { solveLinear } from "../analysis/normal-equations.ts";

const model = (await findModel("polyad")) as Model;
const options = { terms: null, fixed: {} } as const;
/** ws wb xss xbb xsb gbb ksbb */
const P = [3086, 1370, -64, -5, -24, 5, 100];
const levels = (p: readonly number[], upTo: number, bend: "degenerate" | "single" = "degenerate") =>
  model.manifold!({ ...options, bend }).levels(p, upTo);

/** N, l, energy, weight of the pure stretch (COMPUTED with numpy from the definition; the highest level first). */
const EXACT = `1,0,3037.736319,0.9528;1,0,2704.263681,0.0472;2,0,5959.520684,0.8323;2,0,5709.980911,0.1632;2,0,5340.498406,0.0045;
3,0,8785.366675,0.5247;3,0,8591.561700,0.4376;3,0,8299.930161,0.0369;3,0,7911.141464,0.0007;
4,0,11560.179424,0.1444;4,0,11341.925383,0.6257;4,0,11125.980323,0.2178;4,0,10814.831289,0.0119;4,0,10417.083580,0.0002;
5,0,14309.622277,0.0204;5,0,14015.448235,0.2563;5,0,13797.092329,0.5820;5,0,13572.718441,0.1357;5,0,13256.719622,0.0055;5,0,12858.399096,0.0001;
1.5,1,4398.446371,0.9152;1.5,1,4039.553629,0.0848;2.5,1,7318.721944,0.7386;2.5,1,7026.565863,0.2501;2.5,1,6642.712193,0.0113;
3.5,1,10151.656389,0.4333;3.5,1,9893.347651,0.4893;3.5,1,9578.078069,0.0751;3.5,1,9180.917891,0.0022`;

describe("exact polyads", () => {
  it("levels, numbering from the highest down, and stretch shares", () => {
    const all = levels(P, 5);
    const seen = new Map<string, number>();
    for (const row of EXACT.split(";")) {
      const [n, l, energy, share] = row.trim().split(",").map(Number) as [number, number, number, number];
      const j = (seen.get(`${n} ${l}`) ?? 0) + 1;
      seen.set(`${n} ${l}`, j);
      const level = all.find(({ label }) => label === `${n}_${j}${l > 0 ? `:${l}` : ""}`)!;
      // half a unit of the last printed digits
      expect(Math.abs(level.energy - energy)).toBeLessThan(5.1e-7);
      expect(Math.abs(level.share - share)).toBeLessThan(5.1e-5);
    }
  });

  it("two levels: 3022.0 and 2720.0 coupled by 70.710678 give 3037.736319 and 2704.263681", () => {
    const [low, high] = levels(P, 1).filter(({ label }) => label.startsWith("1_") && !label.includes(":"));
    expect(Math.abs(low!.uncoupled - 2720)).toBeLessThan(1e-9);
    expect(Math.abs(high!.uncoupled - 3022)).toBeLessThan(1e-9);
    expect(Math.abs(high!.energy - 3037.736319)).toBeLessThan(5e-7);
  });

  it("energies do not depend on the sign of k, and a degenerate level stands once", () => {
    const [plus, minus] = [P, P.map((x, k) => (k === 6 ? -x : x))].map((p) => levels(p, 4));
    plus!.forEach(({ energy }, i) => {
      expect(Math.abs(energy - minus![i]!.energy)).toBeLessThan(1e-8);
    });
    // N = 2 of a degenerate bend: v_b = 4, 2, 0 with l up to v_b, one of ±l: 3 + 2 + 1 levels
    expect(plus!.filter(({ numbers }) => numbers.N === 2)).toHaveLength(6);
  });
});

describe("the coupling element against an operator basis", () => {
  /** ⟨m|q²|n⟩ and ⟨m|q|n⟩ of a harmonic oscillator in its dimensionless coordinate, from the matrix of q in a basis long enough. */
  const size = 14;
  const q = Array.from({ length: size }, (_, m) =>
    Array.from({ length: size }, (_, n) =>
      m === n + 1 ? Math.sqrt((n + 1) / 2) : n === m + 1 ? Math.sqrt((m + 1) / 2) : 0,
    ),
  );
  const q2 = new Matrix(q).mmul(new Matrix(q)).to2DArray();

  it("single bend: k·q_s·q_b²", () => {
    for (const [s, b] of [
      [1, 0],
      [2, 0],
      [1, 1],
      [2, 3],
      [4, 5],
    ] as const) {
      const expected = q[s - 1]![s]! * q2[b + 2]![b]!;
      // rounding
      expect(Math.abs(Math.abs(couplingElement(s, b, 0, true)) - expected)).toBeLessThan(1e-12);
    }
  });

  it("degenerate bend: k·q_s·(q_x² + q_y²) between eigenstates of l", () => {
    // two-dimensional oscillator with v quanta: l² is diagonalised in the states |n, v-n⟩, and q_x² + q_y² taken between states of one |l|
    const states = (v: number) => Array.from({ length: v + 1 }, (_, n) => [n, v - n] as const);
    const eigen = (v: number, l: number) => {
      // l = i(a†_x a_y - a_x a†_y); in this basis l² is real and symmetric
      const basis = states(v);
      const lz = basis.map(([m]) =>
        basis.map(([n]) =>
          m === n + 1 ? Math.sqrt((n + 1) * (v - n)) : n === m + 1 ? -Math.sqrt(n * (v - n + 1)) : 0,
        ),
      );
      const square = new Matrix(lz).mmul(new Matrix(lz)).mul(-1);
      const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(square, { assumeSymmetric: true });
      return realEigenvalues.flatMap((value, i) =>
        Math.abs(value - l * l) < 1e-8 ? [eigenvectorMatrix.getColumn(i)] : [],
      );
    };
    const operator = (v: number) =>
      states(v + 2).map(([mx, my]) =>
        states(v).map(([nx, ny]) => (my === ny ? q2[mx]![nx]! : 0) + (mx === nx ? q2[my]![ny]! : 0)),
      );
    for (const [s, b, l] of [
      [1, 0, 0],
      [2, 0, 0],
      [1, 2, 0],
      [1, 1, 1],
      [2, 2, 2],
      [3, 3, 1],
    ] as const) {
      const [lower, upper] = [eigen(b, l), eigen(b + 2, l)];
      const matrix = operator(b);
      const overlaps = upper.map((up) =>
        lower.map((low) =>
          up.reduce((sum, x, i) => sum + x * matrix[i]!.reduce((inner, y, j) => inner + y * low[j]!, 0), 0),
        ),
      );
      // the sum of squares over ±l does not depend on how the pair is chosen
      const size2 = overlaps.flat().reduce((sum, x) => sum + x * x, 0) / lower.length;
      const expected = q[s - 1]![s]! * Math.sqrt(size2);
      expect(Math.abs(Math.abs(couplingElement(s, b, l, false)) - expected)).toBeLessThan(1e-9);
    }
    // printed for k = 1: (1,0,0) 0.70711, (2,0,0) 1, (1,2,0) 1.41421, (1,1,1) 1, (2,2,2) 1.73205, (3,3,1) 3 (COMPUTED)
    const printed = [
      [1, 0, 0, Math.SQRT1_2],
      [2, 0, 0, 1],
      [1, 2, 0, Math.SQRT2],
      [1, 1, 1, 1],
      [2, 2, 2, Math.sqrt(3)],
      [3, 3, 1, 3],
    ] as const;
    for (const [s, b, l, size3] of printed)
      expect(Math.abs(Math.abs(couplingElement(s, b, l, false)) - size3)).toBeLessThan(1e-12);
  });
});

describe("derivatives and fits", () => {
  it("Hellmann–Feynman against differences", () => {
    const manifold = model.manifold!(options);
    const step = 1e-4;
    const shifted = P.map((_, k) =>
      [1, -1].map(
        (sign) =>
          new Map(
            manifold
              .levels(
                P.map((x, j) => (j === k ? x + sign * step : x)),
                4,
              )
              .map(({ label, energy }) => [label, energy]),
          ),
      ),
    );
    for (const { label, gradient } of manifold.levels(P, 4))
      gradient.forEach((derivative, k) => {
        const difference = (shifted[k]![0]!.get(label)! - shifted[k]![1]!.get(label)!) / (2 * step);
        // 1e-6 of the largest derivative, v_b² = 64
        expect(Math.abs(derivative - difference)).toBeLessThan(64e-6);
      });
  });

  /** Twelve levels, l = 0 and 1. */
  const LABELS = ["1_1", "1_2", "2_1", "2_2", "2_3", "3_1", "3_2", "3_3", "1.5_1:1", "1.5_2:1", "2.5_1:1", "2.5_2:1"];
  const exact = new Map(levels(P, 3).map(({ label, energy }) => [label, energy]));

  it("100 synthetic polyads with 0.5 cm-1 noise: χ² of the constants follows χ²(7); naive reading biased by -9 % in ω̃x, deperturbed not", async () => {
    let [sum, squares, naive, deperturbed] = [0, 0, 0, 0];
    const seeds = 100;
    for (let seed = 1; seed <= seeds; seed++) {
      const { normal } = generator(seed * 31);
      const bands = LABELS.map((label) => `${label} ${(exact.get(label)! + 0.5 * normal()).toFixed(6)}`).join(", ");
      const { constants, covariance, deperturbation, fitReport } = (
        await fit({ bands, model: "polyad", sigma: 0.5, excess: "none", upTo: 2 })
      ).series[0]!;
      expect(fitReport.converged).toBe(true);
      const d = Object.values(constants).map(({ value }, k) => (k === 6 ? Math.abs(value) : value) - P[k]!);
      const x = solveLinear(covariance!, d);
      const chi = d.reduce((total, value, k) => total + value * x[k]!, 0);
      sum += chi;
      squares += chi * chi;
      naive += deperturbation!.naive!.wx / seeds;
      deperturbed += deperturbation!.constants.wx.value / seeds;
    }
    const mean = sum / seeds;
    // mean 7, variance 14: three standard deviations of the mean of a hundred
    expect(Math.abs(mean - 7)).toBeLessThan(3 * Math.sqrt(14 / seeds));
    const variance = squares / seeds - mean ** 2;
    // its variance: roughly 14 ± 14·√(2/100 + 12/(7·100)), three times
    expect(Math.abs(variance - 14)).toBeLessThan(3 * 14 * Math.sqrt(2 / seeds + 12 / (7 * seeds)));
    // E(2) - 2E(1) of the strongest: -115.95, so 57.98 against 64
    expect(Math.abs(naive / 64 - 1 + 0.094)).toBeLessThan(0.01);
    expect(Math.abs(deperturbed / 64 - 1)).toBeLessThan(0.01);
  });

  it("holds constants, and says once that the sign of k is not known", async () => {
    const bands = LABELS.filter((label) => !label.includes(":"))
      .map((label) => `${label} ${exact.get(label)}`)
      .join(", ");
    const { constants, warnings, held } = (await fit({ bands, model: "polyad", fix: "gbb=5", sigma: 0.5 })).series[0]!;
    expect(held).toEqual(["gbb"]);
    // levels in full precision; the fit stops within 1e-8 standard deviations
    expect(Math.abs(constants.ksbb!.value - 100)).toBeLessThan(1e-5);
    expect(Math.abs(constants.xss!.value + 64)).toBeLessThan(1e-5);
    expect(warnings.filter(({ code }) => code === "k-sign")).toHaveLength(1);
  });

  it("a single bend has levels without l, and its own coupling", async () => {
    const q = [3086, 1370, -64, -5, -24, 100];
    const { levels: all } = await predict({
      model: "polyad",
      bend: "single",
      constants: "ws=3086 wb=1370 xss=-64 xbb=-5 xsb=-24 ksbb=100",
      upTo: 1,
    });
    const [high, low] = ["1_1", "1_2"].map((label) => all!.find((level) => level.label === label)!.energy);
    const [a, b] = [q[0]! + q[2]!, 2 * q[1]! + 4 * q[3]!];
    // W = k·√½·½·√2 = k/2
    const half = Math.hypot((a - b) / 2, 50);
    expect(Math.abs(high! - ((a + b) / 2 + half))).toBeLessThan(1e-9);
    expect(Math.abs(low! - ((a + b) / 2 - half))).toBeLessThan(1e-9);
  });

  it("pure stretch shares of a polyad add to one", () => {
    fc.assert(
      fc.property(fc.double({ min: -150, max: 150, noNaN: true }), fc.integer({ min: 1, max: 5 }), (k, n) => {
        const all = levels(
          P.map((x, i) => (i === 6 ? k : x)),
          n,
        ).filter(({ numbers }) => numbers.N === n && numbers.l === 0);
        expect(Math.abs(all.reduce((total, { share }) => total + share, 0) - 1)).toBeLessThan(1e-10);
      }),
      { seed: 81, numRuns: 50 },
    );
  });

  it.each([
    ["a wrong parity of l", "2_1:1 5000, 1_1 3000", {}, "label", 2],
    ["l above v_b", "1_1:4 3000, 2_1 5000", {}, "label", 2],
    ["N neither whole nor half", "1.3_1 3000, 2_1 5000", {}, "label", 2],
    ["a level there is not", "1_3 3000, 2_1 5000", {}, "label", 2],
    ["a label of another kind", "1-0 3000, 2-0 5000", {}, "label", 2],
    ["l for a single bend", "1_1:2 3000, 2_1 5000", { bend: "single" }, "label", 2],
    ["another bend", "1_1 3000, 2_1 5000", { bend: "bent" }, "unknown-choice", 2],
  ] as const)("refuses %s", async (_, bands, more, code, exit) => {
    const error = await fit({ bands, model: "polyad", ...more }).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect([(error as InputError).faults[0]!.code, (error as InputError).exit]).toEqual([code, exit]);
  });

  it("names gbb when only levels of l = 0 are there: exit 3", async () => {
    const bands = ["1_1", "1_2", "2_1", "2_2", "2_3", "3_1", "3_2", "3_3"]
      .map((label) => `${label} ${exact.get(label)}`)
      .join(", ");
    await expect(fit({ bands, model: "polyad" })).rejects.toMatchObject({
      exit: 3,
      faults: [{ code: "not-determined", mend: expect.stringContaining("gbb") }],
    });
  });
});
