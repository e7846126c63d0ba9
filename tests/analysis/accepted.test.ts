import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { quotable } from "../../src/reporting/text/quotable.ts";

const hcl = { series: "2885.9775 5667.9841 8346.7821 10922.803 13396.19", bond: "1H 35Cl", terms: 2 };

describe("an accepted D0", () => {
  it("is read in any unit of energy with its uncertainty", async () => {
    // Huber & Herzberg 1979, READ: D0(HCl) 4.4336 eV = 35759 cm-1
    const { series } = await fit({ ...hcl, accepted: "4.4336(6) eV" });
    expect(series[0]!.accepted!.value).toBeCloseTo(35759.4, 0); // four decimals of an eV are 0.4 cm-1
    expect(series[0]!.accepted!.standardUncertainty).toBeCloseTo(4.84, 2); // 0.0006 eV
  });

  it("below an observed level: a warning that names both", async () => {
    const { series } = await fit({ ...hcl, accepted: 12000 });
    const warning = series[0]!.warnings.find(({ code }) => code === "accepted-below-levels")!;
    expect(warning.about).toBe("5-0");
    expect(warning.message).toContain("12000");
    expect(warning.message).toContain("13396.19");
  });

  it("stands in the sentence to quote, with the ratio and whether the empirical range holds it", async () => {
    const { series } = await fit({ ...hcl, accepted: "35759(5)" });
    const sentence = quotable(series[0]!)!;
    const ratio = series[0]!.dissociation[0]!.d0!.value / 35759;
    expect(sentence).toContain(`fitted/accepted = ${ratio.toFixed(3)}`);
    // five bands of HCl overshoot by about 18 % (COMPUTED from published wells)
    expect(ratio).toBeGreaterThan(1.15);
    expect(ratio).toBeLessThan(1.2);
    expect(sentence).toMatch(/lies (in|outside) the empirical range/);
  });
});
