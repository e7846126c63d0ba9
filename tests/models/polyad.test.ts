import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit, predict } from "../../src/index.ts";
import { InputError } from "../../src/messages/index.ts";
import { findModel, type Model } from "../../src/models/index.ts";
import { generator } from "../analysis/ladders.ts";

const model = (await findModel("polyad")) as Model;
/** ws wb xss xbb xsb gbb ksbb */
const P = [3086, 1370, -64, -5, -24, 5, 100] as const;
const with_ = (k: number) => [...P.slice(0, 6), k];
const options = (bend: "degenerate" | "single") => ({ terms: null, fixed: {}, bend }) as const;
const levelsOf = (p: readonly number[], upTo: number, bend: "degenerate" | "single" = "degenerate") =>
  model.manifold!(options(bend))
    .levels(p, upTo)
    .filter(({ numbers }) => (numbers.l as number) < 2);

/** Levels as `--bands` wants them, with normal noise where a generator is given. */
const bandsOf = (levels: readonly { label: string; energy: number }[], noise = 0, seed = 1) => {
  const { normal } = generator(seed);
  return levels.map(({ label, energy }) => `${label} ${(energy + noise * normal()).toFixed(8)}`).join(", ");
};
const fitted = async (request: object) => (await fit({ model: "polyad", sigma: 0.5, ...request })).series[0]!;
const refusal = async (work: Promise<unknown>) => {
  const error = await work.catch((wrong: unknown) => wrong);
  expect(error).toBeInstanceOf(InputError);
  const { exit, faults } = error as InputError;
  return { exit, ...faults[0]! };
};

describe("a fit from the levels alone", () => {
  it("comes back to the constants that made the levels, for both kinds of bend, with a positive coupling", async () => {
    const constants = fc.record({
      ws: fc.double({ min: 2900, max: 3900, noNaN: true }),
      detuning: fc.double({ min: -300, max: 300, noNaN: true }),
      xss: fc.double({ min: -90, max: -45, noNaN: true }),
      xbb: fc.double({ min: -12, max: 0, noNaN: true }),
      xsb: fc.double({ min: -40, max: 0, noNaN: true }),
      gbb: fc.double({ min: 0, max: 10, noNaN: true }),
      k: fc.double({ min: 10, max: 200, noNaN: true }),
      sign: fc.constantFrom(1, -1),
      bend: fc.constantFrom("degenerate" as const, "single" as const),
    });
    await fc.assert(
      fc.asyncProperty(constants, async ({ ws, detuning, xss, xbb, xsb, gbb, k, sign, bend }) => {
        const wb = (ws + xss - detuning) / 2;
        const p = [ws, wb, xss, xbb, xsb, ...(bend === "single" ? [] : [gbb]), sign * k];
        const { constants: found, fitReport } = await fitted({ bands: bandsOf(levelsOf(p, 4, bend)), bend });
        expect(fitReport.converged).toBe(true);
        const expected = [...p.slice(0, -1), k];
        Object.values(found).forEach(({ value }, i) => {
          // positions are printed to 1e-8 and the search ends within 1e-8 of σ; 1e-4 is far below any σ of a constant
          expect(Math.abs(value - expected[i]!)).toBeLessThan(1e-4);
        });
      }),
      { seed: 20261201, numRuns: 60 },
    );
  });

  it("does not end at zero coupling, where no level depends on it to first order, however far off the model is", async () => {
    // levels of a degenerate bend read as those of a single one, and with 20 cm-1 of noise
    for (let seed = 1; seed <= 5; seed++) {
      const bands = bandsOf(
        levelsOf(P, 3).filter(({ numbers }) => numbers.l === 0),
        20,
        seed,
      );
      const free = await fitted({ bands, bend: "single", excess: "none" }).catch(() => null);
      const held = async (k: number) =>
        (await fitted({ bands, bend: "single", excess: "none", fix: `ksbb=${k}` })).quality.chiSquare!;
      const grid = await Promise.all([0, 20, 40, 60, 80, 100, 130].map(held));
      // refused: no coupling does better than none; else the fit does better than every coupling tried
      if (free === null) expect(grid[0]).toBe(Math.min(...grid));
      else expect(free.quality.chiSquare!).toBeLessThanOrEqual(Math.min(...grid) * (1 + 1e-9));
    }
  });

  it("refuses the coupling where the levels are met best without it, and says so: exit 3", async () => {
    let [refused, found] = [0, 0];
    for (let seed = 1; seed <= 20; seed++) {
      const bands = bandsOf(levelsOf(with_(0), 3), 0.5, seed);
      const result = await fitted({ bands, excess: "none" }).catch((wrong: unknown) => wrong as InputError);
      if (!(result instanceof InputError)) {
        found++;
        expect(result.constants.ksbb!.value).toBeGreaterThan(0);
        continue;
      }
      refused++;
      expect(result.exit).toBe(3);
      expect(result.faults[0]!.mend).toContain('hold it with --fix "ksbb=0"');
    }
    // the square of k comes out negative in half of all draws: 10 ± 2.2 of 20, four standard deviations
    expect(refused).toBeGreaterThan(1);
    expect(found).toBeGreaterThan(1);
    const { constants } = await fitted({ bands: bandsOf(levelsOf(with_(0), 3), 0.5, 3), fix: "ksbb=0" });
    // seven standard deviations or less would be chance; 3086 ± 0.6
    expect(Math.abs(constants.ws!.value - 3086)).toBeLessThan(3);
  });

  it("a prior on the coupling is weighed, and keeps its sign", async () => {
    const bands = bandsOf(levelsOf(P, 3));
    const { constants } = await fitted({ bands, fix: "ksbb=-100(5)" });
    // the data, exact, agree with the prior
    expect(Math.abs(constants.ksbb!.value + 100)).toBeLessThan(1e-4);
    const pulled = await fitted({ bands, fix: "ksbb=90.0(1)" });
    expect(pulled.constants.ksbb!.value).toBeGreaterThan(90);
    expect(pulled.constants.ksbb!.value).toBeLessThan(95);
  });
});

