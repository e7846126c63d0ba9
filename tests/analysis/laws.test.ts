import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { SeriesResult } from "../../src/analysis/index.ts";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";

const one = async (request: FitRequest): Promise<SeriesResult> => (await fit(request)).series[0]!;
const seeded = { seed: 20261201, numRuns: 60 };

/** A Morse oscillator with at least eight bound levels. */
const morse = fc
  .record({
    we: fc.double({ min: 400, max: 4400, noNaN: true }),
    ratio: fc.double({ min: 0.003, max: 0.04, noNaN: true }),
  })
  .map(({ we, ratio }) => ({ we, wexe: we * ratio }));
const levels = fc.uniqueArray(fc.integer({ min: 1, max: 8 }), { minLength: 3, maxLength: 6 });
const position = ({ we, wexe }: { we: number; wexe: number }, v: number) => we * v - wexe * v * (v + 1);
const bands = (m: { we: number; wexe: number }, vs: readonly number[], scale = 1) =>
  vs.map((v) => `${v}-0 ${position(m, v) * scale}`).join(", ");

describe("laws of the fit", () => {
  it("a Morse oscillator comes back from its own bands, whatever bands and in whatever order", async () => {
    await fc.assert(
      fc.asyncProperty(morse, levels, async (m, vs) => {
        const { constants, dissociation } = await one({ bands: bands(m, vs) });
        // positions are written with 16 digits; the design is conditioned below 1e3
        expect(Math.abs(constants.we!.value / m.we - 1)).toBeLessThan(1e-11);
        expect(Math.abs(constants.wexe!.value / m.wexe - 1)).toBeLessThan(1e-9);
        const d0 = m.we ** 2 / (4 * m.wexe) - m.we / 2 + m.wexe / 4;
        expect(Math.abs(dissociation[0]!.d0!.value / d0 - 1)).toBeLessThan(1e-9);
      }),
      seeded,
    );
  });

  it("twice the positions and σ give twice the constants, their uncertainties and the energies", async () => {
    await fc.assert(
      fc.asyncProperty(morse, levels, async (m, vs) => {
        const a = await one({ bands: bands(m, vs), sigma: 0.5 });
        const b = await one({ bands: bands(m, vs, 2), sigma: 1 });
        for (const key of ["we", "wexe"]) {
          // doubling is exact; only the printed digits of the input are rounded
          expect(Math.abs(b.constants[key]!.value / a.constants[key]!.value - 2)).toBeLessThan(1e-9);
          expect(
            Math.abs(b.constants[key]!.standardUncertainty! / a.constants[key]!.standardUncertainty! - 2),
          ).toBeLessThan(1e-12);
        }
        expect(Math.abs(b.dissociation[0]!.d0!.value / a.dissociation[0]!.d0!.value - 2)).toBeLessThan(1e-8);
      }),
      seeded,
    );
  });

  it("a common offset cancels in subtracted spacings except for 1-0", async () => {
    const spacings = "1-0 3704, 2-1 3538, 3-2 3372, 4-3 3206";
    const a = await one({ bands: spacings, spacings: "subtracted", sigma: 0.1, sharedSigma: 0.5, excess: "none" });
    const b = await one({ series: "3704 7242 10614 13820", sigma: 0.1, sharedSigma: 0.5, excess: "none" });
    // the same measurements told in two ways: an identity of generalised least squares
    for (const key of ["we", "wexe"])
      expect(Math.abs(a.constants[key]!.standardUncertainty! - b.constants[key]!.standardUncertainty!)).toBeLessThan(
        1e-8,
      );
  });

  it("a shared wavelength offset keeps its sign and grows with the square of the position", async () => {
    const { series } = await fit({ series: "3704 7242 10614 13820", sigma: 0.1, sharedSigma: "0.01 nm" });
    expect(series[0]!.constants.we!.standardUncertainty).toBeGreaterThan(
      (await one({ series: "3704 7242 10614 13820", sigma: 0.1 })).constants.we!.standardUncertainty!,
    );
  });

  it("positions, σ and units: nm in vacuum and cm-1 give the same constants", async () => {
    await fc.assert(
      fc.asyncProperty(morse, levels, async (m, vs) => {
        const inNm = vs.map((v) => `${v}-0 ${1e7 / position(m, v)} nm`).join(", ");
        const a = await one({ bands: inNm });
        // conversion there and back costs two roundings of 1e-16 relative, times the conditioning of wexe
        expect(Math.abs(a.constants.wexe!.value / m.wexe - 1)).toBeLessThan(1e-9);
      }),
      seeded,
    );
  });

  it("a held constant has no uncertainty of its own, and a prior pulls towards its value", async () => {
    const held = await one({ series: "2885.98 5667.98 8346.78", terms: 2, fix: "weye=0.22" });
    expect(held.terms).toBe(3);
    expect(held.held).toEqual(["weye"]);
    expect(held.constants.weye).toMatchObject({ value: 0.22, standardUncertainty: null });
    expect(held.quality.degreesOfFreedom).toBe(1);
    const prior = await one({ series: "2885.98 5667.98 8346.78", sigma: 0.01, fix: "weye=0.22(1)" });
    expect(prior.quality.degreesOfFreedom).toBe(1);
    expect(prior.constants.weye!.standardUncertainty).toBeLessThanOrEqual(0.01);
  });

  it("predictions stop at the highest bound level and default to three beyond the last band", async () => {
    const shallow = await one({ bands: bands({ we: 1000, wexe: 100 }, [1, 2, 3]), upTo: 30 });
    expect(shallow.derived!.highestLevel!.value).toBe(4);
    expect(shallow.predictions.at(-1)!.label).toBe("4-0");
    expect(shallow.warnings.map(({ code }) => code)).toContain("above-highest-level");
    const deep = await one({ bands: bands({ we: 3870, wexe: 83 }, [1, 2, 4]) });
    expect(deep.predictions.at(-1)!.label).toBe("7-0");
  });

  it("the four intercepts and slopes are those of the straight lines through exact Morse bands", async () => {
    const { derived } = await one({ bands: bands({ we: 3870, wexe: 83 }, [1, 2, 3, 4]) });
    // ν̃/v = (ω - ωx) - ωx·v and ΔG = (ω - ωx) - 2ωx·(v + ½): algebra; rounding only
    expect(derived!.positionPlotIntercept.value).toBeCloseTo(3787, 7);
    expect(derived!.positionPlotSlope.value).toBeCloseTo(-83, 7);
    expect(derived!.spacingPlotIntercept.value).toBeCloseTo(3787, 7);
    expect(derived!.spacingPlotSlope.value).toBeCloseTo(-166, 7);
  });

  it("the spacing sum is exact on a Morse ladder, with gaps and hot bands too", async () => {
    const m = { we: 3870, wexe: 83 };
    const d0 = m.we ** 2 / (4 * m.wexe) - m.we / 2 + m.wexe / 4;
    for (const labels of [
      bands(m, [1, 2, 3, 4]),
      bands(m, [1, 3, 4, 6]),
      `${bands(m, [1, 2])}, 4-2 ${position(m, 4) - position(m, 2)}`,
    ]) {
      const sum = (await one({ bands: labels, terms: 2 })).dissociation.find(({ method }) => method === "spacing-sum")!;
      // mean spacings of a Morse ladder lie on one straight line; the remainder under it is exact up to (ωx/4) from ½-steps
      expect(Math.abs(sum.d0!.value - d0)).toBeLessThan(0.5 * m.wexe);
    }
  });

  it("the spacing sum is null when the top is not linked to v = 0", async () => {
    const sum = (await one({ bands: "1-0 3704, 3-2 3372, 4-3 3206" })).dissociation.at(-1)!;
    expect(sum.d0).toBeNull();
    expect(sum.note).toContain("not linked");
  });

  it("stability: the row with all bands is the fit itself", async () => {
    const result = await one({ series: "2885.9775 5667.9841 8346.7821 10922.803 13396.19" });
    expect(result.stability.map(({ bands: count }) => count)).toEqual([2, 3, 4, 5]);
    expect(result.stability.at(-1)!.we).toBe(result.constants.we!.value);
    expect(result.stability.at(-1)!.d0).toBe(result.dissociation[0]!.d0!.value);
    // COMPUTED: two terms on 1-0 … 3-0 of HCl
    expect(Math.abs(result.stability[1]!.we - 2989.467)).toBeLessThan(5e-4);
  });
});
