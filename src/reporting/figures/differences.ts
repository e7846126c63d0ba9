import type { Comparison } from "../../analysis/index.ts";
import { listed } from "./captions.ts";
import { compose, heightFor, type PanelPlan } from "./compose.ts";
import type { FigureSpec, Point, Run, Trace } from "./figure-spec.ts";
import type { FigureOptions } from "./options.ts";
import { GREY, SIZE } from "./style.ts";
import { quotient, SYMBOL, UNIT } from "./symbols.ts";
import { distinctNames } from "./text-width.ts";
import { paddedRange } from "./ticks.ts";

/** Pairs that one page holds in three panels. */
const MOST_PAIRS = 15;

const delta = (symbol: readonly Run[]): readonly Run[] => [{ text: "Δ" }, ...symbol];

/** Differences of the first two constants and of D0 between series with their 95 % intervals, one panel each; null without comparisons. */
export function differencesFigure(
  comparisons: readonly Comparison[],
  { widthMm, notation }: FigureOptions,
): FigureSpec | null {
  if (comparisons.length === 0 || comparisons.length > MOST_PAIRS) return null;
  const symbols: Readonly<Record<string, readonly Run[]>> = {
    we: notation === "local" ? SYMBOL.localHarmonic : SYMBOL.harmonic,
    wexe: notation === "local" ? SYMBOL.localAnharmonic : SYMBOL.anharmonic,
    d0: SYMBOL.dissociationEnergy,
  };
  const keys = Object.keys(symbols).filter((key) =>
    comparisons.some(({ differences }) => differences.some((one) => one.key === key)),
  );
  if (keys.length === 0) return null;
  const count = comparisons.length;
  const names = distinctNames(
    comparisons.map(({ first, second }) => `${second} − ${first}`),
    110,
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
  const panels = keys.map((key, k): PanelPlan => {
    const points = comparisons.flatMap(({ differences }, i): Point[] => {
      const found = differences.find((one) => one.key === key)?.difference;
      if (found === undefined) return [];
      const half = found.interval95 === null ? null : (found.interval95[1] - found.interval95[0]) / 2;
      return [{ x: found.value, y: count - 1 - i, ...(half === null ? {} : { xError: half }) }];
    });
    const [low, high] = paddedRange([0, ...points.flatMap(({ x, xError = 0 }) => [x - xError, x + xError])]);
    const traces: Trace[] = [
      {
        kind: "line",
        name: null,
        colour: GREY,
        widthPt: SIZE.thin,
        dashPt: [],
        points: [
          { x: 0, y: y.min },
          { x: 0, y: y.max },
        ],
      },
      { kind: "points", name: null, colour: "#000000", marker: "circle", filled: true, sizePt: 2.8, points },
    ];
    return {
      tag: keys.length > 1 ? `(${"abc"[k]})` : null,
      weight: 1,
      x: { label: quotient(delta(symbols[key]!), UNIT.wavenumber), range: [low, high] },
      y: { label: [], range: [y.min, y.max], ready: y },
      traces,
      texts: [],
      legend: false,
    };
  });
  return compose(
    {
      name: "differences",
      widthMm,
      heightMm: heightFor(widthMm, keys.length * (0.3 + 0.1 * count)),
      caption: `Differences between ${listed([...new Set(comparisons.flatMap(({ first, second }) => [first, second]))])}, second less first, with 95 % intervals; grey: no difference.`,
      alt: `Differences of ${keys.length} quantities between ${count === 1 ? "one pair" : `${count} pairs`} of series as intervals about zero.`,
    },
    panels,
  );
}
