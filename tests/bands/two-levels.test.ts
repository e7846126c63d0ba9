import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { separate } from "../../src/bands/two-levels.ts";
import { fit } from "../../src/commands/fit.ts";
import type { InputError } from "../../src/messages/index.ts";
import { generator } from "../analysis/ladders.ts";

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
    const { sigma, couplingSigma } = separate(given);
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
