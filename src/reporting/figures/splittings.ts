import type { SeriesResult } from "../../analysis/index.ts";
import { compose, heightFor } from "./compose.ts";
import type { Axis, FigureSpec, Point, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { SIZE } from "./style.ts";
import { quotient, UNIT } from "./symbols.ts";

/** Splittings smaller than this are below what any spectrum shows. */
const LEAST = 1e-4;

/** Splitting of the pair with all quanta in one bond against V on a logarithmic axis, observed and calculated; null for other models. */
export function splittingsFigure(series: SeriesResult, options: FigureOptions, name: string): FigureSpec | null {
  const { levels, consequences, bands } = series;
  if (levels === null) return null;
  const calculated = consequences.flatMap(({ key, quantity }) => {
    const [, v] = /^splitting(\d+)$/.exec(key) ?? [];
    const size = Math.abs(quantity?.value ?? 0);
    return v === undefined || size < LEAST ? [] : [{ x: Number(v), size }];
  });
  if (calculated.length < 2) return null;
  const observed = calculated.flatMap(({ x }) => {
    const pair = levels.filter(({ V, label }) => V === x && new RegExp(`^${x}[0.]+([+-]|[ABEF]\\d?)?$`).test(label));
    const seen = pair.flatMap(({ label }) => bands.find((band) => band.label === label && band.used)?.observed ?? []);
    const size = seen.length === 2 ? Math.abs(seen[1]! - seen[0]!) : 0;
    return size < LEAST ? [] : [{ x, size }];
  });
  const log = ({ x, size }: { readonly x: number; readonly size: number }): Point => ({ x, y: Math.log10(size) });
  const all = [...calculated, ...observed].map((one) => log(one).y);
  const [low, high] = [Math.floor(Math.min(...all) - 0.1), Math.ceil(Math.max(...all) + 0.1)];
  const ticks = Array.from({ length: high - low + 1 }, (_, i) => low + i);
  const y: Axis = {
    label: quotient([{ text: "Δ" }, { text: "E", italic: true }], UNIT.wavenumber),
    min: low,
    max: high,
    ticks,
    decimals: 0,
    tickLabels: ticks.map((power) => (power >= 0 ? String(10 ** power) : (10 ** power).toFixed(-power))),
  };
  const last = Math.max(...calculated.map(({ x }) => x));
  const traces: Trace[] = [
    {
      kind: "line",
      name: "calculated",
      colour: "#000000",
      widthPt: SIZE.line,
      dashPt: [],
      points: calculated.map(log),
    },
    ...(observed.length === 0
      ? []
      : [
          {
            kind: "points",
            name: "observed",
            colour: "#D55E00",
            marker: "circle",
            filled: true,
            sizePt: SIZE.marker,
            points: observed.map(log),
          } satisfies Trace,
        ]),
  ];
  return compose(
    {
      name,
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.85),
      caption: `Splitting of the levels of ${series.name} with all V quanta in one bond, against V; logarithmic scale. Splittings below about 1 cm⁻¹ are beyond what the model describes.`,
      alt: `Splittings of local pairs fall from ${calculated[0]!.size.toPrecision(3)} to ${calculated.at(-1)!.size.toPrecision(2)} cm⁻¹ between V = ${calculated[0]!.x} and ${last}.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: [{ text: "V", italic: true }], range: [0.5, last + 0.5], least: 1 },
        y: { label: y.label, range: [low, high], ready: y },
        traces,
        texts: [],
        legend: observed.length > 0,
      },
    ],
  );
}
