import { beforeAll, describe, expect, it } from "vitest";
import type { SeriesResult } from "../../../src/analysis/index.ts";
import { fit } from "../../../src/commands/fit.ts";
import { birgeSponerFigure } from "../../../src/reporting/figures/birge-sponer.ts";
import { residualsFigure } from "../../../src/reporting/figures/residuals.ts";

/** Levels of the limiting law itself, n = 5: D 20043.11, v_D 87.35, slope H (K5 0.515355 times 3/10) of I2 B; exact to the digits given. */
const D = 20043.11;
const energy = (v: number) => D - (0.3 * 0.515355 * (87.35 - v)) ** (10 / 3);
const levels = [72, 73, 74, 75, 76, 77, 78, 79, 80];

let series: SeriesResult[];
beforeAll(async () => {
  const bands = levels.map((v) => `${v}-0 ${energy(v).toFixed(4)}(50)`).join(", ");
  series = [...(await fit({ bands, model: "near-limit", power: 5, reducedMass: 63.452236 })).series];
});

describe("figures of levels close under a limit", () => {
  it("show the spacings of those levels with the law through and past them, not the way up from v = 0", () => {
    const panel = birgeSponerFigure(series, { widthMm: 85, notation: "equilibrium" })!.panels[0]!;
    const points = panel.traces.flatMap((trace) => (trace.kind === "points" ? trace.points : []));
    expect(points.map(({ x }) => x)).toEqual(levels.slice(1).map((v) => v - 0.5));
    const [fitted, beyond] = panel.traces.filter((trace) => trace.kind === "line");
    expect(fitted!.points[0]!.x).toBe(72.5);
    // the line at 72.5 is the law's own spacing; positions are given to 1e-4
    expect(Math.abs((fitted!.points[0] as { y: number }).y - (energy(73) - energy(72)))).toBeLessThan(1e-3);
    expect((beyond!.points.at(-1) as { y: number }).y).toBeLessThan(0.01);
    expect(panel.x.min).toBeGreaterThan(70);
  });

  it("show residuals over those levels only", () => {
    const { x } = residualsFigure(series, { widthMm: 85, notation: "equilibrium" })!.panels[0]!;
    expect([x.min > 70, x.max < 82]).toEqual([true, true]);
  });
});
