import type { SeriesResult } from "../../analysis/index.ts";
import { correctedPhrase, counted, seriesPhrase } from "./captions.ts";
import { compose, heightFor, type PanelPlan, plannedFrames } from "./compose.ts";
import type { FigureSpec, Point, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE, seriesStyle } from "./style.ts";
import { plain, quotient, SYMBOL, UNIT } from "./symbols.ts";
import { distinctNames, textWidth } from "./text-width.ts";
import { paddedRange, scatteredTicks, tickText } from "./ticks.ts";

/** Least distance in pt between labels in a row, and between ticks of the second axis. */
const APART = { label: 3, tick: 26 } as const;

/** Observed and predicted bands along the wavenumber axis, a row a series, with vacuum wavelengths on the far side. */
export function positionsFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const rows = series.map(rowOf);
  const all = rows.flatMap(({ observed, unused, predicted }) => [...observed, ...unused, ...predicted]);
  if (all.length === 0) return null;
  const range = paddedRange(
    all.flatMap(({ x, xError = 0 }) => [x - xError, x + xError]),
    0.05,
  );
  const low = Math.max(range[0], 0.004 * range[1]);
  const size = { widthMm: options.widthMm, heightMm: heightFor(options.widthMm, 0.42 + 0.16 * series.length) };
  const names = distinctNames(
    series.map(({ name }) => name),
    60,
    SIZE.small,
  );
  const count = series.length;
  const plan = (ticks: readonly { at: number; text: string }[], traces: readonly Trace[]): PanelPlan => ({
    tag: null,
    weight: 1,
    x: { label: quotient(SYMBOL.wavenumber, UNIT.wavenumber), range: [low, range[1]] },
    y: {
      label: [],
      range: [-0.6, count - 0.2],
      ready: {
        label: [],
        min: -0.6,
        max: count - 0.2,
        ticks: count > 1 ? names.map((_, i) => count - 1 - i) : [],
        decimals: 0,
        tickLabels: count > 1 ? names : [],
      },
    },
    x2: { label: quotient(SYMBOL.vacuumWavelength, UNIT.nanometre), ticks },
    traces,
    texts: [],
    legend: false,
  });
  const [frame] = plannedFrames(size, [plan([{ at: low, text: "1000" }], [])]);
  const width = frame!.right - frame!.left;
  const perPt = (range[1] - low) / width;
  const place = (nm: number) => 1e7 / nm;
  const wavelengths = scatteredTicks([1e7 / range[1], 1e7 / low], place, APART.tick * perPt);
  // A label at the left edge would reach out of the picture.
  const inside = wavelengths.filter((nm) => count > 1 || place(nm) > low + 9 * perPt);
  const ticks = inside.map((nm) => ({ at: place(nm), text: tickText(nm, nm < 10 ? 1 : 0) }));
  const traces = rows.flatMap((row, i) => tracesOf(row, i, count - 1 - i, perPt));
  return compose({ name: "positions", ...size, caption: caption(series, all), alt: alt(series, rows) }, [
    plan(ticks, traces),
  ]);
}

interface Mark {
  readonly x: number;
  readonly xError?: number;
  readonly label: string;
}

interface Row {
  readonly observed: readonly Mark[];
  readonly unused: readonly Mark[];
  readonly predicted: readonly Mark[];
}

function rowOf({ bands, predictions }: SeriesResult): Row {
  const mark = ({ label, observed, standardUncertainty: u }: SeriesResult["bands"][number]): Mark => ({
    x: observed,
    label,
    ...(u === null ? {} : { xError: u }),
  });
  return {
    observed: bands.filter(({ used }) => used).map(mark),
    unused: bands.filter(({ used }) => !used).map(mark),
    predicted: predictions
      .filter(({ observed }) => !observed)
      .map(({ label, position: { value, interval95 } }) => ({
        x: value,
        label,
        ...(interval95 === null ? {} : { xError: (interval95[1] - interval95[0]) / 2 }),
      })),
  };
}

/** Labels stand above their marks where they have room; crowded ones are left out. */
function tracesOf({ observed, unused, predicted }: Row, index: number, y: number, perPt: number): Trace[] {
  const { colour, marker } = seriesStyle(index);
  const labelled = new Set<Mark>();
  let free = Number.NEGATIVE_INFINITY;
  for (const one of [...observed, ...predicted].sort((a, b) => a.x - b.x)) {
    const half = ((textWidth(one.label, SIZE.small) + APART.label) / 2) * perPt;
    if (one.x - half < free) continue;
    labelled.add(one);
    free = one.x + half;
  }
  const points = (marks: readonly Mark[]): Point[] =>
    marks.map((one) => ({
      x: one.x,
      y,
      ...(one.xError === undefined ? {} : { xError: one.xError }),
      ...(labelled.has(one) ? { text: plain(one.label), textSide: "above" as const } : {}),
    }));
  // Crosses have no inside: hollow ones are drawn smaller.
  const open = marker === "cross" || marker === "plus" ? 0.6 * SIZE.marker : SIZE.marker;
  const trace = (marks: readonly Mark[], filled: boolean, paint: string): Trace[] => {
    const sizePt = filled ? SIZE.marker : open;
    return marks.length === 0
      ? []
      : [{ kind: "points", name: null, colour: paint, marker, filled, sizePt, points: points(marks) }];
  };
  return [...trace(unused, false, GREY), ...trace(predicted, false, colour), ...trace(observed, true, colour)];
}

function caption(series: readonly SeriesResult[], all: readonly Mark[]): string {
  const unused = series.some(({ bands }) => bands.some(({ used }) => !used));
  const bars = all.some(({ xError }) => xError !== undefined)
    ? " Bars: stated standard uncertainty of observed bands and 95 % interval of predicted ones, mostly smaller than the marks."
    : "";
  return [
    `Band positions (vacuum wavenumbers) of ${seriesPhrase(series)}: filled, observed and fitted; hollow${series.length > 4 ? " (crosses: small)" : ""}, predicted`,
    `${unused ? "; grey, observed but not fitted" : ""}. Upper axis: vacuum wavelength.${bars}${correctedPhrase(series)}`,
  ].join("");
}

function alt(series: readonly SeriesResult[], rows: readonly Row[]): string {
  const each = rows.map(
    ({ observed, predicted }, i) =>
      `${series[i]!.name}: ${counted(observed.length, "observed band")}, ${predicted.length} predicted`,
  );
  return `Bands along the wavenumber axis. ${each.join("; ")}.`;
}
