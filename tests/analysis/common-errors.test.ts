import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";
import { normalEquations } from "./normal-equations.ts";

const csv = (text: string, more: Partial<FitRequest> = {}): FitRequest => ({
  input: { text, source: "bands.csv", format: "csv" },
  excess: "none",
  ...more,
});
const one = async (request: FitRequest) => (await fit(request)).series[0]!;

/** Two instruments; the second one off by `shift`. Positions of ω̃ 3800, ω̃x 80. */
const position = (v: number) => v * 3800 - v * (v + 1) * 80;
const table = (shift: number, noise: readonly number[] = [0, 0, 0, 0, 0, 0]) =>
  [
    "band,position,sigma,group",
    ...[1, 2, 3, 4, 5, 6].map(
      (v, i) => `${v}-0,${position(v) + (v > 2 ? shift : 0) + noise[i]!},0.05,${v > 2 ? "laser" : "fts"}`,
    ),
  ].join("\n");

describe("groups of bands with errors of their own", () => {
  it("an offset carried as a correlated error is the same as a constant of the fit with that prior (normal equations)", async () => {
    const noise = [0.03, -0.06, 0.02, 0.05, -0.04, 0.01];
    const request = csv(table(0.4, noise), { groupSigma: "laser=0.3", terms: 2 });
    const fitted = await one({ ...request, groups: "fitted" });
    // Independent: columns (v, -v(v+1), offset of v > 2) with the prior as one more row; 3 by 3 normal equations.
    const rows = [1, 2, 3, 4, 5, 6].map((v) => [v / 0.05, (-v * (v + 1)) / 0.05, v > 2 ? 1 / 0.05 : 0]);
    const right = [1, 2, 3, 4, 5, 6].map((v, i) => (position(v) + (v > 2 ? 0.4 : 0) + noise[i]!) / 0.05);
    rows.push([0, 0, 1 / 0.3]);
    right.push(0);
    const { solution, inverse } = normalEquations(rows, right);
    const laser = fitted.commonErrors.find(({ group }) => group === "laser")!;
    // normal equations with a condition number near 1e6 keep nine digits
    expect(Math.abs(laser.shift!.value - solution[2]!)).toBeLessThan(1e-7);
    expect(Math.abs(laser.shift!.standardUncertainty! / Math.sqrt(inverse[2]![2]!) - 1)).toBeLessThan(1e-7);
    expect(Math.abs(fitted.constants.wexe!.value - solution[1]!)).toBeLessThan(1e-7);
    expect(Math.abs(fitted.constants.wexe!.standardUncertainty! / Math.sqrt(inverse[1]![1]!) - 1)).toBeLessThan(1e-7);
    const carried = await one(request);
    expect(carried.constants).toEqual(fitted.constants);
    expect(carried.commonErrors.map(({ shift }) => shift)).toEqual([null]);
  });

  it("recovers a shift: a group 0.4 off with a prior of 1 comes out at 0.4", async () => {
    const { commonErrors } = await one(csv(table(0.4), { groupSigma: "laser=1", groups: "fitted", terms: 2 }));
    const { shift } = commonErrors[0]!;
    // the prior draws it towards 0 by (u/1)² of itself
    const drawn = 0.4 * shift!.standardUncertainty! ** 2;
    expect(Math.abs(shift!.value - 0.4)).toBeLessThan(drawn * 1.01);
  });

  it("a scale in ppm acts on each position in proportion, an offset in nm with the sign and size of dν̃/dλ", async () => {
    const { commonErrors } = await one(csv(table(0), { groupSigma: "laser=10 ppm, fts=0.01 nm", terms: 2 }));
    // 1e-5 of 3-0 and of 6-0; -0.01 nm · ν̃²/1e7 of 2-0 and 1-0
    const [laser, fts] = [commonErrors[0]!.effect!, commonErrors[1]!.effect!];
    expect(Math.abs(laser[0] / (position(3) * 1e-5) - 1)).toBeLessThan(1e-12);
    expect(Math.abs(laser[1] / (position(6) * 1e-5) - 1)).toBeLessThan(1e-12);
    expect(Math.abs(fts[0] / (-0.01e-7 * position(2) ** 2) - 1)).toBeLessThan(1e-12);
    expect(Math.abs(fts[1] / (-0.01e-7 * position(1) ** 2) - 1)).toBeLessThan(1e-12);
  });

  it("names the pair when the shift cannot be told from a constant: a scale of all bands, exit 3", async () => {
    const all = table(0).replaceAll("laser", "fts");
    await expect(one(csv(all, { groupSigma: "fts=5 ppm", groups: "fitted", terms: 2 }))).rejects.toMatchObject({
      exit: 3,
      faults: [{ code: "group-not-separable", what: expect.stringMatching(/scale of group "fts".*ω/) }],
    });
    // carried, it is no fault
    await one(csv(all, { groupSigma: "fts=5 ppm", terms: 2 }));
  });

  it("warns when a shift is far outside its prior, and when there is no σ to stand beside", async () => {
    const large = await one(csv(table(3), { groupSigma: "laser=0.5", groups: "fitted", terms: 2 }));
    expect(large.warnings.find(({ code }) => code === "group-shift-large")?.about).toBe("laser");
    const bare = table(0).replaceAll(",0.05,", ",,");
    const without = await one(csv(bare, { groupSigma: "laser=0.5", terms: 2 }));
    expect(without.warnings.map(({ code }) => code)).toContain("shared-needs-sigma");
    expect(without.commonErrors).toEqual([]);
  });

  it.each([
    ["laser", "group-sigma"],
    ["laser=x", "sigma"],
    ["laser=-1", "sigma-not-positive"],
    ["laser=1, laser=2", "group-twice"],
    ["lasser=1", "group-without-bands"],
  ])("refuses --group-sigma %s", async (groupSigma, code) => {
    const error = await one(csv(table(0), { groupSigma })).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect((error as InputError).faults.map((fault) => fault.code)).toEqual([code]);
  });
});