describe("an uncertain coupling", () => {
  it("near zero is warned of, and its profile stands at or above zero and reaches further down", async () => {
    // k = 10 ± 10: levels go with k², so the linear interval is wrong
    const levels = levelsOf(with_(12), 3);
    for (const seed of [1, 3]) {
      const bands = bandsOf(levels, 0.5, seed);
      const linear = await fitted({ bands, excess: "none" }).catch(() => null);
      if (linear === null) continue;
      const { value, standardUncertainty: u, interval95 } = linear.constants.ksbb!;
      const warned = linear.warnings.some(({ code }) => code === "near-zero");
      expect(warned).toBe(value <= 3 * u!);
      const profile = (await fitted({ bands, excess: "none", intervals: "profile" })).constants.ksbb!;
      expect(profile.interval95![0]).toBeGreaterThanOrEqual(0);
      expect(profile.interval95![0]).toBeLessThanOrEqual(Math.max(0, interval95![0]));
      expect(profile.interval95![1]).toBeLessThan(interval95![1]);
    }
  });

  it("profiles and draws of well-determined polyads agree with the linear intervals", async () => {
    const bands = bandsOf(levelsOf(P, 3), 0.5, 5);
    const linear = await fitted({ bands });
    for (const intervals of ["profile", "resample"] as const) {
      const other = await fitted({ bands, intervals });
      for (const [key, { interval95, standardUncertainty: u }] of Object.entries(linear.constants)) {
        // the levels are nearly linear in the constants over one u, and 10 000 draws place a 95 % bound to 0.02 u
        expect(Math.abs(other.constants[key]!.interval95![0] - interval95![0])).toBeLessThan(0.15 * u!);
        expect(Math.abs(other.constants[key]!.interval95![1] - interval95![1])).toBeLessThan(0.15 * u!);
      }
      const [row, plain] = [other.dissociation[0]!.d0!, linear.dissociation[0]!.d0!];
      expect(Math.abs(row.interval95![0] - plain.interval95![0])).toBeLessThan(0.15 * plain.standardUncertainty!);
    }
  });
});

