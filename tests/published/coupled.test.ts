import { readFileSync } from "node:fs";
import fc from "fast-check";
import { EigenvalueDecomposition, Matrix } from "ml-matrix";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { quarticOf } from "../../src/models/coupled/normal-modes.ts";
import { findModel, type Model } from "../../src/models/index.ts";

const model = (await findModel("coupled")) as Model;
const levels = (bonds: number, p: readonly number[], upTo: number) =>
  model.manifold!({ terms: null, fixed: {}, bonds }).levels(p, upTo);

/** Exact levels (COMPUTED with numpy/scipy from the definition; see the reference values of the project): V, orbit, species, energy, weight. */
const EXACT = [
  {
    bonds: 2,
    p: [3870, 83, -49.5],
    upTo: 5,
    rows: `1,10,A1,3654.500000,1.0000;1,10,B2,3753.500000,1.0000;2,20,A1,7195.810217,0.8212;2,20,B2,7242.000000,1.0000;2,11,A1,7454.189783,0.8212;
3,30,A1,10585.852152,0.9027;3,30,B2,10597.571132,0.9646;3,21,A1,10875.147848,0.9027;3,21,B2,11061.428868,0.9646;
4,40,A1,13799.394789,0.9560;4,40,B2,13801.041048,0.9646;4,31,A1,14227.446844,0.6641;4,31,B2,14336.958952,0.9646;4,22,A1,14595.158368,0.7007;
5,50,A1,16841.435560,0.9719;5,50,B2,16841.592337,0.9727;5,41,A1,17463.840539,0.7333;5,41,B2,17503.872578,0.9027;5,32,A1,17786.223901,0.7572;5,32,B2,18043.035084,0.9290`,
  },
  {
    bonds: 3,
    p: [2200, 38.5, -3.7],
    upTo: 4,
    rows: `1,100,A1,2115.600000,1.0000;1,100,E,2126.700000,1.0000;2,200,A1,4167.460490,0.9788;2,200,E,4168.662133,0.9958;2,110,A1,4240.139510,0.9788;2,110,E,4250.037867,0.9958;
3,300,A1,6137.424653,0.9960;3,300,E,6137.467545,0.9966;3,210,A1,6279.641478,0.9759;3,210,E,6285.863152,0.9982;3,210,E,6298.669302,0.9983;3,210,A2,6303.100000,1.0000;3,111,A1,6370.833869,0.9799;
4,400,A1,8029.517546,0.9979;4,400,E,8029.518454,0.9979;4,310,A1,8255.014346,0.9666;4,310,E,8256.608780,0.9848;4,310,E,8263.200908,0.9824;4,310,A2,8264.700000,1.0000;4,220,A1,8338.721027,0.9512;4,220,E,8339.892644,0.9692;4,211,A1,8402.247080,0.9748;4,211,E,8423.179215,0.9939`,
  },
  {
    bonds: 4,
    p: [2256, 34, -0.55],
    upTo: 3,
    rows: `1,1000,A1,2186.350000,1.0000;1,1000,F2,2188.550000,1.0000;2,2000,A1,4307.944879,0.9992;2,2000,F2,4307.982211,0.9997;2,1100,A1,4373.855121,0.9992;2,1100,F2,4376.017789,0.9997;2,1100,E,4377.100000,1.0000;
3,3000,A1,6359.979650,0.9998;3,3000,F2,6359.979874,0.9999;3,2100,A1,6493.714584,0.9983;3,2100,F2,6494.575281,0.9995;3,2100,E,6495.450000,1.0000;3,2100,F2,6496.860110,0.9999;3,2100,F1,6497.650000,1.0000;3,1110,A1,6562.455766,0.9985;3,1110,F2,6564.584734,0.9995`,
  },
] as const;

