import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { SeriesResult } from "../../src/analysis/index.ts";
import { fit } from "../../src/commands/fit.ts";
import { predict } from "../../src/commands/predict.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";
import { renderFit } from "../../src/reporting/index.ts";
import { normal, seeded } from "../fitting/random.ts";

interface Law {
  readonly d: number;
  readonly vd: number;
  readonly hn: number;
  readonly power: number;
}

/** Much like I2 B, counted from its own v = 0. */
const iodine: Law = { d: 4318.51, vd: 87.35, hn: 0.1546, power: 5 };
const energy = ({ d, vd, hn, power }: Law, v: number) => d - (hn * (vd - v)) ** ((2 * power) / (power - 2));
const range = (low: number, high: number) => Array.from({ length: high - low + 1 }, (_, i) => low + i);
const bands = (law: Law, vs: readonly number[], error = (_: number) => 0) =>
  vs.map((v) => `${v}-0 ${energy(law, v) + error(v)}`).join(", ");
const asked = (law: Law, vs: readonly number[], more: Partial<FitRequest> = {}): FitRequest => ({
  bands: bands(law, vs),
  model: "near-limit",
  power: law.power,
  ...more,
});
const one = async (request: FitRequest): Promise<SeriesResult> => (await fit(request)).series[0]!;
const codes = ({ warnings }: SeriesResult) => warnings.map(({ code }) => code);

describe("exact levels of the law", () => {
  it("give back D, v_D and the slope, whatever n and levels, and are accepted", async () => {
    const law = fc.record({
      d: fc.double({ min: 500, max: 3e4, noNaN: true }),
      vd: fc.double({ min: 30.2, max: 34, noNaN: true }),
      power: fc.constantFrom(3, 4, 5, 6, 8),
      share: fc.double({ min: 0.05, max: 0.6, noNaN: true }),
    });
    const levels = fc.uniqueArray(fc.integer({ min: 21, max: 28 }), { minLength: 4, maxLength: 8 });
    await fc.assert(
      fc.asyncProperty(law, levels, async ({ d, vd, power, share }, others) => {
        // the deepest level lies `share` of D under the limit
        const hn = (share * d) ** ((power - 2) / (2 * power)) / (vd - 20);
        const truth = { d, vd, hn, power };
        const vs = [20, ...others, 29, 30];
        const result = await one(asked(truth, vs));
        // positions have 16 digits; the uppermost levels magnify their rounding by up to 1e5
        expect(Math.abs(result.constants.d!.value / d - 1)).toBeLessThan(1e-9);
        expect(Math.abs(result.constants.vd!.value / vd - 1)).toBeLessThan(1e-6);
        expect(Math.abs(result.constants.hn!.value / hn - 1)).toBeLessThan(1e-5);
        expect(result.dissociation[0]!.d0!.value).toBe(result.constants.d!.value);
        expect(result.fitReport.converged).toBe(true);
      }),
      { seed: 20261201, numRuns: 60 },
    );
  });

  it("C_n follows from the same slope by the masses: the fit does not change", async () => {
    const without = await one(asked(iodine, range(70, 80), { sigma: 0.01 }));
    const result = await one(asked(iodine, range(70, 80), { sigma: 0.01, bond: "127I 127I" }));
    expect(Object.keys(result.constants)).toEqual(["d", "vd", "cn"]);
    // two ways to write one constant: the same minimum within 1e-8 standard deviations, uncertainties to rounding
    for (const key of ["d", "vd"])
      for (const part of ["value", "standardUncertainty"] as const)
        expect(Math.abs(result.constants[key]![part]! / without.constants[key]![part]! - 1)).toBeLessThan(1e-6);
    // u(ln C_n) = n·u(ln H_n), propagation to first order
    const relative = (q: { value: number; standardUncertainty: number | null }) => q.standardUncertainty! / q.value;
    expect(Math.abs(relative(result.constants.cn!) / (5 * relative(without.constants.hn!)) - 1)).toBeLessThan(1e-6);
    expect(codes(without)).toContain("no-bond");
    expect(codes(result)).not.toContain("no-bond");
  });

  it("a level may hang on another excited one, and only one needs to hang on v = 0", async () => {
    const step = (v: number) => energy(iodine, v) - energy(iodine, v - 1);
    const text = [`70-0 ${energy(iodine, 70)}`, ...range(71, 80).map((v) => `${v}-${v - 1} ${step(v)}`)].join(", ");
    const { constants } = await one({ bands: text, model: "near-limit", power: 5 });
    // differences of positions near 4300 keep 12 digits
    expect(Math.abs(constants.d!.value - iodine.d)).toBeLessThan(1e-6);
    expect(Math.abs(constants.vd!.value - iodine.vd)).toBeLessThan(1e-6);
  });

  it("further levels are predicted up to the limit, and --up-to ends them earlier", async () => {
    const all = await one(asked(iodine, range(70, 80), { sigma: 0.01 }));
    expect(all.predictions.map(({ label }) => label)).toEqual(range(70, 87).map((v) => `${v}-0`));
    // the calculated levels are those of the law, to the rounding of the input
    expect(Math.abs(all.predictions.at(-1)!.position.value - energy(iodine, 87))).toBeLessThan(1e-6);
    const some = await one(asked(iodine, range(70, 80), { sigma: 0.01, upTo: 83 }));
    expect(some.predictions.at(-1)!.label).toBe("83-0");
    const many = await one(asked(iodine, range(70, 80), { sigma: 0.01, upTo: 100 }));
    expect(codes(many)).toContain("above-highest-level");
  });
});

