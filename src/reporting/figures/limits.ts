import type { DissociationMethod, SeriesResult } from "../../analysis/index.ts";
import { methodNames } from "../text/method-names.ts";
import { namesOf } from "./captions.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE } from "./style.ts";
import { quotient, SYMBOL, UNIT } from "./symbols.ts";
import { distinctNames } from "./text-width.ts";
import { paddedRange } from "./ticks.ts";

/** Sky blue of Okabe & Ito, for broad bars only. */
const BROAD = "#56B4E9";

interface Row {
  readonly name: string;
  readonly value: number;
  /** 95 % of the fit */
  readonly interval: readonly [number, number] | null;
  readonly empirical: readonly [number, number] | null;
}

/** D0 by method (of several series: the headline of each) as intervals on one axis; null without any D0. */
export function limitsFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const rows = series.length === 1 ? methodRows(series[0]!) : series.flatMap(headlineRow);
  if (rows.length === 0) return null;
  const accepted = series.length === 1 ? series[0]!.accepted : null;
  const top = series.length === 1 ? highestLevel(series[0]!) : null;
  const [low, high] = paddedRange(
    rows
      .flatMap(({ value, interval, empirical }) => [value, ...(interval ?? []), ...(empirical ?? [])])
      .concat(accepted?.value ?? []),
  );
  const from = top === null ? low : Math.min(low, top - 0.03 * (high - Math.min(low, top)));
  const count = rows.length;
  const names = distinctNames(
    rows.map(({ name }) => name),
    70,
    SIZE.small,
  );
  const y = {
    label: [],
    min: -0.7,
    max: count - 0.3,
    ticks: names.map((_, i) => count - 1 - i),
    decimals: 0,
    tickLabels: names,
  };
  return compose(
    {
      name: "dissociation",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.38 + 0.11 * count),
      caption: caption(series, rows, accepted !== null, top !== null),
      alt: `Dissociation energy of ${namesOf(series)} by ${count === 1 ? "one way" : `${count} ways`}, as intervals on one axis.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: quotient(SYMBOL.dissociationEnergy, UNIT.wavenumber), range: [from, high] },
        y: { label: [], range: [y.min, y.max], ready: y },
        traces: [...broadBars(rows), ...marks(accepted?.value ?? null, top, y.min, y.max), ...points(rows)],
        texts: [],
        legend: false,
      },
    ],
  );
}

function methodRows({ dissociation }: SeriesResult): Row[] {
  return dissociation.flatMap(({ method, d0, empirical }) =>
    d0 === null ? [] : [row(methodNames[method], d0, empirical?.correctedRange ?? null)],
  );
}

function headlineRow({ name, dissociation }: SeriesResult): Row[] {
  const first = dissociation.find(({ d0 }) => d0 !== null);
  return first?.d0 == null ? [] : [row(name, first.d0, first.empirical?.correctedRange ?? null)];
}

function row(name: string, d0: { value: number; interval95: Row["interval"] }, empirical: Row["empirical"]): Row {
  return { name, value: d0.value, interval: d0.interval95, empirical };
}

function highestLevel({ bands }: SeriesResult): number | null {
  const levels = bands.filter(({ used, label }) => used && label.endsWith("-0")).map(({ observed }) => observed);
  return levels.length === 0 ? null : Math.max(...levels);
}

function broadBars(rows: readonly Row[]): Trace[] {
  return rows.flatMap(({ empirical }, i): Trace[] => {
    if (empirical === null) return [];
    const y = rows.length - 1 - i;
    const ends = empirical.map((x) => ({ x, y }));
    return [{ kind: "line", name: null, colour: BROAD, widthPt: 4, dashPt: [], points: ends }];
  });
}

function marks(accepted: number | null, top: number | null, low: number, high: number): Trace[] {
  const upright = (x: number, colour: string, dashPt: readonly number[]): Trace => ({
    kind: "line",
    name: null,
    colour,
    widthPt: SIZE.line,
    dashPt,
    points: [low, high].map((y) => ({ x, y })),
  });
  return [
    ...(accepted === null ? [] : [upright(accepted, "#D55E00", [4, 2])]),
    ...(top === null ? [] : [upright(top, GREY, [1.2, 1.6])]),
  ];
}

/** The bars are lines of their own: a profile or resampled interval is not symmetric. */
function points(rows: readonly Row[]): Trace[] {
  return [
    ...rows.flatMap(({ interval }, i): Trace[] => {
      if (interval === null) return [];
      const ends = interval.map((x) => ({ x, y: rows.length - 1 - i }));
      return [{ kind: "line", name: null, colour: "#000000", widthPt: SIZE.line, dashPt: [], points: ends }];
    }),
    {
      kind: "points",
      name: null,
      colour: "#000000",
      marker: "circle",
      filled: true,
      sizePt: 3,
      points: rows.map(({ value }, i) => ({ x: value, y: rows.length - 1 - i })),
    },
  ];
}

function caption(series: readonly SeriesResult[], rows: readonly Row[], accepted: boolean, top: boolean): string {
  const what = series.length === 1 ? "by method" : `by ${methodNames[headlineMethod(series)]}`;
  const parts = [
    `D0 of ${namesOf(series)} ${what}. Points with bars: the fit and its 95 % interval, which says nothing of the extrapolation.`,
  ];
  if (rows.some(({ empirical }) => empirical !== null))
    parts.push("Broad bars: where known wells fitted in the same way put it (80 %, empirical).");
  if (accepted) parts.push("Broken line: the accepted value given by the user.");
  if (top) parts.push("Dotted line: highest observed level, below which no D0 can lie.");
  return parts.join(" ");
}

function headlineMethod(series: readonly SeriesResult[]): DissociationMethod {
  return series.find(({ dissociation }) => dissociation.length > 0)?.dissociation[0]?.method ?? "morse";
}
