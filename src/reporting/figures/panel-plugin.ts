import type { SKRSContext2D } from "@napi-rs/canvas";
import type { Chart, Plugin } from "chart.js";
import { drawLegend } from "./draw-legend.ts";
import { drawRuns } from "./draw-text.ts";
import type { Panel, Point, Run, Side, Trace } from "./figure-spec.ts";
import { GAP, type Rect } from "./layout.ts";
import { SIZE } from "./style.ts";

/** What chart.js has not: error bars with caps, text made of runs, a frame, and a legend that shows marker and dash. */
export function panelPlugin(panel: Panel, strip: Rect, frame: Rect, px: number): Plugin<"scatter"> {
  const context = (chart: Chart) => chart.ctx as unknown as SKRSContext2D;
  // an area is two datasets, every other trace one
  const traceOf = panel.traces.flatMap<Trace>((trace) => (trace.kind === "area" ? [trace, trace] : [trace]));
  return {
    id: "panel",
    beforeDatasetDraw(chart, { index }) {
      const trace = traceOf[index]!;
      if (trace.kind === "points") drawBars(context(chart), chart, trace, frame, px);
    },
    afterDatasetsDraw(chart) {
      const ctx = context(chart);
      const at = toPixels(chart);
      for (const trace of panel.traces) {
        if (trace.kind !== "points") continue;
        for (const point of trace.points) drawPointText(ctx, point, at(point.x, point.y), trace, px);
      }
      for (const { x, y, runs, align, baseline } of panel.texts) {
        const [left, top] = at(x, y);
        drawRuns(ctx, runs, { x: left, y: top, align, baseline, sizePt: SIZE.small }, px);
      }
      ctx.strokeStyle = "#000000";
      ctx.lineWidth = SIZE.frame * px;
      ctx.strokeRect(frame.left, frame.top, frame.right - frame.left, frame.bottom - frame.top);
      if (panel.legend !== null) drawLegend(ctx, panel.traces, panel.legend, frame, px);
      drawLabels(ctx, panel, strip, frame, px);
    },
  };
}

function toPixels(chart: Chart): (x: number, y: number) => readonly [number, number] {
  const { x: across, y: up } = chart.scales;
  return (x, y) => [across!.getPixelForValue(x), up!.getPixelForValue(y)];
}

function drawBars(
  ctx: SKRSContext2D,
  chart: Chart,
  { points, colour }: Extract<Trace, { kind: "points" }>,
  frame: Rect,
  px: number,
): void {
  const at = toPixels(chart);
  const half = (SIZE.cap / 2) * px;
  ctx.save();
  ctx.beginPath();
  ctx.rect(frame.left, frame.top, frame.right - frame.left, frame.bottom - frame.top);
  ctx.clip();
  ctx.beginPath();
  for (const { x, y, xError, yError } of points) {
    if (yError !== undefined) {
      const [middle, low] = at(x, y - yError);
      const [, high] = at(x, y + yError);
      ctx.moveTo(middle, low);
      ctx.lineTo(middle, high);
      for (const end of [low, high]) {
        ctx.moveTo(middle - half, end);
        ctx.lineTo(middle + half, end);
      }
    }
    if (xError !== undefined) {
      const [left, middle] = at(x - xError, y);
      const [right] = at(x + xError, y);
      ctx.moveTo(left, middle);
      ctx.lineTo(right, middle);
      for (const end of [left, right]) {
        ctx.moveTo(end, middle - half);
        ctx.lineTo(end, middle + half);
      }
    }
  }
  ctx.strokeStyle = colour;
  ctx.lineWidth = SIZE.bar * px;
  ctx.setLineDash([]);
  ctx.stroke();
  ctx.restore();
}

const SIDES = {
  above: { dx: 0, dy: -1, align: "center", baseline: "bottom" },
  below: { dx: 0, dy: 1, align: "center", baseline: "top" },
  left: { dx: -1, dy: 0, align: "right", baseline: "middle" },
  right: { dx: 1, dy: 0, align: "left", baseline: "middle" },
} as const satisfies Record<Side, object>;

function drawPointText(
  ctx: SKRSContext2D,
  { text, textSide = "above" }: Point,
  [x, y]: readonly [number, number],
  { sizePt }: { readonly sizePt: number },
  px: number,
): void {
  if (text === undefined) return;
  const { dx, dy, align, baseline } = SIDES[textSide];
  const away = (sizePt / 2 + 1.5) * px;
  drawRuns(ctx, text, { x: x + dx * away, y: y + dy * away, align, baseline, sizePt: SIZE.small }, px);
}

function drawLabels(ctx: SKRSContext2D, panel: Panel, strip: Rect, frame: Rect, px: number): void {
  const label = (runs: readonly Run[], x: number, y: number, upright = false) => {
    if (runs.length === 0) return;
    drawRuns(ctx, runs, { x, y, align: "center", baseline: "middle", sizePt: SIZE.text, upright }, px);
  };
  const line = (GAP.edge + GAP.labelLine / 2) * px;
  const middle = (frame.left + frame.right) / 2;
  label(panel.x.label, middle, strip.bottom - line);
  label(panel.y.label, line, (frame.top + frame.bottom) / 2, true);
  if (panel.x2 !== undefined) label(panel.x2.label, middle, strip.top + line);
  if (panel.tag === null) return;
  const place = { x: GAP.edge * px, y: strip.top + GAP.edge * px, align: "left", baseline: "top" } as const;
  drawRuns(ctx, [{ text: panel.tag }], { ...place, sizePt: SIZE.text }, px);
}
