import { describe, expect, it } from "vitest";
import type { AnalysisOptions } from "../../src/analysis/index.ts";
import { normal, seeded } from "../fitting/random.ts";
import { analysed, position, synthetic, type Truth } from "./synthetic.ts";

const truth: Truth = { we: 3870, wexe: 83, weye: 0 };
const levels = [1, 2, 3, 4, 5];
const d0 = truth.we ** 2 / (4 * truth.wexe) - truth.we / 2 + truth.wexe / 4;

/** Share of series whose 95 % interval holds the truth, for ωe, D0 and the 7-0 band. */
function coverage(count: number, sigma: number, stated: number, options: Partial<AnalysisOptions>, seed = 4): number[] {
  const next = normal(seeded(seed));
  const held = [0, 0, 0];
  for (let trial = 0; trial < count; trial++) {
    const result = analysed(
      synthetic(
        truth,
        levels,
        levels.map(() => sigma * next()),
        stated,
      ),
      { terms: 2, upTo: 7, ...options },
    );
    const inside = (bounds: readonly [number, number] | null, value: number) =>
      Number(bounds !== null && bounds[0] <= value && value <= bounds[1]);
    held[0]! += inside(result.constants.we!.interval95, truth.we);
    held[1]! += inside(result.dissociation[0]!.d0!.interval95, d0);
    held[2]! += inside(result.predictions[6]!.position.interval95, position(truth, 7));
  }
  return held.map((h) => h / count);
}

/** Three binomial standard errors of a share of 0.95, and the 2 % the issue of non-linearity may cost. */
const bound = (count: number) => 3 * Math.sqrt((0.95 * 0.05) / count);

describe("coverage of 95 % intervals, five bands, σ known", () => {
  it.each([
    ["linear", 600],
    ["profile", 150],
    ["resample", 150],
  ] as const)("%s intervals hold the truth in 0.95 of %i series, within counting error", (intervals, count) => {
    for (const share of coverage(count, 1, 1, { intervals, excess: "none" }))
      expect(Math.abs(share - 0.95)).toBeLessThan(bound(count));
  });

  it("σ stated half the true value: without treatment intervals hold far too seldom; scatter and Birge bring them back up", () => {
    const none = coverage(400, 1, 0.5, { excess: "none" });
    const scatter = coverage(400, 1, 0.5, { excess: "scatter" });
    const birge = coverage(400, 1, 0.5, { excess: "birge" });
    none.forEach((share, k) => {
      // a normal interval at half its width holds in 67 %; three binomial standard errors are 7 %
      expect(Math.abs(share - 0.67)).toBeLessThan(0.07);
      expect(scatter[k]!).toBeGreaterThan(0.78);
      expect(birge[k]!).toBeGreaterThan(0.78);
    });
  });
});

describe("choice of terms, five bands, σ known", () => {
  const count = 600;
  // three binomial standard errors at 95 %
  const slack = bound(count);

  it("picks two terms in at least 95 % of Morse series", () => {
    const next = normal(seeded(21));
    let two = 0;
    for (let trial = 0; trial < count; trial++)
      two += Number(
        analysed(
          synthetic(
            truth,
            levels,
            levels.map(() => next()),
            1,
          ),
        ).terms === 2,
      );
    expect(two / count).toBeGreaterThan(0.95 - slack);
  });

  it("picks three in at least 95 % when ωeye is five standard errors", () => {
    const next = normal(seeded(22));
    const three = analysed(
      synthetic(
        truth,
        levels,
        levels.map(() => 0),
        1,
      ),
      { terms: 3 },
    );
    const weye = 5 * three.constants.weye!.standardUncertainty!;
    let right = 0;
    for (let trial = 0; trial < count; trial++)
      right += Number(
        analysed(
          synthetic(
            { ...truth, weye },
            levels,
            levels.map(() => next()),
            1,
          ),
        ).terms === 3,
      );
    expect(right / count).toBeGreaterThan(0.95 - slack);
  });

  it("with one band (v = 1–4) ten σ off names that band in at least 95 % and adds no term", () => {
    const next = normal(seeded(23));
    let named = 0;
    let added = 0;
    for (let trial = 0; trial < count; trial++) {
      const off = trial % 4;
      const errors = levels.map((_, i) => next() + (i === off ? (trial % 8 < 4 ? 10 : -10) : 0));
      const { terms, warnings } = analysed(synthetic(truth, levels, errors, 1));
      named += Number(warnings.find(({ code }) => code === "band-stands-out")?.about === `${off + 1}-0`);
      added += Number(terms !== 2);
    }
    expect(named / count).toBeGreaterThan(0.95 - slack);
    expect(added / count).toBeLessThan(0.05);
  });

  it("names nobody with one degree of freedom", () => {
    const { warnings } = analysed(synthetic(truth, [1, 2, 3], [0, 30, 0], 1), { terms: 2 });
    expect(warnings.map(({ code }) => code)).not.toContain("band-stands-out");
  });
});
