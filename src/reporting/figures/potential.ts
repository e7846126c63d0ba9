import type { DissociationRow, SeriesResult } from "../../analysis/index.ts";
import { counted, namesOf } from "./captions.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Trace } from "./figure-spec.ts";
import { levelsOf } from "./levels.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE, seriesStyle } from "./style.ts";
import { quotient, SYMBOL, UNIT } from "./symbols.ts";
import { type FittedWell, fittedWell } from "./term-values.ts";
import { distinctNames } from "./text-width.ts";

const STEPS = 240;
/** The inner wall is followed up to this multiple of De, the outer branch until this share of it. */
const WALL = 1.12;
const ASYMPTOTE = 0.985;
/** Levels that were not observed are thinned out where they would stand closer than this share of the depth. */
const NARROW = 0.012;

const NAMES: Readonly<Record<DissociationRow["method"], string>> = {
  morse: "Morse",
  "morse-refit": "Morse refit",
  "turning-point": "turning point",
  "spacing-sum": "spacing sum",
  "near-limit": "near limit",
};

interface Curve {
  readonly series: SeriesResult;
  readonly well: FittedWell;
  readonly depth: number;
  /** Å⁻¹ */
  readonly a: number;
}

/** The Morse curve of the leading constants with levels and limits; null without masses or without a Morse limit. */
export function potentialFigure(series: readonly SeriesResult[], options: FigureOptions): FigureSpec | null {
  const curves = series.flatMap((one): Curve[] => {
    const well = fittedWell(one);
    const depth = one.dissociation[0]?.method === "morse" ? one.dissociation[0].de?.value : undefined;
    const a = one.derived?.morseA?.value;
    return well === null || depth === undefined || a === undefined ? [] : [{ series: one, well, depth, a }];
  });
  if (curves.length === 0) return null;
  const single = curves.length === 1 ? curves[0]! : null;
  const limits = single === null ? [] : limitsOf(single.series);
  const top = Math.max(...curves.map(({ depth }) => depth * WALL), ...limits.map(({ value }) => value * 1.06));
  const left = Math.min(...curves.map((curve) => distance(curve, curve.depth * WALL, -1)));
  const right = Math.max(...curves.map((curve) => distance(curve, curve.depth * ASYMPTOTE, 1)));
  const span = right - left;
  const range: readonly [number, number] = [left - 0.04 * span, right + 0.04 * span];
  const names = distinctNames(
    curves.map((curve) => curve.series.name),
    90,
    SIZE.small,
  );
  const traces = curves.flatMap((curve, i) => [
    ...(single === null ? [] : levelTraces(curve)),
    ...curveTraces(curve, i, single === null ? names[i]! : null, range),
  ]);
  return compose(
    {
      name: "potential",
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 1.05),
      caption: caption(curves, limits.length > 0),
      alt: `Potential energy curve of ${namesOf(curves.map((curve) => curve.series))} with its vibrational levels.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: quotient(SYMBOL.displacement, UNIT.angstrom), range },
        y: { label: quotient(SYMBOL.potential, UNIT.wavenumber), range: [0, top * 1.02] },
        traces: [...traces, ...limitTraces(limits, range)],
        texts: [],
        legend: single === null || limits.length > 0,
      },
    ],
  );
}

/** r - re in Å where the Morse curve has that energy, on the inner (-1) or outer (1) branch. */
function distance({ depth, a }: Curve, energy: number, branch: 1 | -1): number {
  return -Math.log(1 - branch * Math.sqrt(energy / depth)) / a;
}

function curveTraces(curve: Curve, index: number, name: string | null, [from, to]: readonly [number, number]): Trace[] {
  const { colour, dashPt, marker } = seriesStyle(index);
  const { depth, a, series } = curve;
  const start = distance(curve, depth * WALL, -1);
  const points = Array.from({ length: STEPS + 1 }, (_, i) => Math.max(start, from) + ((to - start) * i) / STEPS)
    .filter((x) => x <= to)
    .map((x) => ({ x, y: depth * (1 - Math.exp(-a * x)) ** 2 }));
  const line: Trace = { kind: "line", name, colour, widthPt: SIZE.line, dashPt, points };
  if (name === null) return [line];
  const observed = observedLevels(series).flatMap((v) => outer(curve, v));
  return [line, { kind: "points", name, colour, marker, filled: true, sizePt: SIZE.marker, points: observed }];
}

function outer(curve: Curve, v: number): { x: number; y: number }[] {
  const y = curve.well.term(v);
  return y < curve.depth * 0.999 ? [{ x: distance(curve, y, 1), y }] : [];
}

/** Every bound level between its classical turning points: observed ones black, the others thin and grey. */
function levelTraces(curve: Curve): Trace[] {
  const observed = new Set([0, ...observedLevels(curve.series)]);
  const highest = Math.min(curve.series.derived?.highestLevel?.value ?? Math.max(...observed), 200);
  let last = Number.NEGATIVE_INFINITY;
  return Array.from({ length: highest + 1 }, (_, v) => v).flatMap((v): Trace[] => {
    const y = curve.well.term(v);
    const seen = observed.has(v);
    if (!(y < curve.depth * 0.999) || (!seen && y - last < NARROW * curve.depth)) return [];
    last = y;
    const points = [-1, 1].map((branch) => ({ x: distance(curve, y, branch as 1 | -1), y }));
    return [
      {
        kind: "line",
        name: null,
        colour: seen ? "#000000" : GREY,
        widthPt: seen ? SIZE.line : 0.5,
        dashPt: seen ? [] : [1, 1.5],
        points,
      },
    ];
  });
}

function observedLevels({ bands }: SeriesResult): number[] {
  const levels = bands.filter(({ used }) => used).flatMap(({ label }) => levelsOf(label) ?? []);
  return [...new Set(levels.flatMap(({ upper, lower }) => [upper, lower]))];
}

interface LimitLine {
  readonly name: string;
  readonly value: number;
}

function limitsOf({ dissociation }: SeriesResult): LimitLine[] {
  return dissociation
    .flatMap(({ method, de }) => (de === null ? [] : [{ name: NAMES[method], value: de.value }]))
    .sort((a, b) => a.value - b.value);
}

/** One line a method, told apart by colour and dash and named in the legend from above down. */
function limitTraces(limits: readonly LimitLine[], [from, to]: readonly [number, number]): Trace[] {
  const start = from + 0.45 * (to - from);
  return [...limits].reverse().map(({ name, value }, i) => {
    const { colour, dashPt } = seriesStyle(i + 1);
    const points = [start, to].map((x) => ({ x, y: value }));
    return { kind: "line", name, colour, widthPt: 0.8, dashPt, points };
  });
}

function caption(curves: readonly Curve[], limits: boolean): string {
  const names = namesOf(curves.map(({ series }) => series));
  const parts = [`Morse curve of the leading constants for ${names}, against the displacement from the minimum.`];
  if (curves.length === 1) {
    const count = observedLevels(curves[0]!.series).length;
    parts.push(
      `Horizontal lines: fitted levels, solid where the bands reach them (${counted(count, "level")}), dotted elsewhere.`,
    );
  } else parts.push("Marks: levels that the bands reach, at their outer turning points.");
  if (limits) parts.push("Broken lines: dissociation limits De by the methods named; none of them is measured.");
  return parts.join(" ");
}
