import type { Marker } from "./figure-spec.ts";

/** Sizes in pt at print size: text 7 to 9 pt, lines at least 0.5 pt (what AIP, RSC and ACS ask of figures). */
export const SIZE = {
  text: 8,
  small: 7,
  script: 6,
  frame: 0.6,
  tick: 2.5,
  thin: 0.6,
  line: 1,
  bar: 0.6,
  cap: 3,
  marker: 3.8,
} as const;

/** How one series looks; any two of the first six differ in colour, marker and dash alike. */
export interface SeriesStyle {
  readonly colour: string;
  readonly marker: Marker;
  /** lengths in pt; empty: solid */
  readonly dashPt: readonly number[];
}

/** Black, blue, vermillion, bluish green and reddish purple of Okabe & Ito (2008), and a neutral grey; contrast to white at least 3. */
const COLOURS = ["#000000", "#0072B2", "#D55E00", "#009E73", "#CC79A7", "#6B6B6B"] as const;
const MARKERS: readonly Marker[] = ["circle", "square", "triangle", "diamond", "cross", "plus"];
const DASHES: readonly (readonly number[])[] = [
  [],
  [4.5, 1.8],
  [1.2, 1.6],
  [6, 1.6, 1.2, 1.6],
  [9, 2.4],
  [4, 1.4, 1.2, 1.4, 1.2, 1.4],
];

/** Zero lines and what stands behind the data. */
export const GREY = "#6B6B6B";

/** The look of series number `index` (from 0); after six it begins again. */
export function seriesStyle(index: number): SeriesStyle {
  const i = index % COLOURS.length;
  return { colour: COLOURS[i]!, marker: MARKERS[i]!, dashPt: DASHES[i]! };
}

/** The dash of the extrapolated part of a line: broken where the line is solid, wider gaps where it is broken already. */
export function extrapolatedDash(dashPt: readonly number[]): readonly number[] {
  return dashPt.length === 0 ? [2.5, 2] : dashPt.map((length, i) => (i % 2 === 0 ? length : 2 * length));
}
