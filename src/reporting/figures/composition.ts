import type { LevelResult, SeriesResult } from "../../analysis/index.ts";
import { compose, heightFor } from "./compose.ts";
import type { FigureSpec, Trace } from "./figure-spec.ts";
import { blockOf } from "./mixed-levels.ts";
import type { FigureOptions } from "./options.ts";

/** Rows that fit a page. */
const MOST_LEVELS = 28;
/** The leading part, the next, and the rest: dark, middle, light, so that grey print keeps them apart. */
const SHADES = ["#0072B2", "#56B4E9", "#C9DDEC"] as const;

/** What each level is made of, as bars of its two largest parts and the rest, highest block first; null for other models. */
export function compositionFigure(series: SeriesResult, options: FigureOptions, name: string): FigureSpec | null {
  const { levels } = series;
  if (levels === null) return null;
  const mixed = levels.filter(({ composition, l = 0 }) => composition.length > 1 && l < 2);
  if (mixed.length === 0) return null;
  // The highest block that leaves the figure readable goes in whole.
  const blocks = [...new Set(mixed.map(blockOf))].sort((a, b) => a - b);
  const shown: LevelResult[] = [];
  for (const block of blocks) {
    const own = mixed.filter((level) => blockOf(level) === block);
    if (shown.length + own.length > MOST_LEVELS) break;
    shown.push(...own);
  }
  if (shown.length === 0) return null;
  const count = shown.length;
  const rows = shown.map((level, i) => {
    const [first = 0, second = 0] = level.composition.map(({ weight }) => weight);
    return { y: count - 1 - i, ends: [first, Math.min(1, first + second), 1] as const };
  });
  const names = ["largest part", "second", "the rest"];
  const traces: Trace[] = rows.flatMap(({ y, ends }, row) =>
    ends.map((end, k): Trace => {
      const from = k === 0 ? 0 : ends[k - 1]!;
      return {
        kind: "line",
        name: row === 0 ? names[k]! : null,
        colour: SHADES[k]!,
        widthPt: 4,
        dashPt: [],
        points: [
          { x: from, y },
          { x: Math.max(from, end), y },
        ],
      };
    }),
  );
  const labels = shown.map(({ label, composition }) => `${label} (${composition[0]!.state})`);
  return compose(
    {
      name,
      widthMm: options.widthMm,
      heightMm: Math.min(200, heightFor(options.widthMm, 0.28) + 3.4 * count),
      caption: `What the mixed levels of ${series.name} are made of: weights of the largest basis state (in parentheses), of the second and of all others.${shown.length < mixed.length ? ` ${mixed.length - shown.length} higher levels are left out.` : ""}`,
      alt: `Bars of the composition of ${count} levels.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: { label: [{ text: "weight" }], range: [0, 1] },
        y: {
          label: [],
          range: [-0.8, count - 0.2],
          ready: {
            label: [],
            min: -0.8,
            max: count - 0.2,
            ticks: rows.map(({ y }) => y),
            decimals: 0,
            tickLabels: labels,
          },
        },
        traces,
        texts: [],
        legend: false,
      },
    ],
  );
}
