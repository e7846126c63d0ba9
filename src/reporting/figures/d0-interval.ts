import type { SeriesResult } from "../../analysis/index.ts";
import { coverageFactor } from "../../quantity/index.ts";
import { namesOf } from "./captions.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Run, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE, seriesStyle } from "./style.ts";
import { plain, quotient, SYMBOL, UNIT } from "./symbols.ts";
import { distinctNames } from "./text-width.ts";
import { paddedRange } from "./ticks.ts";

const RISE: readonly Run[] = [{ text: "Δ" }, { text: "χ", italic: true }, { text: "2", script: "super" }];

/** How the interval of D0 was found, where it was not to first order: the profile of χ², or the distribution of the draws. */
export function d0IntervalFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const profiled = series.filter((one) => one.intervals?.profiles.some(({ key }) => key === "D0"));
  if (profiled.length > 0) return profileFigure(profiled, options);
  const drawn = series.filter((one) => one.intervals?.distributions.some(({ key }) => key === "D0"));
  return drawn.length > 0 ? distributionFigure(drawn, options) : null;
}

function profileFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec {
  const names = shown(series);
  const curves = series.map((one) => one.intervals!.profiles.find(({ key }) => key === "D0")!.points);
  const level = coverageFactor(0.95, series[0]!.quality.intervalDegreesOfFreedom) ** 2;
  const inside = curves.map((points) => points.filter(([, rise]) => rise <= 2.2 * level));
  const [low, high] = paddedRange(inside.flatMap((points) => points.map(([x]) => x)));
  const traces = series.flatMap((one, i): Trace[] => {
    const { colour, dashPt, marker } = seriesStyle(i);
    const d0 = one.dissociation[0]!.d0!;
    const u = d0.standardUncertainty ?? 1;
    const parabola = Array.from({ length: 121 }, (_, k) => low + ((high - low) * k) / 120).map((x) => ({
      x,
      y: ((x - d0.value) / u) ** 2,
    }));
    const straight = parabola.filter(({ y }) => y <= 2.2 * level);
    return [
      { kind: "line", name: null, colour: GREY, widthPt: SIZE.thin, dashPt: [2, 2], points: straight },
      {
        kind: "line",
        name: names[i]!,
        colour,
        widthPt: SIZE.line,
        dashPt,
        points: inside[i]!.map(([x, y]) => ({ x, y })),
      },
      {
        kind: "points",
        name: names[i]!,
        colour,
        marker,
        filled: true,
        sizePt: 3,
        points: inside[i]!.map(([x, y]) => ({ x, y })),
      },
    ];
  });
  return compose(
    {
      name: "d0-profile",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.85),
      caption: `Rise of χ² (in units of the variance) when D0 of ${namesOf(series)} is held and all else is fitted anew. Horizontal line: the rise that bounds the 95 % interval; broken grey: what a first-order interval assumes. Only the fit is in this, not the error of the extrapolation.`,
      alt: `Profile of chi-square against D0 of ${namesOf(series)}.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: quotient(SYMBOL.dissociationEnergy, UNIT.wavenumber), range: [low, high] },
        y: { label: RISE, range: [0, 2.3 * level] },
        traces: [
          ...traces,
          {
            kind: "line",
            name: null,
            colour: "#000000",
            widthPt: SIZE.thin,
            dashPt: [],
            points: [low, high].map((x) => ({ x, y: level })),
          },
        ],
        texts: [],
        legend: series.length > 1,
      },
    ],
  );
}

function distributionFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec {
  const names = shown(series);
  const histograms = series.map((one) => one.intervals!.distributions.find(({ key }) => key === "D0")!);
  const [low, high] = paddedRange(histograms.flatMap(({ edges }) => edges));
  const peak = Math.max(...histograms.map(({ counts }) => Math.max(...counts) / total(counts)));
  const traces = histograms.flatMap(({ edges, counts }, i): Trace[] => {
    const { colour, dashPt } = seriesStyle(i);
    const share = counts.map((count) => count / total(counts));
    const steps = share.flatMap((y, k) => [
      { x: edges[k]!, y },
      { x: edges[k + 1]!, y },
    ]);
    const closed = [{ x: edges[0]!, y: 0 }, ...steps, { x: edges.at(-1)!, y: 0 }];
    const bounds = series[i]!.dissociation[0]!.d0!.interval95 ?? [];
    return [
      { kind: "line", name: names[i]!, colour, widthPt: SIZE.line, dashPt, points: closed },
      ...bounds.map(
        (x): Trace => ({
          kind: "line",
          name: null,
          colour,
          widthPt: SIZE.thin,
          dashPt: [2, 2],
          points: [
            { x, y: 0 },
            { x, y: 0.9 * peak },
          ],
        }),
      ),
    ];
  });
  const first = series[0]!.intervals!;
  return compose(
    {
      name: "d0-distribution",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.85),
      caption: `Distribution of D0 of ${namesOf(series)} over ${first.resamples} draws of the constants (seed ${first.seed}), between its 0.5 % and 99.5 % points. Broken lines: the 95 % interval. Only the fit is in this, not the error of the extrapolation.`,
      alt: `Histogram of D0 of ${namesOf(series)} over the draws.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: quotient(SYMBOL.dissociationEnergy, UNIT.wavenumber), range: [low, high] },
        y: { label: plain("share of draws"), range: [0, 1.1 * peak] },
        traces,
        texts: [],
        legend: series.length > 1,
      },
    ],
  );
}

const total = (counts: readonly number[]) => counts.reduce((sum, count) => sum + count, 0);

const shown = (series: readonly SeriesResult[]) =>
  series.length === 1
    ? [null]
    : distinctNames(
        series.map(({ name }) => name),
        90,
        SIZE.small,
      );
