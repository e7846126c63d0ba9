import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { separate } from "../../src/bands/two-levels.ts";
import { fit } from "../../src/commands/fit.ts";
import type { InputError } from "../../src/messages/index.ts";
import { generator } from "../analysis/ladders.ts";
import { faultsOf, understand } from "./read.ts";

const pair = { bandSigma: null, companionSigma: null, ratioSigma: null };
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe("two levels, one dark", () => {
  it("3022.0 and 2720.0 coupled by 70.710678 give 3037.736319 and 2704.263681, and back (COMPUTED)", () => {
    // bright upper level: intensities are the shares of the bright state in both
    const [upper, lower] = [3037.736319, 2704.263681];
    const share = (3022 - lower) / (upper - lower);
    const found = separate({ ...pair, band: upper, companion: lower, ratio: share / (1 - share) });
    // positions printed to 1e-6
    expect(Math.abs(found.corrected - 3022)).toBeLessThan(2e-6);
    expect(Math.abs(found.coupling - 70.710678)).toBeLessThan(2e-6);
  });

  it("mixing and separating give back the levels, whichever is bright and above", () => {
    fc.assert(
      fc.property(number(3000, 12000), number(-200, 200), number(0.5, 80), (bright, gap, w) => {
        fc.pre(Math.abs(gap) > 1e-3);
        const dark = bright + gap;
        const half = Math.hypot(gap / 2, w);
        const mean = (bright + dark) / 2;
        // the share of the bright state in the upper level
        const upperShare = (1 - gap / (2 * half)) / 2;
        const band = upperShare >= 0.5 ? mean + half : mean - half;
        const companion = 2 * mean - band;
        const share = Math.max(upperShare, 1 - upperShare);
        const found = separate({ ...pair, band, companion, ratio: share / (1 - share) });
        // rounding of numbers near 1e4, some times the ratio's own
        expect(Math.abs(found.corrected - bright)).toBeLessThan(1e-7);
        expect(Math.abs(found.coupling - w)).toBeLessThan(1e-6 * Math.max(1, w));
        expect(Math.abs(found.corrected - band - found.shift)).toBeLessThan(1e-10);
      }),
      { seed: 91, numRuns: 300 },
    );
  });

  it("uncertainties to first order are those of twenty thousand draws", () => {
    const given = {
      band: 10057.756,
      bandSigma: 0.1,
      companion: 10086.006,
      companionSigma: 0.3,
      ratio: 6.7,
      ratioSigma: 0.3,
    };
    const { sigma, couplingSigma, shiftSigma } = separate(given);
    const { normal } = generator(17);
    const draws = Array.from({ length: 20_000 }, () =>
      separate({
        ...pair,
        band: given.band + 0.1 * normal(),
        companion: given.companion + 0.3 * normal(),
        ratio: given.ratio + 0.3 * normal(),
      }),
    );
    const deviation = (values: readonly number[]) => {
      const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
      return Math.sqrt(values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / values.length);
    };
    // half a percent is the standard error of such a deviation; the curvature in R adds a few tenths
    expect(Math.abs(deviation(draws.map(({ corrected }) => corrected)) / sigma! - 1)).toBeLessThan(0.02);
    expect(Math.abs(deviation(draws.map(({ coupling }) => coupling)) / couplingSigma! - 1)).toBeLessThan(0.02);
    expect(Math.abs(deviation(draws.map(({ shift }) => shift)) / shiftSigma! - 1)).toBeLessThan(0.02);
  });
});

