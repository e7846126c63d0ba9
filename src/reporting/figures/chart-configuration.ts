import type { ChartConfiguration, ChartDataset, Plugin, Scale, ScaleOptionsByType } from "chart.js";
import { FAMILY } from "./draw-text.ts";
import type { Axis, Marker, Panel, Trace } from "./figure-spec.ts";
import { GAP, type Rect } from "./layout.ts";
import { SIZE } from "./style.ts";
import { tickTexts } from "./ticks.ts";

type Dataset = ChartDataset<"scatter">;

const POINT_STYLES = {
  circle: "circle",
  square: "rect",
  triangle: "triangle",
  diamond: "rectRot",
  cross: "crossRot",
  plus: "cross",
} as const satisfies Record<Marker, string>;

/** Radii that make the marks look equally large. */
const RADIUS: Readonly<Record<Marker, number>> = {
  circle: 0.5,
  square: 0.62,
  triangle: 0.6,
  diamond: 0.6,
  cross: 0.62,
  plus: 0.58,
};

/** A colour with an opacity between 0 and 1. */
function translucent(colour: string, opacity: number): string {
  return `${colour}${Math.round(opacity * 255)
    .toString(16)
    .padStart(2, "0")}`;
}

/** Datasets of one trace, the uppermost first; an area is a pair of invisible lines with the room between them filled. */
function datasets(trace: Trace, order: number, px: number): readonly Dataset[] {
  if (trace.kind === "points") {
    const stroke = trace.marker === "cross" || trace.marker === "plus" ? SIZE.line : SIZE.thin;
    return [
      {
        data: trace.points.map(({ x, y }) => ({ x, y })),
        order,
        clip: false,
        pointStyle: POINT_STYLES[trace.marker],
        pointRadius: RADIUS[trace.marker] * trace.sizePt * px,
        pointBorderColor: trace.colour,
        pointBackgroundColor: trace.filled ? trace.colour : "#FFFFFF",
        pointBorderWidth: stroke * px,
      },
    ];
  }
  const line = { type: "line", order, clip: 0, pointRadius: 0, tension: 0 } as unknown as Dataset;
  if (trace.kind === "line") {
    const dash = trace.dashPt.map((length) => length * px);
    const drawn = { borderColor: trace.colour, borderWidth: trace.widthPt * px, borderDash: dash, showLine: true };
    return [{ ...line, ...drawn, data: trace.points.map(({ x, y }) => ({ x, y })) } as Dataset];
  }
  const edge = { ...line, borderWidth: 0, borderColor: "transparent", showLine: true };
  const fill = { fill: "+1", backgroundColor: translucent(trace.colour, trace.opacity) };
  return [
    { ...edge, ...fill, data: trace.points.map(({ x, high }) => ({ x, y: high })) } as unknown as Dataset,
    { ...edge, fill: false, data: trace.points.map(({ x, low }) => ({ x, y: low })) } as unknown as Dataset,
  ];
}

function scale(axis: Axis, texts: readonly string[], size: (scale: Scale) => void, px: number) {
  return {
    type: "linear",
    min: axis.min,
    max: axis.max,
    reverse: axis.reversed ?? false,
    border: { display: false },
    grid: { drawOnChartArea: false, tickLength: SIZE.tick * px, tickWidth: SIZE.frame * px, tickColor: "#000000" },
    ticks: {
      display: true,
      autoSkip: false,
      maxRotation: 0,
      padding: GAP.tick * px,
      color: "#000000",
      font: { family: `"${FAMILY.roman}"`, size: SIZE.small * px, lineHeight: 1 },
      callback: (_: unknown, index: number) => texts[index] ?? "",
    },
    afterBuildTicks: (built: Scale) => {
      built.ticks = axis.ticks.map((value) => ({ value }));
    },
    afterFit: (built: Scale) => {
      size(built);
      built.paddingLeft = built.paddingRight = built.paddingTop = built.paddingBottom = 0;
    },
  };
}

/**
 * What chart.js draws of a panel: axes, ticks, lines, areas and markers. `frame` and `strip` in px, `px` is pixels per pt.
 * Margins are set by us, so that axes of stacked panels stand one under the other.
 */
export function chartConfiguration(
  panel: Panel,
  strip: Rect,
  frame: Rect,
  px: number,
  plugins: readonly Plugin<"scatter">[],
): ChartConfiguration<"scatter"> {
  const bottom = (built: Scale) => {
    built.height = strip.bottom - frame.bottom;
  };
  const side = (built: Scale) => {
    built.width = frame.left;
  };
  const top = (built: Scale) => {
    built.height = frame.top - strip.top;
  };
  const far = panel.x2 && { ...panel.x, ticks: panel.x2.ticks.map(({ at }) => at) };
  const x2 = far && {
    x2: {
      ...scale(
        far,
        panel.x2!.ticks.map(({ text }) => text),
        top,
        px,
      ),
      axis: "x",
      position: "top",
    },
  };
  const scales = {
    x: { ...scale(panel.x, tickTexts(panel.x), bottom, px), position: "bottom" },
    y: { ...scale(panel.y, tickTexts(panel.y), side, px), position: "left" },
    ...x2,
  };
  const count = panel.traces.length;
  return {
    type: "scatter",
    data: { datasets: panel.traces.flatMap((trace, i) => datasets(trace, count - i, px)) },
    options: {
      animation: false,
      responsive: false,
      devicePixelRatio: 1,
      events: [],
      layout: {
        autoPadding: false,
        padding: { left: 0, bottom: 0, right: strip.right - frame.right, top: far ? 0 : frame.top - strip.top },
      },
      scales: scales as unknown as Record<string, ScaleOptionsByType<"linear">>,
      plugins: { legend: { display: false }, title: { display: false }, tooltip: { enabled: false } },
    },
    plugins: [...plugins],
  };
}
