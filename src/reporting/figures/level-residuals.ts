import type { SeriesResult } from "../../analysis/index.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Trace } from "./figure-spec.ts";
import { blockOf, blockSymbol } from "./mixed-levels.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE, seriesStyle } from "./style.ts";
import { quotient, SYMBOL, UNIT } from "./symbols.ts";
import { paddedRange } from "./ticks.ts";

/** Distance between levels of one polyad, in units of N. */
const SIDE = 0.07;

/** Observed minus calculated levels by total quanta or polyad, species (or place in the polyad) apart; null for other models. */
export function levelResidualsFigure(series: SeriesResult, options: FigureOptions, name: string): FigureSpec | null {
  const { levels, bands } = series;
  if (levels === null) return null;
  const polyads = levels.some(({ N }) => N !== undefined);
  const kinds = [...new Set(levels.map(({ species, l }) => species ?? (l === undefined ? "" : `l = ${l}`)))].sort();
  const shown = bands.flatMap(({ label, residual, standardUncertainty: u, used }) => {
    const level = levels.find((one) => one.label === label.split(/\s+from\s+/i)[0]);
    if (level === undefined || residual === null || !used) return [];
    return [
      {
        // Levels of a polyad side by side, in their order.
        block: blockOf(level) + (level.j === undefined ? 0 : SIDE * (1 - level.j)),
        kind: kinds.indexOf(level.species ?? (level.l === undefined ? "" : `l = ${level.l}`)),
        residual,
        u,
      },
    ];
  });
  if (shown.length === 0) return null;
  const present = [...new Set(shown.map(({ kind }) => kind))].sort((a, b) => a - b);
  const [low, high] = [
    Math.min(...shown.map(({ block }) => block)) - 0.6,
    Math.max(...shown.map(({ block }) => block)) + 0.6,
  ];
  const traces: Trace[] = [
    {
      kind: "line",
      name: null,
      colour: GREY,
      widthPt: SIZE.thin,
      dashPt: [],
      points: [
        { x: low, y: 0 },
        { x: high, y: 0 },
      ],
    },
    ...present.map((kind, i): Trace => {
      const { colour, marker } = seriesStyle(i);
      const of = shown.filter((one) => one.kind === kind);
      return {
        kind: "points",
        name: present.length > 1 ? kinds[kind]! : null,
        colour,
        marker,
        filled: true,
        sizePt: SIZE.marker,
        points: of.map(({ block, residual, u }) => ({
          x: block + (polyads ? 0 : (i - (present.length - 1) / 2) * 0.14),
          y: residual,
          ...(u === null ? {} : { yError: u }),
        })),
      };
    }),
  ];
  const reach = shown.flatMap(({ residual, u }) => [residual - (u ?? 0), residual + (u ?? 0), 0]);
  return compose(
    {
      name,
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.8),
      caption: `Observed less calculated levels of ${series.name} by ${polyads ? "polyad number N, the levels of a polyad side by side with the highest on the right" : "total quanta V"}; ${shown.some(({ u }) => u !== null) ? "bars: stated standard uncertainties" : "no uncertainties were stated"}.`,
      alt: `Residuals of ${shown.length} levels; the largest is ${Math.max(...shown.map(({ residual }) => Math.abs(residual))).toPrecision(2)} cm⁻¹.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: [blockSymbol(levels)], range: [low, high], least: 1 },
        y: { label: quotient(SYMBOL.observedMinusCalculated, UNIT.wavenumber), range: paddedRange(reach, 0.14) },
        traces,
        texts: [],
        legend: present.length > 1,
      },
    ],
  );
}