describe("levels of equivalent bonds, exact sets", () => {
  for (const { bonds, p, upTo, rows } of EXACT)
    it(`${bonds} bonds up to V = ${upTo}, by V, orbit, species and order from below`, () => {
      const all = levels(bonds, p, upTo);
      const expected = rows.split(";").map((row) => row.trim().split(","));
      expect(all).toHaveLength(expected.length);
      const seen = new Map<string, number>();
      for (const [total, orbit, species, energy, weight] of expected) {
        const nth = (seen.get(`${orbit}${species}`) ?? 0) + 1;
        seen.set(`${orbit}${species}`, nth);
        const ending = bonds === 2 ? (orbit![0] === orbit![1] ? "" : species === "A1" ? "+" : "-") : species!;
        const label = `${orbit}${ending}${nth > 1 ? `#${nth}` : ""}`;
        const level = all.find((one) => one.label === label)!;
        expect([label, level?.numbers]).toEqual([label, { V: Number(total), species }]);
        // half a unit of the last printed digits
        expect(Math.abs(level.energy - Number(energy))).toBeLessThan(5.1e-7);
        expect(Math.abs(level.share - Number(weight))).toBeLessThan(5.1e-5);
      }
    });
});

describe("published levels, three constants, unweighted (COMPUTED fits of levels from memory; see datasets/coupled)", () => {
  // values and standard errors as printed; the tolerance is half a unit of the last digit
  it.each([
    ["H2O, V ≤ 4", "h2o", 2, 4, [3853.5855, 78.7197, -41.8769], [5.3375, 1.4244, 2.4241], 12.933],
    ["H2O, V ≤ 3", "h2o", 2, 3, [3858.8302, 79.4406, -43.9046], [6.6641, 2.1009, 2.4553], 8.497],
    ["H2S, V ≤ 4", "h2s", 2, 4, [2715.506, 47.5038, -6.7226], [0.4518, 0.1133, 0.336], 1.085],
    ["AsH3, V ≤ 4", "ash3", 3, 4, [2198.4544, 38.2141, -3.7219], [0.316, 0.0753, 0.2269], 0.667],
    ["SiH4, V ≤ 4", "sih4", 4, 4, [2255.8242, 33.7731, -0.5234], [0.2644, 0.0596, 0.122], 0.37],
  ] as const)("%s", async (_, name, bonds, upTo, values, errors, sd) => {
    const text = readFileSync(`datasets/coupled/${name}.csv`, "utf8")
      .split("\n")
      .filter((line) => {
        const state = /^([\d.]+)/.exec(line)?.[1];
        if (state === undefined) return true;
        return [...state].reduce((sum, digit) => sum + Number(digit), 0) <= upTo;
      })
      .join("\n");
    const series = (await fit({ input: { text, source: name, format: "csv" }, model: "coupled", bonds })).series[0]!;
    const constants = Object.values(series.constants);
    constants.forEach(({ value, standardUncertainty }, k) => {
      expect(Math.abs(value - values[k]!)).toBeLessThan(5.1e-5);
      expect(Math.abs(standardUncertainty! - errors[k]!)).toBeLessThan(5.1e-5);
    });
    expect(Math.abs(series.quality.standardDeviation! - sd)).toBeLessThan(5.1e-4);
    expect(series.fitReport.converged).toBe(true);
  });
});

describe("symmetry of the manifolds (COMPUTED by character counting)", () => {
  it.each([
    [
      2,
      [
        { A1: 1, B2: 1 },
        { A1: 2, B2: 1 },
        { A1: 2, B2: 2 },
        { A1: 3, B2: 2 },
        { A1: 3, B2: 3 },
      ],
    ],
    [
      3,
      [
        { A1: 1, E: 1 },
        { A1: 2, E: 2 },
        { A1: 3, A2: 1, E: 3 },
        { A1: 4, A2: 1, E: 5 },
        { A1: 5, A2: 2, E: 7 },
      ],
    ],
    [
      4,
      [
        { A1: 1, F2: 1 },
        { A1: 2, E: 1, F2: 2 },
        { A1: 3, E: 1, F1: 1, F2: 4 },
        { A1: 5, E: 3, F1: 2, F2: 6 },
        { A1: 6, E: 4, F1: 4, F2: 10 },
      ],
    ],
  ] as const)("%d bonds, V = 1 to 5", (bonds, expected) => {
    const all = levels(bonds, [3000, 60, -5], 5);
    expected.forEach((counts, i) => {
      const found: Record<string, number> = {};
      for (const { numbers } of all)
        if (numbers.V === i + 1) found[numbers.species!] = (found[numbers.species!] ?? 0) + 1;
      expect(found).toEqual(counts);
      // as many levels, with their degeneracies, as ways to put V quanta into the bonds
      const states = all
        .filter(({ numbers }) => numbers.V === i + 1)
        .reduce((sum, { degeneracy }) => sum + degeneracy, 0);
      expect(states).toBe([0, 0, i + 2, ((i + 2) * (i + 3)) / 2, ((i + 2) * (i + 3) * (i + 4)) / 6][bonds]);
    });
  });
});

