import type { LevelResult, SeriesResult } from "../../analysis/index.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Point, Run, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE } from "./style.ts";
import { quotient, UNIT } from "./symbols.ts";
import { paddedRange } from "./ticks.ts";

/** Total quanta of a level, or its polyad number. */
export const blockOf = ({ V, N }: LevelResult): number => V ?? N ?? 0;

/** What the number of a block is called. */
export const blockSymbol = (levels: readonly LevelResult[]): Run => ({
  text: levels.some(({ N }) => N !== undefined) ? "N" : "V",
  italic: true,
});

/** Half-widths of a column, in units of the block number. */
const COLUMN = { local: [-0.36, -0.08], level: [0.02, 0.4] } as const;

/**
 * Levels by total quanta or polyad: without the coupling on the left of each column, with it on the right, joined; observed ones marked. Energies less
 * the block number times the mean spacing of the lowest block, so that splittings are seen. null for models without such levels.
 */
export function mixedLevelsFigure(series: SeriesResult, options: FigureOptions, name: string): FigureSpec | null {
  const { levels, bands } = series;
  if (levels === null || levels.length === 0) return null;
  const polyads = levels.some(({ N }) => N !== undefined);
  // Pure stretches only: the ladders of other l would hide them.
  const shown = levels.filter(({ l = 0 }) => l === 0).filter((level) => !polyads || Number.isInteger(blockOf(level)));
  if (shown.length === 0) return null;
  const first = Math.min(...shown.map(blockOf));
  const lowest = shown.filter((level) => blockOf(level) === first);
  const spacing =
    Math.round(lowest.reduce((sum, { uncoupled }) => sum + uncoupled, 0) / lowest.length / first / 10) * 10;
  const reduced = (energy: number, level: LevelResult) => energy - blockOf(level) * spacing;
  const lines: Trace[] = shown.flatMap((level): Trace[] => {
    const block = blockOf(level);
    const [free, bound] = [reduced(level.uncoupled, level), reduced(level.energy, level)];
    const share = level.stretchShare ?? 1;
    const end = COLUMN.level[0] + (COLUMN.level[1] - COLUMN.level[0]) * (polyads ? Math.max(0.08, share) : 1);
    return [
      stroke(block + COLUMN.local[0], free, block + COLUMN.local[1], free, GREY, SIZE.thin, [], null),
      stroke(block + COLUMN.local[1], free, block + COLUMN.level[0], bound, GREY, SIZE.thin, [1, 1.2], null),
      stroke(block + COLUMN.level[0], bound, block + end, bound, "#000000", SIZE.line, [], null),
    ];
  });
  const points: Point[] = bands.flatMap(({ label, observed }) => {
    const level = shown.find((one) => one.label === label);
    return level === undefined ? [] : [{ x: blockOf(level) + 0.44, y: reduced(observed, level) }];
  });
  const values = [
    ...shown.flatMap((level) => [reduced(level.energy, level), reduced(level.uncoupled, level)]),
    ...points.map(({ y }) => y),
  ];
  const last = Math.max(...shown.map(blockOf));
  return compose(
    {
      name,
      widthMm: options.widthMm,
      heightMm: heightFor(options.widthMm, 1.15),
      caption: [
        `Levels of ${series.name} by ${polyads ? "polyad number N (l = 0)" : "total quanta V"}, energies less ${spacing} cm⁻¹ for each quantum.`,
        `Left of each column, grey: without the coupling; right: with it${polyads ? ", as long as their share of the pure stretch" : ""}.`,
        ...(points.length > 0 ? ["Circles: observed."] : []),
      ].join(" "),
      alt: `Level diagram of ${series.name}: ${shown.length} levels in ${new Set(shown.map(blockOf)).size} columns, ${points.length} of them observed.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: [blockSymbol(levels)], range: [first - 0.6, last + 0.6], least: 1 },
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
                  sizePt: 2.6,
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

function stroke(
  x1: number,
  y1: number,
  x2: number,
  y2: number,
  colour: string,
  widthPt: number,
  dashPt: readonly number[],
  name: string | null,
): Trace {
  return {
    kind: "line",
    name,
    colour,
    widthPt,
    dashPt,
    points: [
      { x: x1, y: y1 },
      { x: x2, y: y2 },
    ],
  };
}