describe("uncertainties of D and v_D", () => {
  /** Eight levels with errors of 0.03 or so. */
  const noisy =
    "70-0 4291.72, 71-0 4296.48, 72-0 4300.66, 73-0 4304.30, 74-0 4307.29, 75-0 4309.89, 76-0 4311.97, 77-0 4313.74";
  const request: FitRequest = { bands: noisy, sigma: 0.03, model: "near-limit", power: 5 };

  it("are those of an independent fit (COMPUTED with scipy's least_squares)", async () => {
    const { constants, correlation, quality } = await one(request);
    // half a unit of the last printed digit; the reference stops its own search near 1e-6 of a standard deviation
    expect(Math.abs(constants.d!.value - 4318.59897)).toBeLessThan(5e-6);
    expect(Math.abs(constants.d!.standardUncertainty! - 0.120719)).toBeLessThan(1e-6);
    expect(Math.abs(constants.vd!.value - 87.4497928)).toBeLessThan(1e-6);
    expect(Math.abs(constants.vd!.standardUncertainty! - 0.132863)).toBeLessThan(1e-6);
    expect(Math.abs(constants.hn!.value - 0.153854368)).toBeLessThan(1e-8);
    expect(Math.abs(correlation!.matrix[0]![1]! - 0.98138)).toBeLessThan(1e-5);
    expect(Math.abs(quality.chiSquare! - 4.893147)).toBeLessThan(1e-6);
  });

  it("by profile D lies within 4318.36645 to 4318.83974 at 95 % (COMPUTED with scipy), and D0 is the same", async () => {
    const { constants, dissociation } = await one({ ...request, intervals: "profile" });
    const [low, high] = constants.d!.interval95!;
    // half a unit of the last printed digit
    expect(Math.abs(low - 4318.36645)).toBeLessThan(5e-6);
    expect(Math.abs(high - 4318.83974)).toBeLessThan(5e-6);
    expect(dissociation[0]!.d0).toEqual(constants.d);
  });

  it("hold D in 95 % of simulated fits, and refuse the true law in at most one of ten", async () => {
    const draw = normal(seeded(5));
    const runs = 200;
    let held = 0;
    let refused = 0;
    for (let run = 0; run < runs; run++) {
      const result = await one({
        bands: bands(iodine, range(70, 81), () => 0.01 * draw()),
        sigma: 0.01,
        excess: "none",
        model: "near-limit",
        power: 5,
      });
      const [low, high] = result.constants.d!.interval95!;
      if (low <= iodine.d && iodine.d <= high) held++;
      if (codes(result).includes("not-near-limit")) refused++;
    }
    // binomial, 190 ± 3.1: within four standard deviations
    expect(held).toBeGreaterThanOrEqual(178);
    // two tests at 5 % each
    expect(refused).toBeLessThanOrEqual(runs / 10);
  });

  it("grow by the scatter that makes χ² equal the degrees of freedom, or by Birge's factor, as for an oscillator", async () => {
    const tight = { ...request, sigma: 0.003 };
    const scatter = await one(tight);
    expect(scatter.quality.excess).toMatchObject({ kind: "scatter", applied: true });
    const birge = await one({ ...tight, excess: "birge" });
    // σ of 0.03 gave χ² = 4.893147 on 5 degrees of freedom: with a tenth of it, √(489.3147/5)
    expect(Math.abs(birge.quality.excess.value! - Math.sqrt(97.86294))).toBeLessThan(1e-5);
    // all σ alike: √(σ² + τ²) is σ times Birge's factor, and either fit is the unweighted one
    const total = Math.hypot(0.003, scatter.quality.excess.value!);
    expect(Math.abs(total / (0.003 * birge.quality.excess.value!) - 1)).toBeLessThan(1e-6);
    const relative = scatter.constants.d!.standardUncertainty! / birge.constants.d!.standardUncertainty!;
    expect(Math.abs(relative - 1)).toBeLessThan(1e-6);
  });

  it("without σ come from the residuals, with Student t", async () => {
    const { sigma: _, ...unstated } = request;
    const { constants, quality } = await one(unstated);
    // u scales with √(χ²/ν) of the fit with σ = 0.03
    expect(Math.abs(constants.d!.standardUncertainty! - 0.120719 * Math.sqrt(4.893147 / 5))).toBeLessThan(2e-6);
    expect(quality.intervalDegreesOfFreedom).toBe(5);
  });
});