describe("closed forms and laws", () => {
  const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  const p = fc.tuple(number(1500, 4000), number(10, 90), number(-80, 80));

  it("V = 1 and the A1, E and F2 blocks of V = 2", () => {
    fc.assert(
      fc.property(p, fc.constantFrom(2, 3, 4), ([w, wx, lambda], bonds) => {
        const all = levels(bonds, [w, wx, lambda], 2);
        const of = (total: number, species: string) =>
          all
            .filter(({ numbers }) => numbers.V === total && numbers.species === species)
            .map(({ energy }) => energy)
            .sort((a, b) => a - b);
        const two = (a: number, b: number, c: number) => {
          const [mean, half] = [(a + b) / 2, Math.hypot((a - b) / 2, c)];
          return [mean - half, mean + half];
        };
        const other = { 2: "B2", 3: "E", 4: "F2" }[bonds]!;
        const close = (found: readonly number[], expected: readonly number[]) => {
          expect(found).toHaveLength(expected.length);
          // rounding of Jacobi rotations of numbers near 1e4
          found.forEach((x, i) => {
            expect(Math.abs(x - expected[i]!)).toBeLessThan(1e-9);
          });
        };
        close(of(1, "A1"), [w - 2 * wx + (bonds - 1) * lambda]);
        close(of(1, other), [w - 2 * wx - lambda]);
        close(
          of(2, "A1"),
          two(2 * w - 6 * wx, 2 * w - 4 * wx + 2 * (bonds - 2) * lambda, 2 * Math.sqrt(bonds - 1) * lambda),
        );
        if (bonds === 2) close(of(2, "B2"), [2 * w - 6 * wx]);
        if (bonds === 3) close(of(2, "E"), two(2 * w - 6 * wx, 2 * w - 4 * wx - lambda, Math.SQRT2 * lambda));
        if (bonds === 4) {
          close(of(2, "F2"), two(2 * w - 6 * wx, 2 * w - 4 * wx, 2 * lambda));
          close(of(2, "E"), [2 * w - 4 * wx - 2 * lambda]);
        }
      }),
      { seed: 71, numRuns: 100 },
    );
  });

  it("the trace of V does not depend on λ; λ = 0 gives the local energies; wx = 0 the ladder of normal modes", () => {
    fc.assert(
      fc.property(p, fc.constantFrom(2, 3, 4), ([w, wx, lambda], bonds) => {
        const trace = (q: readonly number[]) =>
          levels(bonds, q, 4)
            .filter(({ numbers }) => numbers.V === 4)
            .reduce((sum, { energy, degeneracy }) => sum + energy * degeneracy, 0);
        expect(Math.abs(trace([w, wx, lambda]) - trace([w, wx, 0]))).toBeLessThan(1e-6);
        for (const { energy, label } of levels(bonds, [w, wx, 0], 4)) {
          const quanta = [...label].slice(0, bonds).map(Number);
          expect(Math.abs(energy - quanta.reduce((sum, v) => sum + v * w - v * (v + 1) * wx, 0))).toBeLessThan(1e-8);
        }
        for (const { energy, numbers } of levels(bonds, [w, 0, lambda], 3)) {
          // n_s·(w + (N-1)λ) + (V - n_s)·(w - λ)
          const steps = (energy - Number(numbers.V) * (w - lambda)) / (bonds * lambda);
          if (Math.abs(lambda) > 1) expect(Math.abs(steps - Math.round(steps))).toBeLessThan(1e-7);
        }
      }),
      { seed: 72, numRuns: 60 },
    );
  });

  it("two bonds have the same energies for λ and -λ: only + and - of odd V change places", () => {
    fc.assert(
      fc.property(p, ([w, wx, lambda]) => {
        const energies = (sign: number) =>
          levels(2, [w, wx, sign * lambda], 6)
            .map(({ energy }) => energy)
            .sort((a, b) => a - b);
        const [plus, minus] = [energies(1), energies(-1)];
        plus.forEach((energy, i) => {
          expect(Math.abs(energy - minus[i]!)).toBeLessThan(1e-8);
        });
      }),
      { seed: 73, numRuns: 40 },
    );
  });

  it("leading order of the splitting of a pair, 2n|λ|ⁿ/[(2wx)ⁿ⁻¹(n-1)!], and exact values (COMPUTED)", () => {
    const exact = [99, 46.19, 11.719, 1.64626, 0.156778, 0.011341];
    const { consequences } = model.manifold!({ terms: null, fixed: {}, bonds: 2 });
    consequences(6)
      .filter(({ key }) => key.startsWith("splitting"))
      .forEach(({ of }, i) => {
        // half a unit of the last printed digit
        expect(Math.abs(Math.abs(of([3870, 83, -49.5])!) - exact[i]!)).toBeLessThan(
          [5e-4, 5e-4, 5e-4, 5e-6, 5e-7, 5e-7][i]!,
        );
      });
    const xi = consequences(1).find(({ key }) => key === "xi")!;
    expect(Math.abs(xi.of([3870, 83, -49.5])! + 0.342347103)).toBeLessThan(5e-10);
  });
});

