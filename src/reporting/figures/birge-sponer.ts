import type { SeriesResult } from "../../analysis/index.ts";
import { correctedPhrase, counted, modelPhrase, seriesPhrase } from "./captions.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Point, Trace } from "./figure-spec.ts";
import { levelsOf, observedSpacings } from "./levels.ts";
import type { FigureOptions } from "./options.ts";
import { extrapolatedDash, SIZE, seriesStyle } from "./style.ts";
import { quotient, SYMBOL, UNIT } from "./symbols.ts";
import { fittedWell, type Valued } from "./term-values.ts";
import { distinctNames } from "./text-width.ts";
import { paddedRange } from "./ticks.ts";

/** Beyond this many times the observed range the line is not followed to zero. */
const FARTHEST = 12;

/** One series ready to be drawn: what was observed, and the line as a function of the abscissa. */
interface Drawn {
  readonly name: string;
  readonly points: readonly (Point & { readonly filled: boolean })[];
  readonly line: ((x: number) => Valued) | null;
  /** abscissae: left end of the frame, start of the line, end of what was observed, end of the extrapolation */
  readonly from: number;
  readonly start: number;
  readonly observed: number;
  readonly to: number;
  readonly reachesZero: boolean;
}

/**
 * The plot of Birge and Sponer (1926): spacings against v + ½ with the fitted line on to ΔG = 0; in local-mode notation ν̃/v
 * against v. Points are made from the bands, the line from the constants: nothing is fitted here. null when no band can be shown.
 */
export function birgeSponerFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const overtones = series.map((one) => positionPlot(one));
  const wells = series.some((one) => fittedWell(one) !== null);
  const local = wells && options.notation === "local" && overtones.some(({ points }) => points.length > 0);
  const drawn = local ? overtones : series.map((one) => spacingPlot(one));
  const points = drawn.flatMap((one) => one.points);
  if (points.length === 0) return null;
  const names = distinctNames(
    drawn.map(({ name }) => name),
    90,
    SIZE.small,
  );
  const traces = drawn.flatMap((one, i) => tracesOf(one, i, drawn.length > 1 ? names[i]! : null));
  const zero = drawn.some(({ reachesZero }) => reachesZero);
  const heights = [
    ...points.flatMap(({ y, yError = 0 }) => [y - yError, y + yError]),
    ...traces.flatMap((trace) => (trace.kind === "line" ? trace.points.map(({ y }) => y) : [])),
  ];
  const padded = paddedRange(heights);
  const right = Math.max(...drawn.map(({ to, observed }) => Math.max(to, observed)));
  const left = Math.min(...drawn.map(({ from }) => from));
  const y = local ? SYMBOL.wavenumberOverLevel : SYMBOL.spacing;
  const unshown = points.some(({ filled }) => !filled);
  return compose(
    {
      name: "birge-sponer",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 1),
      caption: caption(series, options, local, unshown),
      alt: alt(drawn, local),
    },
    [
      {
        tag: null,
        weight: 1,
        x: {
          label: local ? SYMBOL.level : SYMBOL.levelPlusHalf,
          range: [left, right + 0.03 * (right - left) + 0.2],
          least: 1,
        },
        y: { label: quotient(y, UNIT.wavenumber), range: zero ? [0, padded[1]] : padded },
        traces,
        texts: [],
        legend: drawn.length > 1,
      },
    ],
  );
}

function spacingPlot(series: SeriesResult): Drawn {
  const well = fittedWell(series);
  // A law that holds close under the limit says nothing of the way from v = 0 up to its lowest level.
  const shown = observedSpacings(series.bands).filter(({ lower, upper }) => well !== null || lower > 0 || upper === 1);
  const points = shown.map(({ lower, upper, mean, standardUncertainty: u }) => ({
    x: (lower + upper) / 2,
    y: mean,
    filled: upper - lower === 1,
    ...(u === null ? {} : { yError: u }),
  }));
  const observed = Math.max(0.5, ...points.map(({ x }) => x));
  const { name } = series;
  if (well === null) {
    const spacings = fittedSpacings(series);
    const [first, last] = [spacings[0], spacings.at(-1)];
    const line = first === undefined ? null : (x: number) => ({ value: between(spacings, x), half: null });
    const lowest = Math.min(first?.x ?? observed, ...points.map(({ x }) => x));
    const from = lowest > 3 ? lowest - 0.5 : 0;
    return { name, points, line, from, start: first?.x ?? from, observed, to: last?.x ?? observed, reachesZero: false };
  }
  const line = (x: number) => well.difference(x + 0.5, x - 0.5);
  return { name, points, line, from: 0, start: 0, observed, ...zeroOf((x) => line(x).value, observed) };
}

interface At {
  readonly x: number;
  readonly value: number;
}

/** Spacings of neighbouring levels as the model gives them, for models without a well: from calculated and predicted v-0 bands. */
function fittedSpacings({ bands, predictions }: SeriesResult): At[] {
  const energies = new Map<number, number>();
  const add = (label: string, energy: number | null) => {
    const levels = levelsOf(label);
    if (levels?.lower === 0 && energy !== null) energies.set(levels.upper, energy);
  };
  for (const { label, position } of predictions) add(label, position.value);
  for (const { label, calculated } of bands) add(label, calculated);
  return [...energies]
    .filter(([v]) => energies.has(v + 1))
    .map(([v, energy]) => ({ x: v + 0.5, value: energies.get(v + 1)! - energy }))
    .sort((a, b) => a.x - b.x);
}