describe("an error proportional to v", () => {
  it("goes wholly into the first constant: ±u of ω̃, nothing of ω̃x, no residual", async () => {
    await fc.assert(
      fc.asyncProperty(fc.double({ min: 0.01, max: 5, noNaN: true }), async (u) => {
        const series = [1, 2, 3, 4, 5].map(position).join(" ");
        const request: FitRequest = { series, sigma: 0.05, excess: "none", terms: 2 };
        const [plain, with_] = await Promise.all([one(request), one({ ...request, perQuantumSigma: u })]);
        // ω̃ and ωe differ by ω̃x, which the error leaves alone, so the variance of ωe grows by u²
        const grown = with_.constants.we!.standardUncertainty! ** 2 - plain.constants.we!.standardUncertainty! ** 2;
        // Cholesky of V with u up to a hundred σ leaves some 1e-12 of u²
        expect(Math.abs(grown / u ** 2 - 1)).toBeLessThan(1e-8);
        expect(
          Math.abs(with_.constants.wexe!.standardUncertainty! / plain.constants.wexe!.standardUncertainty! - 1),
        ).toBeLessThan(1e-8);
        expect(Math.abs(with_.constants.we!.value - plain.constants.we!.value)).toBeLessThan(1e-6);
      }),
      { seed: 11, numRuns: 30 },
    );
  });
});