describe("normal modes: the same levels from the converted constants (x–K relations)", () => {
  /** H in number states of normal modes: ω_s, ω_t with v + ½ and the quartic terms -wx·T_abcd·b†b†bb; diagonalised with ml-matrix. */
  function normalLevels(bonds: number, [w, wx, lambda]: readonly [number, number, number], total: number): number[] {
    const { tensor } = quarticOf(bonds);
    const states: number[][] = [];
    const fill = (rest: number, head: number[]): void => {
      if (head.length === bonds - 1) states.push([...head, rest]);
      else for (let n = 0; n <= rest; n++) fill(rest - n, [...head, n]);
    };
    fill(total, []);
    const index = new Map(states.map((state, i) => [state.join(), i]));
    const h = states.map(() => states.map(() => 0));
    const modes = Array.from({ length: bonds }, (_, i) => i);
    states.forEach((state, i) => {
      h[i]![i]! += state.reduce((sum, n, a) => sum + n * (w + (a === 0 ? (bonds - 1) * lambda : -lambda) - 2 * wx), 0);
      for (const c of modes)
        for (const d of modes) {
          const lower = [...state];
          let factor = Math.sqrt(lower[c]!);
          lower[c]! -= 1;
          if (lower[c]! < 0) continue;
          factor *= Math.sqrt(lower[d]!);
          lower[d]! -= 1;
          if (lower[d]! < 0) continue;
          for (const a of modes)
            for (const b of modes) {
              const to = [...lower];
              to[a]! += 1;
              const up = Math.sqrt(to[a]!);
              to[b]! += 1;
              h[index.get(to.join())!]![i]! += -wx * tensor(a, b, c, d) * factor * up * Math.sqrt(to[b]!);
            }
        }
    });
    return new EigenvalueDecomposition(new Matrix(h), { assumeSymmetric: true }).realEigenvalues.sort((a, b) => a - b);
  }

  it.each([2, 3, 4])("%d bonds, V ≤ 5, to 1e-8", (bonds) => {
    const p = [3500, 70, -12] as const;
    const local = levels(bonds, p, 5);
    for (let total = 1; total <= 5; total++) {
      const expected = normalLevels(bonds, p, total);
      const found = local
        .filter(({ numbers }) => numbers.V === total)
        .flatMap(({ energy, degeneracy }) => new Array<number>(degeneracy).fill(energy))
        .sort((a, b) => a - b);
      expect(found).toHaveLength(expected.length);
      found.forEach((energy, i) => {
        expect(Math.abs(energy - expected[i]!)).toBeLessThan(1e-8);
      });
    }
  });

  it("two bonds: ω_s,a = w ± λ, x_ss = -wx/2, x_sa = -2wx, K = -2wx", () => {
    const values = Object.fromEntries(
      model.manifold!({ terms: null, fixed: {}, bonds: 2 })
        .consequences(1)
        .map(({ key, of }) => [key, of([3870, 83, -49.5])]),
    );
    const expected = {
      omegaSymmetric: 3820.5,
      omegaOther: 3919.5,
      xss: -41.5,
      xst: -166,
      kst: -166,
      gammaPrime: 49.5,
      xm: -83,
    };
    // rounding
    for (const [key, value] of Object.entries(expected)) expect(Math.abs(values[key]! - value)).toBeLessThan(1e-9);
  });
});

