import type { SeriesResult } from "../../analysis/index.ts";
import { correctedPhrase, counted, modelPhrase, seriesPhrase } from "./captions.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Point, Trace } from "./figure-spec.ts";
import { levelsOf } from "./levels.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE, seriesStyle } from "./style.ts";
import { plain, quotient, SYMBOL, UNIT } from "./symbols.ts";
import { distinctNames } from "./text-width.ts";
import { paddedRange } from "./ticks.ts";

/** Several series stand this far apart at the same v. */
const APART = 0.12;

/** Observed minus calculated positions against v′ with their stated uncertainties; null when there is nothing to see. */
export function residualsFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const all = series.map((one, i) => pointsOf(one, (i - (series.length - 1) / 2) * APART));
  const largest = Math.max(...all.flat().flatMap(({ used, y, yError = 0 }) => (used ? [Math.abs(y) + yError] : [])));
  // A band that was not fitted may lie anywhere; it must not press the others flat.
  const drawn = all.map((points) => points.filter(({ used, y }) => used || Math.abs(y) <= 1.5 * largest));
  const points = drawn.flat();
  if (points.length === 0 || points.every(({ y, yError }) => y === 0 && yError === undefined)) return null;
  const beyond = all.flat().length - points.length;
  const names = distinctNames(
    series.map(({ name }) => name),
    90,
    SIZE.small,
  );
  const lowest = Math.min(...points.map(({ x }) => x));
  const left = lowest > 3 ? lowest - 0.6 : 0.4;
  const right = Math.max(...points.map(({ x }) => x)) + 0.6;
  const reach = points.flatMap(({ y, yError = 0 }) => [y - yError, y + yError, 0]);
  const traces: Trace[] = [
    {
      kind: "line",
      name: null,
      colour: GREY,
      widthPt: SIZE.thin,
      dashPt: [],
      points: [
        { x: left, y: 0 },
        { x: right, y: 0 },
      ],
    },
    ...drawn.flatMap((some, i) => tracesOf(some, i, series.length > 1 ? names[i]! : null)),
  ];
  const [bottom, high] = paddedRange(reach, 0.14);
  // A legend takes its room from above and squeezes the rest; a name under a bar needs its height all the same.
  const named = series.length > 1 && points.some(({ flagged, y }) => flagged && y < 0);
  const low = named ? bottom - 0.2 * (high - bottom) : bottom;
  return compose(
    {
      name: "residuals",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 0.8),
      caption: caption(series, options, points, beyond),
      alt: alt(series, points),
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: SYMBOL.upperLevel, range: [left, right], least: 1 },
        y: { label: quotient(SYMBOL.observedMinusCalculated, UNIT.wavenumber), range: [low, high] },
        traces,
        texts: points
          .filter(({ flagged }) => flagged)
          .map(({ x, y, yError = 0, label }) => ({
            x,
            y: y >= 0 ? y + yError + 0.02 * (high - low) : y - yError - 0.02 * (high - low),
            runs: plain(label),
            align: "center" as const,
            baseline: y >= 0 ? ("bottom" as const) : ("top" as const),
          })),
        legend: series.length > 1,
      },
    ],
  );
}

type Levels = NonNullable<ReturnType<typeof levelsOf>>;

interface Residual extends Point {
  readonly used: boolean;
  readonly flagged: boolean;
  readonly label: string;
}

function pointsOf({ bands, warnings }: SeriesResult, shift: number): Residual[] {
  const named = new Set(warnings.filter(({ code }) => code === "band-stands-out").map(({ about }) => about));
  const all = bands.flatMap(({ label }) => levelsOf(label) ?? []);
  return bands.flatMap(({ label, observed, residual, standardUncertainty: u, used }) => {
    const levels = levelsOf(label);
    if (levels === null || residual === null) return [];
    const x = levels.upper + shift + aside(levels, all);
    const flagged = used && named.has(label);
    // A fit through every band leaves rounding, which is no residual.
    const y = Math.abs(residual) < 1e-10 * observed ? 0 : residual;
    return [{ x, y, used, flagged, label, ...(u === null ? {} : { yError: u }) }];
  });
}

/** Hot bands stand to the right of the overtone with the same upper level, those from higher levels further. */
function aside({ upper, lower }: Levels, all: readonly Levels[]): number {
  if (lower === 0) return 0;
  const lowers = [
    ...new Set(all.filter((other) => other.upper === upper && other.lower > 0).map((other) => other.lower)),
  ];
  return (0.5 * (lowers.filter((other) => other < lower).length + 1)) / (lowers.length + 1);
}

function tracesOf(points: readonly Residual[], index: number, name: string | null): Trace[] {
  const { colour, marker } = seriesStyle(index);
  return [true, false].flatMap((filled): Trace[] => {
    const some = points.filter(({ used }) => used === filled);
    if (some.length === 0) return [];
    const plainPoints = some.map(({ x, y, yError }) => ({ x, y, ...(yError === undefined ? {} : { yError }) }));
    return [
      { kind: "points", name: filled ? name : null, colour, marker, filled, sizePt: SIZE.marker, points: plainPoints },
    ];
  });
}

function caption(
  series: readonly SeriesResult[],
  options: FigureOptions,
  points: readonly Residual[],
  beyond: number,
): string {
  const known = points.some(({ yError }) => yError !== undefined);
  const hollow = points.some(({ used }) => !used) ? "; hollow: bands not used in the fit" : "";
  const flagged = points.some((point) => point.flagged) ? " Bands that stand out by the residual test are named." : "";
  return [
    `Residuals, observed minus calculated, against the upper level v′ for ${seriesPhrase(series)},`,
    `fitted by ${modelPhrase(series, options)}.`,
    `Bars: ${known ? "stated standard uncertainties" : "none, as no uncertainties were stated"}${hollow}.${flagged}${correctedPhrase(series)}`,
    ...(beyond > 0 ? [`${counted(beyond, "unused band")} outside the frame.`] : []),
  ].join(" ");
}

function alt(series: readonly SeriesResult[], points: readonly Residual[]): string {
  const largest = Math.max(...points.filter(({ used }) => used).map(({ y }) => Math.abs(y)));
  return `Residuals of ${counted(series.length, "series").replace("seriess", "series")} against the upper level; the largest of a used band is ${largest.toPrecision(2)} cm⁻¹.`;
}
