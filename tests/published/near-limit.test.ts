import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { findModel, type Model } from "../../src/models/index.ts";
import { limitSlope } from "../../src/models/near-limit/index.ts";

const model = (await findModel("near-limit")) as Model;

describe("I2 B, n = 5: C5 3.1e5 cm-1 Å⁵, v_D 87.35 (LeRoy & Bernstein 1970, from memory); μ 63.452236 u", () => {
  const mass = 63.452236;
  const options = { terms: null, fixed: {}, power: 5, reducedMass: mass };
  /** D - E(v) */
  const below = (v: number) =>
    -model.prepare([{ label: `${v}-0`, isotopologue: null }], options).evaluate([0, 87.35, 3.1e5]).calculated[0]!;

  it("K5 = 0.515355 (COMPUTED)", () => {
    // half a unit of the last printed digit
    expect(Math.abs(limitSlope(5, 3.1e5, mass) - 0.515355)).toBeLessThan(5e-7);
  });

  it("v' = 80 at 20041.5795 cm-1 (Gerstenkorn & Luc 1985, READ) puts the limit at 20043.11 (COMPUTED)", () => {
    expect(Math.abs(20041.5795 + below(80) - 20043.11)).toBeLessThan(5e-3); // half a unit of the last printed digit
  });

  it("v' = 43 at 19433.6763 cm-1 (Gerstenkorn & Luc 1985, READ) puts it at 20046.1 (COMPUTED)", () => {
    expect(Math.abs(19433.6763 + below(43) - 20046.1)).toBeLessThan(0.05); // half a unit of the last printed digit
  });
});

describe("H2, n = 6, levels v = 1 to 14 of Komasa et al. 2011 (READ): too curved up to the last one", () => {
  const text = readFileSync(new URL("../../datasets/h2.csv", import.meta.url), "utf8");
  const request: FitRequest = { input: { text, source: "h2.csv", format: "csv" }, model: "near-limit", power: 6 };
  const lines = text.trim().split("\n");
  const from = (v: number) => lines.filter((line) => !/^\d/.test(line) || Number.parseInt(line, 10) >= v).join("\n");
  const levelsFrom = (v: number): FitRequest => ({ ...request, input: { ...request.input!, text: from(v) } });

  it.each<[string, FitRequest]>([
    ["all levels, no σ", request],
    ["all levels, σ 0.001", { ...request, sigma: 0.001 }],
    ["all levels, no masses", { ...request, input: { ...request.input!, text: text.replace("# bond: 1H 1H\n", "") } }],
    ["the upper seven", levelsFrom(8)],
    ["the upper five", levelsFrom(10)],
    ["the upper four, σ 0.001", { ...levelsFrom(11), sigma: 0.001 }],
    // C6 of H + H, 6.499 atomic units (from memory), is 3.13e4 cm-1 Å⁶
    ["C6 given", { ...request, cn: "3.13e4" }],
    ["the limit given (36118.0695, READ)", { ...request, limit: "36118.0695" }],
  ])("%s: refused, as the first warning", async (_, asked) => {
    const { dissociation, predictions, warnings } = (await fit(asked)).series[0]!;
    expect(warnings[0]!.code).toBe("not-near-limit");
    expect(dissociation.map(({ method, de, d0 }) => [method, de, d0])).toEqual([["near-limit", null, null]]);
    expect(dissociation[0]!.note).toContain("refused");
    expect(predictions).toEqual([]);
  });

  it("names the tests it failed: the line is curved, and the limit falls when low levels are left out", async () => {
    const { warnings } = (await fit(request)).series[0]!;
    // D of all levels, of the bent line and of the upper seven: COMPUTED with scipy's least_squares
    for (const part of ["curvature", "drift", "(D-E)^(1/3)", "from 40737.4 to 37306.3", "from 40737.4 to 37462 "])
      expect(warnings[0]!.message).toContain(part);
  });

  it("the constants still describe the levels: D 40737.36(617.13), v_D 26.310(778) (COMPUTED with scipy)", async () => {
    const { constants, quality } = (await fit(request)).series[0]!;
    // half a unit of the last printed digit
    expect(Math.abs(constants.d!.value - 40737.36)).toBeLessThan(5e-3);
    expect(Math.abs(constants.d!.standardUncertainty! - 617.13)).toBeLessThan(5e-3);
    expect(Math.abs(constants.vd!.value - 26.31)).toBeLessThan(5e-4);
    expect(Math.abs(constants.vd!.standardUncertainty! - 0.778)).toBeLessThan(5e-4);
    expect(Math.abs(quality.rms - 238.423)).toBeLessThan(5e-4);
  });
});

describe("five bands of HCl lie far below their limit", () => {
  it("are refused for their reach", async () => {
    const series = "2885.98 5667.98 8346.78 10922.81 13396.19"; // textbook series, READ; D0 is 35759
    const { warnings, dissociation } = (await fit({ series, bond: "1H 35Cl", model: "near-limit", power: 6 }))
      .series[0]!;
    expect(warnings[0]!.code).toBe("not-near-limit");
    expect(warnings[0]!.message).toContain("(reach)");
    expect(dissociation[0]!.d0).toBeNull();
  });
});
