import { describe, expect, it } from "vitest";
import { fit } from "../../../src/commands/fit.ts";
import type { FitRequest } from "../../../src/commands/request.ts";

// H35Cl: Rank, Rao, Wiggins, J. Mol. Spectrosc. 17, 122 (1965), from memory; the tests need only that they are such bands
const hcl = "2885.9775 5667.9841 8346.7821 10922.803 13396.19";

async function one(request: FitRequest) {
  const series = (await fit(request)).series[0]!;
  const warning = series.warnings.find(({ code }) => code === "extrapolation-error" || code === "no-reference")!;
  const row = (method: string) => series.dissociation.find((found) => found.method === method)!;
  return { series, warning, row };
}

describe("the empirical error in a result", () => {
  it("stands on the rows of the Morse form and on no other, with the shape the document promises", async () => {
    const { row } = await one({ series: hcl, terms: 3, bond: "1H 35Cl" });
    for (const method of ["morse", "morse-refit"]) {
      const { empirical } = row(method);
      expect(empirical).toMatchObject({
        class: "hydride",
        references: expect.any(Number),
        covered: expect.any(Number),
      });
      expect(empirical!.correctedRange[0]).toBeGreaterThan(13396.19);
    }
    for (const method of ["turning-point", "spacing-sum"]) expect(row(method).empirical).toBeUndefined();
  });

  it("warns with the coverage, the range of fitted/accepted and the corrected range", async () => {
    const { warning, row } = await one({ series: hcl, bond: "1H 35Cl" });
    const { errorRange, correctedRange } = row("morse").empirical!;
    expect(warning.code).toBe("extrapolation-error");
    for (const x of errorRange) expect(warning.message).toContain(x.toFixed(2));
    for (const x of correctedRange) expect(warning.message).toContain(x.toFixed(0));
    expect(warning.message).toContain("empirical");
  });

  it("asks for the bond when none is given, and then leaves nothing out", async () => {
    const { warning, row } = await one({ series: hcl });
    expect(row("morse").empirical!.class).toBe("all");
    expect(warning.message).toContain("give --bond");
    const reduced = await one({ series: hcl, reducedMass: 0.98 });
    expect(reduced.warning.message).toContain("give --bond");
  });

  it("takes the top from the bands where they are spacings", async () => {
    const direct = await one({ series: "2000 3900 5700", bond: "12C 1H" });
    const spacings = await one({ bands: "1-0 2000, 2-1 1900, 3-2 1800", bond: "12C 1H" });
    // an exact Morse progression: both fits are the same, to rounding
    const [a, b] = [direct, spacings].map(({ row }) => row("morse").empirical!.correctedRange[0]);
    expect(Math.abs(a! / b! - 1)).toBeLessThan(1e-9);
  });

  it("names gaps below the highest band", async () => {
    const { warning } = await one({ bands: "1-0 2885.98, 2-0 5667.98, 5-0 13396.19", bond: "1H 35Cl" });
    expect(warning.message).toContain("bands are missing");
  });

  it("is null with a warning where constants are held, and where no well reaches", async () => {
    const held = await one({ series: hcl, bond: "1H 35Cl", terms: 3, fix: "weye=0.22" });
    expect(held.row("morse").empirical).toBeNull();
    expect(held.warning).toMatchObject({ code: "no-reference", message: expect.stringContaining("--fix") });
    const iodine = await one({ series: "213.3 425.4", bond: "127I 127I" });
    expect(iodine.row("morse").empirical).toBeNull();
    expect(iodine.warning.message).toContain("no reference at this coverage");
  });

  it("is absent where no Morse D0 follows", async () => {
    const { row, warning } = await one({ series: "1000 2010 3040", bond: "12C 1H" });
    expect(row("morse").empirical).toBeUndefined();
    expect(warning).toBeUndefined();
  });
});
