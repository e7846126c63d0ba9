import { describe, expect, it } from "vitest";
import { birgeSponerFigure } from "../../../src/reporting/figures/birge-sponer.ts";
import type { FigureSpec, Trace } from "../../../src/reporting/figures/figure-spec.ts";
import { figuresFor } from "../../../src/reporting/figures/index.ts";
import { layOut, PT_PER_MM } from "../../../src/reporting/figures/layout.ts";
import { limitsFigure } from "../../../src/reporting/figures/limits.ts";
import { positionsFigure } from "../../../src/reporting/figures/positions.ts";
import { potentialFigure } from "../../../src/reporting/figures/potential.ts";
import { residualsFigure } from "../../../src/reporting/figures/residuals.ts";
import { overtones, sampleResult } from "./sample-results.ts";

const options = { widthMm: 85, notation: "equilibrium" } as const;
const traces = <K extends Trace["kind"]>(figure: FigureSpec | null, kind: K) =>
  figure!.panels[0]!.traces.filter((trace): trace is Extract<Trace, { kind: K }> => trace.kind === kind);

describe("Birge–Sponer plot", () => {
  const result = sampleResult({ labels: overtones(5), sigma: () => 0.5 });
  const figure = birgeSponerFigure([result], options);

  it("shows the spacings of neighbouring levels against v + ½ with bars of √2 σ, σ for the first", () => {
    const points = traces(figure, "points").flatMap((trace) => trace.points);
    expect(points.map(({ x }) => x)).toEqual([0.5, 1.5, 2.5, 3.5, 4.5]);
    const positions = [0, ...result.bands.map(({ observed }) => observed)];
    points.forEach(({ y, yError }, v) => {
      // differences of numbers near 1e4: rounding below 1e-10
      expect(Math.abs(y - (positions[v + 1]! - positions[v]!))).toBeLessThan(1e-9);
      expect(Math.abs(yError! - 0.5 * (v === 0 ? 1 : Math.SQRT2))).toBeLessThan(1e-9);
    });
  });

  it("draws the line solid as far as was observed and broken on to where ΔG vanishes", () => {
    const [fitted, beyond] = traces(figure, "line");
    expect(fitted!.dashPt).toEqual([]);
    expect(fitted!.points.at(-1)!.x).toBe(4.5);
    expect(beyond!.dashPt.length).toBeGreaterThan(0);
    // ΔG = ωe - 2ωexe(v + 1) of the sample vanishes near ωe/(2ωexe) - ½
    const [we, wexe] = ["we", "wexe"].map((key) => result.constants[key]!.value) as [number, number];
    expect(Math.abs(beyond!.points.at(-1)!.x - (we / (2 * wexe) - 0.5))).toBeLessThan(0.1);
    expect(Math.abs(beyond!.points.at(-1)!.y)).toBeLessThan(0.02 * we);
  });

  it("shades the 95 % band around the line", () => {
    const [band] = traces(figure, "area");
    for (const { low, high } of band!.points) expect(high).toBeGreaterThan(low);
  });

  it("in local notation shows ν̃/v against v", () => {
    const points = traces(birgeSponerFigure([result], { ...options, notation: "local" }), "points").flatMap(
      (t) => t.points,
    );
    points.forEach(({ x, y }, i) => {
      expect(x).toBe(i + 1);
      expect(y).toBe(result.bands[i]!.observed / x);
    });
  });

  it("takes hot bands and gaps: a missing level gives the mean spacing at its middle, hollow", () => {
    const gap = birgeSponerFigure([sampleResult({ labels: ["1-0", "2-0", "4-0", "2-1"] })], options);
    const hollow = traces(gap, "points")
      .filter(({ filled }) => !filled)
      .flatMap(({ points }) => points);
    expect(hollow.map(({ x }) => x)).toEqual([3]);
  });
});

describe("residuals", () => {
  it("stand against v′ with the stated bars around a zero line; unused bands are hollow", () => {
    const result = sampleResult({ labels: overtones(5), unused: ["5-0"], deviation: () => 0.3 });
    const figure = residualsFigure([result], options);
    expect(traces(figure, "line")[0]!.points.every(({ y }) => y === 0)).toBe(true);
    const filled = traces(figure, "points")
      .filter((trace) => trace.filled)
      .flatMap(({ points }) => points);
    filled.forEach(({ x, y, yError }, i) => {
      expect(x).toBe(i + 1);
      expect(y).toBe(result.bands[i]!.residual);
      expect(yError).toBe(0.05);
    });
  });

  it("name the band that stands out, and no other", () => {
    const result = sampleResult({ labels: overtones(5) });
    const warned = { ...result, warnings: [{ code: "band-stands-out", message: "", about: "3-0" }] };
    const texts = residualsFigure([warned], options)!.panels[0]!.texts;
    expect(texts.map(({ runs }) => runs[0]!.text)).toEqual(["3-0"]);
  });

  it("are left out when the model goes through every band and no σ is stated", () => {
    const exact = sampleResult({ labels: overtones(2), sigma: () => null, deviation: () => 0 });
    expect(residualsFigure([exact], options)).toBeNull();
  });

  it("are not pressed flat by a band that was not fitted", () => {
    const result = sampleResult({
      labels: overtones(5),
      unused: ["3-0"],
      deviation: (upper) => (upper === 3 ? 1000 : 1),
    });
    const { max } = residualsFigure([result], options)!.panels[0]!.y;
    expect(max).toBeLessThan(10);
  });
});

