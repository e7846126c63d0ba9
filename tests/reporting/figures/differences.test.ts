import { describe, expect, it } from "vitest";
import { fit } from "../../../src/commands/fit.ts";
import { differencesFigure } from "../../../src/reporting/figures/differences.ts";

const options = { widthMm: 85, notation: "equilibrium" } as const;
const file = (names: readonly string[]) => ({
  text: [
    "series,band,position,sigma",
    ...names.flatMap((name, i) => [1, 2, 3].map((v) => `${name},${v}-0,${v * (3700 - 20 * i) - v * (v + 1) * 80},0.1`)),
  ].join("\n"),
  source: "bands.csv",
  format: "csv" as const,
});

describe("figure of differences", () => {
  it("has a panel for ωe, ωexe and D0, a row a pair, intervals of the document, and a line at zero", async () => {
    const { comparisons } = await fit({ input: file(["a", "b", "c"]), terms: 2, excess: "none" });
    const figure = differencesFigure(comparisons, options)!;
    expect(figure.panels.map(({ tag }) => tag)).toEqual(["(a)", "(b)", "(c)"]);
    const [panel] = figure.panels;
    expect(panel!.y.tickLabels).toEqual(["b − a", "c − a", "c − b"]);
    const points = panel!.traces.flatMap((trace) => (trace.kind === "points" ? trace.points : []));
    expect(points.map(({ x }) => x)).toEqual(comparisons.map(({ differences }) => differences[0]!.difference.value));
    const [low, high] = comparisons[0]!.differences[0]!.difference.interval95!;
    // half of the interval, to rounding
    expect(Math.abs(points[0]!.xError! - (high - low) / 2)).toBeLessThan(1e-9);
    expect(panel!.x.min).toBeLessThan(0);
    expect(panel!.x.max).toBeGreaterThanOrEqual(0);
  });

  it("leaves out a shared constant, and is none for one series or more pairs than a page holds", async () => {
    const shared = await fit({ input: file(["a", "b"]), share: "wexe", excess: "none" });
    expect(differencesFigure(shared.comparisons, options)!.panels).toHaveLength(2);
    expect(differencesFigure((await fit({ series: "2885.98 5667.98" })).comparisons, options)).toBeNull();
    const many = await fit({ input: file(["a", "b", "c", "d", "e", "f", "g"]), terms: 2, excess: "none" });
    expect(many.comparisons).toHaveLength(21);
    expect(differencesFigure(many.comparisons, options)).toBeNull();
  });
});