/** Straight between neighbouring points. */
function between(points: readonly At[], x: number): number {
  const after = Math.max(
    1,
    points.findIndex((point) => point.x >= x),
  );
  const [low, high] = [points[after - 1]!, points[after] ?? points.at(-1)!];
  return high.x === low.x ? low.value : low.value + ((high.value - low.value) * (x - low.x)) / (high.x - low.x);
}

/** Where the line falls to zero past what was observed; otherwise where it stops falling, or a little further on. */
function zeroOf(line: (x: number) => number, observed: number): { to: number; reachesZero: boolean } {
  const step = 0.1;
  const none = { to: observed * 1.3 + 0.5, reachesZero: false };
  let before = line(observed);
  if (before <= 0) return { to: observed, reachesZero: false };
  for (let x = observed; x < FARTHEST * (observed + 0.5); x += step) {
    const next = line(x + step);
    if (next >= before) return x > observed + step ? { to: x, reachesZero: false } : none;
    if (next <= 0) return { to: x + (step * before) / (before - next), reachesZero: true };
    before = next;
  }
  return { to: 3 * observed, reachesZero: false };
}

function positionPlot(series: SeriesResult): Drawn {
  const points = series.bands.flatMap(({ label, observed, standardUncertainty: u, used }) => {
    const levels = levelsOf(label);
    if (levels === null || levels.lower !== 0 || levels.upper === 0) return [];
    const v = levels.upper;
    return [{ x: v, y: observed / v, filled: used, ...(u === null ? {} : { yError: u / v }) }];
  });
  const well = fittedWell(series);
  const line = well === null ? null : (x: number) => (x < 1e-6 ? well.slope(0) : well.difference(x, 0, x));
  const observed = Math.max(1, ...points.map(({ x }) => x));
  return { name: series.name, points, line, from: 0, start: 0, observed, to: observed + 1, reachesZero: false };
}

const STEPS = 120;

function tracesOf({ points, line, start, observed, to }: Drawn, index: number, label: string | null): Trace[] {
  const { colour, marker, dashPt } = seriesStyle(index);
  const traces: Trace[] = [];
  if (line !== null) {
    const sampled = (first: number, end: number) =>
      Array.from({ length: STEPS + 1 }, (_, i) => first + ((end - first) * i) / STEPS).map((x) => ({ x, ...line(x) }));
    const fitted = sampled(start, observed);
    const beyond = to > observed ? sampled(observed, to) : [];
    const band = [...fitted, ...beyond].flatMap(({ x, value, half }) =>
      half === null ? [] : [{ x, low: value - half, high: value + half }],
    );
    const xy = (all: typeof fitted) => all.map(({ x, value }) => ({ x, y: value }));
    if (band.length > 0) traces.push({ kind: "area", name: null, colour, opacity: 0.16, points: band });
    traces.push({ kind: "line", name: label, colour, widthPt: SIZE.line, dashPt, points: xy(fitted) });
    if (beyond.length > 0) {
      const broken = extrapolatedDash(dashPt);
      traces.push({ kind: "line", name: null, colour, widthPt: SIZE.thin, dashPt: broken, points: xy(beyond) });
    }
  }
  for (const filled of [false, true]) {
    const some = points.filter((point) => point.filled === filled).map(({ filled: _, ...point }) => point);
    if (some.length === 0) continue;
    const named = filled || points.every((point) => !point.filled) ? label : null;
    traces.push({ kind: "points", name: named, colour, marker, filled, sizePt: SIZE.marker, points: some });
  }
  return traces;
}

function caption(series: readonly SeriesResult[], options: FigureOptions, local: boolean, hollow: boolean): string {
  const what = local
    ? "ν̃/v of the overtone bands v-0 against v"
    : "Birge–Sponer plot: spacings ΔG(v + ½) between neighbouring observed levels against v + ½";
  const known = series.some(({ bands }) => bands.some(({ standardUncertainty: u }) => u !== null));
  const bars = known
    ? "bars: standard uncertainties, propagated from those of the bands"
    : "no uncertainties were stated";
  const other = local ? "hollow: bands not used in the fit" : "hollow: mean spacing over levels that were not observed";
  const band = series.some((one) => one.covariance !== null && fittedWell(one) !== null)
    ? "; shaded: its 95 % confidence band"
    : "";
  return [
    `${what}, for ${seriesPhrase(series)}.`,
    `Points: observed${hollow ? ` (${other})` : ""}; ${bars}.${correctedPhrase(series)}`,
    `Line: ${modelPhrase(series, options)} fitted to the band positions themselves${band};`,
    "thinner and more widely broken: extrapolated beyond the highest observed band.",
  ].join(" ");
}

function alt(drawn: readonly Drawn[], local: boolean): string {
  const kind = local
    ? "Band positions divided by v, against v"
    : "Spacings of neighbouring levels against v plus one half";
  const each = drawn.map(({ name, points, reachesZero, to }) => {
    const end = reachesZero ? `; the fitted line falls to zero at v + ½ = ${to.toFixed(1)}` : "";
    return `${name}: ${counted(points.length, "point")}${end}`;
  });
  return `${kind}. ${each.join(". ")}.`;
}
