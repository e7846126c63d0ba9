import { describe, expect, it } from "vitest";
import type { SeriesResult } from "../../src/analysis/index.ts";
import { fit } from "../../src/commands/fit.ts";

// The demo scenario is invented; what a right analysis finds in it was COMPUTED independently of this code.
const a =
  "1-0 3599.83(3), 2-0 7034.69(5), 2-1 3434.73(8), 3-0 970.056(10) nm air, 4-0 745.286(10) nm air, 5-0 611.031(10) nm air, 6-0 522.111(15) nm air";
const b = "1-0 3527.37(3), 2-0 6881.26(5), 3-0 993.985(10) nm air, 4-0 764.998(10) nm air, 5-0 628.716(10) nm air";

const one = async (bands: string, terms: number): Promise<SeriesResult> => (await fit({ bands, terms })).series[0]!;
const prediction = ({ predictions }: SeriesResult, label: string) => predictions.find((line) => line.label === label)!;
const within = (value: number | null | undefined, expected: number, half: number) =>
  expect(Math.abs(value! - expected)).toBeLessThanOrEqual(half);

describe("the demo, bond a", () => {
  it("the air wavelengths become 10305.857(106), 13413.973(180), 16361.253(268), 19147.684(550) cm-1", async () => {
    const { bands } = await one(a, 3);
    const expected = [
      [10305.857, 0.106],
      [13413.973, 0.18],
      [16361.253, 0.268],
      [19147.684, 0.55],
    ];
    bands.slice(3).forEach((band, i) => {
      // half a unit of the last printed digit
      within(band.observed, expected[i]![0]!, 5e-4);
      within(band.standardUncertainty, expected[i]![1]!, 5e-4);
    });
  });

  it("two terms: χ² 758.9 on 5, and a warning that the data call for more", async () => {
    const { quality, warnings } = await one(a, 2);
    within(quality.chiSquare, 758.9, 0.3); // computed there with σ rounded to three digits, which moves χ² by 1e-3 at most
    expect(quality.degreesOfFreedom).toBe(5);
    expect(warnings.map(({ code }) => code)).toContain("more-terms");
  });

  it("three terms: χ² 4.96 on 4 (P 0.29), 3765.96(11), 83.383(55), 0.197(7); 7-0 at 21775.5(8), 459.103 nm in air", async () => {
    const result = await one(a, 3);
    const { quality, constants } = result;
    within(quality.chiSquare, 4.96, 0.005);
    expect(quality.degreesOfFreedom).toBe(4);
    within(quality.probability, 0.29, 0.005);
    within(constants.we!.value, 3765.96, 0.005);
    within(constants.we!.standardUncertainty, 0.11, 0.005);
    within(constants.wexe!.value, 83.383, 5e-4);
    within(constants.wexe!.standardUncertainty, 0.055, 5e-4);
    within(constants.weye!.value, 0.197, 5e-4);
    within(constants.weye!.standardUncertainty, 0.007, 5e-4);
    within(prediction(result, "7-0").position.value, 21775.5, 0.05);
    within(prediction(result, "7-0").position.standardUncertainty, 0.8, 0.05);
    within(prediction(result, "7-0").airWavelength, 459.103, 5e-4);
    expect(quality.excess.applied).toBe(false);
  });

  it("four terms: χ² 4.81 on 3", async () => {
    within((await one(a, 4)).quality.chiSquare, 4.81, 0.005);
  });

  it("read as vacuum, three terms: χ² 353 on 4, ω 3764.9, and the medium is suspected", async () => {
    const { quality, constants } = (await fit({ bands: a.replaceAll(" air", ""), terms: 3, excess: "none" }))
      .series[0]!;
    within(quality.chiSquare, 353, 0.5);
    within(constants.we!.value, 3764.9, 0.1); // one digit given; rounded or cut is not said
  });
});

describe("the demo, bond b", () => {
  it("all five bands, two terms: χ² 1046 on 3, 3-0 stands out at -32; more terms do not help (802, 721)", async () => {
    const { quality, bands, warnings } = await one(b, 2);
    within(quality.chiSquare, 1046, 0.5);
    expect(quality.degreesOfFreedom).toBe(3);
    within(bands[2]!.studentizedResidual, -32, 0.5);
    expect(warnings.find(({ code }) => code === "band-stands-out")?.about).toBe("3-0");
    within((await one(b, 3)).quality.chiSquare, 802, 0.5);
    within((await one(b, 4)).quality.chiSquare, 721, 0.5);
  });

  it("without 3-0: 3700.96(4), 86.783(12), χ² 3.2 on 2; 6-0 at 18560.9(3), 538.618 nm in air", async () => {
    const result = await one(b.replace(" 3-0 993.985(10) nm air,", ""), 2);
    const { quality, constants } = result;
    within(quality.chiSquare, 3.2, 0.05);
    within(constants.we!.value, 3700.96, 0.005);
    within(constants.we!.standardUncertainty, 0.04, 0.005);
    within(constants.wexe!.value, 86.783, 5e-4);
    within(constants.wexe!.standardUncertainty, 0.012, 5e-4);
    within(prediction(result, "6-0").position.value, 18560.9, 0.05);
    within(prediction(result, "6-0").position.standardUncertainty, 0.3, 0.05);
    within(prediction(result, "6-0").airWavelength, 538.618, 5e-4);
  });
});

describe("the demo, number of terms chosen by the bands", () => {
  it("three for a, with four refused", async () => {
    const { terms, comparison, warnings } = (await fit({ bands: a, terms: "auto" })).series[0]!;
    expect(terms).toBe(3);
    expect(comparison!.map((row) => [row.terms, row.chosen])).toEqual([2, 3, 4, 5, 6].map((n) => [n, n === 3]));
    expect(warnings.map(({ code }) => code)).not.toContain("band-stands-out");
  });

  it("two for b, with 3-0 named and no term bought by it; without 3-0 two terms pass", async () => {
    const all = (await fit({ bands: b, terms: "auto" })).series[0]!;
    expect(all.terms).toBe(2);
    expect(all.warnings.find(({ code }) => code === "band-stands-out")?.about).toBe("3-0");
    const rest = (await fit({ bands: b.replace(" 3-0 993.985(10) nm air,", ""), terms: "auto" })).series[0]!;
    expect(rest.terms).toBe(2);
    expect(rest.quality.excess.applied).toBe(false);
  });

  it("a robust fit of b sets 3-0 aside and lands on the fit without it", async () => {
    const robust = (await fit({ bands: b, robust: "tukey" })).series[0]!;
    expect(robust.bands[2]!.weight).toBeLessThan(1e-3);
    const rest = (await fit({ bands: b.replace(" 3-0 993.985(10) nm air,", "") })).series[0]!;
    // Tukey's weights of the four good bands stay near 1: within a tenth of a standard uncertainty
    for (const key of ["we", "wexe"])
      within(robust.constants[key]!.value, rest.constants[key]!.value, 0.3 * rest.constants[key]!.standardUncertainty!);
    expect(robust.warnings.find(({ code }) => code === "robust-fit")?.message).toContain("3-0");
  });
});
