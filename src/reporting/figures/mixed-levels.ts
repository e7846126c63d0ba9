import type { LevelResult, SeriesResult } from "../../analysis/index.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Point, Run, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE } from "./style.ts";
import { quotient, UNIT } from "./symbols.ts";
import { paddedRange } from "./ticks.ts";

/** Total quanta of a level, or its polyad number. */
export const blockOf = ({ V, N }: LevelResult): number => V ?? N ?? 0;

/** Width of the part of a polyad level that is pure stretch, pt. */
const HEAVY = 2;
/** Diameter of the marks of observed levels in pt: small, for levels lie close. */
const MARK = 3;

/** What the number of a block is called. */
export const blockSymbol = (levels: readonly LevelResult[]): Run => ({
  text: levels.some(({ N }) => N !== undefined) ? "N" : "V",
  italic: true,
});

/** Ends of the parts of a column, in units of the distance between columns. */
const COLUMN = { local: [-0.38, -0.1], level: [0, 0.3], observed: 0.43 } as const;

/**
 * Levels by total quanta or polyad: without the coupling on the left of each column, with it on the right, joined; observed ones marked. Of a
 * polyad level a heavy line as long as its share of the pure stretch lies on a thin one of full length. Energies less the block number times
 * the mean spacing of the lowest block, so that splittings are seen. null for models without such levels.
 */
export function mixedLevelsFigure(series: SeriesResult, options: FigureOptions, name: string): FigureSpec | null {
  const { levels, bands } = series;
  if (levels === null || levels.length === 0) return null;
  const polyads = levels.some(({ N }) => N !== undefined);
  const shown = shownLevels(levels, new Set(bands.map(({ label }) => label)));
  if (shown.length === 0) return null;
  const whole = shown.filter((level) => Number.isInteger(blockOf(level)));
  const first = Math.min(...whole.map(blockOf));
  const lowest = whole.filter((level) => blockOf(level) === first);
  const spacing =
    Math.round(lowest.reduce((sum, { uncoupled }) => sum + uncoupled, 0) / lowest.length / first / 10) * 10;
  const reduced = (energy: number, level: LevelResult) => energy - blockOf(level) * spacing;
  const step = whole.length < shown.length ? 0.5 : 1;
  const at = (level: LevelResult, place: number) => blockOf(level) + step * place;
  const lines: Trace[] = shown.flatMap((level): Trace[] => {
    const [free, bound] = [reduced(level.uncoupled, level), reduced(level.energy, level)];
    const [left, middle, right] = [COLUMN.local[0], COLUMN.local[1], COLUMN.level[0]].map((place) => at(level, place));
    const full = at(level, COLUMN.level[1]);
    const share = polyads ? (level.stretchShare ?? 1) : 1;
    return [
      stroke(left!, free, middle!, free, GREY, SIZE.thin),
      stroke(middle!, free, right!, bound, GREY, SIZE.thin, [1, 1.2]),
      ...(polyads ? [stroke(right!, bound, full, bound, "#000000", SIZE.thin)] : []),
      stroke(right!, bound, right! + share * (full - right!), bound, "#000000", polyads ? HEAVY : SIZE.line),
    ];
  });
  const points: Point[] = bands.flatMap(({ label, observed }) => {
    const level = shown.find((one) => one.label === label);
    return level === undefined ? [] : [{ x: at(level, COLUMN.observed), y: reduced(observed, level) }];
  });
  const values = [
    ...shown.flatMap((level) => [reduced(level.energy, level), reduced(level.uncoupled, level)]),
    ...points.map(({ y }) => y),
  ];
  const blocks = shown.map(blockOf);
  const which = shown.some(({ l = 0 }) => l > 0) ? "l = 0, and l = 1 for half N" : "l = 0";
  return compose(
    {
      name,
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 1.15),
      caption: [
        `Levels of ${series.name} by ${polyads ? `polyad number N (${which})` : "total quanta V"}, energies less ${spacing} cm⁻¹ for each quantum.`,
        `Left of each column, grey: without the coupling; right: with it${polyads ? ", the heavy part as long as the share of the state with most stretch" : ""}.`,
        ...(points.length > 0 ? ["Circles: observed."] : []),
      ].join(" "),
      alt: `Level diagram of ${series.name}: ${shown.length} levels in ${new Set(blocks).size} columns, ${points.length} of them observed.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: {
          label: [blockSymbol(levels)],
          range: [Math.min(...blocks) - 0.6 * step, Math.max(...blocks) + 0.6 * step],
          least: step,
        },
        y: {
          label: quotient(
            [{ text: "E", italic: true }, { text: " − " }, { text: `${spacing} ` }, blockSymbol(levels)],
            UNIT.wavenumber,
          ),
          range: paddedRange(values),
        },
        traces: [
          ...lines,
          ...(points.length === 0
            ? []
            : [
                {
                  kind: "points",
                  name: null,
                  colour: "#D55E00",
                  marker: "circle",
                  filled: true,
                  sizePt: MARK,
                  points,
                } satisfies Trace,
              ]),
        ],
        texts: [],
        legend: false,
      },
    ],
  );
}

/** Of polyads the ladders of the least l, and those of half N only where one of them was observed: the ladders of other l would hide them. */
function shownLevels(levels: readonly LevelResult[], observed: ReadonlySet<string>): LevelResult[] {
  const least = levels.filter((level) => (level.l ?? 0) < 2);
  const halves = least.filter((level) => !Number.isInteger(blockOf(level)));
  return halves.some(({ label }) => observed.has(label))
    ? least
    : least.filter((level) => Number.isInteger(blockOf(level)));
}

function stroke(
  x1: number,
  y1: number,
  x2: number,
  y2: number,
  colour: string,
  widthPt: number,
  dashPt: readonly number[] = [],
): Trace {
  return {
    kind: "line",
    name: null,
    colour,
    widthPt,
    dashPt,
    points: [
      { x: x1, y: y1 },
      { x: x2, y: y2 },
    ],
  };
}