describe("constants given", () => {
  it("a given limit is held and a given C_n too; with an uncertainty each is one more observation", async () => {
    const base = asked(iodine, range(70, 80), { sigma: 0.01, bond: "127I 127I" });
    const free = await one(base);
    const cn = free.constants.cn!.value;
    const held = await one({ ...base, limit: "4318.51", cn: String(cn) });
    expect(held.held).toEqual(["d", "cn"]);
    expect(held.constants.d).toMatchObject({ value: 4318.51, standardUncertainty: null });
    expect(held.quality.degreesOfFreedom).toBe(10);
    const prior = await one({ ...base, limit: "4318.510(5)" });
    expect(prior.quality.degreesOfFreedom).toBe(9);
    const u = free.constants.d!.standardUncertainty!;
    // two independent observations of D: 1/u² adds up, to first order in a fit that is nearly linear here
    expect(Math.abs(prior.constants.d!.standardUncertainty! / (1 / Math.hypot(1 / u, 1 / 0.005)) - 1)).toBeLessThan(
      1e-3,
    );
  });

  it("a C_n that the levels contradict is a reason to refuse", async () => {
    const base = asked(iodine, range(70, 80), { sigma: 0.001, bond: "127I 127I" });
    const { warnings } = await one({ ...base, cn: "5e5" });
    expect(warnings[0]!.code).toBe("not-near-limit");
    expect(warnings[0]!.message).toContain("(coefficient)");
  });
});

describe("levels that do not reach the limiting region", () => {
  /** Levels of a Morse well from the bottom up; the last below its limit is v = 34. */
  const morse = (vs: readonly number[]) => vs.map((v) => `${v}-0 ${200 * v - 2.85 * v * (v + 1)}`).join(", ");

  it("are refused also where they come as close as a Morse well allows", async () => {
    const { warnings, dissociation } = await one({
      bands: morse(range(10, 34)),
      sigma: 0.01,
      model: "near-limit",
      power: 6,
    });
    expect(warnings[0]!.code).toBe("not-near-limit");
    expect(dissociation[0]!.d0).toBeNull();
  });

  it("low levels under good ones are refused with the level from which the rest pass", async () => {
    // from v = 74 down the levels leave the law, each by more
    const off = (v: number) => (v < 75 ? 0.02 * (75 - v) ** 3 : 0);
    const text = bands(iodine, range(66, 84), off);
    const { warnings } = await one({ bands: text, sigma: 0.001, model: "near-limit", power: 5 });
    expect(warnings[0]!.code).toBe("not-near-limit");
    expect(warnings[0]!.message).toMatch(/levels from v = 7[3-6] up pass/);
    const upper = await one({ bands: bands(iodine, range(75, 84), off), sigma: 0.001, model: "near-limit", power: 5 });
    expect(upper.dissociation[0]!.d0).not.toBeNull();
  });

  it("four levels without σ cannot be tested, and it says so", async () => {
    const error = (v: number) => [0.01, -0.02, 0.02, -0.01][v % 4]!;
    const { warnings, dissociation } = await one({
      bands: bands(iodine, range(78, 81), error),
      model: "near-limit",
      power: 5,
    });
    expect(warnings[0]!.code).toBe("near-limit-untested");
    expect(dissociation[0]!.note).toContain("too few levels to test");
  });
});