describe("a companion as it is read", () => {
  const read = async (columns: string, cells: string, options: Record<string, string> = {}) => {
    const { series } = await understand(`band,position,companion,ratio${columns}\n${cells}\n`, options);
    return { band: series[0]!.bands[0]!, warnings: series[0]!.warnings };
  };

  it("in the unit and medium of its row", async () => {
    const { band } = await read(",unit,medium", "3-0,993.985(10),991.201(10),6.7,nm,air");
    // demo.md: 10057.756(101) and 10086.006; half a unit of the last printed digit
    expect(Math.abs(band.twoLevels!.measured - 10057.756)).toBeLessThan(5.1e-4);
    expect(Math.abs(band.twoLevels!.companion - 10086.006)).toBeLessThan(5.1e-4);
    expect(Math.abs(band.twoLevels!.companionSigma! - 0.102)).toBeLessThan(5.1e-4);
    expect(band.twoLevels!.asRead).toEqual({ companion: "991.201(10)", ratio: "6.7" });
  });

  it("--sigma-means holds for what stands after ±, in companion and ratio as in the position; parentheses are standard", async () => {
    const means = { "sigma-means": "2sigma" };
    const plus = (await read("", "1-0,3000±0.2,3020±0.4,5±0.6", means)).band.twoLevels!;
    expect([plus.measuredSigma, plus.companionSigma, plus.ratioSigma]).toEqual([0.1, 0.2, 0.3]);
    const brackets = (await read("", "1-0,3000.0(2),3020.0(4),5.0(6)", means)).band.twoLevels!;
    expect([brackets.measuredSigma, brackets.companionSigma, brackets.ratioSigma]).toEqual([0.2, 0.4, 0.6]);
  });

  it("without σ of its own it has that of the band; without any, none is made up", async () => {
    expect((await read("", "1-0,3000.0(2),3020,5")).band.twoLevels!.companionSigma).toBe(0.2);
    const { band } = await read("", "1-0,3000,3020,5.0(6)");
    expect([band.sigma, band.twoLevels!.couplingSigma, band.twoLevels!.shiftSigma]).toEqual([null, null, null]);
  });

  it("as scattered light where there is an exciting line, to the red of it like its band", async () => {
    const nm = (shift: number) => (1e7 / (1e7 / 532 - shift)).toFixed(6);
    const { band } = await read(",unit", `1-0,${nm(3000)},${nm(3020)},5,nm`, { laser: "532.0" });
    // (5·3000 + 3020)/6; wavelengths to 1e-6 nm are 3e-5 cm-1
    expect(Math.abs(band.position - 18020 / 6)).toBeLessThan(1e-4);
    expect(
      (await faultsOf(() => read(",unit", `1-0,${nm(3000)},531,5,nm`, { laser: "532.0" }))).map(({ code }) => code),
    ).toEqual(["not-stokes"]);
  });

  it("TOML has the same names", async () => {
    const toml = (more: string) => `[[bands]]\nband = "1-0"\nposition = "3000.0(2)"\n${more}`;
    const [one] = (await understand(toml('companion = "3020.0(4)"\nratio = "5.0(6)"\n'), {}, "toml")).series;
    const [same] = (await understand("band,position,companion,ratio\n1-0,3000.0(2),3020.0(4),5.0(6)\n")).series;
    expect(one!.bands[0]!.twoLevels).toEqual(same!.bands[0]!.twoLevels);
    const codes = async (more: string) => (await faultsOf(() => understand(toml(more), {}, "toml"))).map((f) => f.code);
    expect(await codes("companion = 3020.0\n")).toEqual(["companion-without-ratio"]);
    expect(await codes("ratio = 5\n")).toEqual(["ratio-without-companion"]);
    expect(await codes("companion = 3020.0\nratio = 0\n")).toEqual(["ratio"]);
    expect(await codes("companion = 3000\nratio = 5\n")).toEqual(["companion-equals-band"]);
  });

  it("is refused beside subtracted spacings, which are no positions", async () => {
    const faults = await faultsOf(() => read("", "1-0,3000.0(2),3020,5", { spacings: "subtracted" }));
    expect(faults.map(({ code }) => code)).toEqual(["companion-of-subtracted"]);
  });

  it("a companion stronger than its band is used, and said", async () => {
    const { band, warnings } = await read("", "1-0,3000.0(2),3020,0.5");
    expect(Math.abs(band.position - (0.5 * 3000 + 3020) / 1.5)).toBeLessThan(1e-9); // rounding
    expect(warnings.find(({ code }) => code === "companion-corrected")!.message).toContain("the stronger of the two");
    const usual = (await read("", "1-0,3000.0(2),3020,2")).warnings;
    expect(usual.find(({ code }) => code === "companion-corrected")!.message).not.toContain("the stronger of the two");
  });
});

describe("a band with its companion in a fit (the invented demo, bond b)", () => {
  const rows = (third: string) =>
    [
      "# bond: 16O 1H",
      "band,position,unit,medium,companion,ratio",
      "1-0,3527.37(3),cm-1,vacuum,,",
      "2-0,6881.26(5),cm-1,vacuum,,",
      third,
      "4-0,764.998(10),nm,air,,",
      "5-0,628.716(10),nm,air,,",
    ]
      .filter((row) => row !== "")
      .join("\n");
  const run = async (third: string) =>
    (await fit({ input: { text: rows(third), source: "b.csv", format: "csv" }, terms: 2, excess: "none" })).series[0]!;

  it("W 9.48, shift 3.65, 3-0 at 10061.41 with the ratio of the scenario, 6.74, printed as 6.7", async () => {
    const { twoLevels } = (await run("3-0,993.985(10),nm,air,991.201(10),6.74")).bands[2]!;
    // half a unit of the last printed digit
    expect(Math.abs(twoLevels!.coupling - 9.48)).toBeLessThan(0.0051);
    expect(Math.abs(twoLevels!.shift - 3.65)).toBeLessThan(0.0051);
    expect(Math.abs(twoLevels!.corrected - 10061.41)).toBeLessThan(0.0051);
    const rounded = (await run("3-0,993.985(10),nm,air,991.201(10),6.7")).bands[2]!.twoLevels!;
    // 0.04 of the ratio is 0.02 of each
    expect(Math.abs(rounded.coupling - 9.48)).toBeLessThan(0.03);
    expect(Math.abs(rounded.corrected - 10061.41)).toBeLessThan(0.03);
  });

  it("agrees with the fit without 3-0: within a standard deviation, and a good χ²", async () => {
    const corrected = await run("3-0,993.985(10),nm,air,991.201(10),6.7(3)");
    const without = await run("");
    for (const key of ["we", "wexe"])
      expect(Math.abs(corrected.constants[key]!.value - without.constants[key]!.value)).toBeLessThan(
        without.constants[key]!.standardUncertainty!,
      );
    expect(corrected.quality.probability!).toBeGreaterThan(0.05);
    expect(corrected.warnings.map(({ code }) => code)).toContain("companion-corrected");
    expect((await run("3-0,993.985(10),nm,air,,")).quality.probability!).toBeLessThan(1e-6);
  });

  it.each([
    ["a ratio of zero", "991.201(10),0", "ratio"],
    ["a negative ratio", "991.201(10),-2", "ratio"],
    ["no ratio", "991.201(10),", "companion-without-ratio"],
    ["no companion", ",6.7", "ratio-without-companion"],
    ["a companion equal to its band", "993.985,6.7", "companion-equals-band"],
  ])("refuses %s", async (_, cells, code) => {
    const error = await run(`3-0,993.985(10),nm,air,${cells}`).catch((wrong: unknown) => wrong);
    expect((error as InputError).faults.map((fault) => fault.code)).toEqual([code]);
  });
});