describe("Hellmann–Feynman derivatives against differences", () => {
  it.each<[number | "unlike", readonly number[]]>([
    [2, [3870, 83, -49.5]],
    [3, [2200, 38.5, -3.7]],
    [4, [2256, 34, -0.55]],
    // near-degenerate: 40+ and 40- of H2S-like bonds; a crossing without coupling, 3,0 against 2,1
    [2, [2715, 47.5, -0.01]],
    ["unlike", [3800, 80, 3700, 85, 12]],
    ["unlike", [3700, 80, 3700.001, 80, 5]],
  ])("%s bonds at %j", (bonds, p) => {
    const manifold = model.manifold!({ terms: null, fixed: {}, bonds });
    // small beside the gap of near-degenerate levels, large beside rounding
    const step = 1e-5;
    const at = (k: number, shift: number) =>
      new Map(
        manifold
          .levels(
            p.map((x, j) => (j === k ? x + shift : x)),
            5,
          )
          .map(({ label, energy }) => [label, energy]),
      );
    const shifted = p.map((_, k) => [at(k, step), at(k, -step)] as const);
    for (const { label, gradient } of manifold.levels(p, 5))
      gradient.forEach((derivative, k) => {
        const [high, low] = shifted[k]!;
        const difference = (high.get(label)! - low.get(label)!) / (2 * step);
        // the bound of the issue, relative to the largest derivative (V(V+1) = 30): differences of numbers near 1e4 keep seven digits
        expect(Math.abs(derivative - difference)).toBeLessThan(3e-6 * 30);
      });
  });
});

describe("two unlike bonds", () => {
  it("the V = 1 pair is a two-level problem", () => {
    const [low, high] = model.manifold!({ terms: null, fixed: {}, bonds: "unlike" }).levels(
      [3800, 80, 3700, 85, 12],
      1,
    );
    const [a, b] = [3640, 3530];
    const half = Math.hypot((a - b) / 2, 12);
    expect([low!.label, high!.label]).toEqual(["0.1", "1.0"]);
    expect(Math.abs(low!.energy - ((a + b) / 2 - half))).toBeLessThan(1e-9);
    expect(Math.abs(high!.energy - ((a + b) / 2 + half))).toBeLessThan(1e-9);
  });

  it("fitted apart each bond takes the shift of its levels into its constants; without coupling there is none", () => {
    const { consequences } = model.manifold!({ terms: null, fixed: {}, bonds: "unlike" });
    const at = (p: readonly number[]) => Object.fromEntries(consequences(3).map(({ key, of }) => [key, of(p)]));
    const free = at([3800, 80, 3700, 85, 0]);
    // least squares through exact levels leaves rounding
    expect(Math.abs(free.w1Apart! - 3800)).toBeLessThan(1e-8);
    expect(Math.abs(free.wx2Apart! - 85)).toBeLessThan(1e-8);
    const tied = at([3800, 80, 3700, 85, 12]);
    // far more than the uncertainty of any such constant
    expect(Math.abs(tied.w1Apart! - 3800)).toBeGreaterThan(1);
    expect(Math.abs(tied.w2Apart! - 3700)).toBeGreaterThan(1);
  });

  it("with equal constants gives the levels of two equivalent bonds", () => {
    const unlike = model.manifold!({ terms: null, fixed: {}, bonds: "unlike" })
      .levels([3870, 83, 3870, 83, -49.5], 5)
      .map(({ energy }) => energy);
    const equal = levels(2, [3870, 83, -49.5], 5).map(({ energy }) => energy);
    unlike.forEach((energy, i) => {
      expect(Math.abs(energy - equal[i]!)).toBeLessThan(1e-8);
    });
  });

  it("recovers its constants from its levels", async () => {
    const truth = [3766, 83.4, 3701, 86.8, 9.5];
    const bands = model.manifold!({ terms: null, fixed: {}, bonds: "unlike" })
      .levels(truth, 4)
      .map(({ label, energy }) => `${label} ${energy.toFixed(6)}`)
      .join(", ");
    const { constants, warnings } = (await fit({ bands, model: "coupled", bonds: "unlike", sigma: 0.5 })).series[0]!;
    Object.values(constants).forEach(({ value }, k) => {
      // positions to 1e-6; the sign of λ is not determined
      expect(Math.abs(Math.abs(value) - truth[k]!)).toBeLessThan(1e-4);
    });
    expect(warnings.map(({ code }) => code)).toContain("lambda-sign");
  });
});