describe("what the model does not have", () => {
  it.each([
    ["accepted", asked(iodine, range(70, 80), { sigma: 0.01 })],
    ["refused", { series: "2885.98 5667.98 8346.78 10922.81 13396.19", model: "near-limit", power: 6 }],
  ])("%s: no terms, derived numbers or stability, and text for a terminal all the same", async (_, request) => {
    const document = await fit(request);
    const result = document.series[0]!;
    expect(result).toMatchObject({ model: "near-limit", terms: null, derived: null, stability: [], comparison: null });
    for (const quiet of [true, false]) {
      const text = renderFit(document, {
        colour: false,
        notation: "equilibrium",
        quiet,
        symbols: { d: "D", vd: "vD", hn: "Hn" },
      });
      expect(text).toContain("vD");
      expect(text).not.toMatch(/NaN|undefined|null/);
    }
  });

  it("predict repeats the levels of a stored fit, and refuses bare constants", async () => {
    const request = asked(iodine, range(70, 80), { sigma: 0.01, bond: "127I 127I" });
    const document = await fit(request);
    const stored = { text: JSON.stringify(document), source: "result.json" };
    const { predictions } = await predict({ stored, upTo: 85, hot: 71 });
    const same = document.series[0]!.predictions.slice(0, 16).map(({ label, position }) => [label, position.value]);
    expect(predictions.slice(0, 16).map(({ label, position }) => [label, position.value])).toEqual(same);
    // hot bands only between levels for which the law was fitted
    expect(predictions.slice(16).every(({ label }) => /-7[01]$/.test(label))).toBe(true);
    await expect(predict({ constants: "d=4318 vd=87 cn=3e5", model: "near-limit", power: 5 })).rejects.toThrow(
      InputError,
    );
  });
});

describe("bad input", () => {
  const good = asked(iodine, range(70, 80));
  const { power: _, ...unpowered } = good;
  it.each<[string, FitRequest, string, 2 | 3, string]>([
    ["no power", unpowered, "setting-missing", 2, "3 or more"],
    ["a power of 2", { ...good, power: 2 }, "out-of-range", 2, "3 or more"],
    ["a power that is no number", { ...good, power: "six" }, "not-a-number", 2, "such as 5 or 6"],
    ["a C_n of zero", { ...good, bond: "127I 127I", cn: 0 }, "out-of-range", 2, "such as 3.1e5"],
    ["a negative C_n", { ...good, bond: "127I 127I", cn: "-3e5" }, "out-of-range", 2, "such as 3.1e5"],
    ["a negative C_n by --fix", { ...good, bond: "127I 127I", fix: "cn=-3e5" }, "out-of-range", 2, "write cn="],
    ["a C_n without masses", { ...good, cn: "3e5" }, "no-mass", 2, "--bond"],
    ["a C_n twice", { ...good, bond: "127I 127I", cn: "3e5", fix: "cn=3e5" }, "constant-twice", 2, "once"],
    ["levels above the given limit", { ...good, limit: "4316" }, "above-limit", 2, "mend the position or the limit"],
    ["a level above the given v_D", { ...good, fix: "vd=79.5" }, "above-limit", 2, "mend the label or vD"],
    ["three levels", asked(iodine, [78, 79, 80]), "not-determined", 3, "at least 4 levels"],
    [
      "four bands of three levels",
      { ...good, bands: "78-0 4315.1, 79-0 4316.2, 80-0 4317.0, 79-78 1.1" },
      "not-determined",
      3,
      "at least 4 levels",
    ],
    [
      "spacings alone",
      { ...good, bands: "75-74 2.56, 76-75 2.12, 77-76 1.72, 78-77 1.38" },
      "not-determined",
      3,
      "v-0",
    ],
    [
      "a power for an oscillator",
      { series: "2885.98 5667.98 8346.78", power: 6 },
      "setting-of-another-model",
      2,
      "--model near-limit",
    ],
  ])("%s: refused with place and mend", async (_, request, code, exit, mend) => {
    const error = await fit(request).then(
      () => null,
      (thrown: unknown) => thrown,
    );
    expect(error).toBeInstanceOf(InputError);
    const { faults, exit: status } = error as InputError;
    expect(status).toBe(exit);
    expect(new Set(faults.map((fault) => fault.code))).toEqual(new Set([code]));
    expect(faults[0]!.mend).toContain(mend);
    expect(faults[0]!.place.source).not.toBe("");
  });

  it("every level above the limit is named, at its own place", async () => {
    const error = (await fit({ ...good, limit: "4316" }).catch((thrown: unknown) => thrown)) as InputError;
    expect(error.faults.map(({ place }) => place.column)).toEqual(["79-0", "80-0"]);
  });
});
