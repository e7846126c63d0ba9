import { compose } from "../../src/reporting/figures/compose.ts";
import type { FigureSpec, Point, Trace } from "../../src/reporting/figures/figure-spec.ts";
import { GREY, SIZE, seriesStyle } from "../../src/reporting/figures/style.ts";
import { SYMBOL } from "../../src/reporting/figures/symbols.ts";
import { leaveOneOut } from "./leave-one-out.ts";
import type { WellFile } from "./read-well.ts";

/** Two terms on so many bands are shown. */
const BANDS = 5;

/** Leave-one-well-out as a picture: a row a well, fitted D0 and corrected range over the accepted D0. */
export function figure(wells: readonly WellFile[]): FigureSpec {
  const trials = leaveOneOut(wells, 2, BANDS).sort((a, b) => a.fit.d0 / a.well.d0 - b.fit.d0 / b.well.d0);
  const fitted: Point[] = trials.map(({ fit, well }, y) => ({ x: fit.d0 / well.d0, y }));
  const ranges = trials.flatMap(({ answer, well, outcome }, y) => {
    if ("reason" in answer || outcome === null) return [];
    const [low, high] = answer.correctedRange.map((x) => x / well.d0) as [number, number];
    return [{ holds: outcome.holds, point: { x: (low + high) / 2, y, xError: (high - low) / 2 } }];
  });
  const points = (name: string, index: number, filled: boolean, some: readonly Point[]): Trace => ({
    kind: "points",
    name,
    colour: seriesStyle(index).colour,
    marker: seriesStyle(index).marker,
    filled,
    sizePt: SIZE.marker,
    points: some,
  });
  const held = (yes: boolean) => ranges.filter(({ holds }) => holds === yes).map(({ point }) => point);
  return compose(
    {
      name: "empirical-error",
      widthMm: 85,
      heightMm: 115,
      caption: `Leave-one-well-out, two terms on the lowest ${BANDS} bands: D0 over accepted D0, in rising order of the fitted value. Circles: fitted; squares with bars: corrected 80 % range that holds the accepted value, the mark at its middle; triangles: range that misses it. Dashed: the accepted value.`,
      alt: `One row for each of ${trials.length} wells. The fitted D0 runs from ${fitted[0]!.x.toFixed(2)} to ${fitted.at(-1)!.x.toFixed(2)} of the accepted one; ${held(true).length} corrected ranges hold it, ${held(false).length} miss it.`,
    },
    [
      {
        tag: null,
        weight: 1,
        x: {
          label: [...SYMBOL.dissociationEnergy, { text: " / " }, ...SYMBOL.dissociationEnergy, { text: " (accepted)" }],
          range: [0.55, 1.75],
        },
        y: {
          label: [{ text: "" }],
          range: [-1, trials.length + 4],
          ready: {
            label: [{ text: "" }],
            min: -0.8,
            max: trials.length + 2.6,
            ticks: trials.map((_, y) => y),
            decimals: 0,
            tickLabels: trials.map(({ well }) => well.name),
          },
        },
        traces: [
          {
            kind: "line",
            name: null,
            colour: GREY,
            widthPt: SIZE.thin,
            dashPt: [3, 2],
            points: [
              { x: 1, y: -0.8 },
              { x: 1, y: trials.length - 0.5 },
            ],
          },
          points("corrected range, holds", 1, true, held(true)),
          points("corrected range, misses", 2, true, held(false)),
          points("fitted", 0, false, fitted),
        ],
        texts: [],
        legend: true,
      },
    ],
  );
}