describe("natural mixtures", () => {
  it("HCl: the pull of H37Cl is 0.51 at 1-0 and 2.18 at 5-0 (COMPUTED, reference values of the project)", async () => {
    // H35Cl, Rank, Rao & Wiggins 1965 (from memory)
    const series = "2885.9775 5667.9841 8346.7821 10922.803 13396.22";
    const { commonErrors, reducedMass } = await one({ series, sigma: 0.02, bond: "1H Cl" });
    const { kind, effect, bands } = commonErrors[0]!;
    expect([kind, bands]).toEqual(["mixture", 5]);
    // half a unit of the last printed digit
    expect(Math.abs(effect![0] - 0.51)).toBeLessThan(0.005);
    expect(Math.abs(effect![1] - 2.18)).toBeLessThan(0.005);
    // mean mass of chlorine 35.4529 u (IUPAC conventional 35.45)
    expect(Math.abs(reducedMass! - (1.00782503 * 35.4529) / (1.00782503 + 35.4529))).toBeLessThan(1e-5);
  });

  it("is zero for an element of one natural isotope, and absent for isotopes", async () => {
    const series = "2885.98 5667.98 8346.78";
    expect((await one({ series, sigma: 0.02, bond: "1H F" })).commonErrors).toEqual([]);
    expect((await one({ series, sigma: 0.02, bond: "1H 35Cl" })).commonErrors).toEqual([]);
  });

  it("is said, and not carried, without σ", async () => {
    const { warnings, commonErrors } = await one({ series: "2885.98 5667.98 8346.78", bond: "H Cl" });
    expect(commonErrors).toEqual([]);
    expect(warnings.find(({ code }) => code === "natural-mixture")?.message).toContain("without σ");
  });
});

describe("Raman: scattered wavelengths with --laser", () => {
  it("bands are the shifts from the exciting line", async () => {
    const shifts = [2885.98, 5667.98, 8346.78];
    const laser = 1e7 / 532;
    const series = shifts.map((shift) => (1e7 / (laser - shift)).toFixed(9)).join(" ");
    const { bands } = await one({ series, unit: "nm", laser: 532 });
    // wavelengths to 1e-9 nm are 1e-5 cm-1 at worst here
    bands.forEach((band, i) => {
      expect(Math.abs(band.observed - shifts[i]!)).toBeLessThan(1e-4);
    });
  });

  it("σ in nm counts at the scattered wavelength, and the laser's own is common to all", async () => {
    const scattered = 1e7 / (1e7 / 532 - 2885.98);
    const bands = `1-0 ${scattered} nm, 2-0 ${1e7 / (1e7 / 532 - 5667.98)} nm`;
    const { bands: read, commonErrors } = await one({ bands, sigma: "0.01 nm", laser: "532.00(2)" });
    // 0.01 nm · 1e7/λ²
    expect(Math.abs(read[0]!.standardUncertainty! / ((0.01 * 1e7) / scattered ** 2) - 1)).toBeLessThan(1e-9);
    const [low, high] = commonErrors[0]!.effect!;
    expect(low).toBe(high);
    expect(Math.abs(low / ((0.02 * 1e7) / 532 ** 2) - 1)).toBeLessThan(1e-9);
  });

  it("in air, laser and scattered light are both taken to vacuum", async () => {
    // 632.8 nm in air is 15798.01 cm-1, 773.8 nm 12919.75 (Ciddor 1996 by the project's own conversion, checked in air.test.ts)
    const { bands } = await one({ bands: "1-0 773.8 nm, 2-0 990 nm", medium: "air", laser: 632.8 });
    const vacuum = await one({ bands: "1-0 773.8 nm, 2-0 990 nm", laser: 632.8 });
    const n = (wavelength: number) =>
      1 + 1e-8 * (5792105 / (238.0185 - (1e3 / wavelength) ** 2) + 167917 / (57.362 - (1e3 / wavelength) ** 2));
    const expected = 1e7 / (632.8 * n(632.97)) - 1e7 / (773.8 * n(774.01));
    // the index is evaluated 5e-3 nm off the vacuum wavelength: 1e-9 of the position
    expect(Math.abs(bands[0]!.observed - expected)).toBeLessThan(1e-4);
    expect(Math.abs(vacuum.bands[0]!.observed - (1e7 / 632.8 - 1e7 / 773.8))).toBeLessThan(1e-8);
  });

  it.each([
    [{ bands: "1-0 3000" }, "laser-without-wavelength"],
    [{ bands: "1-0 500 nm" }, "not-stokes"],
    [{ bands: "1-0 600 nm", laser: "5x" }, "laser"],
    [{ bands: "1-0 600 nm", laser: "18797 cm-1" }, "laser"],
  ])("refuses %j", async (request, code) => {
    const error = await one({ laser: 532, ...request }).catch((wrong: unknown) => wrong);
    expect((error as InputError).faults.map((fault) => fault.code)).toEqual([code]);
  });
});