describe("what a reader would take for the overtones", () => {
  it("stands beside the deperturbed ones as far as it was observed: −9.4 % in ω̃x from N = 1 and 2", async () => {
    const { deperturbation } = await fitted({ bands: bandsOf(levelsOf(P, 3)) });
    const { overtones, naive, constants } = deperturbation!;
    expect(overtones.map(({ v, strongest }) => [v, strongest.label, strongest.observed])).toEqual([
      [1, "1_1", true],
      [2, "2_1", true],
      [3, "3_1", true],
      [4, "4_2", false],
    ]);
    // E(2) - 2E(1) = -115.95 (COMPUTED from the exact set): ω̃x 57.98; half a unit of the last digit
    expect(Math.abs(overtones[1]!.naive!.wx - 57.98)).toBeLessThan(0.005);
    expect(overtones[0]!.naive).toBeNull();
    expect(overtones[3]!.naive).toBeNull();
    expect(naive).toEqual(overtones[2]!.naive);
    // ws·v + xss·v², and ω̃x = -xss, ω̃ = ws - xss: exact data, digits of the printed positions
    for (const { v, deperturbed } of overtones)
      expect(Math.abs(deperturbed.value - (3086 * v - 64 * v * v))).toBeLessThan(1e-4);
    expect(Math.abs(constants.w.value - 3150)).toBeLessThan(1e-4);
    expect(Math.abs(constants.wx.value - 64)).toBeLessThan(1e-4);
  });

  it("the deperturbed overtones have the uncertainty of ws·v + xss·v²", async () => {
    const { deperturbation, covariance, correlation } = await fitted({ bands: bandsOf(levelsOf(P, 3)) });
    const at = (key: string) => correlation!.order.indexOf(key);
    const c = (a: string, b: string) => covariance![at(a)]![at(b)]!;
    for (const { v, deperturbed } of deperturbation!.overtones) {
      const variance = v ** 2 * c("ws", "ws") + 2 * v ** 3 * c("ws", "xss") + v ** 4 * c("xss", "xss");
      // rounding
      expect(Math.abs(deperturbed.standardUncertainty! / Math.sqrt(variance) - 1)).toBeLessThan(1e-9);
    }
  });
});

describe("requests", () => {
  const exact = bandsOf(levelsOf(P, 3));

  it.each([
    [
      "levels of l = 0 alone",
      3,
      { bands: bandsOf(levelsOf(P, 3).filter(({ numbers }) => numbers.l === 0)) },
      "no band depends on gbb",
    ],
    ["few levels, all of l = 0", 3, { bands: "1_1 3037.7, 1_2 2704.3" }, "no band depends on gbb"],
    ["gbb of a single bend", 2, { bands: "1_1 3037.7, 1_2 2704.3", bend: "single", fix: "gbb=5" }, "leave gbb out"],
    ["a quarter of N", 2, { bands: exact, upTo: 2.25 }, "steps of 0.5"],
    ["levels without end", 2, { bands: exact, upTo: 40 }, "0.5 to 15"],
    ["one level under two names", 2, { bands: "2_1 5959.5, 2.0_1:0 5800", sigma: 0.5 }, "mend a label"],
  ] as const)("refuses %s with exit %i", async (_, exit, request, mend) => {
    const fault = await refusal(fitted(request));
    expect(fault.exit).toBe(exit);
    expect(fault.mend).toContain(mend);
  });

  it("lists levels up to a half N", async () => {
    const { levels } = await fitted({ bands: exact, upTo: 1.5 });
    expect([...new Set(levels!.map(({ N }) => N))]).toEqual([0.5, 1, 1.5]);
  });

  it("predicts from a stored result as from its bands, the kind of bend kept", async () => {
    const single = bandsOf(levelsOf([...P.slice(0, 5), 100], 3, "single"));
    const request = { model: "polyad", bend: "single", bands: single, sigma: 0.5 } as const;
    const stored = { text: JSON.stringify(await fit(request)), source: "result.json" };
    expect((await predict({ stored, upTo: 4 })).levels).toEqual((await predict({ ...request, upTo: 4 })).levels);
  });

  it("predict names the constants that are missing, and wants no hot bands", async () => {
    const missing = await refusal(predict({ model: "polyad", constants: "ws=3086 wb=1370 xss=-64 xbb=-5 xsb=-24" }));
    expect(missing.what).toContain("gbb and ksbb are missing");
    const hot = await refusal(
      predict({ model: "polyad", constants: "ws=3086 wb=1370 xss=-64 xbb=-5 xsb=-24 gbb=5 ksbb=100", hot: 1 }),
    );
    expect(hot.code).toBe("hot");
  });
});

describe("a companion beside a polyad", () => {
  it("is warned of: the model may hold the same mixing", async () => {
    const text = [
      "band,position,sigma,companion,ratio",
      "1_1,3037.7,0.5,2950,9",
      ...["1_2,2704.3", "2_1,5959.5", "2_2,5710.0", "2_3,5340.5", "3_1,8785.4", "3_2,8591.6"].map(
        (row) => `${row},0.5,,`,
      ),
    ].join("\n");
    const { series } = await fit({ input: { text, source: "p.csv", format: "csv" }, model: "polyad", fix: "gbb=5" });
    expect(series[0]!.warnings.map(({ code }) => code)).toContain("companion-in-mixed-model");
  });
});