describe("potential", () => {
  it("is null without masses", () => {
    expect(potentialFigure([sampleResult({ reducedMass: null })], options)).toBeNull();
  });

  it("places each level between the classical turning points of the Morse curve", () => {
    const result = sampleResult({ labels: overtones(4) });
    const a = result.derived!.morseA!.value;
    const depth = result.dissociation[0]!.de!.value;
    const levels = traces(potentialFigure([result], options), "line").filter(
      ({ points }) => points.length === 2 && points[0]!.x < 0,
    );
    expect(levels.length).toBeGreaterThan(5);
    // V = De(1 - e^(-a·x))²: exact up to rounding of a logarithm
    for (const { points } of levels)
      for (const { x, y } of points)
        expect(Math.abs(depth * (1 - Math.exp(-a * x)) ** 2 - y)).toBeLessThan(1e-6 * depth);
  });

  it("names every limit in the legend", () => {
    const figure = potentialFigure([sampleResult({ weye: 0.2 })], options);
    const names = traces(figure, "line").flatMap(({ name }) => name ?? []);
    expect(new Set(names)).toEqual(new Set(["Morse", "Morse refit", "turning point", "spacing sum"]));
  });
});

describe("positions", () => {
  it("carry vacuum wavelengths on the far side: 1e7 over the wavenumber", () => {
    const { x2 } = positionsFigure([sampleResult()], options)!.panels[0]!;
    expect(x2!.ticks.length).toBeGreaterThan(2);
    for (const { at, text } of x2!.ticks) expect(Math.abs(1e7 / at / Number(text) - 1)).toBeLessThan(1e-9);
  });

  it("show observed bands filled and predicted ones hollow", () => {
    const result = sampleResult({ labels: overtones(3), upTo: 6 });
    const [hollow, filled] = traces(positionsFigure([result], options), "points");
    expect([hollow!.filled, filled!.filled]).toEqual([false, true]);
    expect(filled!.points.map(({ x }) => x)).toEqual(result.bands.map(({ observed }) => observed));
    expect(hollow!.points).toHaveLength(result.predictions.filter(({ observed }) => !observed).length);
  });
});

describe("limits", () => {
  it("show every way to D0 as its interval and the highest observed level", () => {
    const result = sampleResult({ labels: overtones(4), weye: 0.2 });
    const figure = limitsFigure([result], options)!;
    expect(figure.panels[0]!.y.tickLabels).toHaveLength(result.dissociation.length);
    const upright = traces(figure, "line").filter(({ points }) => points[0]!.x === points[1]!.x);
    expect(upright.map(({ points }) => points[0]!.x)).toEqual([
      Math.max(...result.bands.map(({ observed }) => observed)),
    ]);
  });
});

describe.each([
  ["one band", [1]],
  ["three bands", [3]],
  ["forty bands", [40]],
  ["two series", [5, 6]],
  ["six series", [3, 4, 5, 6, 7, 8]],
])("every figure of %s", (_, counts) => {
  const series = counts.map((count, i) =>
    sampleResult({
      name: `sample number ${i} with a rather long name of its own`,
      labels: overtones(count),
      we: 3000 + 100 * i,
      wexe: count > 20 ? 13 : 60,
      terms: 2,
      ...(count === 1 ? { terms: 1 } : {}),
    }),
  );
  for (const widthMm of [85, 171])
    it(`is ${widthMm} mm wide, has a caption and alt text, no title, and frames inside the picture`, () => {
      const usable = series.filter(({ terms }) => terms !== 1);
      for (const figure of figuresFor(usable, { widthMm, notation: "equilibrium" })) {
        expect(figure.widthMm).toBe(widthMm);
        expect(figure.dpi).toBe(600);
        expect(figure.heightMm).toBeLessThanOrEqual(233); // the tallest a page of RSC allows
        expect(figure.caption.length).toBeGreaterThan(60);
        expect(figure.alt.length).toBeGreaterThan(15);
        for (const { frame } of layOut(figure)) {
          expect(frame.left).toBeGreaterThan(0);
          expect(frame.right).toBeLessThan(widthMm * PT_PER_MM);
          expect(frame.right - frame.left).toBeGreaterThan(0.5 * widthMm * PT_PER_MM);
          expect(frame.bottom).toBeLessThan(figure.heightMm * PT_PER_MM);
        }
        for (const { x, y } of figure.panels)
          for (const axis of [x, y])
            for (const tick of axis.ticks) expect(tick >= axis.min && tick <= axis.max).toBe(true);
      }
    });
});
