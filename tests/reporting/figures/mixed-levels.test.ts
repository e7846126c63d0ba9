import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import type { SeriesResult } from "../../../src/analysis/index.ts";
import { fit } from "../../../src/commands/fit.ts";
import { compositionFigure } from "../../../src/reporting/figures/composition.ts";
import type { FigureSpec } from "../../../src/reporting/figures/figure-spec.ts";
import { figuresFor } from "../../../src/reporting/figures/figures-for.ts";
import { levelResidualsFigure } from "../../../src/reporting/figures/level-residuals.ts";
import { mixedLevelsFigure } from "../../../src/reporting/figures/mixed-levels.ts";
import { splittingsFigure } from "../../../src/reporting/figures/splittings.ts";

const options = { widthMm: 85, notation: "local" } as const;
let water: SeriesResult;
let polyad: SeriesResult;
let simple: SeriesResult;

beforeAll(async () => {
  const text = readFileSync("datasets/coupled/h2o.csv", "utf8");
  water = (await fit({ input: { text, source: "h2o.csv", format: "csv" }, model: "coupled", bonds: 2 })).series[0]!;
  const bands = "1_1 3037.7, 1_2 2704.3, 2_1 5959.5, 2_2 5710, 2_3 5340.5, 3_1 8785.4, 3_2 8591.6";
  polyad = (await fit({ bands, model: "polyad", fix: "gbb=5", sigma: 0.5 })).series[0]!;
  simple = (await fit({ series: "2885.98 5667.98 8346.78" })).series[0]!;
});

const points = (figure: FigureSpec | null) =>
  figure!.panels[0]!.traces.flatMap((trace) => (trace.kind === "points" ? trace.points : []));
const lines = (figure: FigureSpec | null) => figure!.panels[0]!.traces.filter((trace) => trace.kind === "line");

describe("figures of levels that mix", () => {
  it("are made only for models that have them, one set a series", () => {
    const names = (all: readonly SeriesResult[]) => figuresFor(all, options).map(({ name }) => name);
    expect(names([water])).toEqual(expect.arrayContaining(["levels", "level-residuals", "splittings", "composition"]));
    expect(names([polyad])).toEqual(expect.arrayContaining(["levels", "level-residuals", "composition"]));
    expect(names([polyad])).not.toContain("splittings");
    expect(names([water, polyad])).toEqual(expect.arrayContaining(["levels-1", "levels-2"]));
    expect(names([simple]).filter((name) => /level|split|compos/.test(name))).toEqual([]);
  });

  it("level diagram: three strokes a level, one mark an observed level at its energy less the same multiple", () => {
    const figure = mixedLevelsFigure(water, options, "levels");
    expect(lines(figure)).toHaveLength(3 * water.levels!.length);
    expect(points(figure)).toHaveLength(water.bands.length);
    const spacing = Number(/less (\d+) cm/.exec(figure!.caption)![1]);
    expect(Math.abs(points(figure)[0]!.y - (3657.053 - spacing))).toBeLessThan(1e-9);
  });

  it("polyads: whole N, a heavy stroke as long as the stretch share on a thin one of full length", () => {
    const figure = mixedLevelsFigure(polyad, options, "levels");
    const shown = polyad.levels!.filter(({ N, l }) => l === 0 && Number.isInteger(N));
    expect(lines(figure)).toHaveLength(4 * shown.length);
    const length = (i: number) => lines(figure)[i]!.points[1]!.x - lines(figure)[i]!.points[0]!.x;
    shown.forEach(({ stretchShare }, i) => {
      // rounding
      expect(Math.abs(length(4 * i + 3) / length(4 * i + 2) - stretchShare!)).toBeLessThan(1e-9);
    });
  });

  it("polyads: half N with l = 1 have columns of their own once one of their levels is observed, each observed level a mark", async () => {
    const bands = `1_1 3037.7, 1_2 2704.3, 2_1 5959.5, 2_2 5710, 2_3 5340.5, 3_1 8785.4, 3_2 8591.6, 1.5_1:1 4398.4`;
    const both = (await fit({ bands, model: "polyad", sigma: 0.5 })).series[0]!;
    const figure = mixedLevelsFigure(both, options, "levels");
    const shown = both.levels!.filter(({ l }) => l! < 2);
    expect(lines(figure)).toHaveLength(4 * shown.length);
    expect(points(figure)).toHaveLength(8);
    expect(figure!.caption).toContain("l = 1 for half N");
    // no column reaches into the next: all of one column within half a step, 0.25
    lines(figure).forEach(({ points: ends }, i) => {
      for (const { x } of ends) expect(Math.abs(x - shown[Math.floor(i / 4)]!.N!)).toBeLessThan(0.25);
    });
  });

  it("polyads: residuals of one polyad stand side by side", () => {
    const at = points(levelResidualsFigure(polyad, options, "x")).map(({ x }) => x);
    expect(new Set(at).size).toBe(polyad.bands.length);
  });

  it("residuals by V, species told apart by marker, bars where σ was stated", () => {
    const figure = levelResidualsFigure(water, options, "level-residuals");
    expect(
      points(figure)
        .map(({ y }) => y)
        .sort(),
    ).toEqual(water.bands.map(({ residual }) => residual!).sort());
    const markers = figure!.panels[0]!.traces.flatMap((trace) => (trace.kind === "points" ? [trace.marker] : []));
    expect(new Set(markers).size).toBe(2);
    expect(points(levelResidualsFigure(polyad, options, "x")).every(({ yError }) => yError === 0.5)).toBe(true);
  });

  it("splittings on a logarithmic axis: H2O 1-0 pair at log10 of 98.876, observed", () => {
    const figure = splittingsFigure(water, options, "splittings");
    const [first] = points(figure);
    // 3755.929 - 3657.053
    expect(Math.abs(first!.y - Math.log10(98.876))).toBeLessThan(1e-9);
    expect(figure!.panels[0]!.y.tickLabels).toContain("0.1");
  });

  it("composition bars: weights add up to one, two shades and the rest, readable number of rows", () => {
    const figure = compositionFigure(water, options, "composition");
    const ends = lines(figure).map((line) => line.points[1]!.x);
    expect(ends.filter((_, i) => i % 3 === 2).every((end) => end === 1)).toBe(true);
    expect(figure!.panels[0]!.y.ticks.length).toBeLessThanOrEqual(28);
  });

  it("every caption and alternative text says something of the data", () => {
    for (const { caption, alt } of figuresFor([water], options)) {
      expect(caption.length).toBeGreaterThan(40);
      expect(alt.length).toBeGreaterThan(15);
      expect(caption + alt).not.toMatch(/NaN|undefined|Infinity/);
    }
  });
});
